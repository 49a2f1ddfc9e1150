import type { Vector } from '#app/physics/vector.ts';
import { dot } from '#app/physics/vector.ts';
import { backEstimate } from './back-estimate.ts';
import { lineHint } from './best-plane.ts';
import type { LocalPlane, PlaneHits } from './bundle.ts';
import { cutPlane, emptyHits } from './bundle.ts';
import { batchMean, discPowers, stripPowers } from './disc-power.ts';
import { addScaled, toGlobal, toLocal, unitOf } from './frame.ts';
import { SpotFinder } from './hot-spot.ts';
import type { TracedOptic } from './trace-bundle.ts';

/** Concentration with its standard error, in suns. */
export interface Measured {
  readonly concentration: number;
  readonly stdError: number;
}

/** Plane by a point and the normal that looks towards the light, ENU from O. */
export interface ReceiverPlane {
  readonly origin: Vector;
  readonly normal: Vector;
}

function localPlane(traced: TracedOptic, plane: ReceiverPlane): LocalPlane {
  const { frame } = traced.kernel;
  return { origin: toLocal(frame, plane.origin), normal: toLocal(frame, unitOf(plane.normal, 'normal')) };
}

function placeOf(hits: PlaneHits, plane: LocalPlane, point: Vector): readonly [number, number] {
  const offset = addScaled(point, plane.origin, -1);
  return [dot(offset, hits.columnDirection), dot(offset, hits.rowDirection)];
}

const per = (parts: readonly number[], area: number): Measured => {
  const { mean, stdError } = batchMean(parts);
  return { concentration: mean / area, stdError: stdError / area };
};

/** Disc of any diameter round a point of a plane, from forward rays. */
export function discAt(traced: TracedOptic, plane: ReceiverPlane, centre: Vector, diameterM: number): Measured {
  const local = localPlane(traced, plane);
  const hits = cutPlane(traced.bundle, local, emptyHits(traced.bundle.capacity));
  const [x, y] = placeOf(hits, local, toLocal(traced.kernel.frame, centre));
  return per(discPowers(hits, x, y, diameterM / 2), (Math.PI / 4) * diameterM * diameterM);
}

/** Disc of any diameter on its hot spot in a plane, from forward rays; with the place found. */
export function hotDiscIn(traced: TracedOptic, plane: ReceiverPlane, diameterM: number): Measured & { readonly centre: Vector } {
  const local = localPlane(traced, plane);
  const hits = cutPlane(traced.bundle, local, emptyHits(traced.bundle.capacity));
  const spot = new SpotFinder(traced.bundle.capacity).find(hits, diameterM / 2, lineHint(traced, local, hits, null), 1) ?? { x: 0, y: 0 };
  const centre = addScaled(addScaled(local.origin, hits.columnDirection, spot.x), hits.rowDirection, spot.y);
  return { ...per(discPowers(hits, spot.x, spot.y, diameterM / 2), (Math.PI / 4) * diameterM * diameterM), centre: toGlobal(traced.kernel.frame, centre) };
}

/** Strip round a point of a plane, its length along a direction. */
export function stripAt(traced: TracedOptic, plane: ReceiverPlane, centre: Vector, along: Vector, widthM: number, lengthM: number): Measured {
  const local = localPlane(traced, plane);
  const { frame } = traced.kernel;
  const hits = cutPlane(traced.bundle, local, emptyHits(traced.bundle.capacity), Infinity, toLocal(frame, along));
  const [x, y] = placeOf(hits, local, toLocal(frame, centre));
  return per(stripPowers(hits, x, widthM / 2, y - lengthM / 2, y + lengthM / 2), widthM * lengthM);
}

/** Disc round a point traced back to the sun; null for optics without that estimator. */
export function backTracedDiscAt(traced: TracedOptic, plane: ReceiverPlane, centre: Vector, diameterM: number, paths: number, seed: number): Measured | null {
  const { backTrace, frame } = traced.kernel;
  return backTrace ? backEstimate(backTrace, toLocal(frame, centre), localPlane(traced, plane), diameterM, paths, seed) : null;
}
