import { describe, expect, test } from 'vitest';
import { moves } from '#app/domain/case-state.ts';
import { isHarmless, mailHoldSeconds, stateBefore, undoGraceSeconds, undoLeftMs, undoLeftWords, undoSeconds, whyLasting } from '#app/domain/move-undo.ts';

/** As agreed: nothing signed or frozen, no copy made for somebody, nobody's work ended. */
const table: Readonly<Record<string, boolean>> = {
  'open-triage': true,
  return: true,
  answer: true,
  'mark-duplicate': true,
  'undo-duplicate': false,
  accept: true,
  'straight-to-action': true,
  'close-at-triage': false,
  'send-findings': true,
  'send-back': false,
  sign: false,
  'sign-no-action': false,
  'close-no-action': false,
  'pass-to-action': true,
  close: false,
  'back-to-investigation': true,
  'reopen-investigation': true,
  'reopen-action': true,
};

describe('which moves may be taken back', () => {
  test('is decided for every move', () => {
    expect(Object.fromEntries(moves.map(({ id }) => [id, isHarmless(id)]))).toEqual(table);
  });

  test('every lasting one says why in a sentence of its own, and a move that is not known lasts', () => {
    for (const { id } of moves) {
      if (isHarmless(id)) expect(whyLasting(id)).toBeNull();
      else expect(whyLasting(id)).toMatch(/^(?!This move is not undone)[A-Z].*\.$/u);
    }
    expect(isHarmless('no-such-move')).toBe(false);
    expect(whyLasting('no-such-move')).not.toBeNull();
  });

  test('none of them ends at a closed case or at a signature', () => {
    for (const { id, to } of moves.filter((move) => isHarmless(move.id))) {
      expect(to).not.toBe('closed');
      expect(id).not.toMatch(/^sign/u);
    }
  });
});

describe('the time for it', () => {
  test('is ten seconds, and mail waits longer than they and the way to the server', () => {
    expect(undoSeconds).toBe(10);
    expect(mailHoldSeconds).toBeGreaterThan(undoSeconds + undoGraceSeconds);
  });

  test('runs down to nothing, in words', () => {
    expect(undoLeftMs(0)).toBe(10_000);
    expect(undoLeftMs(9.5)).toBe(500);
    expect(undoLeftMs(60)).toBe(0);
    expect([10_000, 9_001, 1_000, 1].map(undoLeftWords)).toEqual(['10 seconds left', '10 seconds left', '1 second left', '1 second left']);
  });
});

test('columns from the log come back as what they were, instants included, and an unknown one is refused', () => {
  const kept = { state: 'closed', closedAt: new Date('2026-05-09T12:00:00Z'), closeReason: null, reopenCount: 2 };
  expect(stateBefore.parse(JSON.parse(JSON.stringify(kept)))).toEqual(kept);
  expect(stateBefore.safeParse({ state: 'triage', narrative: 'other words' }).success).toBe(false);
});
