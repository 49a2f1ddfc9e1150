import type { OccluderInput } from './model/input.ts';
import type { Occluder } from '#app/physics/optics/trace/trace-model.ts';
import { inRange } from './units.ts';
import { add, cross, dot, lengthOf, scale, subtract, type Vector } from './vector.ts';

/** One sigma of surveyed corners where none is given, common practice for a tape. [m] */
export const defaultOccluderSigmaM = 0.01;

/** An outline counts as plane within this. [m] */
const planeToleranceM = 0.001;

/** Unit normal of an outline that looks away from the optic's origin. */
function outwardNormal(corners: readonly Vector[], field: string): Vector {
  const [a, b, c] = corners;
  if (a === undefined || b === undefined || c === undefined) throw new RangeError(`${field}.corners has ${corners.length} corners; at least 3 are needed.`);
  const product = cross(subtract(b, a), subtract(c, a));
  if (!(lengthOf(product) > 1e-12)) throw new RangeError(`${field}.corners: the first three lie on one line; they must span a plane.`);
  const normal = scale(product, 1 / lengthOf(product));
  for (const corner of corners) {
    const offM = Math.abs(dot(normal, subtract(corner, a)));
    if (offM > planeToleranceM) throw new RangeError(`${field}.corners: one lies ${offM.toPrecision(2)} m out of the plane of the first three; at most ${planeToleranceM} m is allowed.`);
  }
  return dot(normal, a) < 0 ? scale(normal, -1) : normal;
}

function readOne(input: OccluderInput, field: string): Occluder[] {
  const corners = input.corners.map(({ eastM, northM, upM }): Vector => [eastM, northM, upM]);
  const normal = outwardNormal(corners, field);
  const depthM = input.revealDepthM;
  if (depthM === undefined || depthM === 0) return [{ kind: input.kind, corners }];
  if (input.kind === 'block') throw new RangeError(`${field}.kind and ${field}.revealDepthM disagree: only an opening has a reveal.`);
  inRange(`${field}.revealDepthM`, depthM, 0, 10, 'm');
  if (Math.abs(dot(normal, corners[0] ?? [0, 0, 0])) < 1e-6) {
    throw new RangeError(`${field}.corners and ${field}.revealDepthM disagree: the optic’s origin lies in the plane of the opening, so that neither side of it is outward.`);
  }
  // A straight reveal passes what passes its inner and its outer outline.
  return [
    { kind: 'opening', corners },
    { kind: 'opening', corners: corners.map((corner) => add(corner, scale(normal, depthM))) },
  ];
}

/**
 * Openings and obstacles as the tracer wants them; a reveal becomes a second outline further out.
 *
 * @throws RangeError naming the field, or the two fields that disagree.
 */
export function readOccluders(list: readonly OccluderInput[] | undefined): readonly Occluder[] {
  return (list ?? []).flatMap((input, index) => readOne(input, `occluders[${index}]`));
}

/** All occluders moved by a vector. [m] */
export function movedOccluders(occluders: readonly Occluder[], by: Vector): readonly Occluder[] {
  return occluders.map(({ kind, corners }) => ({ kind, corners: corners.map((corner) => add(corner, by)) }));
}
