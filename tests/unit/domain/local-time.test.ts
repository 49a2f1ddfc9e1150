import { describe, expect, test } from 'vitest';
import { daysBetween, formatClock, formatDay, formatDayClock, formatIsoDay, formatOffset, formatWeekday, fromLocalInput, isZone, localDay, toLocalInput } from '#app/domain/local-time.ts';

/**
 * Published clock changes of 2026.
 * London: forward at 01:00 on 29 March, back at 02:00 on 25 October (GOV.UK, "When do the clocks change?").
 * New York: forward at 02:00 on 8 March, back at 02:00 on 1 November (Energy Policy Act of 2005, section 110; NIST, "Daylight Saving Time").
 * Sydney: back at 03:00 on 5 April, forward at 02:00 on 4 October (NSW Government, "Daylight saving").
 * Lord Howe Island: back by half an hour at 02:00 on 5 April (IANA time zone database, file `australasia`).
 */
const reading = (local: string, zone: string, which?: 'first' | 'second') => {
  const read = fromLocalInput(local, zone, which);
  if (read.kind === 'instant') return read.instant.toISOString();
  if (read.kind === 'fold') return [read.first.toISOString(), read.second.toISOString()];
  return read.kind === 'gap' ? 'gap' : read.kind;
};

describe('a wall-clock time that the clock skipped', () => {
  test.each([
    ['2026-03-29T01:00', 'Europe/London'],
    ['2026-03-29T01:59', 'Europe/London'],
    ['2026-03-08T02:30', 'America/New_York'],
    ['2026-10-04T02:15', 'Australia/Sydney'],
  ])('%s in %s does not exist', (local, zone) => {
    expect(reading(local, zone)).toBe('gap');
    expect(reading(local, zone, 'first')).toBe('gap');
  });

  test('names a time that did exist, as far past the change', () => {
    const read = fromLocalInput('2026-03-29T01:30', 'Europe/London');
    expect(read.kind === 'gap' ? formatClock(read.after, 'Europe/London') : read.kind).toBe('02:30');
  });

  test.each([
    ['2026-03-29T00:59', 'Europe/London', '2026-03-29T00:59:00.000Z'],
    ['2026-03-29T02:00', 'Europe/London', '2026-03-29T01:00:00.000Z'],
    ['2026-03-08T01:59', 'America/New_York', '2026-03-08T06:59:00.000Z'],
    ['2026-03-08T03:00', 'America/New_York', '2026-03-08T07:00:00.000Z'],
  ])('%s in %s, beside the change, is one instant', (local, zone, instant) => {
    expect(reading(local, zone)).toBe(instant);
  });
});

describe('a wall-clock time that the clock showed twice', () => {
  test.each([
    ['2026-10-25T01:30', 'Europe/London', ['2026-10-25T00:30:00.000Z', '2026-10-25T01:30:00.000Z']],
    ['2026-11-01T01:30', 'America/New_York', ['2026-11-01T05:30:00.000Z', '2026-11-01T06:30:00.000Z']],
    ['2026-04-05T02:30', 'Australia/Sydney', ['2026-04-04T15:30:00.000Z', '2026-04-04T16:30:00.000Z']],
    ['2026-04-05T01:45', 'Australia/Lord_Howe', ['2026-04-04T14:45:00.000Z', '2026-04-04T15:15:00.000Z']],
  ])('%s in %s is two instants, earlier first', (local, zone, instants) => {
    expect(reading(local, zone)).toEqual(instants);
    expect([reading(local, zone, 'first'), reading(local, zone, 'second')]).toEqual(instants);
  });

  test.each([
    ['2026-10-25T00:59', '2026-10-24T23:59:00.000Z'],
    ['2026-10-25T02:00', '2026-10-25T02:00:00.000Z'],
  ])('%s in London, beside the change, is one instant', (local, instant) => {
    expect(reading(local, 'Europe/London')).toBe(instant);
  });
});

test.each(['', 'yesterday', '2026-02-30T10:00', '2026-05-09T25:00'])('%j is no time', (local) => {
  expect(reading(local, 'Europe/London')).toBe('unreadable');
});

describe('an instant in the clock of a place', () => {
  // 4 July 2026 was a Saturday; New York keeps UTC-4 then.
  const night = new Date('2026-07-05T03:05:30Z');

  test('is written with the day of the place, not that of UTC', () => {
    expect(formatDay(night, 'America/New_York')).toBe('4 Jul 2026');
    expect(formatWeekday(night, 'America/New_York')).toBe('Sat 4 Jul 2026');
    expect(formatDayClock(night, 'America/New_York')).toBe('4 Jul 2026, 23:05');
    expect(localDay(night, 'America/New_York')).toBe('2026-07-04');
    expect(localDay(night, 'Europe/London')).toBe('2026-07-05');
  });

  test('fills a field and comes back the same to the minute', () => {
    expect(toLocalInput(night, 'America/New_York')).toBe('2026-07-04T23:05');
    expect(reading(toLocalInput(night, 'America/New_York'), 'America/New_York')).toBe('2026-07-05T03:05:00.000Z');
  });

  test.each([
    ['2026-01-15T12:00:00Z', 'Europe/London', 'UTC'],
    ['2026-07-15T12:00:00Z', 'Europe/London', 'UTC+1'],
    // Nepal Standard Time is UTC+5:45 (IANA time zone database, file `asia`); Newfoundland is UTC-3:30 in winter.
    ['2026-01-15T12:00:00Z', 'Asia/Kathmandu', 'UTC+5:45'],
    ['2026-01-15T12:00:00Z', 'America/St_Johns', 'UTC-3:30'],
  ])('%s in %s stands at %s', (instant, zone, offset) => {
    expect(formatOffset(new Date(instant), zone)).toBe(offset);
  });

  test('an ISO day is written without a clock', () => {
    expect(formatIsoDay('2028-02-29')).toBe('29 Feb 2028');
  });

  test('days are counted by the calendar of the place, across a clock change too', () => {
    // Saturday 23:30 to Monday 00:30 in London: two midnights, and 24 hours by the stopwatch, since one hour was skipped.
    expect(daysBetween(new Date('2026-03-28T23:30:00Z'), new Date('2026-03-29T23:30:00Z'), 'Europe/London')).toBe(2);
    expect(daysBetween(new Date('2026-07-05T03:00:00Z'), new Date('2026-07-05T05:00:00Z'), 'America/New_York')).toBe(1);
    expect(daysBetween(new Date('2026-07-05T03:00:00Z'), new Date('2026-07-05T05:00:00Z'), 'Europe/London')).toBe(0);
  });
});

describe('a zone name', () => {
  test.each(['Europe/London', 'Australia/Lord_Howe', 'America/Argentina/Ushuaia', 'UTC'])('%s is one', (name) => {
    expect(isZone(name)).toBe(true);
  });
  test.each(['', 'Europe/Tallowmere', '+01:00', '-05:00', 'GMT+25', 'London'])('%j is none', (name) => {
    expect(isZone(name)).toBe(false);
  });
});
