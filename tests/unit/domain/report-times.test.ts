import { describe, expect, test } from 'vitest';
import { readReportTimes } from '#app/domain/report-times.ts';

const now = new Date('2026-05-09T14:12:00Z');
const london = { zone: 'Europe/London', now };
const read = (typed: Record<string, string>, place = london) => readReportTimes(typed, place);

describe('when it was found', () => {
  test('has to be answered', () => {
    expect(read({}).errors).toEqual({ foundWhen: [expect.stringContaining("Don't know")] });
  });

  test('"just now" is the moment it was pressed, not the moment the report got through', () => {
    expect(read({ foundWhen: 'just-now', foundNowAt: '2026-05-09T13:40:00.000Z' }).times.foundAt?.toISOString()).toBe('2026-05-09T13:40:00.000Z');
    expect(read({ foundWhen: 'just-now' }).times.foundAt).toEqual(now);
  });

  test('"just now" by a clock that runs ahead is refused with a way out', () => {
    expect(read({ foundWhen: 'just-now', foundNowAt: '2026-05-09T15:40:00.000Z' }).errors['foundWhen']?.[0]).toContain('Today at');
  });

  test('a clock time is that of the place', () => {
    expect(read({ foundWhen: 'at', foundLocal: '2026-05-09T15:10' }).times.foundAt?.toISOString()).toBe('2026-05-09T14:10:00.000Z');
    // Adelaide keeps UTC+9:30 in May.
    expect(read({ foundWhen: 'at', foundLocal: '2026-05-09T15:10' }, { zone: 'Australia/Adelaide', now }).times.foundAt?.toISOString()).toBe('2026-05-09T05:40:00.000Z');
  });

  test('"Don\'t know" is an answer', () => {
    expect(read({ foundWhen: 'dont-know' })).toMatchObject({ errors: {}, times: { foundAt: null, foundPrecision: 'unknown' } });
  });

  test.each([
    ['the future', '2026-05-09T15:20', 'still to come'],
    ['a year before 1970', '1969-12-31T23:00', '1970'],
    ['a day that does not exist', '2026-02-30T10:00', 'no such day'],
    ['no time', '2026-05-09', 'a day and a time'],
    ['words', 'yesterday', 'a day and a time'],
    ['nothing', '', 'a day and a time'],
  ])('%s is refused with a sentence', (_what, foundLocal, sentence) => {
    expect(read({ foundWhen: 'at', foundLocal }).errors['foundLocal']?.[0]).toContain(sentence);
  });

  test('two minutes of difference between clocks are no future', () => {
    expect(read({ foundWhen: 'at', foundLocal: '2026-05-09T15:13' })).toMatchObject({ errors: {}, times: { foundAt: now } });
  });
});

describe('clock changes', () => {
  // Directive 2000/84/EC: summer time begins on the last Sunday in March and ends on the last Sunday in October, at 01:00 UTC.
  const later = { now: new Date('2026-11-30T12:00:00Z') };

  test('a skipped hour is explained, with a time that exists', () => {
    const { errors, times } = read({ foundWhen: 'at', foundLocal: '2026-03-29T02:30' }, { ...later, zone: 'Europe/Berlin' });
    expect(errors['foundLocal']?.[0]).toMatch(/skipped.*03:30/u);
    expect(times.foundAt).toBeNull();
  });

  test('a repeated hour is asked about, and each answer is its own instant', () => {
    const typed = { foundWhen: 'at', foundLocal: '2026-10-25T02:30' };
    const berlin = { ...later, zone: 'Europe/Berlin' };
    expect(read(typed, berlin).repeated.foundLocal).toEqual({ first: 'The first time, 02:30 at UTC+2', second: 'The second time, 02:30 at UTC+1' });
    expect(read({ ...typed, foundLocalPass: 'first' }, berlin).times.foundAt?.toISOString()).toBe('2026-10-25T00:30:00.000Z');
    expect(read({ ...typed, foundLocalPass: 'second' }, berlin).times.foundAt?.toISOString()).toBe('2026-10-25T01:30:00.000Z');
  });

  test('an hour away from the change nothing is asked', () => {
    expect(read({ foundWhen: 'at', foundLocal: '2026-10-25T03:30' }, { ...later, zone: 'Europe/Berlin' })).toMatchObject({ errors: {}, repeated: {} });
  });

  test('each field of a range is asked about by itself', () => {
    const { repeated } = read({ foundWhen: 'range', foundFromLocal: '2026-10-25T02:10', foundToLocal: '2026-10-25T02:50' }, { ...later, zone: 'Europe/Berlin' });
    expect(Object.keys(repeated)).toEqual(['foundFromLocal', 'foundToLocal']);
  });
});

describe('the onset window', () => {
  test('a range runs from last seen sound to found', () => {
    expect(read({ foundWhen: 'range', foundFromLocal: '2026-05-05T09:00', foundToLocal: '2026-05-09T15:10' }).times).toEqual({
      foundAt: new Date('2026-05-09T14:10:00Z'),
      foundPrecision: 'exact',
      onsetEarliestAt: new Date('2026-05-05T08:00:00Z'),
      onsetLatestAt: new Date('2026-05-09T14:10:00Z'),
      onsetBasis: 'last-seen-sound',
    });
  });

  test('an exact time may be given as a range of no length', () => {
    expect(read({ foundWhen: 'range', foundFromLocal: '2026-05-09T15:10', foundToLocal: '2026-05-09T15:10' }).errors).toEqual({});
  });

  test('out of order is refused beside the field', () => {
    expect(Object.keys(read({ foundWhen: 'range', foundFromLocal: '2026-05-09T15:10', foundToLocal: '2026-05-09T15:00' }).errors)).toEqual(['foundFromLocal']);
    expect(Object.keys(read({ foundWhen: 'just-now', lastSoundLocal: '2026-05-09T15:12', foundNowAt: '2026-05-09T13:00:00Z' }).errors)).toEqual(['lastSoundLocal']);
  });

  test('of more than 14 days is asked about, and taken when confirmed', () => {
    const typed = { foundWhen: 'just-now', lastSoundLocal: '2026-04-20T12:00' };
    expect(read(typed)).toMatchObject({ longWindowDays: 19, errors: { lastSoundLocal: [expect.stringContaining('19 days')] } });
    expect(read({ ...typed, longWindowConfirmed: 'yes' }).errors).toEqual({});
  });

  test('of exactly 14 days is not asked about', () => {
    expect(read({ foundWhen: 'just-now', lastSoundLocal: '2026-04-25T15:12' })).toMatchObject({ errors: {}, longWindowDays: null });
  });

  test('last seen sound is kept when the finding is not known', () => {
    expect(read({ foundWhen: 'dont-know', lastSoundLocal: '2026-05-09T09:00' }).times).toMatchObject({ foundAt: null, onsetEarliestAt: new Date('2026-05-09T08:00:00Z'), onsetLatestAt: null });
  });

  test('what was left in the fields of another answer is ignored', () => {
    expect(read({ foundWhen: 'dont-know', foundLocal: 'nonsense', foundFromLocal: '2030-01-01T00:00' }).errors).toEqual({});
  });
});
