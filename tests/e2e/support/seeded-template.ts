import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import type { TestProject } from 'vitest/node';
import { cloneDatabase, ensureTemplate } from '#tests/support/database.ts';
import { objectStoreEnv } from '#tests/support/object-store.ts';
import { projectRoot } from './app-process.ts';

declare module 'vitest' {
  interface ProvidedContext {
    seededTemplate: string;
  }
}

/**
 * Fills one database with the demonstration before the browser tests; each of them works on a copy, so that none sees
 * what another did.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const seeded = await cloneDatabase(await ensureTemplate(), 'seeded');
  await promisify(execFile)(process.execPath, ['--import', 'tsx', 'db/seed.ts'], {
    cwd: projectRoot,
    env: { ...process.env, ...objectStoreEnv(), NODE_ENV: 'test', DATABASE_URL: seeded.url },
    maxBuffer: 64 * 1024 * 1024,
  });
  project.provide('seededTemplate', seeded.name);
  return seeded.drop;
}
