import type { LensOptic } from '#app/physics/optics/optic.ts';
import { lensmakerFocalLengthM } from '#app/physics/optics/refraction.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import { aimAtDisc } from './body-kernel.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import { kernelOf } from './body-spec.ts';
import type { ConvexSet } from './convex-body.ts';
import { frameAbout, toLocal } from './frame.ts';
import type { Kernel } from './kernel.ts';
import { slopeError } from './slope-error.ts';
import { indexForFocus } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceRequest } from './trace-model.ts';

/** Radius of curvature of a lens of known focal length. */
export function lensRadius(shape: 'plano-convex' | 'biconvex', n: number, focalLength: number, thickness: number): number {
  const k = n - 1;
  if (shape === 'plano-convex') return focalLength * k;
  // f = R² n / (k (2 n R − k t)): the larger root is the lens.
  const b = 2 * k * focalLength;
  const c = (k * k * thickness * focalLength) / n;
  return (b + Math.sqrt(b * b - 4 * c)) / 2;
}

function lensSets(optic: LensOptic, radius: number, thickness: number, front: number): ConvexSet[] {
  const back = front - thickness;
  const towards: ConvexSet = { kind: 'ball', centreZ: front - radius, radius, rough: true };
  const away: ConvexSet = { kind: 'ball', centreZ: back + radius, radius, rough: true };
  if (optic.shape === 'biconvex') return [towards, away];
  return optic.faceToSun === 'curved'
    ? [towards, { kind: 'half-space', level: back, side: 'above', rough: true }]
    : [{ kind: 'half-space', level: front, side: 'below', rough: true }, away];
}

/** Shape of a lens: radius, thickness and where its rear principal point lies behind the front vertex. */
function lensShape(optic: LensOptic): { radius: number; thickness: number; principal: number } {
  const n = indexForFocus(optic.material);
  const half = optic.diameterM / 2;
  const faces = optic.shape === 'biconvex' ? 2 : 1;
  let thickness = optic.centreThicknessM ?? 0;
  let radius = lensRadius(optic.shape, n, optic.focalLengthM, thickness);
  if (!(radius > half)) {
    throw new RangeError(`diameterM = ${optic.diameterM} and focalLengthM = ${optic.focalLengthM} disagree: the face would need a radius of ${radius.toPrecision(3)} m`);
  }
  if (optic.centreThicknessM === undefined) {
    thickness = faces * (radius - Math.sqrt(radius * radius - half * half)) + 0.001;
    radius = lensRadius(optic.shape, n, optic.focalLengthM, thickness);
  }
  if (optic.shape === 'plano-convex') return { radius, thickness, principal: optic.faceToSun === 'curved' ? thickness * (1 - 1 / n) : thickness };
  const focal = lensmakerFocalLengthM(n, radius, -radius, thickness);
  return { radius, thickness, principal: thickness - (focal * (n - 1) * thickness) / (n * radius) };
}

/** Lens with its stop in the plane of the front vertex. */
export function lensKernel(optic: LensOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const { radius, thickness, principal } = lensShape(optic);
  const frame = frameAbout(fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg));
  const towards = toLocal(frame, sun.direction);
  const half = optic.diameterM / 2;
  const front = request.lensOrigin === 'first-vertex' ? 0 : principal;
  const slope = slopeError(optic);
  const given = optic.centreThicknessM !== undefined;
  return kernelOf(
    {
      frame,
      body: { sets: lensSets(optic, radius, thickness, front), slopeSigmaRad: slope.sigmaRad, allBranches: request.branches === 'all' },
      material: optic.material,
      longestPathM: 2 * optic.diameterM + thickness,
      stop: { shape: 'disc', centre: [0, 0, front], e: [1, 0, 0], f: [0, 1, 0], a: half, b: half, upstreamM: 0 },
      apertureM2: Math.PI * half * half * Math.max(0, towards[2]),
      aim: aimAtDisc(front, 1.25 * half),
      focusKind: 'point',
      focalDistanceM: optic.focalLengthM - principal + front,
      imageFocalM: optic.focalLengthM,
      clearanceM: thickness - front,
      lineDirection: null,
      chief: [-towards[0], -towards[1], -towards[2]],
      throughStop: (px, py, pz, sx, sy, sz) => {
        const t = (front - pz) / sz;
        return (px + t * sx) ** 2 + (py + t * sy) ** 2 <= half * half;
      },
      assumptions: given
        ? slope.assumptions
        : [...slope.assumptions, { field: 'centreThicknessM', value: `${(thickness * 1000).toFixed(1)} mm`, source: 'edge of 1 mm, common practice', verified: false }],
      warnings: towards[2] <= 0 ? ['The sun stands behind the face of the lens.'] : [],
    },
    sun,
    blocked,
  );
}
