/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import type { PlaneHits } from './bundle.ts';
import { cutPlane } from './bundle.ts';
import { toLocal } from './frame.ts';
import type { ReceiverPlane } from './measure.ts';
import type { TracedOptic } from './trace-bundle.ts';

/** Square map of disc means about a point of a plane. */
export interface MapShape {
  /** Half of the side. [m] */
  readonly halfM: number;
  readonly cellM: number;
  /** Points along a side, odd. */
  readonly side: number;
  /** Half-width of the disc in each row of cells that it touches, from its lowest row to its highest. In cells. */
  readonly halfWidths: Float64Array;
}

const mostCells = 48;
const subRows = 8;

/** Mean half-width of a disc within one row of cells. @param row Rows from the middle. @param radius In cells. */
function halfWidth(row: number, radius: number): number {
  let sum = 0;
  for (let k = 0; k < subRows; k++) sum += Math.sqrt(Math.max(0, radius * radius - (row + (k + 0.5) / subRows - 0.5) ** 2));
  return sum / subRows;
}

/** Cells of an eighth of the disc, or as fine as the extent allows; a disc is never smaller than one cell. */
export function mapShape(halfM: number, discM: number): MapShape {
  const cellM = Math.max(discM / 8, halfM / mostCells);
  const cells = Math.ceil(halfM / cellM);
  const radius = Math.max(discM / 2 / cellM, 0.5);
  const reach = Math.ceil(radius - 0.5);
  return { halfM: cells * cellM, cellM, side: 2 * cells + 1, halfWidths: Float64Array.from({ length: 2 * reach + 1 }, (_unused, k) => halfWidth(k - reach, radius)) };
}

/** Power in square cells about the middle of a plane, each row summed up from its left end: entry `column` is the sum before that cell. */
function summedRows(hits: PlaneHits, { side, cellM }: MapShape): Float64Array {
  const middle = (side - 1) / 2;
  const sums = new Float64Array(side * (side + 1));
  const inverse = 1 / cellM;
  for (let i = 0; i < hits.count; i++) {
    const column = Math.round(hits.x[i]! * inverse) + middle;
    const row = Math.round(hits.y[i]! * inverse) + middle;
    if (column < 0 || row < 0 || column >= side || row >= side) continue;
    const k = row * (side + 1) + column + 1;
    sums[k] = sums[k]! + hits.weight[i]!;
  }
  for (let row = 0; row < side; row++) {
    for (let k = row * (side + 1) + 1; k <= row * (side + 1) + side; k++) sums[k] = sums[k]! + sums[k - 1]!;
  }
  return sums;
}

/** Sum of a row up to a place between its cells. */
function upTo(sums: Float64Array, start: number, side: number, place: number): number {
  const held = place < 0 ? 0 : place > side ? side : place;
  const k = Math.min(side - 1, Math.floor(held));
  const low = sums[start + k]!;
  return low + (held - k) * (sums[start + k + 1]! - low);
}

/**
 * Mean concentration on discs round every point of a map, from forward rays.
 *
 * @param across Direction of the map's rows in the plane. @param out Filled row by row, `side` × `side`.
 * @param perBatch At most this many rays of each batch. @param share All rays over those looked at.
 */
export function fillDiscMap(
  traced: TracedOptic, plane: ReceiverPlane, across: Vector, shape: MapShape, hits: PlaneHits, perBatch: number, share: number, out: Float32Array,
): void {
  const { frame } = traced.kernel;
  cutPlane(traced.bundle, { origin: toLocal(frame, plane.origin), normal: toLocal(frame, plane.normal) }, hits, perBatch, toLocal(frame, across));
  const { side, cellM, halfWidths } = shape;
  const sums = summedRows(hits, shape);
  const reach = (halfWidths.length - 1) / 2;
  const perArea = share / (2 * halfWidths.reduce((sum, half) => sum + half, 0) * cellM * cellM);
  for (let row = 0; row < side; row++) {
    const lowest = Math.max(0, row - reach);
    const highest = Math.min(side - 1, row + reach);
    for (let column = 0; column < side; column++) {
      let sum = 0;
      for (let r = lowest; r <= highest; r++) {
        const half = halfWidths[r - row + reach]!;
        sum += upTo(sums, r * (side + 1), side, column + 0.5 + half) - upTo(sums, r * (side + 1), side, column + 0.5 - half);
      }
      out[row * side + column] = sum * perArea;
    }
  }
}

/** Bilinear reading of a map at a place from its middle; 0 outside. @param at Start of the map in `values`. */
export function readDiscMap(values: Float32Array, at: number, shape: MapShape, x: number, y: number): number {
  const { side, cellM } = shape;
  const u = x / cellM + (side - 1) / 2;
  const v = y / cellM + (side - 1) / 2;
  if (!(u >= 0 && v >= 0 && u < side - 1 && v < side - 1)) return 0;
  const column = Math.floor(u);
  const row = Math.floor(v);
  const s = u - column;
  const t = v - row;
  const k = at + row * side + column;
  return (1 - t) * ((1 - s) * values[k]! + s * values[k + 1]!) + t * ((1 - s) * values[k + side]! + s * values[k + side + 1]!);
}
