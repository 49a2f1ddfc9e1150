/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { PlaneHits } from './bundle.ts';

/** Radii round a point that hold given shares of the power in the plane. */
export function enclosingRadii(hits: PlaneHits, x: number, y: number, shares: readonly number[]): number[] {
  const perDecade = 400;
  const decades = 9;
  const bins = new Float64Array(perDecade * decades + 1);
  let total = 0;
  for (let i = 0; i < hits.count; i++) {
    const dx = hits.x[i]! - x;
    const dy = hits.y[i]! - y;
    const r2 = dx * dx + dy * dy;
    // From 1 µm in steps of 1/400 decade.
    const k = Math.max(0, Math.min(bins.length - 1, Math.round((Math.log10(r2) / 2 + 6) * perDecade)));
    bins[r2 > 0 ? k : 0] = bins[r2 > 0 ? k : 0]! + hits.weight[i]!;
    total += hits.weight[i]!;
  }
  return shares.map((share) => {
    let sum = 0;
    const k = bins.findIndex((b) => (sum += b) >= share * total);
    return total > 0 ? 10 ** (k / perDecade - 6) : 0;
  });
}

/** Concentration on a square grid round a point, row by row. */
export function gridOf(hits: PlaneHits, x: number, y: number, cells: number, size: number): number[] {
  const grid = new Float64Array(cells * cells);
  const cell = size / cells;
  for (let i = 0; i < hits.count; i++) {
    const column = Math.floor((hits.x[i]! - x) / cell + cells / 2);
    const row = Math.floor((hits.y[i]! - y) / cell + cells / 2);
    if (column < 0 || row < 0 || column >= cells || row >= cells) continue;
    grid[row * cells + column] = grid[row * cells + column]! + hits.weight[i]!;
  }
  return Array.from(grid, (power) => Number((power / (cell * cell)).toPrecision(3)));
}

/** Concentration along a line through a point, averaged over discs of a diameter, at steps of a quarter of it. */
export function profileAlong(hits: PlaneHits, x: number, y: number, ux: number, uy: number, diameter: number, halfLength: number): { readonly stepM: number; readonly suns: Float64Array } {
  const step = diameter / 4;
  const radius = diameter / 2;
  const half = Math.min(20000, Math.ceil(halfLength / step));
  const suns = new Float64Array(2 * half + 1);
  const area = Math.PI * radius * radius;
  for (let i = 0; i < hits.count; i++) {
    const dx = hits.x[i]! - x;
    const dy = hits.y[i]! - y;
    const across = dy * ux - dx * uy;
    if (Math.abs(across) > radius) continue;
    const along = dx * ux + dy * uy;
    const reach = Math.sqrt(radius * radius - across * across);
    const first = Math.max(0, Math.ceil((along - reach) / step + half));
    const last = Math.min(2 * half, Math.floor((along + reach) / step + half));
    for (let k = first; k <= last; k++) suns[k] = suns[k]! + hits.weight[i]! / area;
  }
  return { stepM: step, suns };
}

/** Length of the profile on which the concentration reaches a threshold; crossings are interpolated. */
export function widthAbove(profile: { readonly stepM: number; readonly suns: Float64Array }, threshold: number): number {
  const { stepM, suns } = profile;
  let length = 0;
  for (let k = 1; k < suns.length; k++) {
    const a = suns[k - 1]! - threshold;
    const b = suns[k]! - threshold;
    if (a >= 0 && b >= 0) length += stepM;
    else if (a >= 0 !== b >= 0) length += (stepM * Math.max(a, b)) / Math.abs(a - b);
  }
  return length;
}
