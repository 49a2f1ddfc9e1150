import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { asksReason, missingInput, moveEvent, needsOf } from '#app/domain/case-move.ts';
import type { MoveFacts } from '#app/domain/case-state.ts';
import { caseStates, findMove, moves, movesFrom } from '#app/domain/case-state.ts';
import { fieldOfNeed, isReady, moveChecklist } from '#app/domain/move-checklist.ts';

/**
 * From the table of states in the requirements: from, to. The finding is passed on to action by signing it, or by the
 * manager after a signature that said that no action is needed; that signature leaves the state as it is.
 */
const agreed = [
  'reported>triage', 'triage>returned', 'returned>triage', 'triage>duplicate', 'triage>investigation', 'triage>corrective-action', 'triage>closed',
  'investigation>findings', 'findings>investigation', 'findings>corrective-action', 'findings>corrective-action', 'findings>findings', 'findings>closed', 'corrective-action>closed', 'corrective-action>investigation',
  'closed>investigation', 'closed>corrective-action', 'duplicate>triage',
];

const nothing: MoveFacts = {
  eventType: null, hazardStillPresent: null, interimControl: null, investigatorId: null, risk: null, anyoneHurt: null, onsetEarliestAt: null, onsetLatestAt: null, opticStated: false,
  attachedReconstructions: 0, reconstructionWaiver: null, alternativesExamined: 0, focusedHypotheses: 0, untestedWithoutWhy: 4, photoCount: 0, evidenceWaiver: null, finding: null,
  openReviewComments: 0, actionsOpen: 0, actionsUnproven: 0, actionsNotEffective: 0, effectivenessWaiver: null, noActionReason: null, lesson: null, externalReports: null, closedAt: null,
};
const draft = { authorId: 'author', state: 'draft', limits: 'No skyline.', opinion: 'Focused sunlight.', certainty: 'possible' };
const complete: MoveFacts = {
  ...nothing, eventType: 'near-miss', hazardStillPresent: 'no', investigatorId: 'person', risk: 'low', anyoneHurt: 'no', onsetEarliestAt: new Date(0), onsetLatestAt: new Date(1), opticStated: true,
  attachedReconstructions: 1, alternativesExamined: 2, focusedHypotheses: 1, untestedWithoutWhy: 0, photoCount: 1, finding: draft, lesson: 'Look up.', externalReports: 'Not needed.',
};
const move = (id: string) => {
  const found = findMove(id);
  if (!found) throw new Error(`no move ${id}`);
  return found;
};
const needs = (id: string, change: Partial<MoveFacts>) => needsOf(move(id), { ...complete, ...change });

test('the moves are those of the requirements', () => {
  expect(moves.map(({ from, to }) => `${from}>${to}`).sort()).toEqual([...agreed].sort());
});

test('every state can be left, and each move is found by its id', () => {
  for (const state of caseStates) expect(movesFrom(state).length).toBeGreaterThan(0);
  expect(new Set(moves.map(({ id }) => id)).size).toBe(moves.length);
  expect(findMove('no-such-move')).toBeUndefined();
});

test('every move has an event of its own in the log', () => {
  for (const { id } of moves) expect(moveEvent(id)).not.toBe('case.moved');
});

describe('opening the investigation', () => {
  test('needs nothing more when all is there', () => expect(needs('accept', {})).toEqual([]));
  test.each([
    [{ eventType: null }, 'kind of event'],
    [{ hazardStillPresent: null }, 'hazard'],
    [{ hazardStillPresent: 'yes' }, 'interim control'],
    [{ investigatorId: null }, 'investigator'],
    [{ risk: null }, 'risk'],
  ] as const)('with %j asks for it', (change, word) => {
    const sentences = needs('accept', change);
    expect(sentences).toHaveLength(1);
    expect(sentences[0]).toContain(word);
  });
  test('takes a hazard that is still there once it is controlled', () => expect(needs('accept', { hazardStillPresent: 'yes', interimControl: 'Sheet over it.' })).toEqual([]));
});

describe('going straight to action', () => {
  test('is for undesired circumstances', () => {
    expect(needs('straight-to-action', { eventType: 'undesired-circumstance' })).toEqual([]);
    expect(needs('straight-to-action', { eventType: 'fire' })).toHaveLength(1);
  });
  test.each(['yes', 'dont-know', null])('is closed when hurt is %j', (anyoneHurt) => {
    expect(needs('straight-to-action', { eventType: 'undesired-circumstance', anyoneHurt })).toHaveLength(1);
  });
});

describe('sending the finding', () => {
  test('needs nothing more when all is there', () => expect(needs('send-findings', {})).toEqual([]));
  test.each([
    [{ onsetEarliestAt: null }, 'onset window'],
    [{ onsetLatestAt: null }, 'onset window'],
    [{ opticStated: false }, 'optic'],
    [{ attachedReconstructions: 0 }, 'reconstruction'],
    [{ focusedHypotheses: 0 }, 'focused-sunlight'],
    [{ alternativesExamined: 1 }, 'two alternatives'],
    [{ untestedWithoutWhy: 1 }, 'four tests'],
    [{ photoCount: 0 }, 'photo'],
    [{ finding: null }, 'opinion'],
    [{ finding: { ...draft, opinion: ' ' } }, 'opinion'],
    [{ finding: { ...draft, limits: ' ' } }, 'limits'],
  ] as const)('with %j asks for it', (change, word) => {
    const sentences = needs('send-findings', change);
    expect(sentences).toHaveLength(1);
    expect(sentences[0]).toContain(word);
  });
  test('takes a stated reason in place of a reconstruction and of photos', () => {
    expect(needs('send-findings', { attachedReconstructions: 0, reconstructionWaiver: 'Optic gone.', photoCount: 0, evidenceWaiver: 'Repaired before.' })).toEqual([]);
  });
});

describe('review', () => {
  test('sends back only with a comment', () => {
    expect(needs('send-back', { openReviewComments: 0 })).toHaveLength(1);
    expect(needs('send-back', { openReviewComments: 1 })).toEqual([]);
  });
  test('signs only when no comment is open', () => {
    expect(needs('sign', { openReviewComments: 1 })).toHaveLength(1);
    expect(needs('sign', { openReviewComments: 0 })).toEqual([]);
  });
});

describe('no action needed', () => {
  const signed = { finding: { ...draft, state: 'signed' }, noActionReason: 'The lamp is gone.' };
  test('is signed like any finding, once', () => {
    expect(needs('sign-no-action', { openReviewComments: 0 })).toEqual([]);
    expect(needs('sign-no-action', { openReviewComments: 1 })).toHaveLength(1);
    for (const id of ['sign', 'sign-no-action', 'send-back']) expect(needs(id, { ...signed, openReviewComments: id === 'send-back' ? 1 : 0 }).join()).toContain('signed already');
  });
  test('closes when all is there', () => expect(needs('close-no-action', signed)).toEqual([]));
  test.each([
    [{ ...signed, finding: draft }, 'signs the finding first'],
    [{ ...signed, finding: null }, 'signs the finding first'],
    [{ ...signed, noActionReason: null }, 'no action is needed, and why'],
    [{ ...signed, openReviewComments: 1 }, 'comment'],
    [{ ...signed, actionsOpen: 3 }, '3 still open'],
    [{ ...signed, hazardStillPresent: 'yes', interimControl: 'Sheet.' }, 'still there'],
  ] as const)('with %j asks for it', (change, word) => {
    const sentences = needs('close-no-action', change);
    expect(sentences).toHaveLength(1);
    expect(sentences[0]).toContain(word);
  });
  test('is passed to action after all only once it is signed', () => {
    expect(needs('pass-to-action', signed)).toEqual([]);
    expect(needs('pass-to-action', { finding: draft })).toHaveLength(1);
  });
});

describe('closing', () => {
  const signed = { finding: { ...draft, state: 'signed' } };
  test('needs nothing more when all is there', () => expect(needs('close', signed)).toEqual([]));
  test.each([
    [{ finding: draft }, 'signs'],
    [{ ...signed, openReviewComments: 1 }, 'comment'],
    [{ ...signed, actionsOpen: 2 }, '2 still open'],
    [{ ...signed, actionsUnproven: 1 }, 'sun is back'],
    [{ ...signed, actionsNotEffective: 1 }, 'not effective'],
    [{ ...signed, lesson: null }, 'lesson'],
    [{ ...signed, externalReports: null }, 'outside bodies'],
  ] as const)('with %j asks for it', (change, word) => {
    const sentences = needs('close', change);
    expect(sentences).toHaveLength(1);
    expect(sentences[0]).toContain(word);
  });
  test('takes a waiver for an effect that was not shown, never for an action that failed', () => {
    expect(needs('close', { ...signed, actionsUnproven: 1, effectivenessWaiver: 'Glass removed.' })).toEqual([]);
    expect(needs('close', { ...signed, actionsNotEffective: 1, effectivenessWaiver: 'Glass removed.' })).toHaveLength(1);
  });
  test('needs no signature where there never was a finding', () => expect(needs('close', { finding: null })).toEqual([]));
});

describe('what is typed with a move', () => {
  const now = new Date('2026-07-16T09:00:00Z');
  const typed = (id: string, reason: string, extra: object = {}, since = now) => Object.keys(missingInput(move(id), { reason, extra, now, since }));

  test.each(['mark-duplicate', 'straight-to-action', 'close-at-triage', 'sign-no-action', 'close-no-action', 'pass-to-action', 'back-to-investigation', 'reopen-investigation', 'reopen-action'])('%s needs a reason that is more than spaces', (id) => {
    expect(typed(id, '  ')).toContain('reason');
    expect(typed(id, 'A new fact.')).not.toContain('reason');
    expect(asksReason(id)).toBe(true);
  });
  test('returning needs the question and a later day', () => {
    expect(typed('return', '')).toEqual(['question', 'answerDueAt']);
    expect(typed('return', '', { question: 'Which door?', answerDueAt: now })).toEqual(['answerDueAt']);
    expect(typed('return', '', { question: 'Which door?', answerDueAt: new Date(now.getTime() + 1) })).toEqual([]);
  });
  test('undoing a duplicate needs a reason only after 30 days', () => {
    expect(typed('undo-duplicate', '', {}, new Date('2026-06-16T09:00:00Z'))).toEqual([]);
    expect(typed('undo-duplicate', '', {}, new Date('2026-06-16T08:59:59Z'))).toEqual(['reason']);
  });
});

describe('the checklist', () => {
  const facts = fc.record({
    eventType: fc.constantFrom(null, 'fire', 'undesired-circumstance'),
    hazardStillPresent: fc.constantFrom(null, 'yes', 'no'),
    interimControl: fc.constantFrom(null, 'Sheet over it.'),
    investigatorId: fc.constantFrom(null, 'person'),
    risk: fc.constantFrom(null, 'low'),
    anyoneHurt: fc.constantFrom('yes', 'no', 'dont-know'),
    onsetEarliestAt: fc.constantFrom(null, new Date(0)),
    onsetLatestAt: fc.constantFrom(null, new Date(1)),
    opticStated: fc.boolean(),
    attachedReconstructions: fc.integer({ min: 0, max: 1 }),
    reconstructionWaiver: fc.constantFrom(null, 'Optic gone.'),
    alternativesExamined: fc.integer({ min: 0, max: 3 }),
    focusedHypotheses: fc.integer({ min: 0, max: 1 }),
    untestedWithoutWhy: fc.integer({ min: 0, max: 1 }),
    photoCount: fc.integer({ min: 0, max: 1 }),
    evidenceWaiver: fc.constantFrom(null, 'Repaired.'),
    finding: fc.constantFrom(null, draft, { ...draft, state: 'signed' }, { ...draft, limits: '' }, { ...draft, opinion: '' }),
    openReviewComments: fc.integer({ min: 0, max: 1 }),
    actionsOpen: fc.integer({ min: 0, max: 1 }),
    actionsUnproven: fc.integer({ min: 0, max: 1 }),
    actionsNotEffective: fc.integer({ min: 0, max: 1 }),
    effectivenessWaiver: fc.constantFrom(null, 'Glass removed.'),
    noActionReason: fc.constantFrom(null, 'Lamp already replaced.'),
    lesson: fc.constantFrom(null, 'Look up.'),
    externalReports: fc.constantFrom(null, 'Not needed.'),
    closedAt: fc.constant(null),
  });

  test.each(moves.map(({ id }) => id))('of %s is all ticked exactly when nothing is needed', (id) => {
    fc.assert(fc.property(facts, (generated) => {
      const ticked = moveChecklist(move(id), generated).every((item) => item.done);
      expect(ticked).toBe(needsOf(move(id), generated).length === 0);
    }));
  });

  test('leaves a closing ready when only its own form is still empty', () => {
    const signed = { ...complete, finding: { ...draft, state: 'signed' } };
    expect(isReady(move('close'), { ...signed, lesson: null, externalReports: null, actionsUnproven: 1 })).toBe(true);
    expect(isReady(move('close'), { ...signed, actionsOpen: 1 })).toBe(false);
  });
});

test('a need that the form of the move can fill in stands beside its field, and the others do not', () => {
  const fieldsOf = (id: string, change: Partial<MoveFacts>) => needs(id, change).map((sentence) => fieldOfNeed(id, sentence));
  expect(fieldsOf('close', { finding: { ...draft, state: 'signed' }, lesson: null, externalReports: null, actionsUnproven: 1 })).toEqual(['effectivenessWaiver', 'lesson', 'externalReports']);
  expect(fieldsOf('close', { finding: { ...draft, state: 'signed' }, actionsOpen: 1, openReviewComments: 1 })).toEqual([null, null]);
  expect(fieldsOf('send-findings', { attachedReconstructions: 0, photoCount: 0 })).toEqual(['reconstructionWaiver', 'evidenceWaiver']);
});
