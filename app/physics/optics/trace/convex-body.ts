/**
 * Refracting body as the common part of convex sets, in local axes. A ray enters where it has entered every set and
 * leaves where it first leaves one, so that no surface needs an outline of its own.
 */
export type ConvexSet =
  | { readonly kind: 'ball'; readonly centreZ: number; readonly radius: number; readonly rough: boolean }
  /** Points with z ≤ level (`below`) or z ≥ level (`above`). */
  | { readonly kind: 'half-space'; readonly level: number; readonly side: 'below' | 'above'; readonly rough: boolean }
  /** Round bar along local y. */
  | { readonly kind: 'bar'; readonly radius: number; readonly rough: boolean };

/** Where a ray crosses the body: distance and outward normal, filled by `enterBody` and `leaveBody`. */
export interface Crossing {
  distance: number;
  nx: number;
  ny: number;
  nz: number;
  rough: boolean;
}

export const newCrossing = (): Crossing => ({ distance: 0, nx: 0, ny: 0, nz: 0, rough: false });

interface Interval {
  near: number;
  far: number;
}

const span: Interval = { near: 0, far: 0 };

/** Distances along a ray between which it is inside one set; false if it misses. */
function crossSet(set: ConvexSet, px: number, py: number, pz: number, dx: number, dy: number, dz: number): boolean {
  if (set.kind === 'half-space') {
    const sign = set.side === 'below' ? 1 : -1;
    const climb = dz * sign;
    const t = (set.level - pz) / dz;
    span.near = climb < 0 ? t : -Infinity;
    span.far = climb > 0 ? t : Infinity;
    return dz !== 0 || (set.level - pz) * sign >= 0;
  }
  const ball = set.kind === 'ball';
  const qz = ball ? pz - set.centreZ : pz;
  const a = ball ? 1 : dx * dx + dz * dz;
  const b = ball ? px * dx + py * dy + qz * dz : px * dx + qz * dz;
  const c = (ball ? px * px + py * py + qz * qz : px * px + qz * qz) - set.radius * set.radius;
  const disc = b * b - a * c;
  if (disc <= 0) return false;
  const root = Math.sqrt(disc);
  span.near = (-b - root) / a;
  span.far = (-b + root) / a;
  return true;
}

function setNormal(set: ConvexSet, px: number, py: number, pz: number, at: Crossing): void {
  const x = px;
  const y = py;
  const z = pz;
  at.rough = set.rough;
  if (set.kind === 'half-space') {
    at.nx = 0;
    at.ny = 0;
    at.nz = set.side === 'below' ? 1 : -1;
    return;
  }
  const ball = set.kind === 'ball';
  const nz = ball ? z - set.centreZ : z;
  const ny = ball ? y : 0;
  const f = 1 / Math.sqrt(x * x + ny * ny + nz * nz);
  at.nx = x * f;
  at.ny = ny * f;
  at.nz = nz * f;
}

/** First point of the body on a ray from outside; false if the ray misses. */
export function enterBody(sets: readonly ConvexSet[], px: number, py: number, pz: number, dx: number, dy: number, dz: number, at: Crossing): boolean {
  let near = -Infinity;
  let far = Infinity;
  let entered: ConvexSet | null = null;
  for (const set of sets) {
    if (!crossSet(set, px, py, pz, dx, dy, dz)) return false;
    if (span.near > near) {
      near = span.near;
      entered = set;
    }
    if (span.far < far) far = span.far;
  }
  if (!entered || !(near < far)) return false;
  at.distance = near;
  setNormal(entered, px + near * dx, py + near * dy, pz + near * dz, at);
  return true;
}

/** Point where a ray inside the body leaves it. */
export function leaveBody(sets: readonly ConvexSet[], px: number, py: number, pz: number, dx: number, dy: number, dz: number, at: Crossing): void {
  let far = Infinity;
  let left: ConvexSet | null = null;
  for (const set of sets) {
    if (crossSet(set, px, py, pz, dx, dy, dz) && span.far < far) {
      far = span.far;
      left = set;
    }
  }
  at.distance = Math.max(0, far);
  if (left) setNormal(left, px + far * dx, py + far * dy, pz + far * dz, at);
}

/** Turns a normal by a Gaussian tilt of its two components, given as two standard normal numbers times σ. */
export function tiltNormal(at: Crossing, g1: number, g2: number): void {
  const { nx, ny, nz } = at;
  const side = Math.abs(nz) < 0.9;
  let ax = side ? -ny : 0;
  let ay = side ? nx : -nz;
  let az = side ? 0 : ny;
  const f = 1 / Math.sqrt(ax * ax + ay * ay + az * az);
  ax *= f;
  ay *= f;
  az *= f;
  const bx = ny * az - nz * ay;
  const by = nz * ax - nx * az;
  const bz = nx * ay - ny * ax;
  const x = nx + g1 * ax + g2 * bx;
  const y = ny + g1 * ay + g2 * by;
  const z = nz + g1 * az + g2 * bz;
  const inverse = 1 / Math.sqrt(x * x + y * y + z * z);
  at.nx = x * inverse;
  at.ny = y * inverse;
  at.nz = z * inverse;
}
