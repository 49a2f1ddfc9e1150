import { describe, expect, test } from 'vitest';
import { opticOutline } from '#app/domain/optic-outline.ts';
import { beamView, facingOf } from '#app/domain/run-beam.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { fromAzimuthElevation, lengthOf } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';

const ball: ReconstructionInput = {
  place: { latitudeDeg: 55.7, longitudeDeg: 12.4, elevationM: 12, heightAboveGroundM: 0, zone: 'Europe/Copenhagen' },
  window: { startUtc: '2026-02-03T09:00:00.000Z', endUtc: '2026-02-03T10:30:00.000Z', clockSigmaS: 60 },
  sky: { climateClass: 'temperate-rural' },
  optic: { kind: 'sphere', diameterM: 0.12, material: { name: 'acrylic' } },
  mark: { bearingDeg: 336.6, bearingSigmaDeg: 3, elevationDeg: -15.2, elevationSigmaDeg: 3, distanceM: 0.091, distanceSigmaM: 0.002 },
  seed: 1,
};
const at = (clock: string) => `2026-02-03T${clock}:00.000Z`;
const close = (a: Vector, b: Vector, digits = 4) => a.forEach((value, index) => expect(value).toBeCloseTo(b[index] ?? Number.NaN, digits));

describe('the beam of a ball', () => {
  test('has its chief ray through the centre, straight away from the sun', () => {
    const [minute] = beamView(ball, [at('09:50')])?.minutes ?? [];
    if (!minute) throw new Error('No beam.');
    close(minute.direction, minute.towardsSun.map((part) => -part) as unknown as Vector);
    expect(lengthOf(minute.direction)).toBeCloseTo(1, 4);
  });

  test('moves its spot as fast as the earth turns the sun: 2π in a solar day, times the cosine of the declination', () => {
    // Declination of early February, about −16.5°; a whole degree of error in it would change the speed by half a per cent.
    const view = beamView(ball, [at('09:40'), at('10:00')]);
    const [first, last] = (view?.minutes ?? []).map((minute) => minute.spotMm);
    if (!first || !last) throw new Error('The spot left the target.');
    const mmPerHour = 3 * Math.hypot(last.rightMm - first.rightMm, last.upMm - first.upMm);
    const expected = 91 * ((2 * Math.PI) / 24) * Math.cos((16.5 * Math.PI) / 180);
    expect(mmPerHour / expected).toBeGreaterThan(0.98);
    expect(mmPerHour / expected).toBeLessThan(1.02);
  });

  test('runs from west to east as one faces the mark from the ball, while the sun goes from east to west', () => {
    const view = beamView(ball, [at('09:40'), at('10:00')]);
    const [first, last] = view?.minutes ?? [];
    expect(view?.facing?.rightWords).toBe('north-east');
    expect((last?.spotMm?.rightMm ?? 0) - (first?.spotMm?.rightMm ?? 0)).toBeGreaterThan(0);
  });

  test('is left out while the sun is down, and whole without an optic', () => {
    expect(beamView(ball, ['2026-02-03T02:00:00.000Z'])?.minutes).toEqual([]);
    const { optic: _optic, ...bare } = ball;
    expect(beamView(bare, [at('09:50')])).toBeNull();
  });
});

describe('right and up on a surface as one faces it', () => {
  test.each([
    ['a wall that looks south', fromAzimuthElevation(180, 0), [1, 0, 0], [0, 0, 1]],
    ['a wall that looks north', fromAzimuthElevation(0, 0), [-1, 0, 0], [0, 0, 1]],
    ['a floor, from above, north up', [0, 0, 1] as Vector, [1, 0, 0], [0, 1, 0]],
    ['a ceiling, from below, north up', [0, 0, -1] as Vector, [-1, 0, 0], [0, 1, 0]],
  ] as const)('%s', (_what, normal, right, up) => {
    const facing = facingOf(normal, true);
    close(facing.right, right as unknown as Vector);
    close(facing.up, up as unknown as Vector);
  });
});

describe('the outline of an optic', () => {
  test('of a spherical mirror rises at its rim by the sagitta, R − √(R² − r²)', () => {
    // R 600 mm, r 75 mm: 600 − √(360000 − 5625) = 4.706 mm, by hand.
    const { lines } = opticOutline({ kind: 'concave-mirror', figure: 'spherical', diameterM: 0.15, radiusM: 0.6, reflectance: 0.85, axisAzimuthDeg: 182, axisElevationDeg: 0 });
    const axis = fromAzimuthElevation(182, 0);
    const end = lines[0]?.[0] ?? [0, 0, 0];
    expect(end[0] * axis[0] + end[1] * axis[1] + end[2] * axis[2]).toBeCloseTo(0.004706, 6);
  });

  test('of a bowed pane stands before its centre at the edges by the bow', () => {
    const { lines } = opticOutline({ kind: 'bowed-pane', widthM: 0.61, heightM: 0.91, centreBowM: 0.003, reflectance: 0.3, axisAzimuthDeg: 180, axisElevationDeg: 0 });
    expect(lines[0]?.every((corner) => Math.abs(-corner[1] - 0.003) < 1e-9)).toBe(true);
    expect(lines[1]?.[12]?.[1]).toBeCloseTo(0, 9);
  });

  test('of a bowl ends at the level of the liquid', () => {
    const { body } = opticOutline({ kind: 'bowl', radiusM: 0.1, liquidDepthM: 0.08, material: { name: 'water' } });
    expect(Math.min(...body.map((point) => point[2]))).toBeCloseTo(-0.1, 9);
    expect(Math.max(...body.map((point) => point[2]))).toBeCloseTo(-0.02, 9);
  });
});
