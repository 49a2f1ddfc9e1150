import { describe, expect, test, vi } from 'vitest';
import type { SettledInput } from '#app/physics/reconstruction/setting.ts';
import { settle } from '#app/physics/reconstruction/setting.ts';
import { traceTable } from '#app/physics/reconstruction/trace-table.ts';
import { bestMinute, judgeWindow } from '#app/physics/reconstruction/window.ts';
import { hasAxis, scaledOptic } from '#app/physics/optics/scaled-optic.ts';
import { discAt } from '#app/physics/optics/trace/measure.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import type { TraceRequest } from '#app/physics/optics/trace/trace-model.ts';
import { opticKinds } from '#app/physics/optics/optic.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { add, cross, dot, scale, unit } from '#app/physics/vector.ts';

vi.setConfig({ testTimeout: 60_000 });

const base: SettledInput = {
  place: { latitudeDeg: 51.5, longitudeDeg: -0.1, elevationM: 20, heightAboveGroundM: 0, zone: 'Europe/London' },
  window: { startUtc: '2025-03-12T13:45:00Z', endUtc: '2025-03-12T14:30:00Z', clockSigmaS: 60 },
  sky: { climateClass: 'temperate-rural' },
  mark: { bearingDeg: 35, bearingSigmaDeg: 1, elevationDeg: -30, elevationSigmaDeg: 1, distanceM: 0.06, distanceSigmaM: 0.002, normalAzimuthDeg: 215, normalElevationDeg: 0 },
  seed: 1, rays: 100_000,
};
const optics = [
  { kind: 'sphere', diameterM: 0.09, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } },
  { kind: 'lens', shape: 'plano-convex', faceToSun: 'curved', diameterM: 0.03, focalLengthM: 0.06, slopeErrorMrad: 0, axisAzimuthDeg: 215, axisElevationDeg: 25, material: { name: 'explicit', refractiveIndex: 1.5, absorptionPerM: 1 } },
] as const;

describe.each(optics)('table of a $kind', (optic) => {
  const setting = settle({ ...base, optic });
  const judged = judgeWindow(setting, () => undefined);
  const best = bestMinute(judged);
  const mark = setting.mark;
  if (!best?.beam || best.miss === null || mark === null) throw new Error('The stage has a best minute.');
  const { beam } = best;
  const level = unit(cross(mark.towards, [0, 0, 1]));
  const upright = cross(level, mark.towards);
  const request: TraceRequest = {
    optic, sunDirection: best.sun.towardsSun, sunHalfAngleRad: halfAngleRad(best.sun.distanceAu), rays: 100_000, seed: 1,
    receiver: { kind: 'plane', origin: mark.surveyed, normal: mark.normal },
  };
  const alongM = best.miss.alongM;
  const table = traceTable({
    request, nominal: traceBundle(request), optic, startsAt: [0, 0, 0], markNormal: mark.normal, level, upright,
    track: judged, bestIndex: judged.indexOf(best), best: beam, alongM, nearRel: 0.8, farRel: 1.2, widestM: 0.02, sigmaOpticRel: 0.02,
  });

  /** The same place traced by itself, with another seed. */
  const direct = (k: number, scaleBy: number, along: number, x: number, y: number): number => {
    const minute = judged[k];
    if (!minute?.beam) throw new Error('There is light at this minute.');
    const at = add(scale(minute.beam.direction, along), add(scale(level, x), scale(upright, y)));
    const traced = traceBundle({ ...request, optic: scaledOptic(optic, scaleBy), sunDirection: minute.sun.towardsSun, rays: 200_000, seed: 99 });
    return discAt(traced, { origin: at, normal: mark.normal }, at, 0.005).concentration;
  };
  const read = (k: number, scaleBy: number, along: number, x: number, y: number): number =>
    table?.concentrationAt({ trackIndex: k, alongM: along, levelM: x, uprightM: y, opticScale: scaleBy }) ?? NaN;

  const middle = judged.indexOf(best);
  test.each([
    ['at its middle', middle, 1, 1, 0, 0],
    ['between distances', middle, 1, 1.043, 0, 0],
    ['beside the middle', middle, 1, 1, 0.0013, -0.0007],
    ['between focal lengths', middle, 1.013, 0.97, 0.0005, 0.0005],
    ['between minutes', middle - 12, 1, 1, 0.0004, 0],
  ] as const)('gives within 5 %% what a trace gives %s', (_where, k, scaleBy, rel, x, y) => {
    const expected = direct(k, scaleBy, rel * alongM, x, y);
    expect(expected).toBeGreaterThan(5);
    expect(Math.abs(read(k, scaleBy, rel * alongM, x, y) / expected - 1)).toBeLessThan(0.05);
  });

  test('says over which axes it was made', () => {
    expect(table?.summary.traces).toBe(hasAxis(optic) ? 9 : 3);
    expect(table?.summary.axes.map((axis) => axis.nodes.length)).toEqual([hasAxis(optic) ? 3 : 1, 3, 20, 3]);
    expect(dot(level, upright)).toBeCloseTo(0, 9);
  });
});

test('every kind of optic has a length that its focus goes by', () => {
  expect(opticKinds.length).toBe(14);
  expect(scaledOptic({ kind: 'fresnel', widthM: 1, heightM: 1, focalLengthM: 0.3, transmittance: 1, axisAzimuthDeg: 0, axisElevationDeg: 90 }, 1.1)).toMatchObject({ focalLengthM: 0.33 });
  // A mirror cannot be deeper than half a sphere, whatever the factor.
  expect(scaledOptic({ kind: 'polished-bowl', figure: 'spherical', diameterM: 0.3, radiusM: 0.16, reflectance: 0.6, axisAzimuthDeg: 0, axisElevationDeg: 90 }, 0.5)).toMatchObject({ radiusM: 0.15 });
});
