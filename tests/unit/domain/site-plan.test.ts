import { describe, expect, test } from 'vitest';
import { lineOnGround, offsetM, placeAt } from '#app/domain/ground.ts';
import type { KnownPoint } from '#app/domain/site-plan.ts';
import { placePlan } from '#app/domain/site-plan.ts';
import { readKnownPoints } from '#app/domain/site-plan-form.ts';

const picture = { widthPx: 1000, heightPx: 600 };
const origin = { latitudeDeg: 53.5, longitudeDeg: -1.6 };

/** A point of a drawing whose upper left corner lies at the origin, at 0.1 m a pixel, turned so that its top points to `upDeg`. */
function drawn(xPx: number, yPx: number, upDeg: number, off = { eastM: 0, northM: 0 }): KnownPoint {
  const up = (upDeg * Math.PI) / 180;
  const [right, down] = [xPx * 0.1, yPx * 0.1];
  // Right of "up" is up turned by 90° clockwise: bearing + 90°.
  const eastM = right * Math.cos(up) - down * Math.sin(up) + off.eastM;
  const northM = -right * Math.sin(up) - down * Math.cos(up) + off.northM;
  return { name: '', xPx, yPx, ...placeAt(origin, { eastM, northM }) };
}

describe('a drawing laid on the map', () => {
  test.each([0, 27.3, 90, 200])('by two points keeps its scale and its north when the top points to %d°', (upDeg) => {
    const placement = placePlan(picture, [drawn(100, 100, upDeg), drawn(900, 500, upDeg)]);
    expect(placement?.metresPerPx).toBeCloseTo(0.1, 6);
    expect(Math.abs((((placement?.upBearingDeg ?? NaN) - upDeg + 540) % 360) - 180)).toBeLessThan(0.001);
    expect(placement?.leftOverM).toBeNull();
    const corners = placement?.corners;
    if (!corners) throw new Error('The drawing was not placed.');
    expect(Math.hypot(...Object.values(offsetM(origin, corners.upperLeft)))).toBeLessThan(0.001);
    // The upper edge is 1000 px, 100 m long, and runs square to "up"; the left edge is 60 m.
    expect(lineOnGround(corners.upperLeft, corners.upperRight)).toMatchObject({ lengthM: expect.closeTo(100, 3), bearingDeg: expect.closeTo((upDeg + 90) % 360, 3) });
    expect(lineOnGround(corners.upperLeft, corners.lowerLeft).lengthM).toBeCloseTo(60, 3);
  });

  test('by an equilateral triangle with one corner 3 m off says what is left over', () => {
    // A similarity takes up shift, turn and scale of the error; by Umeyama's closed form the rest of a radial error e
    // at one of three corners of an equilateral triangle has mean square e² ÷ 9.
    const side = 400;
    const corners = [[300, 500], [700, 500], [500, 500 - (side * Math.sqrt(3)) / 2]] as const;
    const points = corners.map(([x, y], index) => drawn(x, y, 0, index === 2 ? { eastM: 0, northM: 3 } : undefined));
    expect(placePlan(picture, points)?.leftOverM).toBeCloseTo(1, 2);
  });

  test('by points on one spot is not placed', () => {
    expect(placePlan(picture, [drawn(100, 100, 0), { ...drawn(500, 500, 0), xPx: 100, yPx: 100 }])).toBeNull();
  });
});

describe('known points as typed', () => {
  const two = { 'point-1-x': '100', 'point-1-y': '100', 'point-1-place': '53.5, -1.6', 'point-2-x': '900', 'point-2-y': '500', 'point-2-place': '53 30 2 N, 1 35 55 W' };

  test('are read in decimals and in degrees, minutes and seconds', () => {
    expect(readKnownPoints(two, picture)).toMatchObject({ ok: true, points: [{ latitudeDeg: 53.5 }, { longitudeDeg: -(1 + 35 / 60 + 55 / 3600) }] });
  });

  test.each([
    [{ 'point-1-x': '1001' }, 'point-1-x'],
    [{ 'point-2-y': '' }, 'point-2-y'],
    [{ 'point-2-place': 'by the hatch' }, 'point-2-place'],
    [{ 'point-3-place': '53.5, -1.6' }, 'point-3-x'],
  ])('with %j are refused beside the field', (typed, field) => {
    const reading = readKnownPoints({ ...two, ...typed }, picture);
    expect(reading.ok ? [] : Object.keys(reading.fieldErrors)).toContain(field);
  });

  test('are two at least, apart, and give a sensible scale', () => {
    const alone = { 'point-1-x': '100', 'point-1-y': '100', 'point-1-place': '53.5, -1.6' };
    expect(readKnownPoints(alone, picture)).toMatchObject({ ok: false, formErrors: [expect.stringContaining('two points')] });
    expect(readKnownPoints({ ...two, 'point-2-x': '100', 'point-2-y': '100' }, picture)).toMatchObject({ ok: false, formErrors: [expect.stringContaining('far apart')] });
    expect(readKnownPoints({ ...two, 'point-2-place': '54.5, -1.6' }, picture)).toMatchObject({ ok: false, formErrors: [expect.stringContaining('one pixel')] });
  });
});
