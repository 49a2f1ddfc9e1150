import { describe, expect, test } from 'vitest';
import { firstLookDue, firstLookView } from '#app/domain/first-look.ts';

/** Expected instants are counted by hand on the calendar of 2026: 27 February is a Friday, 29 March a Sunday. */
describe('the clock of the first look', () => {
  test.each([
    ['in the middle of a morning', '2026-02-26T10:00:00Z', '2026-02-26T14:00:00Z'],
    ['before the desk opens', '2026-02-26T06:30:00Z', '2026-02-26T13:00:00Z'],
    ['late on a Thursday it runs on into Friday', '2026-02-26T15:30:00Z', '2026-02-27T11:30:00Z'],
    ['late on a Friday it runs on into Monday', '2026-02-27T16:00:00Z', '2026-03-02T12:00:00Z'],
    ['on a Saturday it starts on Monday', '2026-02-28T12:00:00Z', '2026-03-02T13:00:00Z'],
  ])('%s', (_when, reported, due) => {
    expect(firstLookDue(new Date(reported), 'Europe/London', false).toISOString()).toBe(new Date(due).toISOString());
  });

  test('goes by the wall clock of the place across the change to summer time', () => {
    // Friday 27 March 16:00 is UTC+0 in London, Monday 30 March 12:00 is UTC+1.
    expect(firstLookDue(new Date('2026-03-27T16:00:00Z'), 'Europe/London', false).toISOString()).toBe('2026-03-30T11:00:00.000Z');
    expect(firstLookDue(new Date('2026-02-26T22:30:00Z'), 'Australia/Sydney', false).toISOString()).toBe('2026-02-27T02:30:00.000Z');
  });

  test('is one hour on any day where the hazard is there or somebody was hurt', () => {
    expect(firstLookDue(new Date('2026-02-28T23:10:00Z'), 'Europe/London', true).toISOString()).toBe('2026-03-01T00:10:00.000Z');
  });

  test.each([
    ['2026-02-26T13:32:00Z', '28 min left', false],
    ['2026-02-26T10:30:00Z', 'due today 14:00', false],
    ['2026-02-26T14:48:00Z', '48 min late', true],
    ['2026-02-28T14:00:00Z', '2 days late', true],
  ])('at %s says "%s"', (now, words, late) => {
    expect(firstLookView({ reportedAt: new Date('2026-02-26T10:00:00Z'), zone: 'Europe/London', urgent: false }, new Date(now))).toMatchObject({ words, late });
  });
});
