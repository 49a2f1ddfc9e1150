import { z } from 'zod';
import rows from '#fixtures/reference/check-values.json';

const rowSchema = z.object({
  id: z.string(), inputs: z.record(z.string(), z.unknown()), expected: z.record(z.string(), z.unknown()), tolerance: z.string(), source: z.string(),
  confidence: z.string(),
});

const table = z.array(rowSchema).parse(rows);

/** Every row id of the collection with its confidence. */
export const rowConfidence: ReadonlyMap<string, string> = new Map(table.map((row) => [row.id, row.confidence]));

/** Row of the outside collection: test name, and inputs and expected values checked against the shapes given. */
export function checkRow<Inputs extends z.ZodType, Expected extends z.ZodType>(id: string, inputs: Inputs, expected: Expected) {
  const row = table.find((candidate) => candidate.id === id);
  if (row === undefined) throw new Error(`The collection has no row ${id}.`);
  return { name: `${id}: ${row.source}`, inputs: inputs.parse(row.inputs), expected: expected.parse(row.expected), tolerance: row.tolerance };
}

/** Ids of the collection that begin with a prefix. */
export function rowIds(prefix: string): readonly string[] {
  return table.flatMap((row) => (row.id.startsWith(prefix) ? row.id : []));
}

export const numbers = z.array(z.number());

/** Largest relative difference between two lists of numbers. */
export function worstRelative(actual: readonly number[], expected: readonly number[]): number {
  if (actual.length !== expected.length) return Number.POSITIVE_INFINITY;
  return actual.reduce((worst, value, k) => {
    const target = expected[k] ?? Number.NaN;
    return Math.max(worst, Math.abs(value - target) / Math.abs(target));
  }, 0);
}

/** Largest absolute difference between two lists of numbers. */
export function worstAbsolute(actual: readonly number[], expected: readonly number[]): number {
  if (actual.length !== expected.length) return Number.POSITIVE_INFINITY;
  return actual.reduce((worst, value, k) => Math.max(worst, Math.abs(value - (expected[k] ?? Number.NaN))), 0);
}
