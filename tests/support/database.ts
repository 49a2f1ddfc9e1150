import { execFile } from 'node:child_process';
import { createHash, randomUUID } from 'node:crypto';
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import postgres from 'postgres';

const projectRoot = fileURLToPath(new URL('../..', import.meta.url));
/** Any number will do, as long as everything that makes a template takes the same lock. */
const templateLock = 734_001;

export interface TestDatabase {
  readonly name: string;
  readonly url: string;
  /** Removes the database, ending connections that are still open. */
  readonly drop: () => Promise<void>;
}

/** Connection for creating and dropping databases; `npm test` sets it to a scratch cluster. */
export function adminUrl(): string {
  return process.env.TEST_DATABASE_ADMIN_URL ?? 'postgres://app@127.0.0.1:55432/postgres';
}

/** A new database with all migrations applied and no rows of its own. */
export async function createTestDatabase(): Promise<TestDatabase> {
  return cloneDatabase(await ensureTemplate(), 'test');
}

/** A copy of a database that nobody is connected to. @param prefix Start of the copy's name. */
export async function cloneDatabase(template: string, prefix: string): Promise<TestDatabase> {
  const name = `${prefix}_${randomUUID().replaceAll('-', '')}`;
  await withAdmin((sql) => sql.unsafe(`create database ${name} template ${template}`));
  return {
    name,
    url: urlFor(name),
    drop: async () => {
      await withAdmin((sql) => sql.unsafe(`drop database if exists ${name} with (force)`));
    },
  };
}

/**
 * Makes the database all others are copied from, once per state of `db/migrations`.
 *
 * @returns Its name.
 */
export async function ensureTemplate(): Promise<string> {
  const name = `template_${migrationsHash()}`;
  await withAdmin(async (sql) => {
    await sql`select pg_advisory_lock(${templateLock})`;
    const [found] = await sql<{ ready: string | null }[]>`
      select shobj_description(oid, 'pg_database') as ready from pg_database where datname = ${name}`;
    if (found?.ready === 'ready') return;
    await sql.unsafe(`drop database if exists ${name} with (force)`);
    await sql.unsafe(`create database ${name}`);
    await migrate(urlFor(name));
    await sql.unsafe(`comment on database ${name} is 'ready'`);
  });
  return name;
}

async function migrate(url: string): Promise<void> {
  await promisify(execFile)(process.execPath, ['--import', 'tsx', 'db/migrate.ts'], {
    cwd: projectRoot,
    env: { ...process.env, DATABASE_URL: url },
  });
}

function migrationsHash(): string {
  const folder = join(projectRoot, 'db', 'migrations');
  const hash = createHash('sha256');
  for (const entry of readdirSync(folder, { recursive: true, encoding: 'utf8' }).sort()) {
    if (entry.endsWith('.sql')) hash.update(entry).update(readFileSync(join(folder, entry)));
  }
  return hash.digest('hex').slice(0, 16);
}

function urlFor(database: string): string {
  const url = new URL(adminUrl());
  url.pathname = `/${database}`;
  return url.href;
}

async function withAdmin<Result>(use: (sql: postgres.Sql) => Promise<Result>): Promise<Result> {
  // One connection: the advisory lock belongs to it and is released with it.
  const sql = postgres(adminUrl(), { max: 1, onnotice: () => undefined });
  try {
    return await use(sql);
  } finally {
    await sql.end();
  }
}
