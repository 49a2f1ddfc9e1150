import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test, vi } from 'vitest';

// Each test starts the command as a process of its own.
vi.setConfig({ testTimeout: 60_000 });

const folder = mkdtempSync(join(tmpdir(), 'reconstruct-'));
afterAll(() => rmSync(folder, { recursive: true }));

function run(...args: readonly string[]) {
  return spawnSync('npx', ['tsx', 'app/cli/reconstruct.ts', ...args], { encoding: 'utf8' });
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
