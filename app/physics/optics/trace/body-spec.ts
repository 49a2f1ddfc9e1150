import type { RefractiveMaterial } from '#app/physics/optics/optic.ts';
import type { Vector } from '#app/physics/vector.ts';
import type { Aim, Stop } from './body-kernel.ts';
import { bodyBackTrace, bodyTracer } from './body-kernel.ts';
import type { Body } from './body-path.ts';
import type { Frame } from './frame.ts';
import { toLocal } from './frame.ts';
import type { Kernel } from './kernel.ts';
import type { OcclusionTest } from './occlusion.ts';
import type { Channel } from './spectral.ts';
import { channelsOf } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceAssumption } from './trace-model.ts';

/** Occlusion test of the request, made for a frame. */
export type OcclusionTestOf = (frame: Frame) => OcclusionTest | null;

/** What sets one refracting body apart from another. */
export interface BodySpec {
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

/** Every path came through the stop. */
export const always = (): boolean => true;
const localSun = (sun: SunDisc, frame: Frame): SunDisc => ({ ...sun, direction: toLocal(frame, sun.direction) });

/** Kernel of a refracting body. */
export function kernelOf(spec: BodySpec, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
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
