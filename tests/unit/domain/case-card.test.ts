import { getTimes } from 'suncalc';
import { describe, expect, test } from 'vitest';
import type { CardCase } from '#app/domain/case-card.ts';
import { dayCard, needsWholeDay, wholeCard } from '#app/domain/case-card.ts';
import { caseTitle } from '#app/domain/case-title.ts';
import { registerHeading } from '#app/domain/case-view.ts';
import { registerSearch, readRegisterFilter } from '#app/domain/register-filter.ts';
import { sunOverhead } from '#app/domain/sun-now.ts';
import { windowWords } from '#app/domain/case-words.ts';

const at = (text: string) => new Date(text);
const kestwick: CardCase = { zone: 'Europe/London', latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 0, onsetEarliestAt: at('2026-05-05T04:30:00Z'), onsetLatestAt: at('2026-05-09T14:10:00Z'), foundAt: at('2026-05-09T14:10:00Z'), reportedAt: at('2026-05-09T14:20:00Z') };
const usual = { fromHour: 4, toHour: 22 };
const words = { start: [], end: [] };

describe('the card of one day', () => {
  test('runs from 04 to 22 in the clock of the place', () => {
    const card = dayCard(kestwick, null, usual);
    expect([card.fromUtc, card.toUtc]).toEqual(['2026-05-09T03:00:00.000Z', '2026-05-09T21:00:00.000Z']);
  });

  test('has the daylight that an independent library gives, within two minutes', () => {
    const [light] = dayCard(kestwick, null, usual).daylight;
    const times = getTimes(at('2026-05-09T12:00:00Z'), 53.5, -1.6);
    for (const [ours, theirs] of [[light?.riseUtc, times.sunrise], [light?.setUtc, times.sunset]] as const) {
      expect(Math.abs(Date.parse(ours ?? '') - Number(theirs?.getTime()))).toBeLessThan(120_000);
    }
  });

  test('leaves a window of several days whole, so that no end is drawn at midnight', () => {
    const card = dayCard(kestwick, null, usual);
    expect(card.window).toEqual({ startUtc: '2026-05-05T04:30:00.000Z', endUtc: '2026-05-09T14:10:00.000Z' });
    expect(card.runs).toHaveLength(1);
    expect(needsWholeDay(kestwick, null)).toBe(false);
  });

  test('shows the day with most sunlit minutes once a run is there', () => {
    const run = (fromUtc: string, toUtc: string, minutes: number) => ({ fromUtc, toUtc, minutes, verdict: 'sunlit', reason: 'sun-on-mark' }) as const;
    const result = { window: { startUtc: '2026-05-05T04:30:00.000Z', endUtc: '2026-05-09T14:10:00.000Z' }, flux: [], runs: [run('2026-05-06T12:00:00.000Z', '2026-05-06T12:10:00.000Z', 10), run('2026-05-07T12:00:00.000Z', '2026-05-07T12:30:00.000Z', 30)] };
    const card = dayCard(kestwick, result, usual);
    expect(card.fromUtc).toBe('2026-05-07T03:00:00.000Z');
    expect(card.runs.map((one) => one.fromUtc)).toEqual(['2026-05-07T12:00:00.000Z']);
  });

  test('asks for the whole day when something was found at night', () => {
    const late = { ...kestwick, onsetEarliestAt: at('2026-05-09T10:00:00Z'), onsetLatestAt: at('2026-05-09T22:30:00Z'), foundAt: at('2026-05-09T22:30:00Z') };
    expect(needsWholeDay(late, null)).toBe(true);
    expect(dayCard(late, null, { fromHour: 0, toHour: 24 }).toUtc).toBe('2026-05-09T23:00:00.000Z');
  });

  test('keeps wall time on the days when clocks change', () => {
    const spring = { ...kestwick, onsetEarliestAt: null, onsetLatestAt: null, foundAt: at('2026-03-29T12:00:00Z') };
    const card = dayCard(spring, null, { fromHour: 0, toHour: 24 });
    expect(Date.parse(card.toUtc) - Date.parse(card.fromUtc)).toBe(23 * 3_600_000);
  });
});

describe('the card of the whole window', () => {
  test('dots all daylight of the window while nothing is reconstructed, and no night', () => {
    const card = wholeCard(kestwick, null, words);
    expect(card.runs).toHaveLength(5);
    expect(new Set(card.runs.map((run) => run.verdict))).toEqual(new Set(['cannot-tell']));
    for (const run of card.runs) expect(card.daylight.some((day) => day.riseUtc <= run.fromUtc && run.toUtc <= day.setUtc)).toBe(true);
  });

  test('says polar day and polar night, and has no daylight in the latter', () => {
    const north = (month: string) => wholeCard({ ...kestwick, latitudeDeg: 78, zone: 'Arctic/Longyearbyen', longitudeDeg: 15, onsetEarliestAt: at(`2026-${month}-20T08:00:00Z`), onsetLatestAt: at(`2026-${month}-20T14:00:00Z`), foundAt: null }, null, words);
    expect(north('06').polar).toBe('day');
    expect(north('06').runs).toHaveLength(1);
    expect(north('12')).toMatchObject({ polar: 'night', daylight: [], runs: [] });
  });
});

test('the sun stands overhead at the tropics on the solstices and at noon over Greenwich', () => {
  // Obliquity 23.44°, IAU 2006; the equation of time on these days is under 2 minutes, half a degree.
  expect(sunOverhead(at('2026-06-21T12:00:00Z')).latitudeDeg).toBeCloseTo(23.44, 1);
  expect(sunOverhead(at('2026-12-21T12:00:00Z')).latitudeDeg).toBeCloseTo(-23.44, 1);
  expect(Math.abs(sunOverhead(at('2026-06-21T12:00:00Z')).longitudeDeg)).toBeLessThan(0.6);
  expect(sunOverhead(at('2026-06-21T00:00:00Z')).longitudeDeg).toSatisfy((longitude: number) => Math.abs(Math.abs(longitude) - 180) < 0.6);
  expect(sunOverhead(at('2026-06-21T06:00:00Z')).longitudeDeg).toSatisfy((longitude: number) => Math.abs(longitude - 90) < 0.6);
});

describe('words', () => {
  test('a title is made of what was ticked and the place, never of the account', () => {
    expect(caseTitle({ sighting: 'mark', placeDetail: 'North parapet\nby the hatch', siteName: 'Kestwick Court', material: 'single-ply-membrane' })).toBe('Mark on single-ply roof membrane, North parapet');
    expect(caseTitle({ sighting: 'dont-know', placeDetail: ' ', siteName: 'Kestwick Court' })).toBe('Something seen, Kestwick Court');
    expect(caseTitle({ sighting: 'mark', placeDetail: 'word '.repeat(40), siteName: 'x' }).length).toBeLessThan(80);
  });

  test('a window is told with its days', () => {
    expect(windowWords(kestwick.onsetEarliestAt, kestwick.onsetLatestAt, null, 'Europe/London')).toEqual({ day: '9 May 2026', hours: '05:30 to 15:10, 5 days' });
    expect(windowWords(null, null, null, 'Europe/London')).toEqual({ day: 'not known', hours: '' });
  });

  test('the heading of the register counts what will be lit again', () => {
    expect(registerHeading(5, 14, false, 6)).toBe('Five cases will be lit again before their fix is proven');
    expect(registerHeading(1, 14, false, 6)).toBe('One case will be lit again before its fix is proven');
    expect(registerHeading(13, 14, false, 6)).toMatch(/^13 cases/u);
    expect(registerHeading(0, 0, true, 0)).toBe('You have not reported anything yet');
  });
});

test('a filter goes into the address and comes back the same', () => {
  const filter = readRegisterFilter(new URLSearchParams('view=mine&state=triage&within=90&q=roof+edge&sort=risk&page=3'));
  expect(readRegisterFilter(new URLSearchParams(registerSearch(filter, { page: filter.page })))).toEqual(filter);
  expect(registerSearch(filter, { state: null })).not.toContain('page');
  expect(registerSearch(readRegisterFilter(new URLSearchParams()))).toBe('');
});
