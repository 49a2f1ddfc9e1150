/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import { dot } from '#app/physics/vector.ts';
import { frameAbout } from './frame.ts';

/** Shares of the power that met the optic, summed over rays; in units of ray weight. */
export interface Ledger {
  incident: number;
  transmitted: number;
  reflected: number;
  absorbed: number;
  stray: number;
  blocked: number;
  worstImbalance: number;
}

/**
 * Rays that leave the optic, in its local axes, kept so that any number of planes can be cut through them.
 *
 * `weight` is power over direct irradiance [m²]; `reach` the distance after which the ray meets the optic again.
 * Batch b holds the rays from `batchEnd[b − 1]` up to `batchEnd[b]`.
 */
export class RayBundle {
  px: Float64Array;
  py: Float64Array;
  pz: Float64Array;
  dx: Float64Array;
  dy: Float64Array;
  dz: Float64Array;
  weight: Float64Array;
  #reach: Float64Array | null = null;
  count = 0;
  readonly batchEnd: number[] = [];
  readonly ledger: Ledger = { incident: 0, transmitted: 0, reflected: 0, absorbed: 0, stray: 0, blocked: 0, worstImbalance: 0 };

  constructor(capacity: number) {
    this.px = new Float64Array(capacity);
    this.py = new Float64Array(capacity);
    this.pz = new Float64Array(capacity);
    this.dx = new Float64Array(capacity);
    this.dy = new Float64Array(capacity);
    this.dz = new Float64Array(capacity);
    this.weight = new Float64Array(capacity);
  }

  get capacity(): number {
    return this.px.length;
  }

  /** Start of a batch. */
  batchStart(batch: number): number {
    return batch === 0 ? 0 : (this.batchEnd[batch - 1] ?? 0);
  }

  /** Distances after which rays meet the optic again; null while none does. */
  get reach(): Float64Array | null {
    return this.#reach;
  }

  /** Adds a ray that meets the optic again at a distance, or never (Infinity). */
  pushLeg(px: number, py: number, pz: number, dx: number, dy: number, dz: number, weight: number, reach: number): void {
    if (this.count >= this.capacity) this.#grow();
    if (reach < Infinity) {
      this.#reach ??= new Float64Array(this.capacity).fill(Infinity);
      this.#reach[this.count] = reach;
    }
    this.push(px, py, pz, dx, dy, dz, weight);
  }

  endBatch(): void {
    this.batchEnd.push(this.count);
  }

  #grow(): void {
    const larger = (from: Float64Array): Float64Array => {
      const to = new Float64Array(2 * from.length).fill(Infinity, from.length);
      to.set(from);
      return to;
    };
    this.px = larger(this.px);
    this.py = larger(this.py);
    this.pz = larger(this.pz);
    this.dx = larger(this.dx);
    this.dy = larger(this.dy);
    this.dz = larger(this.dz);
    this.weight = larger(this.weight);
    if (this.#reach) this.#reach = larger(this.#reach);
  }

  /** Adds a ray with unlimited reach. */
  push(px: number, py: number, pz: number, dx: number, dy: number, dz: number, weight: number): void {
    if (this.count >= this.capacity) this.#grow();
    const i = this.count++;
    this.px[i] = px;
    this.py[i] = py;
    this.pz[i] = pz;
    this.dx[i] = dx;
    this.dy[i] = dy;
    this.dz[i] = dz;
    this.weight[i] = weight;
  }
}

/** Rays among the first `perBatch` of every batch. */
export function raysWithin(bundle: RayBundle, perBatch: number): number {
  return bundle.batchEnd.reduce((sum, end, b) => sum + Math.min(end - bundle.batchStart(b), perBatch), 0);
}

/** Plane of a receiver in the optic's local axes; the normal looks towards the light. */
export interface LocalPlane {
  readonly origin: Vector;
  readonly normal: Vector;
}

/** Points where the rays meet a plane, in plane axes from its origin, with their weights. */
export interface PlaneHits {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly weight: Float64Array;
  count: number;
  readonly batchEnd: number[];
  columnDirection: Vector;
  rowDirection: Vector;
}

export function emptyHits(capacity: number): PlaneHits {
  return {
    x: new Float64Array(capacity),
    y: new Float64Array(capacity),
    weight: new Float64Array(capacity),
    count: 0,
    batchEnd: [],
    columnDirection: [1, 0, 0],
    rowDirection: [0, 1, 0],
  };
}

/**
 * Cuts a plane through the bundle. Rays that come from behind, or would reach it only before they left the optic or
 * after meeting it again, do not count.
 *
 * @param perBatch At most this many rays of each batch, for a quick look.
 * @param row Direction that the rows of the plane's axes should follow, where it matters.
 */
export function cutPlane(bundle: RayBundle, plane: LocalPlane, hits: PlaneHits, perBatch = Infinity, row?: Vector): PlaneHits {
  const [nx, ny, nz] = plane.normal;
  const f = frameAbout(plane.normal, row ?? [0, 1, 0]);
  const ex = f.x;
  const ey = f.y;
  const offset = dot(plane.origin, plane.normal);
  const ox = dot(plane.origin, ex);
  const oy = dot(plane.origin, ey);
  const { px, py, pz, dx, dy, dz, weight, reach } = bundle;
  let k = 0;
  hits.batchEnd.length = 0;
  for (let b = 0; b < bundle.batchEnd.length; b++) {
    const start = bundle.batchStart(b);
    const end = Math.min(bundle.batchEnd[b]!, start + perBatch);
    for (let i = start; i < end; i++) {
      const along = dx[i]! * nx + dy[i]! * ny + dz[i]! * nz;
      if (along >= -1e-9) continue;
      const t = (offset - px[i]! * nx - py[i]! * ny - pz[i]! * nz) / along;
      if (t < 0 || (reach && t > reach[i]!)) continue;
      const x = px[i]! + t * dx[i]!;
      const y = py[i]! + t * dy[i]!;
      const z = pz[i]! + t * dz[i]!;
      hits.x[k] = x * ex[0] + y * ex[1] + z * ex[2] - ox;
      hits.y[k] = x * ey[0] + y * ey[1] + z * ey[2] - oy;
      hits.weight[k] = weight[i]!;
      k++;
    }
    hits.batchEnd.push(k);
  }
  hits.count = k;
  hits.columnDirection = ex;
  hits.rowDirection = ey;
  return hits;
}
