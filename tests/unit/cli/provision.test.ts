import { mkdtempSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { requirePort } from '#app/cli/provision/ports.mjs';
import { startPostgres } from '#app/cli/provision/postgres.mjs';
import { claimRun } from '#app/cli/provision/run-record.mjs';
import { readPlan } from '#app/cli/provision/services.mjs';

let folder = '';

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'scorchline-unit-'));
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

const silent = () => undefined;

describe('starting', () => {
  test('a busy port is refused with the setting that moves the service', async () => {
    const other = createServer();
    const port = await new Promise<number>((resolve) => {
      other.listen(0, '127.0.0.1', () => {
        const address = other.address();
        resolve(address !== null && typeof address === 'object' ? address.port : 0);
      });
    });
    await expect(requirePort(port, 'the web server', 'PORT', '127.0.0.1')).rejects.toThrow(
      `Port ${port}, wanted for the web server, is in use by another program: stop that program, or choose another port with PORT=<port>.`,
    );
    other.close();
  });

  test('a database folder of another version is named together with the version to install', async () => {
    const dataDir = join(folder, 'pg');
    mkdirSync(dataDir);
    writeFileSync(join(dataDir, 'PG_VERSION'), '9\n');
    await expect(startPostgres({ dataDir, port: 1, portVariable: 'LOCAL_PG_PORT', say: silent })).rejects.toThrow(/made by PostgreSQL 9, .* install postgresql-9, or set LOCAL_DATA_DIR/);
  });

  test('a folder with something else in it is never turned into a database', async () => {
    const dataDir = join(folder, 'pg');
    mkdirSync(dataDir);
    writeFileSync(join(dataDir, 'letters.txt'), 'mine');
    await expect(startPostgres({ dataDir, port: 1, portVariable: 'LOCAL_PG_PORT', say: silent })).rejects.toThrow(/holds files but no PostgreSQL database/);
    expect(readFileSync(join(dataDir, 'letters.txt'), 'utf8')).toBe('mine');
  });

  test('services that are configured elsewhere are not started here', () => {
    const plan = readPlan('/project', { DATABASE_URL: 'postgres://db.example/x', SMTP_URL: 'smtp://mail.example' });
    expect(plan).toMatchObject({ database: null, mail: null, s3: { port: 55433 } });
  });
});

describe('claimRun', () => {
  test('a record of a process that no longer runs does not hinder a start', async () => {
    const file = join(folder, 'run.json');
    writeFileSync(file, JSON.stringify({ pid: 2 ** 22 + 1, url: 'http://localhost:1', children: [] }));
    const record = await claimRun(file, folder, 'http://localhost:3000');
    expect(JSON.parse(readFileSync(file, 'utf8'))).toMatchObject({ pid: process.pid, url: 'http://localhost:3000' });
    record.release();
  });

  test('a record that was cut off does not hinder a start', async () => {
    const file = join(folder, 'run.json');
    writeFileSync(file, '{"pid": 1');
    await expect(claimRun(file, folder, 'http://localhost:3000')).resolves.toBeDefined();
  });
});
