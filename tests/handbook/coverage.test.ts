import { readFileSync, readdirSync } from 'node:fs';
import { expect, test } from 'vitest';
import { rowConfidence } from './check-row.ts';

/** Rows without a test, each with the reason. */
const withoutTest: ReadonlyMap<string, string> = new Map([
  ['ign-03', 'temperatures of rigid insulation foams, which are not among the target materials'],
  ['burn-01', 'words for tissue temperatures; the engine states burn times from measured tables and computes no tissue temperature'],
  ['case-02', 'temperatures reported from demonstrations without dimensions of bottle or target'],
  ['case-03', 'temperatures reported by the press without the place of the target'],
]);

const folder = new URL('.', import.meta.url);
const own = new URL(import.meta.url).pathname.split('/').at(-1);
const texts = readdirSync(folder).filter((name) => name.endsWith('.ts') && name !== own).map((name) => readFileSync(new URL(name, folder), 'utf8')).join('\n');

/** A row counts as tested where its id is written out, or where a test walks over every row of its group. */
function hasTest(id: string): boolean {
  const group = `rowIds('${id.slice(0, id.lastIndexOf('-') + 1)}')`;
  return texts.includes(`'${id}'`) || texts.includes(`"${id}"`) || texts.includes(`${id} `) || texts.includes(`${id}:`) || texts.includes(group);
}

test('every row that is not from memory has a test, or a reason why not', () => {
  const missing = [...rowConfidence].filter(([id, confidence]) => confidence !== 'memory' && !withoutTest.has(id) && !hasTest(id)).map(([id]) => id);
  expect(missing).toEqual([]);
});

test('no reason is kept for a row that has a test by now', () => {
  expect([...withoutTest.keys()].filter((id) => !rowConfidence.has(id) || texts.includes(`'${id}'`))).toEqual([]);
});
