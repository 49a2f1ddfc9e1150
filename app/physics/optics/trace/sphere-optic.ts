import type { SphereOptic } from '#app/physics/optics/optic.ts';
import { ballFocalLengthM } from '#app/physics/optics/refraction.ts';
import { aimAtBall } from './body-kernel.ts';
import type { Body } from './body-path.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import { always, kernelOf } from './body-spec.ts';
import { frameAbout } from './frame.ts';
import type { Kernel } from './kernel.ts';
import { slopeError } from './slope-error.ts';
import { channelsOf, indexForFocus } from './spectral.ts';
import { traceSphere } from './sphere-kernel.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceRequest } from './trace-model.ts';

/** Full sphere; local z looks to the sun. */
export function sphereKernel(optic: SphereOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const radius = optic.diameterM / 2;
  const frame = frameAbout(sun.direction);
  const slope = slopeError(optic);
  const body: Body = { sets: [{ kind: 'ball', centreZ: 0, radius, rough: true }], slopeSigmaRad: slope.sigmaRad, allBranches: request.branches === 'all' };
  const focal = ballFocalLengthM(radius, indexForFocus(optic.material));
  const kernel = kernelOf(
    {
      frame,
      body,
      material: optic.material,
      longestPathM: optic.diameterM,
      stop: { shape: 'disc', centre: [0, 0, 0], e: [1, 0, 0], f: [0, 1, 0], a: radius, b: radius, upstreamM: 2 * radius },
      apertureM2: Math.PI * radius * radius,
      aim: aimAtBall([0, 0, 0], radius),
      focusKind: 'point',
      focalDistanceM: focal,
      imageFocalM: focal,
      clearanceM: radius,
      lineDirection: null,
      chief: [0, 0, -1],
      throughStop: always,
      assumptions: slope.assumptions,
      warnings: [],
    },
    sun,
    blocked,
  );
  if (body.slopeSigmaRad > 0 || body.allBranches) return kernel;
  const channels = channelsOf(optic.material, optic.diameterM);
  return { ...kernel, trace: (samples, launch, bundle) => traceSphere(optic, channels, samples, launch, bundle) };
}
