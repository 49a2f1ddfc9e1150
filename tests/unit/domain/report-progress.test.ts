import { describe, expect, test } from 'vitest';
import type { CaseState } from '#app/domain/case-state.ts';
import { progressHeading, progressSteps, resultInWords } from '#app/domain/report-progress.ts';

const reportedAt = new Date('2026-05-09T14:41:00Z');
const steps = (state: CaseState, reachedAt: Partial<Record<CaseState, Date>> = {}, closedAt: Date | null = null) =>
  progressSteps({ state, closeReason: null, result: null }, { reportedAt, closedAt, reachedAt });
const day = (n: number) => new Date(Date.UTC(2026, 4, n));

describe('the line of states', () => {
  test('shows what was, what is and what is still to come', () => {
    expect(steps('triage', { triage: day(10) }).map(({ state, reached, now }) => [state, reached, now])).toEqual([
      ['reported', true, false],
      ['triage', true, true],
      ['investigation', false, false],
      ['findings', false, false],
      ['corrective-action', false, false],
      ['closed', false, false],
    ]);
  });

  test('gives no time to a state that is still to come, even if the case was there before', () => {
    const line = steps('investigation', { triage: day(10), investigation: day(11), findings: day(12) });
    expect(line.find(({ state }) => state === 'findings')).toMatchObject({ reached: false, at: null });
  });

  test('leaves out states that the case jumped over', () => {
    expect(steps('closed', { triage: day(10) }, day(11)).map(({ state }) => state)).toEqual(['reported', 'triage', 'closed']);
  });

  test('puts a question, or an earlier report, after the first look', () => {
    expect(steps('returned', { triage: day(10), returned: day(11) }).map(({ state }) => state)).toEqual(['reported', 'triage', 'returned', 'investigation', 'findings', 'corrective-action', 'closed']);
    expect(steps('duplicate', { triage: day(10) }).map(({ state }) => state)).toEqual(['reported', 'triage', 'duplicate']);
  });
});

describe('the result in plain words', () => {
  test.each([
    [{ certainty: 'probable', kind: 'focused-sunlight' }, 'Focused sunlight: the probable cause'],
    [{ certainty: 'possible', kind: 'electrical' }, 'Electrical: a possible cause'],
    [{ certainty: 'undetermined', kind: 'focused-sunlight' }, 'The cause could not be determined'],
    [{ certainty: 'probable', kind: null }, 'A result was signed'],
  ] as const)('%j', (result, words) => {
    expect(resultInWords(result)).toBe(words);
  });

  test('stands in the heading of a closed report, else the reason for closing', () => {
    expect(progressHeading({ state: 'closed', closeReason: null, result: { certainty: 'probable', kind: 'electrical' } })).toContain('Electrical');
    expect(progressHeading({ state: 'closed', closeReason: 'referred', result: null })).toContain('another body');
  });
});
