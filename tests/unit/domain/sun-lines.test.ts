import { describe, expect, test } from 'vitest';
import { sunLine } from '#app/domain/sun-lines.ts';

// Near the December solstice the sun passes within a few degrees of the zenith at Maputo, where its bearing runs fastest.
const places = [
  ['Maputo', '2026-12-21', { latitudeDeg: -26.1, longitudeDeg: 32.9, elevationM: 10, zone: 'Africa/Maputo' }],
  ['Copenhagen', '2026-06-21', { latitudeDeg: 55.7, longitudeDeg: 12.4, elevationM: 10, zone: 'Europe/Copenhagen' }],
] as const;

describe.each(places)('the way of the sun over %s', (_name, day, place) => {
  const { points } = sunLine(day, place);
  const up = points.filter(({ elevationDeg }) => elevationDeg >= 0);

  test('has no corner that the eye would see: bearings of neighbours lie under 20° apart', () => {
    const steps = up.slice(1).map((point, index) => Math.abs(((point.azimuthDeg - (up[index]?.azimuthDeg ?? 0) + 540) % 360) - 180));
    expect(Math.max(...steps)).toBeLessThan(20);
  });

  test('reaches down to the horizon on both sides', () => {
    expect([up[0], up.at(-1)].every((point) => (point?.elevationDeg ?? 90) < 1.2)).toBe(true);
  });
});
