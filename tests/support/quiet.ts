import { afterEach, beforeEach, expect, vi } from 'vitest';

/**
 * An unexpected warning or error on the console fails the test. A test that provokes one on purpose replaces the spy:
 * `vi.spyOn(console, 'error').mockImplementation(() => {})`, and asserts what was said.
 */
const levels = ['error', 'warn'] as const;
const said: string[] = [];

beforeEach(() => {
  said.length = 0;
  for (const level of levels) {
    vi.spyOn(console, level).mockImplementation((...parts: unknown[]) => {
      said.push(`console.${level}: ${parts.map(String).join(' ')}`);
    });
  }
});

afterEach(() => {
  vi.restoreAllMocks();
  expect(said, 'nothing was written to the console').toEqual([]);
});
