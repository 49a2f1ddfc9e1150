import type { BowlOptic, CylinderOptic, DomeOptic, LensOptic, RefractiveMaterial, SphereOptic } from '#app/physics/optics/optic.ts';
import type { Vector } from '#app/physics/vector.ts';
import { dot, fromAzimuthElevation } from '#app/physics/vector.ts';
import type { Aim, Stop } from './body-kernel.ts';
import { aimAtBall, aimAtBar, aimAtDisc, bodyBackTrace, bodyTracer } from './body-kernel.ts';
import type { Body } from './body-path.ts';
import type { ConvexSet } from './convex-body.ts';
import type { Frame } from './frame.ts';
import { addScaled, frameAbout, toLocal, unitOf } from './frame.ts';
import type { Kernel } from './kernel.ts';
import type { OcclusionTest } from './occlusion.ts';
import { ballFocalLength, lensmakerFocalLength, lensRadius, skewIndex } from './paraxial.ts';
import { slopeError } from './slope-defaults.ts';
import { traceSphere } from './sphere-kernel.ts';
import type { Channel } from './spectral.ts';
import { channelsOf, indexForFocus } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceAssumption, TraceRequest } from './trace-model.ts';

interface BodySpec {
  readonly frame: Frame;
  readonly body: Body;
  readonly material: RefractiveMaterial;
  readonly longestPathM: number;
  readonly stop: Stop;
  readonly apertureM2: number;
  readonly aim: Aim;
  readonly focusKind: 'point' | 'line';
  readonly focalDistanceM: number;
  readonly imageFocalM: number;
  readonly clearanceM: number;
  readonly lineDirection: Vector | null;
  readonly chief: Vector;
  readonly throughStop: (px: number, py: number, pz: number, sx: number, sy: number, sz: number) => boolean;
  readonly assumptions: readonly TraceAssumption[];
  readonly warnings: readonly string[];
}

const always = (): boolean => true;
const localSun = (sun: SunDisc, frame: Frame): SunDisc => ({ ...sun, direction: toLocal(frame, sun.direction) });

function kernelOf(spec: BodySpec, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const channels: readonly Channel[] = channelsOf(spec.material, spec.longestPathM);
  const occluded = blocked(spec.frame);
  const inFrame = localSun(sun, spec.frame);
  return {
    frame: spec.frame,
    focusKind: spec.focusKind,
    apertureM2: spec.apertureM2,
    focalAxis: [0, 0, -1],
    focalDistanceM: spec.focalDistanceM,
    planeNormal: [0, 0, 1],
    imageFocalM: spec.imageFocalM,
    clearanceM: spec.clearanceM,
    lineDirection: spec.lineDirection,
    chiefDirection: spec.chief,
    dimensions: spec.body.slopeSigmaRad > 0 ? 9 : channels.length > 1 ? 5 : 4,
    outputsPerRay: spec.body.allBranches ? 3 : 1,
    transmittanceBound: 1,
    backTrace: bodyBackTrace(spec.body, channels, inFrame, spec.aim, (...at) => spec.throughStop(...at) && !occluded?.(...at)),
    assumptions: spec.assumptions,
    warnings: spec.warnings,
    trace: bodyTracer(spec.body, channels, spec.stop),
  };
}

/** Occlusion test of the request, made for a frame. */
export type OcclusionTestOf = (frame: Frame) => OcclusionTest | null;

/** Full sphere; local z looks to the sun. */
export function sphereKernel(optic: SphereOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const radius = optic.diameterM / 2;
  const frame = frameAbout(sun.direction);
  const slope = slopeError(optic);
  const body: Body = { sets: [{ kind: 'ball', centreZ: 0, radius, rough: true }], slopeSigmaRad: slope.sigmaRad, allBranches: request.branches === 'all' };
  const focal = ballFocalLength(indexForFocus(optic.material), optic.diameterM);
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
  const focal = lensmakerFocalLength(n, radius, -radius, thickness);
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

/** Liquid-filled bar; local y is its axis, local z the sun's side. Walls and ends are left out. */
export function cylinderKernel(optic: CylinderOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const along = dot(sun.direction, axis);
  const across = addScaled(sun.direction, axis, -along);
  const cosSkew = Math.sqrt(Math.max(0, 1 - along * along));
  if (cosSkew < 0.02) throw new RangeError('sunDirection and the axis of the bottle agree within about 1°: no line focus forms');
  const frame = frameAbout(unitOf(across, 'sunDirection'), axis);
  const radius = optic.diameterM / 2;
  const n = skewIndex(indexForFocus(optic.material), Math.acos(cosSkew));
  const focal = ballFocalLength(n, optic.diameterM);
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
      throughStop: (px, py, pz, sx, sy, sz) => Math.abs(py - (pz * sy) / sz) <= halfLength,
      assumptions: slope.assumptions,
      warnings: ['Neck, shoulder, base and ends of the bottle are not modelled; they can make hotter points of their own.'],
    },
    sun,
    blocked,
  );
}

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
