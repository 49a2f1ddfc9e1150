import type { CylinderOptic } from '#app/physics/optics/optic.ts';
import { ballFocalLengthM, bravaisIndex } from '#app/physics/optics/refraction.ts';
import { dot, fromAzimuthElevation } from '#app/physics/vector.ts';
import { aimAtBar } from './body-kernel.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import { kernelOf } from './body-spec.ts';
import { addScaled, frameAbout, unitOf } from './frame.ts';
import type { Kernel } from './kernel.ts';
import { slopeError } from './slope-error.ts';
import { indexForFocus } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceRequest } from './trace-model.ts';

/** Liquid-filled bar; local y is its axis, local z the sun's side. Walls and ends are left out. */
export function cylinderKernel(optic: CylinderOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const along = dot(sun.direction, axis);
  const across = addScaled(sun.direction, axis, -along);
  const cosSkew = Math.sqrt(Math.max(0, 1 - along * along));
  if (cosSkew < 0.02) throw new RangeError('sunDirection and the axis of the bottle agree within about 1°: no line focus forms');
  const frame = frameAbout(unitOf(across, 'sunDirection'), axis);
  const radius = optic.diameterM / 2;
  const focal = ballFocalLengthM(radius, bravaisIndex(indexForFocus(optic.material), along));
  const slope = slopeError(optic);
  const halfLength = optic.lengthM / 2;
  const width = 1.3 * sun.halfAngleRad + 6 * slope.sigmaRad + (sun.circumsolarRatio > 0 ? 0.04 : 0);
  return kernelOf(
    {
      frame,
      body: { sets: [{ kind: 'bar', radius, rough: true }], slopeSigmaRad: slope.sigmaRad, allBranches: request.branches === 'all' },
      material: optic.material,
      longestPathM: optic.diameterM * 8,
      stop: { shape: 'rectangle', centre: [0, 0, 0], e: [1, 0, 0], f: [0, 1, 0], a: radius, b: halfLength, upstreamM: (2 * radius) / cosSkew },
      apertureM2: optic.diameterM * optic.lengthM * cosSkew,
      aim: aimAtBar(radius, along, width),
      focusKind: 'line',
      focalDistanceM: focal,
      imageFocalM: focal,
      clearanceM: radius,
      lineDirection: [0, 1, 0],
      chief: [0, -along, -cosSkew],
      throughStop: (_px, py, pz, _sx, sy, sz) => Math.abs(py - (pz * sy) / sz) <= halfLength,
      assumptions: slope.assumptions,
      warnings: ['Neck, shoulder, base and ends of the bottle are not modelled; they can make hotter points of their own.'],
    },
    sun,
    blocked,
  );
}
