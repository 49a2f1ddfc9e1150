import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import type { Optic } from '#app/physics/optics/optic.ts';
import { guardEnergy, guardRadiance, PhysicsGuardError, radianceBound } from '#app/physics/optics/trace/guards.ts';
import { discAt } from '#app/physics/optics/trace/measure.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { traceFocus } from '#app/physics/optics/trace/trace-focus.ts';
import type { TraceRequest } from '#app/physics/optics/trace/trace-model.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';

// Ray traces are plain arithmetic; on a busy machine they may take their time.
vi.setConfig({ testTimeout: 60_000 });

const half = (0.2665 * Math.PI) / 180;
const upright = { axisAzimuthDeg: 0, axisElevationDeg: 90 } as const;
const base = { sunHalfAngleRad: half, seed: 8, receiver: { kind: 'best plane' } } as const;

const material = fc.record({
  name: fc.constant('explicit' as const),
  refractiveIndex: fc.double({ min: 1.2, max: 1.9, noNaN: true }),
  absorptionPerM: fc.double({ min: 0, max: 60, noNaN: true }),
});
const slopeErrorMrad = fc.constantFrom(0, 4);

/** Refracting bodies of every shape. */
const bodies: fc.Arbitrary<Optic> = fc.oneof(
  fc.record({ kind: fc.constant('sphere' as const), diameterM: fc.double({ min: 0.01, max: 0.4, noNaN: true }), material, slopeErrorMrad }),
  fc.record({ kind: fc.constant('bowl' as const), radiusM: fc.constant(0.14), liquidDepthM: fc.double({ min: 0.02, max: 0.27, noNaN: true }), material, slopeErrorMrad }),
  fc.record({ kind: fc.constant('cylinder' as const), diameterM: fc.constant(0.066), lengthM: fc.constant(0.2), axisAzimuthDeg: fc.constant(33), axisElevationDeg: fc.constant(10), material, slopeErrorMrad }),
  fc.record({
    kind: fc.constant('lens' as const),
    diameterM: fc.constant(0.05),
    focalLengthM: fc.double({ min: 0.2, max: 0.6, noNaN: true }),
    shape: fc.constantFrom('plano-convex' as const, 'biconvex' as const),
    faceToSun: fc.constantFrom('curved' as const, 'flat' as const),
    axisAzimuthDeg: fc.constant(0),
    axisElevationDeg: fc.constant(70),
    material,
    slopeErrorMrad,
  }),
);

describe('energy', () => {
  test('what meets a refracting body is transmitted, reflected, absorbed or left inside, ray by ray', () => {
    fc.assert(
      fc.property(bodies, fc.constantFrom('first' as const, 'all' as const), fc.integer({ min: 20, max: 88 }), (optic, branches, elevationDeg) => {
        const { ledger } = traceBundle({ ...base, optic, branches, rays: 1024, sunDirection: fromAzimuthElevation(200, elevationDeg) }).bundle;
        expect(ledger.worstImbalance).toBeLessThanOrEqual(1e-12);
        expect((ledger.transmitted + ledger.reflected + ledger.absorbed + ledger.stray) / ledger.incident).toBeCloseTo(1, 11);
      }),
      { numRuns: 40, seed: 2 },
    );
  });

  test('a mirror passes on its reflectance once, and a deep bowl its powers', () => {
    const bowl = { kind: 'polished-bowl', figure: 'spherical', diameterM: 0.3, radiusM: 0.15, reflectance: 0.65, slopeErrorMrad: 0, ...upright } as const;
    const deep = traceBundle({ ...base, optic: bowl, rays: 8192, sunDirection: [0, 0, 1] }).bundle.ledger;
    const shallow = traceBundle({ ...base, optic: { ...bowl, radiusM: 0.6 }, rays: 8192, sunDirection: [0, 0, 1] }).bundle.ledger;
    expect(shallow.transmitted / shallow.incident).toBeCloseTo(0.65, 9);
    // Three quarters of a hemisphere's aperture meet the bowl again.
    expect(deep.transmitted / deep.incident).toBeLessThan(0.25 * 0.65 + 0.75 * 0.65 * 0.65 + 1e-6);
    expect(deep.transmitted / deep.incident).toBeGreaterThan(0.3);
  });

  test('a ray that loses its balance stops the run', () => {
    expect(() => guardEnergy(2e-12)).toThrow(PhysicsGuardError);
    expect(() => guardEnergy(NaN)).toThrow(PhysicsGuardError);
    expect(() => guardEnergy(1e-13)).not.toThrow();
  });
});

describe('radiance', () => {
  test('no disc of any optic exceeds the brightness of the sun', () => {
    fc.assert(
      fc.property(bodies, fc.double({ min: 0, max: 1, noNaN: true }), (optic, limbU) => {
        const result = traceFocus({ ...base, optic, limbU, rays: 2048, gridCells: 0, sunDirection: fromAzimuthElevation(180, 75) });
        for (const disc of result.discs) expect(disc.concentration - 5 * disc.stdError).toBeLessThanOrEqual(radianceBound(1, half, limbU));
      }),
      { numRuns: 6, seed: 3 },
    );
  });

  test('the centre of a lossless parabola on the axis reaches sin²φ/sin²θ, times 1/(1 − u/3) for a darkened limb', () => {
    const optic = { kind: 'dish', figure: 'parabolic', diameterM: 0.6, radiusM: 0.5, reflectance: 1, slopeErrorMrad: 0, ...upright } as const;
    const rim = 2 * Math.atan(0.3 / 0.5);
    const limit = (Math.sin(rim) / Math.sin(half)) ** 2;
    const plane = { origin: [0, 0, 0.25], normal: [0, 0, -1] } as const;
    const centre = (limbU: number): number => discAt(traceBundle({ ...base, optic, limbU, rays: 400_000, sunDirection: [0, 0, 1] }), plane, plane.origin, 0.0003).concentration;
    expect(centre(0) / limit).toBeCloseTo(1, 1.7);
    expect(centre(0.56) / (limit / (1 - 0.56 / 3))).toBeCloseTo(1, 1.7);
  });

  test('a value above the bound stops the run, noise near it does not', () => {
    const bound = radianceBound(0.9, half, 0.45);
    expect(() => guardRadiance(bound * 1.1, bound * 0.01, bound)).toThrow(PhysicsGuardError);
    expect(() => guardRadiance(bound * 1.1, bound * 0.05, bound)).not.toThrow();
    expect(() => guardRadiance(-1, 0, bound)).toThrow(PhysicsGuardError);
  });

  test('the bound in air is the published 46 239 for a sun of 0.53291° (row conc-01) and rises with n²', () => {
    const published = (0.53291 / 2) * (Math.PI / 180);
    expect(radianceBound(1, published, 0) / 46239).toBeCloseTo(1, 3);
    expect(radianceBound(1, published, 0, 1.5) / 104037).toBeCloseTo(1, 3);
  });

  test('flux of an image-limited optic is the same in January and July', () => {
    const optic = { kind: 'telescope', diameterM: 0.1, focalLengthM: 1, transmittance: 0.9, ...upright } as const;
    const flux = (distanceAu: number): number => {
      const sunHalfAngleRad = Math.asin(695700 / (distanceAu * 149597870.7));
      const request: TraceRequest = { ...base, optic, sunHalfAngleRad, rays: 400_000, sunDirection: [0, 0, 1] };
      const image = 2 * Math.tan(sunHalfAngleRad);
      const plane = { origin: [0, 0, -1], normal: [0, 0, 1] } as const;
      return (discAt(traceBundle(request), plane, plane.origin, image * 0.999).concentration * 1361.1) / distanceAu ** 2;
    };
    expect(flux(0.98329) / flux(1.01671)).toBeCloseTo(1, 3);
  });
});
