import { z } from 'zod';

/** The only reader of the process environment. Every variable is explained in `.env.example`. */
const flag = z
  .enum(['true', 'false', '1', '0'])
  .transform((value) => value === 'true' || value === '1');

const environmentSchema = z.object({
  NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(1).max(65_535).default(3000),
  PUBLIC_URL: z.url().default('http://localhost:3000'),
  DATABASE_URL: z.string().default('postgres://app@127.0.0.1:55432/scorchline'),
  DATABASE_POOL_SIZE: z.coerce.number().int().min(1).max(100).default(8),
  S3_ENDPOINT: z.url().default('http://127.0.0.1:55433'),
  S3_REGION: z.string().default('eu-central-1'),
  S3_BUCKET: z.string().default('scorchline'),
  S3_ACCESS_KEY_ID: z.string().default('S3RVER'),
  S3_SECRET_ACCESS_KEY: z.string().default('S3RVER'),
  S3_FORCE_PATH_STYLE: flag.default(true),
  SMTP_URL: z.string().default('smtp://127.0.0.1:55434'),
  MAIL_FROM: z.string().default('Scorchline <register@scorchline.example>'),
  DEV_MAILBOX_DIR: z.string().optional(),
  TRUST_PROXY: z.coerce.number().int().min(0).max(10).default(0),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  SESSION_COOKIE_SECURE: flag.default(false),
  PHOTO_MAX_BYTES: z.coerce.number().int().positive().default(25 * 1024 * 1024),
  PHOTO_MAX_PIXELS: z.coerce.number().int().positive().default(60_000_000),
  WORKER_CONCURRENCY: z.coerce.number().int().min(1).max(32).default(1),
  WEATHER_API_URL: z.url().optional(),
  WEATHER_API_LICENCE: z.string().max(300).default(''),
  EMERGENCY_NUMBER: z.string().default('112'),
  MAP_TILE_URL: z.url().refine((url) => ['{z}', '{x}', '{y}'].every((part) => decodeURIComponent(url).includes(part)), 'write {z}, {x} and {y} where the numbers of a tile belong').optional(),
  MAP_TILE_ATTRIBUTION: z.string().default(''),
});

export type Environment = Readonly<z.infer<typeof environmentSchema>>;

function readEnvironment(): Environment {
  const withoutBlanks = Object.fromEntries(Object.entries(process.env).filter(([, value]) => value !== ''));
  const parsed = environmentSchema.safeParse(withoutBlanks);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The configuration cannot be used. ${lines.join('; ')}. See .env.example.`);
  }
  return Object.freeze(parsed.data);
}

export const env = readEnvironment();
