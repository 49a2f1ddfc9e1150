import { describe, expect, test, vi } from 'vitest';
import type { LensOptic, PaneOptic } from '#app/physics/optics/optic.ts';
import { fresnelReflectance } from '#app/physics/optics/refraction.ts';
import { concentrationAlongAxis, dangerZone } from '#app/physics/optics/trace/danger-zone.ts';
import { paneReflectance } from '#app/physics/optics/trace/pane-reflectance.ts';
import { PlateShape } from '#app/physics/optics/trace/plate.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { traceFocus } from '#app/physics/optics/trace/trace-focus.ts';
import type { TraceRequest, TraceResult } from '#app/physics/optics/trace/trace-model.ts';
import type { Vector } from '#app/physics/vector.ts';

// Ray traces are plain arithmetic; on a busy machine they may take their time.
vi.setConfig({ testTimeout: 60_000 });

const half = (0.2665 * Math.PI) / 180;
const base = { sunHalfAngleRad: half, limbU: 0.56, seed: 41, receiver: { kind: 'best plane' }, rays: 16384 } as const;
const crown = { kind: 'sphere', diameterM: 0.09, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } } as const;

const disc = (result: TraceResult, name: string, centre: string): TraceResult['discs'][number] => {
  const found = result.discs.find((d) => d.disc === name && d.centre === centre);
  if (!found) throw new Error(`no ${name} disc on the ${centre}`);
  return found;
};

describe('answer', () => {
  const request: TraceRequest = { ...base, optic: crown, sunDirection: [0, -0.6, 0.8], mark: [0, 0.036, -0.048], thresholdsSuns: [20], trailDirection: [1, 0, 0] };

  test('is the same, byte for byte, for the same request, and another for another seed', () => {
    const first = JSON.stringify(traceFocus(request));
    expect(JSON.stringify(traceFocus(request))).toBe(first);
    expect(JSON.stringify(traceFocus({ ...request, seed: 42 }))).not.toBe(first);
  });

  test('names for every disc its diameter, centre, plane and error, and how far the mark lies from the hot spot', () => {
    const result = traceFocus(request);
    expect(result.discs.map((d) => `${d.disc} ${d.centre}`)).toEqual(['sun-image', '1 mm', '5 mm'].flatMap((n) => [`${n} hot spot`, `${n} mark`]));
    for (const d of result.discs) {
      expect(d.stdError).toBeGreaterThan(0);
      expect(d.planeDistanceM).toBeGreaterThan(0.045);
      expect(d.offsetFromMarkM).toBeLessThan(0.001);
    }
    expect(result.batches).toBeGreaterThanOrEqual(8);
    expect(result.fluxGrid?.concentration).toHaveLength(48 * 48);
    expect(result.backTraced?.centre).toBe('mark');
  });
});

describe('kinds', () => {
  test('a low-emissivity coating on the inner sheet spreads its light where one on surface 2 gathers it', () => {
    const pane: PaneOptic = { kind: 'bowed-pane', widthM: 0.6, heightM: 0.6, centreBowM: 0.003, reflectance: 0.35, axisAzimuthDeg: 180, axisElevationDeg: 0 };
    const at: Vector = [0, -6, 0];
    const on = (coatingSurface: 2 | 3): number => disc(traceFocus({ ...base, optic: { ...pane, coatingSurface }, sunDirection: [0, -1, 0], mark: at, receiver: { kind: 'plane', origin: at, normal: [0, 1, 0] } }), '5 mm', 'mark').concentration;
    expect(on(2)).toBeGreaterThan(3 * on(3));
  });

  test('light on the back of a mirror or pane gives nothing and says so', () => {
    const mirror = { kind: 'dish', figure: 'parabolic', diameterM: 0.6, radiusM: 0.5, reflectance: 0.85, axisAzimuthDeg: 0, axisElevationDeg: 90 } as const;
    const result = traceFocus({ ...base, optic: mirror, sunDirection: [0, 0, -1] });
    expect(result.discs.every((d) => d.concentration === 0)).toBe(true);
    expect(result.warnings).toContain('The sun stands behind the mirror.');
  });

  test('ordinary window glass of 100 mm passes about a fifth of what crown glass passes', () => {
    const of = (name: 'crown-glass' | 'soda-lime-clear'): number => traceBundle({ ...base, optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: { name } }, sunDirection: [0, 0, 1] }).bundle.ledger.transmitted;
    const ratio = of('soda-lime-clear') / of('crown-glass');
    // 0.2118/0.9306 over the full diameter (rows abs-02, abs-03); most chords are shorter.
    expect(ratio).toBeGreaterThan(0.2118 / 0.9306);
    expect(ratio).toBeLessThan(0.36);
  });
});

describe('glass at grazing incidence', () => {
  test('a clear pane at 85° reflects more than a coated one straight on, and both end at 1', () => {
    expect(fresnelReflectance(Math.cos((85 * Math.PI) / 180), 1.5168)).toBeGreaterThan(0.36);
    expect(paneReflectance(0.22, 1)).toBeCloseTo(0.22, 12);
    expect(paneReflectance(0.22, 1e-9)).toBeCloseTo(1, 6);
  });
});

describe('shape of a bowed pane', () => {
  test('lies in its edge plane along the edges, and its slopes are those of its depth', () => {
    const shape = new PlateShape(0.6, 0.9);
    const [here, east, north] = [new Float64Array(3), new Float64Array(3), new Float64Array(3)];
    shape.at(0.3, 0.1, here);
    expect(here[0]).toBeCloseTo(0, 6);
    shape.at(0.1, 0.45, here);
    expect(here[0]).toBeCloseTo(0, 6);
    shape.at(0, 0, here);
    expect(here[0]).toBe(1);
    const step = 0.009375;
    for (const [x, y] of [[0.09375, 0.1875], [-0.15, -0.28125]] as const) {
      shape.at(x - step / 2, y, here);
      shape.at(x + step / 2, y, east);
      expect(((east[0] ?? 0) - (here[0] ?? 0)) / step).toBeCloseTo(((east[1] ?? 0) + (here[1] ?? 0)) / 2, 1);
      shape.at(x, y - step / 2, here);
      shape.at(x, y + step / 2, north);
      expect(((north[0] ?? 0) - (here[0] ?? 0)) / step).toBeCloseTo(((north[2] ?? 0) + (here[2] ?? 0)) / 2, 1);
    }
  });
});

describe('danger zone', () => {
  test('of a lens comes from one bundle and ends where the concentration falls below the threshold', () => {
    const lens: LensOptic = { kind: 'lens', shape: 'plano-convex', faceToSun: 'curved', diameterM: 0.06, focalLengthM: 0.3, material: { name: 'acrylic' }, axisAzimuthDeg: 0, axisElevationDeg: 90 };
    const traced = traceBundle({ ...base, optic: lens, sunDirection: [0, 0, 1] });
    const table = concentrationAlongAxis(traced, 0.005, Array.from({ length: 40 }, (_, i) => 0.02 * (i + 1)));
    const zone = dangerZone(table, 12);
    // Uniform cone: |z|/f = √(τ/threshold) − fθ/D, rounded off by aberration and the 5 mm disc.
    const depth = Math.sqrt(0.9 / 12) - (0.3 * 2 * Math.tan(half)) / 0.06;
    expect(Math.abs((zone?.nearM ?? NaN) / (0.3 * (1 - depth)) - 1)).toBeLessThan(0.08);
    expect(Math.abs((zone?.farM ?? NaN) / (0.3 * (1 + depth)) - 1)).toBeLessThan(0.08);
    expect(dangerZone(table, 1e6)).toBeNull();
  });
});

describe('input', () => {
  const valid: TraceRequest = { ...base, optic: crown, sunDirection: [0, 0, 1] };

  test('out of range is refused with field, value and range', () => {
    expect(() => traceFocus({ ...valid, rays: 10 })).toThrow('rays = 10; allowed 64 to 20000000');
    expect(() => traceFocus({ ...valid, sunHalfAngleRad: 0.3 })).toThrow(/sunHalfAngleRad = 0.3; allowed/);
    expect(() => traceFocus({ ...valid, sunDirection: [0, 0, 2] })).toThrow(/unit vector/);
    expect(() => traceFocus({ ...valid, optic: { ...crown, diameterM: -1 } })).toThrow(/diameterM = -1; allowed/);
    expect(() => traceFocus({ ...valid, receiver: { kind: 'plane', origin: [0, 0, -1], normal: [0, 0, 0] } })).toThrow(/receiver.normal/);
  });

  test('fields that cannot both be true are named together', () => {
    const pose = { axisAzimuthDeg: 0, axisElevationDeg: 90 } as const;
    expect(() => traceFocus({ ...valid, optic: { kind: 'lens', shape: 'plano-convex', faceToSun: 'flat', diameterM: 0.1, focalLengthM: 0.05, material: { name: 'acrylic' }, ...pose } })).toThrow(/diameterM = 0.1 and focalLengthM = 0.05 disagree/);
    expect(() => traceFocus({ ...valid, optic: { kind: 'concave-mirror', figure: 'spherical', diameterM: 1, radiusM: 0.4, reflectance: 1, ...pose } })).toThrow(/diameterM = 1 and radiusM = 0.4 disagree/);
    expect(() => traceFocus({ ...valid, optic: { kind: 'facade', chordM: 9, radiusM: 4, lengthM: 1, generators: 'vertical', reflectance: 1, ...pose } })).toThrow(/chordM = 9 and radiusM = 4 disagree/);
  });
});
