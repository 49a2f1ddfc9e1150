import type { Vector } from '#app/physics/vector.ts';
import { cross, dot, lengthOf, scale } from '#app/physics/vector.ts';

/** a + factor·b */
export const addScaled = (a: Vector, b: Vector, factor: number): Vector => [
  a[0] + factor * b[0],
  a[1] + factor * b[1],
  a[2] + factor * b[2],
];

/** Unit vector of the same direction. @throws RangeError for a zero or non-finite vector. */
export function unitOf(a: Vector, name: string): Vector {
  const size = lengthOf(a);
  if (!(size > 0 && Number.isFinite(size))) throw new RangeError(`${name} = [${a.join(', ')}]; a finite, non-zero vector is needed`);
  return scale(a, 1 / size);
}

/** Right-handed axes of an optic, as rows in ENU. Local z is the direction in which the optic looks. */
export interface Frame {
  readonly x: Vector;
  readonly y: Vector;
  readonly z: Vector;
}

/** Axes with the given z; y is the part of `upward` across z, or of north or east where the two are parallel. */
export function frameAbout(z: Vector, upward: Vector = [0, 0, 1]): Frame {
  let y = addScaled(upward, z, -dot(upward, z));
  if (lengthOf(y) < 1e-9) y = addScaled([0, 1, 0], z, -z[1]);
  if (lengthOf(y) < 1e-9) y = addScaled([1, 0, 0], z, -z[0]);
  const up = scale(y, 1 / lengthOf(y));
  return { x: cross(up, z), y: up, z };
}

/** ENU vector in the axes of a frame. */
export const toLocal = (f: Frame, v: Vector): Vector => [dot(f.x, v), dot(f.y, v), dot(f.z, v)];

/** Vector given in the axes of a frame, in ENU. */
export const toGlobal = (f: Frame, v: Vector): Vector =>
  addScaled(addScaled(scale(f.x, v[0]), f.y, v[1]), f.z, v[2]);
