import { afterAll } from 'vitest';
import { createTestDatabase } from './database.ts';
import { objectStoreEnv } from './object-store.ts';

/**
 * Gives each test file a database of its own. It runs before the file's imports, so that whatever reads the settings
 * on import sees this database and never another.
 */
const database = await createTestDatabase();

const settings = {
  NODE_ENV: 'test',
  DATABASE_URL: database.url,
  PUBLIC_URL: 'http://scorchline.test',
  ...objectStoreEnv(),
  SMTP_URL: process.env.SMTP_URL ?? 'smtp://127.0.0.1:55434',
  MAIL_FROM: 'Scorchline <no-reply@scorchline.test>',
  LOG_LEVEL: 'silent',
};
Object.assign(process.env, settings);

afterAll(async () => {
  const { closeDatabase } = await import('#db/client.server.ts');
  await closeDatabase();
  await database.drop();
});
