import { describe, expect, test } from 'vitest';
import { declinationWords, measuredHeading, skylineFinding } from '#app/domain/measurements-view.ts';
import { sceneSchema } from '#app/domain/scene.ts';

const skyline = { points: [{ azimuthDeg: 90, elevationDeg: 4 }, { azimuthDeg: 180, elevationDeg: 6 }], plusMinusDeg: 1, source: 'clinometer' as const };
const scene = (methods: readonly string[]) => sceneSchema.parse({ optic: { kind: 'curved-mirror', ...Object.fromEntries(['widthMm', 'heightMm'].slice(0, methods.length).map((key, index) => [key, { value: 100, method: methods[index] }])) } });

describe('the finding of the measurements page', () => {
  test.each([
    [[], 'Nothing is measured yet'],
    [['measured'], 'One value is on record, none of them assumed'],
    [['measured', 'assumed'], '2 values are on record, one of them assumed or estimated'],
    [['estimated', 'assumed'], '2 values are on record, all of them assumed or estimated'],
  ])('%j', (methods, heading) => {
    expect(measuredHeading(scene(methods))).toBe(heading);
  });
});

describe('whose skyline a run goes by', () => {
  test('the own one comes before that of the site', () => {
    expect(skylineFinding(skyline, { ...skyline, points: [...skyline.points, { azimuthDeg: 270, elevationDeg: 2 }] }).heading).toBe('2 points of skyline, measured for this case');
  });

  test('that of the site, until there is an own one', () => {
    expect(skylineFinding(undefined, skyline).heading).toBe('The skyline of the site is used: 2 points');
  });

  test('none: what a run takes instead is said', () => {
    expect(skylineFinding({ ...skyline, points: [] }, null).words).toContain('a run takes a level horizon');
  });
});

test('a declination is written with a sign that is no hyphen, and with the day in words', () => {
  expect(declinationWords(-22.61, 'WMM-2025, 2026-12-01')).toBe('Magnetic declination here today: −22.6° (WMM-2025, 1 Dec 2026); east is added.');
  expect(declinationWords(null, '1890-01-01')).toBe('No magnetic model covers 1 Jan 1890.');
});
