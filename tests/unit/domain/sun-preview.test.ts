import { getTimes } from 'suncalc';
import { describe, expect, test } from 'vitest';
import { sunPreview } from '#app/domain/sun-preview.ts';
import type { SunPreviewPlace } from '#app/domain/sun-preview.ts';

// Rise and set from suncalc, a library that shares no code with ours; good to about two minutes.
const greenwich: SunPreviewPlace = { latitudeDeg: 51.4779, longitudeDeg: 0, elevationM: 0, zone: 'Europe/London', skyline: null, facesDeg: null };
const now = new Date('2026-12-31T12:00:00Z');
function outside(day: string): { sunrise: Date; sunset: Date } {
  const { sunrise, sunset } = getTimes(new Date(`${day}T12:00:00Z`), 51.4779, 0);
  if (!sunrise || !sunset) throw new Error('The sun rises and sets at Greenwich every day.');
  return { sunrise, sunset };
}
const minutesFrom = (at: Date, minutes: number) => new Date(at.getTime() + minutes * 60_000).toISOString();
const window = (from: string, to: string) => ({ foundAt: new Date(to), onsetEarliestAt: new Date(from), onsetLatestAt: new Date(to) });
const say = (place: SunPreviewPlace, from: string, to: string) => sunPreview(place, window(from, to), now);

describe('the sun in the stated window', () => {
  const summer = outside('2026-06-21');
  const winter = outside('2026-12-21');

  test('is doubted when the whole window is night, up to five minutes before sunrise', () => {
    const said = say(greenwich, '2026-06-20T21:30:00Z', minutesFrom(summer.sunrise, -5));
    expect(said).toMatchObject({ check: true });
    expect(said?.sentences[0]).toMatch(/^No daylight in this window\./u);
  });

  test('is not doubted when the window reaches five minutes past sunrise, or begins as long before sunset', () => {
    expect(say(greenwich, '2026-06-20T21:30:00Z', minutesFrom(summer.sunrise, 5))).toMatchObject({ check: false });
    expect(say(greenwich, minutesFrom(winter.sunset, -5), '2026-12-21T22:00:00Z')).toMatchObject({ check: false });
  });

  test('counts the daylight of a winter day', () => {
    const sentence = say(greenwich, '2026-12-21T00:00:00Z', '2026-12-21T23:59:00Z')?.sentences[0] ?? '';
    const [, hours, minutes] = /about (\d+) h (\d+) min of daylight/u.exec(sentence) ?? [];
    const expectedMin = (winter.sunset.getTime() - winter.sunrise.getTime()) / 60_000;
    expect(Math.abs(Number(hours) * 60 + Number(minutes) - expectedMin)).toBeLessThanOrEqual(5);
  });

  test('behind a skyline that is higher than the sun ever stands is doubted', () => {
    // On 21 December the sun culminates at 90 − 51.5 − 23.4 = 15.1° there.
    const wall = { points: [0, 90, 180, 270].map((azimuthDeg) => ({ azimuthDeg, elevationDeg: 20 })), plusMinusDeg: 1, source: 'clinometer' as const };
    expect(say({ ...greenwich, skyline: wall }, '2026-12-21T00:00:00Z', '2026-12-21T23:59:00Z')).toMatchObject({ check: true, sentences: [expect.stringContaining('skyline')] });
    expect(say({ ...greenwich, skyline: { ...wall, points: wall.points.map((point) => ({ ...point, elevationDeg: 5 })) } }, '2026-12-21T00:00:00Z', '2026-12-21T23:59:00Z')).toMatchObject({ check: false });
  });

  test('behind a north wall in winter is doubted, before a south wall not', () => {
    // Between the equinoxes of autumn and spring the sun rises south of east and sets south of west.
    expect(say({ ...greenwich, facesDeg: 0 }, '2026-12-21T00:00:00Z', '2026-12-21T23:59:00Z')).toMatchObject({ check: true, sentences: [expect.stringContaining('face toward 0°')] });
    expect(say({ ...greenwich, facesDeg: 180 }, '2026-12-21T00:00:00Z', '2026-12-21T23:59:00Z')).toMatchObject({ check: false });
  });

  test('never doubts a moment alone: a mark may be found at night', () => {
    const said = sunPreview(greenwich, { foundAt: new Date('2026-06-21T01:00:00Z'), onsetEarliestAt: null, onsetLatestAt: null }, now);
    expect(said).toMatchObject({ check: false, sentences: [expect.stringContaining('The sun was down at 02:00')] });
  });

  test('says nothing without a time', () => {
    expect(sunPreview(greenwich, { foundAt: null, onsetEarliestAt: null, onsetLatestAt: null }, now)).toBeNull();
  });
});
