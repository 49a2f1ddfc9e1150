import { describe, expect, test, vi } from 'vitest';
import type { Optic } from '#app/physics/optics/optic.ts';
import { backTracedDiscAt, discAt, hotDiscIn } from '#app/physics/optics/trace/measure.ts';
import { naturalPlane } from '#app/physics/optics/trace/best-plane.ts';
import { toGlobal } from '#app/physics/optics/trace/frame.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';

// Ray traces are plain arithmetic; on a busy machine they may take their time.
vi.setConfig({ testTimeout: 60_000 });

const up = { axisAzimuthDeg: 0, axisElevationDeg: 90 } as const;
const glass = { name: 'explicit', refractiveIndex: 1.5, absorptionPerM: 2 } as const;
const water = { name: 'explicit', refractiveIndex: 1.333, absorptionPerM: 3 } as const;

/** Optics with a disc wide enough to hold many rays, and where along the focal axis it lies in units of the focus. */
const cases: readonly { readonly name: string; readonly optic: Optic; readonly at: number; readonly discM: number; readonly elevationDeg: number; readonly circumsolarRatio?: number }[] = [
  { name: 'smooth sphere', optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: glass }, at: 0.9, discM: 0.004, elevationDeg: 60 },
  { name: 'sphere in haze', optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: glass }, at: 0.9, discM: 0.004, elevationDeg: 60, circumsolarRatio: 0.2 },
  { name: 'rough sphere', optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 5, material: water }, at: 0.9, discM: 0.006, elevationDeg: 60 },
  { name: 'tilted lens', optic: { kind: 'lens', shape: 'plano-convex', faceToSun: 'curved', diameterM: 0.08, focalLengthM: 0.22, centreThicknessM: 0.012, slopeErrorMrad: 0, material: glass, ...up }, at: 0.9, discM: 0.006, elevationDeg: 75 },
  { name: 'part-filled bowl', optic: { kind: 'bowl', radiusM: 0.14, liquidDepthM: 0.1, slopeErrorMrad: 5, material: water }, at: 0.85, discM: 0.01, elevationDeg: 61.4 },
  { name: 'bottle on its side', optic: { kind: 'cylinder', diameterM: 0.066, lengthM: 0.2, slopeErrorMrad: 0, material: water, axisAzimuthDeg: 90, axisElevationDeg: 0 }, at: 1, discM: 0.008, elevationDeg: 70 },
  { name: 'shaving mirror off its axis', optic: { kind: 'concave-mirror', figure: 'spherical', diameterM: 0.15, radiusM: 1, reflectance: 0.85, slopeErrorMrad: 1, ...up }, at: 1, discM: 0.006, elevationDeg: 80 },
  { name: 'dish off its axis', optic: { kind: 'dish', figure: 'parabolic', diameterM: 0.6, radiusM: 0.5, reflectance: 0.85, slopeErrorMrad: 0, ...up }, at: 1, discM: 0.006, elevationDeg: 85 },
  { name: 'hemispherical bowl, light that has bounced twice included', optic: { kind: 'polished-bowl', figure: 'spherical', diameterM: 0.3, radiusM: 0.15, reflectance: 0.65, slopeErrorMrad: 0, ...up }, at: 0.8, discM: 0.01, elevationDeg: 80 },
  { name: 'curved parapet', optic: { kind: 'curved-metal', radiusM: 1.2, chordM: 0.55, lengthM: 1, generators: 'horizontal', reflectance: 0.6, slopeErrorMrad: 2, axisAzimuthDeg: 180, axisElevationDeg: 70 }, at: 1, discM: 0.03, elevationDeg: 60 },
  { name: 'trough deeper than 45°', optic: { kind: 'trough', radiusM: 0.5, chordM: 0.95, lengthM: 1, generators: 'horizontal', reflectance: 0.8, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 80 }, at: 0.8, discM: 0.04, elevationDeg: 80 },
  { name: 'bowed pane', optic: { kind: 'bowed-pane', widthM: 0.6, heightM: 0.6, centreBowM: 0.003, reflectance: 0.35, slopeErrorMrad: 0.6, axisAzimuthDeg: 180, axisElevationDeg: 20 }, at: 0.9, discM: 0.05, elevationDeg: 40 },
  { name: 'pane with its coating on the inner sheet', optic: { kind: 'bowed-pane', widthM: 0.6, heightM: 0.6, centreBowM: 0.003, reflectance: 0.35, coatingSurface: 3, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 20 }, at: 0.9, discM: 0.05, elevationDeg: 40 },
  { name: 'telescope 3° off the sun', optic: { kind: 'telescope', diameterM: 0.08, focalLengthM: 0.4, transmittance: 0.85, ...up }, at: 1, discM: 0.008, elevationDeg: 87 },
  { name: 'grooved sheet in colours', optic: { kind: 'fresnel', widthM: 0.2, heightM: 0.28, focalLengthM: 0.3, transmittance: 0.8, slopeErrorMrad: 1, ...up }, at: 1, discM: 0.012, elevationDeg: 86 },
];

describe('light traced forward and light traced back from the receiver agree', () => {
  for (const { name, optic, at, discM, elevationDeg, circumsolarRatio } of cases) test(name, () => {
    // A sun three times its size: the law is the same and far more paths meet it.
    const traced = traceBundle({ optic, circumsolarRatio: circumsolarRatio ?? 0, sunDirection: fromAzimuthElevation(180, elevationDeg), sunHalfAngleRad: 0.015, limbU: 0.5, seed: 31, rays: 65536, receiver: { kind: 'best plane' } });
    const { frame, focalDistanceM } = traced.kernel;
    const local = naturalPlane(traced, at * focalDistanceM);
    const plane = { origin: toGlobal(frame, local.origin), normal: toGlobal(frame, local.normal) };
    const hot = hotDiscIn(traced, plane, discM);
    const forward = discAt(traced, plane, hot.centre, discM);
    const back = backTracedDiscAt(traced, plane, hot.centre, discM, 65536, 17);
    const error = Math.hypot(forward.stdError, back?.stdError ?? Infinity);
    expect(forward.concentration).toBeGreaterThan(0.5);
    expect(error / forward.concentration).toBeLessThan(0.08);
    // Both errors come from eight batches, so that 4σ is about the usual 3σ.
    expect(Math.abs((back?.concentration ?? NaN) - forward.concentration)).toBeLessThan(4 * error + 0.002 * forward.concentration);
  });
});
