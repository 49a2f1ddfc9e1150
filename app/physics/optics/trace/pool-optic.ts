import type { BowlOptic, DomeOptic, RefractiveMaterial } from '#app/physics/optics/optic.ts';
import type { Vector } from '#app/physics/vector.ts';
import { aimAtBall } from './body-kernel.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import { always, kernelOf } from './body-spec.ts';
import type { Frame } from './frame.ts';
import { frameAbout } from './frame.ts';
import type { Kernel } from './kernel.ts';
import { slopeError } from './slope-error.ts';
import { indexForFocus } from './spectral.ts';
import { sphereKernel } from './sphere-optic.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceRequest } from './trace-model.ts';

interface Pool {
  readonly radius: number;
  readonly depth: number;
  readonly centreZ: number;
  readonly material: RefractiveMaterial;
  readonly slope: ReturnType<typeof slopeError>;
}

function poolKernel(pool: Pool, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const { radius, depth, centreZ, material, slope } = pool;
  const frame: Frame = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };
  const towards = sun.direction;
  const focal = radius / (indexForFocus(material) - 1);
  const across = frameAbout(towards);
  const level = centreZ - radius + depth;
  const surface = Math.sqrt(Math.max(0, depth * (2 * radius - depth)));
  // Everything wet lies within this ball about the middle of the pool.
  const middle: Vector = [0, 0, depth < radius ? level : centreZ];
  const reach = depth < radius ? Math.max(surface, depth) : radius;
  return kernelOf(
    {
      frame,
      body: {
        sets: [
          { kind: 'half-space', level, side: 'below', rough: false },
          { kind: 'ball', centreZ, radius, rough: true },
        ],
        slopeSigmaRad: slope.sigmaRad,
        allBranches: request.branches === 'all',
      },
      material,
      longestPathM: 4 * radius,
      stop: { shape: 'disc', centre: middle, e: across.x, f: across.y, a: reach, b: reach, upstreamM: 2 * radius },
      apertureM2: Math.PI * reach * reach,
      aim: aimAtBall(middle, reach),
      focusKind: 'point',
      focalDistanceM: radius - centreZ + focal,
      imageFocalM: focal,
      clearanceM: radius - centreZ,
      lineDirection: null,
      chief: [-towards[0], -towards[1], -towards[2]],
      throughStop: always,
      assumptions: slope.assumptions,
      warnings: towards[2] <= 0 ? ['The sun stands below the horizontal: the flat surface is lit from beneath.'] : [],
    },
    sun,
    blocked,
  );
}

/** Partly filled round bowl; O is the centre of its sphere, local z is up. A full bowl is a sphere. */
export function bowlKernel(optic: BowlOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  if (!(optic.liquidDepthM > 0 && optic.liquidDepthM <= 2 * optic.radiusM)) {
    throw new RangeError(`liquidDepthM = ${optic.liquidDepthM}; allowed above 0 to twice radiusM = ${2 * optic.radiusM}`);
  }
  if (optic.liquidDepthM >= 1.98 * optic.radiusM) {
    return sphereKernel({ ...optic, kind: 'sphere', diameterM: 2 * optic.radiusM }, request, sun, blocked);
  }
  return poolKernel({ radius: optic.radiusM, depth: optic.liquidDepthM, centreZ: 0, material: optic.material, slope: slopeError(optic) }, request, sun, blocked);
}

/** Water standing in a shallow dome; O is its lowest point, local z is up. The shell bends light too little to count. */
export function domeKernel(optic: DomeOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const { radiusM: radius, pondDiameterM } = optic;
  if (!(pondDiameterM > 0 && pondDiameterM <= 2 * radius)) throw new RangeError(`pondDiameterM = ${pondDiameterM}; allowed above 0 to twice radiusM = ${2 * radius}`);
  const depth = radius - Math.sqrt(radius * radius - (pondDiameterM / 2) ** 2);
  return poolKernel({ radius, depth, centreZ: radius, material: { name: 'water' }, slope: slopeError(optic) }, request, sun, blocked);
}
