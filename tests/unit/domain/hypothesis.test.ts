import { describe, expect, test } from 'vitest';
import { hypothesisFormSchema, resultObstacles, suggestedTests } from '#app/domain/hypothesis-form.ts';
import { hypothesesHeading, hypothesisCard, hypothesisFields } from '#app/domain/hypothesis-view.ts';
import { isExaminedAlternative, noTests, untestedWithoutWhy } from '#app/domain/hypothesis.ts';
import type { FourTests } from '#app/domain/hypothesis.ts';

const filled: Record<string, string> = {
  kind: 'electrical',
  statement: 'A cable failed.',
  geometryResult: 'contradicts',
  geometryWhy: 'No cable within 3 m.',
  weatherResult: 'not-tested',
  weatherWhy: 'Not an idea about the sun.',
  energyResult: 'not-tested',
  energyWhy: '',
  markResult: 'contradicts',
  markWhy: '',
  result: 'ruled-out',
  testedById: '',
};
const tests: FourTests = {
  geometry: { result: 'contradicts', why: 'No cable within 3 m.' },
  weather: { result: 'not-tested', why: 'Not an idea about the sun.' },
  energy: { result: 'not-tested', why: '' },
  mark: { result: 'contradicts', why: '' },
};

describe('the form', () => {
  test('gathers the flat fields of the browser into four tests', () => {
    expect(hypothesisFormSchema.parse(filled)).toMatchObject({ kind: 'electrical', tests, testedById: null, predicts: '' });
  });

  test('and gives them back flat, so that editing starts from what was kept', () => {
    const draft = hypothesisFormSchema.parse(filled);
    expect(hypothesisFormSchema.parse(hypothesisFields(draft))).toEqual(draft);
  });

  test('asks for a statement, a kind and a result in sentences', () => {
    const refused = hypothesisFormSchema.safeParse({ ...filled, statement: '  ', kind: 'magic', result: undefined });
    expect(refused.error?.issues.map((issue) => [issue.path[0], issue.message])).toEqual([
      ['kind', 'Choose what kind of cause this is.'],
      ['statement', 'Say in a sentence what would have happened.'],
      ['result', 'Choose a result; "not tested" is one.'],
    ]);
  });
});

describe('an open test', () => {
  test('is one without a result and without a reason', () => {
    expect(untestedWithoutWhy(tests)).toEqual(['energy']);
    expect(untestedWithoutWhy(noTests)).toEqual(['geometry', 'weather', 'energy', 'mark']);
    expect(untestedWithoutWhy({ ...noTests, geometry: { result: 'not-tested', why: '   ' } })).toContain('geometry');
  });
});

describe('an alternative', () => {
  test.each([
    ['electrical', 'ruled-out', '', 'No cable.', true],
    ['electrical', 'possible', 'A cable ran there.', '', true],
    ['electrical', 'not-tested', '', 'No cable.', false],
    ['electrical', 'ruled-out', ' ', '', false],
    ['focused-sunlight', 'possible', 'The focus was there.', '', false],
  ] as const)('%s, %s, for "%s", against "%s": examined %s', (kind, result, evidenceFor, evidenceAgainst, examined) => {
    expect(isExaminedAlternative({ kind, result, evidenceFor, evidenceAgainst })).toBe(examined);
  });
});

describe('a result', () => {
  const supporting: FourTests = { ...tests, geometry: { result: 'supports', why: '' }, energy: { result: 'inconclusive', why: '' } };

  test('"probable" needs no open test and one that supports', () => {
    expect(resultObstacles('probable', { tests: supporting, evidenceAgainst: '' })).toEqual([]);
    expect(resultObstacles('probable', { tests, evidenceAgainst: '' })).toEqual([expect.stringContaining('for: energy'), expect.stringContaining('Elimination alone shows nothing')]);
  });

  test('"ruled out" needs a contradiction, in a test or in words', () => {
    expect(resultObstacles('ruled-out', { tests, evidenceAgainst: '' })).toEqual([]);
    expect(resultObstacles('ruled-out', { tests: noTests, evidenceAgainst: '' })).toHaveLength(1);
    expect(resultObstacles('ruled-out', { tests: noTests, evidenceAgainst: 'The room was locked.' })).toEqual([]);
  });

  test('"possible" and "not tested" need nothing', () => {
    expect(resultObstacles('possible', { tests: noTests, evidenceAgainst: '' })).toEqual([]);
    expect(resultObstacles('not-tested', { tests: noTests, evidenceAgainst: '' })).toEqual([]);
  });
});

test('the engine’s words are laid over the tests it speaks of, and over no other', () => {
  const suggestion = suggestedTests([{ test: 'geometry', result: 'supports', sentence: 'The beam met the mark.' }, { test: 'mark', result: 'not tested', sentence: 'A line focus carries no time.' }], tests);
  expect(suggestion).toEqual({ geometry: { result: 'supports', why: 'The beam met the mark.' }, weather: tests.weather, energy: tests.energy, mark: { result: 'not-tested', why: 'A line focus carries no time.' } });
});

test('a card whose outcome is hidden holds neither tests nor result', () => {
  const source = { id: 'a', kind: 'electrical' as const, statement: 'A cable failed.', predicts: 'Beads.\n\nA trip.', evidenceFor: '', evidenceAgainst: '', tests, result: 'ruled-out' as const, testedBy: 'A person', updatedAt: new Date('2026-02-05T10:00:00Z') };
  const card = hypothesisCard(source, { zone: 'Europe/London', outcomeShown: false });
  expect(card.outcome).toBeNull();
  expect(card.predicts).toEqual(['Beads.', 'A trip.']);
  expect(JSON.stringify(card)).not.toMatch(/ruled|contradicts/u);
});

test('the heading counts alternatives and never sums results up', () => {
  expect(hypothesesHeading([])).toBe('No hypothesis is recorded yet');
  expect(hypothesesHeading([{ kind: 'electrical', result: 'ruled-out' }])).toContain('not on the list yet');
  expect(hypothesesHeading([{ kind: 'focused-sunlight', result: 'possible' }, { kind: 'electrical', result: 'ruled-out' }, { kind: 'lightning', result: 'not-tested' }])).toBe('Focused sunlight: possible; 1 of 2 alternatives ruled out');
});
