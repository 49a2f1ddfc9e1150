import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import type { MirrorOptic, SphereOptic } from '#app/physics/optics/optic.ts';
import { ballFocalLengthM, lensmakerFocalLengthM } from '#app/physics/optics/refraction.ts';
import { lensRadius } from '#app/physics/optics/trace/lens-optic.ts';
import { discAt, hotDiscIn } from '#app/physics/optics/trace/measure.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { traceFocus } from '#app/physics/optics/trace/trace-focus.ts';
import type { TraceRequest } from '#app/physics/optics/trace/trace-model.ts';
import { fromAzimuthElevation, scale } from '#app/physics/vector.ts';

// Ray traces are plain arithmetic; on a busy machine they may take their time.
vi.setConfig({ testTimeout: 60_000 });

const base = { sunHalfAngleRad: (0.2665 * Math.PI) / 180, limbU: 0.56, seed: 12, receiver: { kind: 'best plane' }, gridCells: 0 } as const;
const sphere = (diameterM: number, absorptionPerM = 0): SphereOptic => ({ kind: 'sphere', diameterM, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5, absorptionPerM } });

/** Image disc of a sphere at a distance in units of its focal length. */
function imageDisc(optic: SphereOptic, azimuthDeg: number, elevationDeg: number, relative: number): number {
  const sunDirection = fromAzimuthElevation(azimuthDeg, elevationDeg);
  const focal = ballFocalLengthM(optic.diameterM / 2, 1.5);
  const origin = scale(sunDirection, -relative * focal);
  return discAt(traceBundle({ ...base, optic, sunDirection, rays: 32768 }), { origin, normal: sunDirection }, origin, 2 * focal * Math.tan(base.sunHalfAngleRad)).concentration;
}

describe('sphere', () => {
  const reference = imageDisc(sphere(0.1), 0, 90, 0.963);

  test('has no axis: the sun may stand anywhere', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 360, noNaN: true }), fc.double({ min: -90, max: 90, noNaN: true }), (azimuthDeg, elevationDeg) => {
        expect(imageDisc(sphere(0.1), azimuthDeg, elevationDeg, 0.963) / reference).toBeCloseTo(1, 2);
      }),
      { numRuns: 12, seed: 4 },
    );
  });

  test('without absorption concentrates alike at every size', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.005, max: 2, noNaN: true }), (diameterM) => {
        expect(imageDisc(sphere(diameterM), 0, 90, 0.963) / reference).toBeCloseTo(1, 6);
      }),
      { numRuns: 12, seed: 5 },
    );
  });

  test('with absorption loses more the larger it is', () => {
    const c = [0.05, 0.1, 0.2].map((d) => imageDisc(sphere(d, 5), 0, 90, 0.963));
    expect(c[0]).toBeGreaterThan(c[1] ?? Infinity);
    expect(c[1]).toBeGreaterThan(c[2] ?? Infinity);
  });

  test('a bowl filled to the top is the same sphere', () => {
    const material = { name: 'explicit', refractiveIndex: 1.333, absorptionPerM: 3 } as const;
    const common = { ...base, sunDirection: [0, 0.6, 0.8], rays: 4096 } as const;
    const bowl = traceFocus({ ...common, optic: { kind: 'bowl', radiusM: 0.1, liquidDepthM: 0.2, slopeErrorMrad: 0, material } });
    const ball = traceFocus({ ...common, optic: { kind: 'sphere', diameterM: 0.2, slopeErrorMrad: 0, material } });
    expect(bowl.discs).toEqual(ball.discs);
  });
});

describe('pose', () => {
  test('a mirror and its sun turned together keep their spot', () => {
    const optic: MirrorOptic = { kind: 'concave-mirror', figure: 'spherical', diameterM: 0.15, radiusM: 1, reflectance: 0.85, slopeErrorMrad: 0, axisAzimuthDeg: 0, axisElevationDeg: 0 };
    const spot = (azimuthDeg: number): number => {
      const traced = traceBundle({ ...base, rays: 32768, optic: { ...optic, axisAzimuthDeg: azimuthDeg }, sunDirection: fromAzimuthElevation(azimuthDeg + 9, 4) });
      const axis = fromAzimuthElevation(azimuthDeg, 0);
      return hotDiscIn(traced, { origin: scale(axis, 0.49), normal: scale(axis, -1) }, 0.005).concentration;
    };
    const first = spot(0);
    for (const azimuthDeg of [77, 191, 305]) expect(spot(azimuthDeg) / first).toBeCloseTo(1, 1.7);
  });

  test('a receiver inclined to the light takes less on the same disc', () => {
    const traced = traceBundle({ ...base, optic: { kind: 'telescope', diameterM: 0.05, focalLengthM: 1, transmittance: 1, axisAzimuthDeg: 0, axisElevationDeg: 90 }, sunDirection: [0, 0, 1], rays: 65536 });
    const square = discAt(traced, { origin: [0, 0, -1], normal: [0, 0, 1] }, [0, 0, -1], 0.003).concentration;
    const slant = discAt(traced, { origin: [0, 0, -1], normal: [Math.sin(1), 0, Math.cos(1)] }, [0, 0, -1], 0.003).concentration;
    expect(slant / square).toBeCloseTo(Math.cos(1), 1.5);
    expect(discAt(traced, { origin: [0, 0, -1], normal: [0, 0, -1] }, [0, 0, -1], 0.003).concentration).toBe(0);
  });
});

describe('paraxial limit', () => {
  test('a lens stopped down to a point focuses where the lensmaker puts it, whichever face looks to the sun', () => {
    const material = { name: 'explicit', refractiveIndex: 1.49, absorptionPerM: 0 } as const;
    for (const shape of ['plano-convex', 'biconvex'] as const) {
      for (const faceToSun of ['curved', 'flat'] as const) {
        const request: TraceRequest = {
          ...base,
          sunHalfAngleRad: 1e-9,
          optic: { kind: 'lens', shape, faceToSun, diameterM: 0.001, focalLengthM: 0.2, centreThicknessM: 0.012, slopeErrorMrad: 0, axisAzimuthDeg: 0, axisElevationDeg: 90, material },
          sunDirection: [0, 0, 1],
          rays: 1024,
        };
        const { bundle } = traceBundle(request);
        // Every ray meets the axis at the focus, counted from the rear nodal point.
        const crossings = Array.from({ length: bundle.count }, (_, i) => {
          const t = -((bundle.px[i] ?? 0) * (bundle.dx[i] ?? 0) + (bundle.py[i] ?? 0) * (bundle.dy[i] ?? 0)) / ((bundle.dx[i] ?? 0) ** 2 + (bundle.dy[i] ?? 0) ** 2);
          return -((bundle.pz[i] ?? 0) + t * (bundle.dz[i] ?? 0));
        });
        expect(crossings.reduce((a, b) => a + b, 0) / crossings.length / 0.2).toBeCloseTo(1, 3);
      }
    }
  });

  test('the radius worked out for a focal length gives that focal length back', () => {
    fc.assert(
      fc.property(fc.double({ min: 1.3, max: 1.9, noNaN: true }), fc.double({ min: 0.05, max: 2, noNaN: true }), fc.double({ min: 0, max: 0.02, noNaN: true }), (n, focal, thickness) => {
        const two = lensRadius('biconvex', n, focal, thickness);
        expect(lensmakerFocalLengthM(n, two, -two, thickness) / focal).toBeCloseTo(1, 9);
        expect(lensmakerFocalLengthM(n, lensRadius('plano-convex', n, focal, thickness), Infinity, thickness) / focal).toBeCloseTo(1, 9);
      }),
      { seed: 6 },
    );
  });
});
