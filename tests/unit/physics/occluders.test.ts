import { describe, expect, test, vi } from 'vitest';
import type { OccluderInput, ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { readOccluders } from '#app/physics/occluders.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { add, cross, scale, unit, type Vector } from '#app/physics/vector.ts';

vi.setConfig({ testTimeout: 60_000 });

const place = { latitudeDeg: 51.5, longitudeDeg: -0.1, elevationM: 20, heightAboveGroundM: 0, zone: 'Europe/London' } as const;
const minute = { startUtc: '2025-03-12T14:09:00Z', endUtc: '2025-03-12T14:10:00Z', clockSigmaS: 0 } as const;
const sky = { climateClass: 'temperate-rural', pressureHpa: 1013.25, temperatureC: 12 } as const;
const sun = solarPosition(Date.parse(minute.startUtc), { ...place, pressureHpa: 1013.25, temperatureC: 12 });
const towards: Vector = sun.towardsSun;
/** Axes across the sun: level and upwards. */
const level = unit(cross([0, 0, 1], towards));
const upwards = cross(towards, level);

const corner = ([eastM, northM, upM]: Vector) => ({ eastM, northM, upM });
/** Rectangle across the sun at a distance, from side to side and from bottom to top. [m] */
const acrossSun = (distanceM: number, left: number, right: number, bottom: number, top: number) =>
  ([[left, bottom], [right, bottom], [right, top], [left, top]] as const).map(([x, y]) => corner(add(scale(towards, distanceM), add(scale(level, x), scale(upwards, y)))));

const ball: ReconstructionInput = {
  place, window: minute, sky, seed: 4, rays: 20_000, samples: 64, occluderSigmaM: 0,
  optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } },
  mark: { bearingDeg: (sun.azimuthDeg + 180) % 360, bearingSigmaDeg: 0.2, elevationDeg: -sun.apparentElevationDeg, elevationSigmaDeg: 0.2, distanceM: 0.068, distanceSigmaM: 0.001 },
  recurrenceFromUtc: '2025-03-12T00:00:00Z', recurrenceToUtc: '2025-03-20T00:00:00Z',
};
const behind = (occluders: readonly OccluderInput[], changed: Partial<ReconstructionInput> = {}): ReconstructionResult => reconstruct({ ...ball, ...changed, occluders });
const blocked = (result: ReconstructionResult): number => result.focus?.traced?.blockedFraction ?? NaN;
const markFlux = (result: ReconstructionResult): number => result.focus?.discs.find((disc) => disc.disc === '5 mm' && disc.centre === 'mark')?.fluxKwm2.mid ?? NaN;

describe('bars and openings mask rays one by one', () => {
  test('a 25 mm bar across the middle of a 100 mm ball stops (2/π)(asin ¼ + ¼√(1 − 1/16)) = 31.5 % of its light, as the area of a strip of a circle says', () => {
    expect(blocked(behind([{ kind: 'block', corners: acrossSun(0.3, -0.0125, 0.0125, -1, 1) }]))).toBeCloseTo(0.315, 2);
  });

  test('a sill over half of the ball stops half of it, and halves the flux of its round spot', () => {
    const open = behind([]);
    const half = behind([{ kind: 'block', corners: acrossSun(0.3, -1, 1, -1, 0) }]);
    expect(blocked(half)).toBeCloseTo(0.5, 2);
    expect(markFlux(half) / markFlux(open)).toBeCloseTo(0.5, 1);
  });

  test('an opening 60 mm square before it lets 3600 of 7854 mm² through', () => {
    expect(1 - blocked(behind([{ kind: 'opening', corners: acrossSun(0.3, -0.03, 0.03, -0.03, 0.03) }]))).toBeCloseTo(3600 / 7854, 2);
  });

  test('two openings of one wall share it: what passes either is let through', () => {
    const left: OccluderInput = { kind: 'opening', corners: acrossSun(0.3, -0.2, 0, -0.2, 0.2) };
    const right: OccluderInput = { kind: 'opening', corners: acrossSun(0.3, 0, 0.2, -0.2, 0.2) };
    expect(blocked(behind([left]))).toBeCloseTo(0.5, 2);
    expect(blocked(behind([left, right]))).toBeLessThan(0.005);
  });

  test('a reveal 0.1 m deep shades a strip d·tan i of a pane 1 m wide: 10 % with the sun 45° to its side', () => {
    const azimuth = sun.azimuthDeg + 45;
    const rad = (azimuth * Math.PI) / 180;
    const right: Vector = [Math.cos(rad), -Math.sin(rad), 0];
    const outward: Vector = [Math.sin(rad), Math.cos(rad), 0];
    const corners = ([[-0.5, -0.5], [0.5, -0.5], [0.5, 0.5], [-0.5, 0.5]] as const).map(([x, y]) => corner(add(scale(outward, 0.0005), add(scale(right, x), [0, 0, y]))));
    const pane = { kind: 'bowed-pane', widthM: 1, heightM: 1, centreBowM: 0.001, reflectance: 0.2, slopeErrorMrad: 0, axisAzimuthDeg: azimuth % 360, axisElevationDeg: 0 } as const;
    const { mark: _mark, ...noMark } = ball;
    const result = reconstruct({ ...noMark, optic: pane, occluders: [{ kind: 'opening', corners, revealDepthM: 0.1 }] });
    // Across: d·tan 45°. From above: d·tan h / cos 45° in the plane of the reveal's top; both strips together.
    const across = 0.1 * Math.tan(Math.PI / 4);
    const above = (0.1 * Math.tan((sun.apparentElevationDeg * Math.PI) / 180)) / Math.cos(Math.PI / 4);
    expect(blocked(result)).toBeCloseTo(1 - (1 - across) * (1 - above), 2);
  });
});

describe('a minute behind bars', () => {
  const wall: OccluderInput = { kind: 'block', name: 'shutter', corners: acrossSun(0.3, -1, 1, -1, 1) };

  test('in which every ray is stopped is not sunlit, contradicts, and has no return', () => {
    const result = behind([wall]);
    expect(result.runs.map((run) => [run.verdict, run.reason])).toEqual([['not-sunlit', 'blocked']]);
    expect(result.checks.find((check) => check.id === 'clears-frame')).toMatchObject({ passed: false, margin: 0, unit: 'min' });
    expect(result.grade).toMatchObject({ word: 'inconsistent because' });
    expect(result.recurrence).toEqual([]);
    expect(result.light).toMatchObject({ lit: [], focused: [] });
  });

  test('that the survey error of the corners would free is left undecided', () => {
    // The edge of the shutter stands 52 mm beyond the middle of the ball of 50 mm radius; two sigmas are 20 mm.
    const corners = acrossSun(0.3, -1, 0.052, -1, 1);
    expect(behind([{ kind: 'block', corners }]).runs[0]?.reason).toBe('blocked');
    expect(behind([{ kind: 'block', corners }], { occluderSigmaM: 0.01 }).runs[0]).toMatchObject({ verdict: 'cannot-tell', reason: 'uncertainty-straddles' });
  });

  test('without an optic is judged at its place', () => {
    const { optic: _optic, mark: _mark, ...unknown } = ball;
    expect(reconstruct({ ...unknown, occluders: [wall] }).runs[0]?.reason).toBe('blocked');
  });

  test('what was left out is listed: no occluders, or the spread of their corners', () => {
    const fields = (result: ReconstructionResult) => result.assumptions.map((one) => one.field);
    expect(fields(behind([]))).toContain('occluders');
    const { occluderSigmaM: _sigma, ...open } = ball;
    expect(fields(reconstruct({ ...open, occluders: [wall] }))).toContain('occluderSigmaM');
  });
});

describe('outlines that cannot be', () => {
  const square = acrossSun(0.3, -0.1, 0.1, -0.1, 0.1);
  test.each([
    ['two corners', [{ kind: 'block', corners: square.slice(0, 2) }], /occluders\[0\]\.corners has 2 corners; at least 3/],
    ['corners on one line', [{ kind: 'block', corners: [0, 1, 2].map((x) => ({ eastM: x, northM: 0, upM: 1 })) }], /the first three lie on one line/],
    ['a corner out of plane', [{ kind: 'block', corners: [...square.slice(0, 3), { eastM: 0, northM: 0, upM: 3 }] }], /out of the plane of the first three/],
    ['a reveal on a bar', [{ kind: 'block', corners: square, revealDepthM: 0.1 }], /kind and occluders\[0\]\.revealDepthM disagree/],
    ['a reveal deeper than walls', [{ kind: 'opening', corners: square, revealDepthM: 11 }], /revealDepthM is 11; it must lie in 0…10/],
  ] as const)('%s are refused by name', (_what, list, message) => {
    expect(() => readOccluders(list)).toThrow(message);
    expect(() => readOccluders(list)).toThrow(RangeError);
  });
});
