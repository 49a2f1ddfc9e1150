import { expect, test } from 'vitest';
import { exampleInput } from '#app/cli/example-input.ts';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';

test('the printed example passes the contract', () => {
  expect(parseReconstructionInput(JSON.parse(JSON.stringify(exampleInput)))).toMatchObject({ ok: true });
});

test('a misspelt field is refused instead of being taken for one left out', () => {
  const parsed = parseReconstructionInput({ ...exampleInput, sky: { ...exampleInput.sky, presureHpa: 1000 } });
  expect(parsed.ok).toBe(false);
  if (!parsed.ok) expect(parsed.problems[0]?.field).toBe('sky');
});

test('a value out of range names its field', () => {
  const parsed = parseReconstructionInput({ ...exampleInput, place: { ...exampleInput.place, longitudeDeg: 200 } });
  expect(parsed.ok).toBe(false);
  if (!parsed.ok) expect(parsed.problems).toContainEqual(expect.objectContaining({ field: 'place.longitudeDeg' }));
});

test('a time without an offset is refused: a bare local time is ambiguous', () => {
  const parsed = parseReconstructionInput({ ...exampleInput, window: { ...exampleInput.window, startUtc: '2025-03-12T11:00:00' } });
  expect(parsed.ok).toBe(false);
});
