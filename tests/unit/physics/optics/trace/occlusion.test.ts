import { describe, expect, test, vi } from 'vitest';
import { frameAbout } from '#app/physics/optics/trace/frame.ts';
import { occlusionTest } from '#app/physics/optics/trace/occlusion.ts';
import { discAt } from '#app/physics/optics/trace/measure.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import type { Occluder, TraceRequest } from '#app/physics/optics/trace/trace-model.ts';
import type { Vector } from '#app/physics/vector.ts';

// Ray traces are plain arithmetic; on a busy machine they may take their time.
vi.setConfig({ testTimeout: 60_000 });

const sun: Vector = [0, 0, 1];
const request: TraceRequest = {
  optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } },
  sunDirection: sun,
  sunHalfAngleRad: (0.2665 * Math.PI) / 180,
  limbU: 0.56,
  receiver: { kind: 'best plane' },
  rays: 100_000,
  seed: 21,
};

const rectangle = (kind: Occluder['kind'], west: number, east: number, south: number, north: number, up = 0.2): Occluder => ({
  kind,
  corners: [
    [west, south, up],
    [east, south, up],
    [east, north, up],
    [west, north, up],
  ],
});

/** Share of the light that polygons leave on a disc behind the sphere. */
function left(occluders: Occluder[], planeM: number, diameterM: number): number {
  const plane = { origin: [0, 0, -planeM], normal: sun } as const;
  const open = discAt(traceBundle(request), plane, plane.origin, diameterM).concentration;
  return discAt(traceBundle({ ...request, occluders }), plane, plane.origin, diameterM).concentration / open;
}

describe('polygons in the way of single rays', () => {
  const core = { plane: 0.0707, disc: 0.000682 };
  const wide = { plane: 0.0627, disc: 0.005 };

  test('a 25 mm mullion over 31 % of the pupil takes two thirds of the core and 40 % of a 5 mm spot (one outside code)', () => {
    const mullion = [rectangle('block', -0.0125, 0.0125, -1, 1)];
    expect(1 - left(mullion, core.plane, core.disc)).toBeCloseTo(0.66, 1);
    expect(1 - left(mullion, wide.plane, wide.disc)).toBeCloseTo(0.4, 1);
  });

  test('covering rays that miss the disc changes nothing', () => {
    // Outer 14 % of the pupil: the rim beyond 0.927 of the radius, covered from four sides.
    const r = 0.05 * Math.sqrt(1 - 0.14);
    const rim = [rectangle('block', r, 1, -1, 1), rectangle('block', -1, -r, -1, 1), rectangle('block', -1, 1, r, 1), rectangle('block', -1, 1, -1, -r)];
    expect(left(rim, core.plane, core.disc)).toBeCloseTo(1, 6);
  });

  test('a sill over half of the pupil halves a round spot on the axis', () => {
    expect(left([rectangle('block', -1, 1, -1, 0)], core.plane, core.disc)).toBeCloseTo(0.5, 2);
  });

  test('an opening lets through what a frame of blocks round it lets through', () => {
    const window = left([rectangle('opening', -0.02, 0.03, -0.01, 0.04)], wide.plane, wide.disc);
    const frame = left(
      [rectangle('block', -1, -0.02, -1, 1), rectangle('block', 0.03, 1, -1, 1), rectangle('block', -0.02, 0.03, -1, -0.01), rectangle('block', -0.02, 0.03, 0.04, 1)],
      wide.plane,
      wide.disc,
    );
    expect(window).toBeCloseTo(frame, 9);
    expect(window).toBeLessThan(0.9);
  });

  test('two openings in one wall are alternatives, in two walls both must be passed', () => {
    const axes = frameAbout([0, 0, 1]);
    const pair = occlusionTest([rectangle('opening', -1, 0, -1, 1), rectangle('opening', 0.5, 1, -1, 1)], axes);
    const behind = occlusionTest([rectangle('opening', -1, 0, -1, 1), rectangle('opening', 0.5, 1, -1, 1, 0.4)], axes);
    expect(pair?.(-0.5, 0, 0, 0, 0, 1)).toBe(false);
    expect(pair?.(0.7, 0, 0, 0, 0, 1)).toBe(false);
    expect(pair?.(0.2, 0, 0, 0, 0, 1)).toBe(true);
    expect(behind?.(-0.5, 0, 0, 0, 0, 1)).toBe(true);
  });

  test('corners out of one plane and polygons of two corners are refused', () => {
    const axes = frameAbout([0, 0, 1]);
    expect(() => occlusionTest([{ kind: 'block', corners: [[0, 0, 0], [1, 0, 0], [1, 1, 0], [0, 1, 0.1]] }], axes)).toThrow(/one plane/);
    expect(() => occlusionTest([{ kind: 'block', corners: [[0, 0, 0], [1, 0, 0]] }], axes)).toThrow(/at least 3/);
  });

  test('the blocked share is the covered share of the pupil', () => {
    const { ledger } = traceBundle({ ...request, occluders: [rectangle('block', -1, 1, -1, 0)] }).bundle;
    expect(ledger.blocked / (ledger.blocked + ledger.incident)).toBeCloseTo(0.5, 3);
  });
});
