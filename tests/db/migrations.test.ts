import { execFile } from 'node:child_process';
import { cpSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { expect, test } from 'vitest';
import { createTestDatabase } from '#tests/support/database.ts';

const run = promisify(execFile);
const root = fileURLToPath(new URL('../..', import.meta.url));

test('applying the migrations a second time changes nothing', async () => {
  const database = await createTestDatabase();
  const env = { ...process.env, DATABASE_URL: database.url };
  await expect(run(process.execPath, ['--import', 'tsx', 'db/migrate.ts'], { cwd: root, env })).resolves.toBeDefined();
  await database.drop();
});

test('every change of the schema has its migration', async () => {
  const copy = mkdtempSync(join(tmpdir(), 'scorchline-migrations-'));
  try {
    cpSync(join(root, 'db', 'migrations'), copy, { recursive: true });
    const before = readdirSync(copy);
    const args = ['node_modules/drizzle-kit/bin.cjs', 'generate', '--dialect=postgresql', '--schema=./db/schema/*.ts', `--out=${copy}`, '--casing=snake_case'];
    await run(process.execPath, args, { cwd: root });
    expect(readdirSync(copy)).toEqual(before);
  } finally {
    rmSync(copy, { recursive: true, force: true });
  }
});
