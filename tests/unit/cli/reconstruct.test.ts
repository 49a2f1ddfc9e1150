import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test, vi } from 'vitest';
import { z } from 'zod';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

// Each test starts the command as a process of its own.
vi.setConfig({ testTimeout: 60_000 });

const folder = mkdtempSync(join(tmpdir(), 'reconstruct-'));
afterAll(() => rmSync(folder, { recursive: true }));

function run(...args: readonly string[]) {
  return spawnSync(process.execPath, ['--import', 'tsx', 'app/cli/reconstruct.ts', ...args], { encoding: 'utf8' });
}

function inputFile(name: string, content: string): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

test('the printed example is an input that the command accepts', () => {
  const example = run('--example');
  expect(example.status).toBe(0);
  const result = run(inputFile('example.json', example.stdout));
  expect(result.stderr).toBe('');
  expect(result.status).toBe(0);
  expect(JSON.parse(result.stdout)).toMatchObject({ grade: { word: expect.any(String) }, seed: 20250312 });
});

test('bad input ends with a sentence that names the field, and prints no result', () => {
  const result = run(inputFile('bad.json', '{"place": {"latitudeDeg": 95}}'));
  expect(result.status).toBe(1);
  expect(result.stdout).toBe('');
  expect(result.stderr).toContain('place.latitudeDeg');
});

test('a file that is no JSON is named', () => {
  const result = run(inputFile('broken.json', '{"place":'));
  expect(result.status).toBe(1);
  expect(result.stderr).toContain('broken.json is not JSON');
});

test('the record of a run gives its stored result again, byte for byte, and says so', () => {
  const { input } = z.object({ input: z.unknown() }).parse({ input: JSON.parse(run('--example').stdout) });
  const parsed = parseReconstructionInput(input);
  if (!parsed.ok) throw new Error('The example was refused.');
  const quick = { ...parsed.input, rays: 1_000, samples: 64 };
  const stored = reconstruct(quick);
  const record = { caseNumber: 7, number: 1, engineVersion, zoneRules: '2025b', inputHash: hashOf(quick), resultHash: hashOf(stored), input: quick, result: stored };
  const again = run(inputFile('record.json', canonicalJson(record)));
  expect(again.status).toBe(0);
  expect(again.stdout).toBe(canonicalJson(stored));
  expect(createHash('sha256').update(again.stdout).digest('hex')).toBe(record.resultHash);
  expect(again.stderr).toContain('The same bytes as the record');
  const other = run(inputFile('other.json', canonicalJson({ ...record, input: { ...quick, seed: quick.seed + 1 } })));
  expect(other.status).toBe(2);
  expect(other.stderr).toContain('Not the bytes of the record');
});
