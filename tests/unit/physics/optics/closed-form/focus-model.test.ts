import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import { concentrationLimit, meanOverCentre } from '#app/physics/sun/sun-disc.ts';
import { degree } from '#app/physics/units.ts';
import { angleBetween, fromAzimuthElevation, scale } from '#app/physics/vector.ts';

const halfAngle = 0.2665 * degree;
const lossless = { name: 'explicit', refractiveIndex: 1.5, absorptionPerM: 0 } as const;
const direction = fc.tuple(fc.double({ min: 0, max: 360, noNaN: true }), fc.double({ min: 1, max: 89, noNaN: true }));

describe('spheres', () => {
  test('answer every sun alike', () => {
    const model = focusModelOf({ kind: 'sphere', diameterM: 0.1, material: lossless });
    const reference = model.beamFor([0, 0, 1], halfAngle)?.concentration(0.07, 0, 0.005);
    fc.assert(fc.property(direction, ([azimuth, elevation]) => {
      const sun = fromAzimuthElevation(azimuth, elevation);
      const beam = model.beamFor(sun, halfAngle);
      expect(beam?.concentration(0.07, 0, 0.005)).toBe(reference);
      expect(angleBetween(beam?.direction ?? sun, scale(sun, -1))).toBeLessThan(1e-12);
    }), { numRuns: 50, seed: 1 });
  });

  test('without absorption concentrate the same at every size, on a disc that grows with them', () => {
    const at = (diameterM: number): number => {
      const beam = focusModelOf({ kind: 'sphere', diameterM, slopeErrorMrad: 0, material: lossless }).beamFor([0, 0, 1], halfAngle);
      return beam?.concentration(0.72 * diameterM, 0, diameterM * 0.01) ?? 0;
    };
    expect(at(0.2) / at(0.02)).toBeCloseTo(1, 9);
  });
});

describe('mirrors and lenses', () => {
  const optics: readonly Optic[] = [
    { kind: 'concave-mirror', figure: 'spherical', diameterM: 0.15, radiusM: 0.6, reflectance: 1, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 30 },
    { kind: 'dish', figure: 'parabolic', diameterM: 1.4, radiusM: 1.3, reflectance: 1, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 30 },
    { kind: 'lens', shape: 'biconvex', faceToSun: 'curved', diameterM: 0.08, focalLengthM: 0.2, material: lossless, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 30 },
    { kind: 'polished-bowl', figure: 'spherical', diameterM: 0.3, radiusM: 0.3, reflectance: 1, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 30 },
  ];
  test('never exceed the radiance bound of Winston, Miñano and Benítez at any tilt, plane or disc', () => {
    const bound = concentrationLimit(halfAngle) / meanOverCentre(0.45);
    fc.assert(fc.property(fc.constantFrom(...optics), fc.double({ min: -50, max: 50, noNaN: true }), fc.double({ min: 0.5, max: 1.5, noNaN: true }), (optic, tilt, share) => {
      const beam = focusModelOf(optic).beamFor(fromAzimuthElevation(180, 30 + tilt), halfAngle);
      if (beam === null) return;
      for (const disc of [0.0002, 0.001, 0.005]) expect(beam.concentration(share * beam.focusM, 0, disc)).toBeLessThanOrEqual(bound);
    }), { numRuns: 200, seed: 3 });
  });

  test('the sun that a mark asks for sends the chief ray to that mark', () => {
    fc.assert(fc.property(fc.constantFrom(...optics), fc.double({ min: 140, max: 220, noNaN: true }), fc.double({ min: 5, max: 60, noNaN: true }), (optic, azimuth, elevation) => {
      const model = focusModelOf(optic);
      const beam = model.beamFor(fromAzimuthElevation(azimuth, elevation), halfAngle);
      if (beam === null) return;
      const required = model.requiredSun(beam.direction);
      expect(required).not.toBeNull();
      expect(angleBetween(required ?? [0, 0, 1], fromAzimuthElevation(azimuth, elevation))).toBeLessThan(1e-9);
    }), { numRuns: 100, seed: 4 });
  });

  test('a mirror with the sun behind it has no beam', () => {
    for (const optic of optics) expect(focusModelOf(optic).beamFor(fromAzimuthElevation(0, 10), halfAngle)).toBeNull();
  });
});

describe('dimensions that contradict each other', () => {
  test('name both fields', () => {
    expect(() => focusModelOf({ kind: 'lens', shape: 'plano-convex', faceToSun: 'curved', diameterM: 0.2, focalLengthM: 0.1, material: lossless, axisAzimuthDeg: 0, axisElevationDeg: 0 }))
      .toThrow(/optic\.diameterM .* and optic\.focalLengthM .* disagree/);
    expect(() => focusModelOf({ kind: 'facade', radiusM: 10, chordM: 30, lengthM: 10, generators: 'vertical', reflectance: 0.3, axisAzimuthDeg: 0, axisElevationDeg: 0 }))
      .toThrow(/optic\.chordM .* and optic\.radiusM .* disagree/);
    expect(() => focusModelOf({ kind: 'bowl', radiusM: 0.1, liquidDepthM: 0.3, material: { name: 'water' } })).toThrow(/optic\.liquidDepthM .* and optic\.radiusM .* disagree/);
  });
});
