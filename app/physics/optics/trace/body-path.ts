/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { ConvexSet } from './convex-body.ts';
import { enterBody, leaveBody, newCrossing, tiltNormal } from './convex-body.ts';
import { attenuate, powerOf, registerSize, splitRay, startRay } from './interact.ts';
import type { Channel } from './spectral.ts';

/** At most this many surfaces are met inside; below the cut-off the rest counts as absorbed. */
export const mostInteractions = 8;
export const cutOff = 1e-4;

export interface Body {
  readonly sets: readonly ConvexSet[];
  readonly slopeSigmaRad: number;
  /** Follow light that is reflected inside beyond its first way out. */
  readonly allBranches: boolean;
}

/** One way out of a body. */
export interface Exit {
  px: number;
  py: number;
  pz: number;
  dx: number;
  dy: number;
  dz: number;
  power: number;
}

/** Ways out and shares of one ray; reused from ray to ray. */
export interface BodyPath {
  readonly exits: readonly Exit[];
  exitCount: number;
  reflected: number;
  absorbed: number;
  /** Power left inside, not followed. */
  stray: number;
}

export function newBodyPath(): BodyPath {
  const exits = Array.from({ length: mostInteractions }, () => ({ px: 0, py: 0, pz: 0, dx: 0, dy: 0, dz: 0, power: 0 }));
  return { exits, exitCount: 0, reflected: 0, absorbed: 0, stray: 0 };
}

const ray = new Float64Array(registerSize);
const through = new Float64Array(registerSize);
const at = newCrossing();

/**
 * Traces one ray of unit power through a body.
 *
 * @param gaussians Four standard normal numbers, two for the wall at entry and two for every wall after it.
 * @returns False if the ray misses the body.
 */
export function traceBody(
  body: Body, channel: Channel, px: number, py: number, pz: number, dx: number, dy: number, dz: number,
  gaussians: Float64Array, path: BodyPath,
): boolean {
  const { sets, slopeSigmaRad } = body;
  if (!enterBody(sets, px, py, pz, dx, dy, dz, at)) return false;
  let x = px + at.distance * dx;
  let y = py + at.distance * dy;
  let z = pz + at.distance * dz;
  if (at.rough && slopeSigmaRad > 0) tiltNormal(at, gaussians[0]! * slopeSigmaRad, gaussians[1]! * slopeSigmaRad);
  startRay(ray, dx, dy, dz);
  path.exitCount = 0;
  path.absorbed = 0;
  path.stray = 0;
  let inside = splitRay(ray, through, at.nx, at.ny, at.nz, 1 / channel.refractiveIndex);
  path.reflected = powerOf(ray);
  if (inside === 0) return true;
  ray.set(through);
  for (let step = 0; step < mostInteractions; step++) {
    const ux = ray[0]!;
    const uy = ray[1]!;
    const uz = ray[2]!;
    leaveBody(sets, x, y, z, ux, uy, uz, at);
    x += at.distance * ux;
    y += at.distance * uy;
    z += at.distance * uz;
    const kept = channel.transmittance(at.distance);
    attenuate(ray, kept);
    path.absorbed += inside * (1 - kept);
    if (at.rough && slopeSigmaRad > 0) {
      const turn = step & 1 ? -1 : 1;
      tiltNormal(at, gaussians[2]! * slopeSigmaRad * turn, gaussians[3]! * slopeSigmaRad);
    }
    const out = splitRay(ray, through, -at.nx, -at.ny, -at.nz, channel.refractiveIndex);
    inside = powerOf(ray);
    if (out > 0) {
      const exit = path.exits[path.exitCount++]!;
      exit.px = x;
      exit.py = y;
      exit.pz = z;
      exit.dx = through[0]!;
      exit.dy = through[1]!;
      exit.dz = through[2]!;
      exit.power = powerOf(through);
      if (!body.allBranches) break;
    }
    if (inside < cutOff) break;
  }
  if (body.allBranches) path.absorbed += inside;
  else path.stray = inside;
  return true;
}
