import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { ensureDebianPackages } from './debian-packages.mjs';
import { requirePort, waitForPort } from './ports.mjs';
import { startPostgres } from './postgres.mjs';
import { startService } from './processes.mjs';

const localBucket = 'scorchline';
// The stand-in knows this one pair only; it protects nothing and listens on loopback alone.
const localS3Keys = { S3_ACCESS_KEY_ID: 'S3RVER', S3_SECRET_ACCESS_KEY: 'S3RVER' };

/** Which of the three services the caller has configured elsewhere, and where the local ones live. */
export function readPlan(root, env) {
  const dataDir = env.LOCAL_DATA_DIR || join(root, '.data');
  return {
    dataDir,
    database: env.DATABASE_URL ? null : { port: Number(env.LOCAL_PG_PORT || 55432), portVariable: 'LOCAL_PG_PORT' },
    s3: env.S3_ENDPOINT ? null : { port: Number(env.LOCAL_S3_PORT || 55433), portVariable: 'LOCAL_S3_PORT' },
    mail: env.SMTP_URL ? null : { port: Number(env.LOCAL_SMTP_PORT || 55434), portVariable: 'LOCAL_SMTP_PORT' },
  };
}

/**
 * Starts the services that are not configured elsewhere.
 *
 * @param {{root: string, plan: ReturnType<typeof readPlan>, databaseDir: () => string, durable?: boolean, say: (line: string) => void, onStop: (name: string, stop: () => Promise<void>) => void}} options
 *   `databaseDir` is asked only once PostgreSQL is installed, since the answer depends on the system user that brings;
 *   `onStop` receives how to stop each part as soon as it runs, so that a failure half-way leaves nothing behind.
 * @returns {Promise<{env: Record<string, string>, database: Awaited<ReturnType<typeof startPostgres>> | null, processes: ReturnType<typeof startService>[]}>}
 *   `env` are the settings under which the application reaches them.
 */
export async function startServices({ root, plan, databaseDir, durable = true, say, onStop }) {
  const env = {};
  const processes = [];
  let database = null;
  mkdirSync(plan.dataDir, { recursive: true });
  if (plan.database) {
    await ensureDebianPackages(['postgres'], say);
    database = await startPostgres({ ...plan.database, dataDir: databaseDir(), durable, say });
    onStop('database', database.stop);
    await database.ensureDatabase('scorchline');
    env.DATABASE_URL = database.urlFor('scorchline');
  }
  if (plan.s3) {
    const folder = join(plan.dataDir, 's3');
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    processes.push(await startFake('s3', plan.s3, [folder, localBucket], root, onStop));
    Object.assign(env, localS3Keys, {
      S3_ENDPOINT: `http://127.0.0.1:${plan.s3.port}`,
      S3_REGION: 'eu-central-1',
      S3_BUCKET: localBucket,
      S3_FORCE_PATH_STYLE: 'true',
    });
  }
  if (plan.mail) {
    const folder = join(plan.dataDir, 'mail');
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    processes.push(await startFake('smtp', plan.mail, [folder], root, onStop));
    Object.assign(env, { SMTP_URL: `smtp://127.0.0.1:${plan.mail.port}`, DEV_MAILBOX_DIR: folder });
  }
  return { env, database, processes };
}

const fakeNames = { s3: 'object store stand-in', smtp: 'mail stand-in' };

async function startFake(kind, { port, portVariable }, args, root, onStop) {
  await requirePort(port, `the ${fakeNames[kind]}`, portVariable);
  const script = join(root, 'app', 'cli', 'fakes', `${kind}.mjs`);
  const service = startService({ name: fakeNames[kind], args: [script, String(port), ...args], cwd: root, env: process.env });
  onStop(service.name, service.stop);
  await waitForPort(port, service);
  return service;
}
