/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { PlaneHits } from './bundle.ts';
import { CellSums } from './cell-sums.ts';

export interface Spot {
  readonly x: number;
  readonly y: number;
  /** Radius with which it was sought; larger than asked where rays are few. */
  readonly radius: number;
  /** Power over area of the disc (or strip) of that radius. */
  readonly concentration: number;
  /** Rays that this rests on. */
  readonly rays: number;
}

/** Disc of a search with the power that it holds. */
interface Disc {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly power: number;
}

/** Straight focus: only the place across it is sought, at a fixed place along it. */
export interface LineHint {
  readonly ux: number;
  readonly uy: number;
  /** Place along the line and half of the stretch that is looked at. */
  readonly at: number;
  readonly half: number;
}

/** Hits that a climb looks at: the place of the disc moves by far less than its radius with more. */
const climbRays = 5000;

/** Hits that a search of the grid looks at first, and those of them on a disc that place it well enough. */
const thinnedHits = 12_000;
const fewestThinned = 300;
const eighths = Float64Array.from({ length: 8 }, (_, k) => Math.cos((k * Math.PI) / 4));

/** Finds hot spots in plane hits; its arrays are reused from search to search. */
export class SpotFinder {
  readonly #coarse: CellSums;
  readonly #fine: CellSums;
  readonly #coarseSlot: Int32Array;
  readonly #promising: Uint8Array;
  readonly #index: Int32Array;
  readonly #nearX: Float64Array;
  readonly #nearY: Float64Array;
  readonly #nearW: Float64Array;
  #meanX = 0;
  #meanY = 0;
  #steps = 3;
  /** Hits that the last gathering found, before it thinned them. */
  #gathered = 0;
  /** Every how many hits a search of the grid looks at. Odd, so that it falls on no subset of the low-discrepancy points. */
  #stride = 1;

  constructor(capacity: number) {
    this.#coarse = new CellSums(capacity);
    this.#fine = new CellSums(capacity);
    this.#coarseSlot = new Int32Array(capacity);
    this.#promising = new Uint8Array(this.#coarse.sum.length);
    this.#index = new Int32Array(capacity);
    this.#nearX = new Float64Array(capacity);
    this.#nearY = new Float64Array(capacity);
    this.#nearW = new Float64Array(capacity);
  }

  /**
   * Centre of the disc of a radius that takes most power; null without hits.
   *
   * @param fewest The radius is doubled until this many rays lie in the disc.
   * @param look `quick` places the disc within a quarter of its radius, `exact` within a sixteenth.
   */
  find(hits: PlaneHits, radius: number, line: LineHint | null, fewest: number, look: 'quick' | 'exact' = 'exact', from = 0, to = hits.count): Spot | null {
    if (to <= from) return null;
    let total = 0;
    for (let i = from; i < to; i++) total += hits.weight[i]!;
    const meanWeight = total / (to - from);
    const enough = Math.min(fewest, (to - from) / 4);
    this.#steps = look === 'quick' ? 1 : 3;
    if (!line && to - from > 2 * thinnedHits) {
      const spot = this.#findThinned(hits, radius, meanWeight, from, to);
      if (spot) return spot;
    }
    this.#stride = 1;
    for (let r = radius; ; r *= 2) {
      const disc = line ? this.#findAcross(hits, r, line, from, to) : this.#findOnGrid(hits, r, enough * meanWeight, from, to);
      const rays = disc.power / meanWeight;
      if (rays >= enough || !(r < 1e4)) {
        const area = line ? 4 * disc.radius * Math.max(line.half, disc.radius) : Math.PI * r * r;
        return { x: disc.x, y: disc.y, radius: disc.radius, concentration: disc.power / area, rays };
      }
    }
  }

  /** Search among a part of the hits; null where that puts too few of them on the disc to place it. */
  #findThinned(hits: PlaneHits, radius: number, meanWeight: number, from: number, to: number): Spot | null {
    this.#stride = Math.ceil((to - from) / thinnedHits) | 1;
    const disc = this.#findOnGrid(hits, radius, (fewestThinned / this.#stride) * meanWeight, from, to);
    const rays = disc.power / meanWeight;
    return rays < fewestThinned * this.#stride ? null : { x: disc.x, y: disc.y, radius, concentration: disc.power / (Math.PI * radius * radius), rays };
  }

  /**
   * Cells of four radii first. The best of them gives a disc; only where cells hold more than that disc can a better
   * one lie, and only there cells of half a radius are filled.
   */
  #findOnGrid(hits: PlaneHits, radius: number, enough: number, from: number, to: number): Disc {
    const coarse = this.#coarse;
    const inverse = 1 / (4 * radius);
    coarse.clear(Math.ceil((to - from) / this.#stride));
    let strongest = 0;
    for (let i = from; i < to; i += this.#stride) {
      const k = coarse.add(Math.floor(hits.x[i]! * inverse), Math.floor(hits.y[i]! * inverse), hits.weight[i]!);
      this.#coarseSlot[i] = k;
      if (coarse.sum[k] === coarse.highest) strongest = k;
    }
    // A cell is five times a disc: where no cell holds enough, no disc will.
    if (coarse.highest < enough) return { x: 0, y: 0, radius, power: 0 };
    this.#promising.fill(0, 0, coarse.mask + 1);
    this.#flagBlock(strongest);
    const first = this.#searchFlagged(hits, radius, from, to);
    let more = false;
    for (let i = 0; i < coarse.used; i++) {
      const k = coarse.slots[i]!;
      // A quick look passes over cells at the foot of the distribution.
      if (this.#steps === 1 && coarse.sum[k]! < 0.35 * coarse.highest) continue;
      if (this.#promising[k] === 0 && coarse.around(k, false) * this.#stride > first.power) {
        this.#promising[k] = 1;
        more = true;
      }
    }
    if (!more) return first;
    const second = this.#searchFlagged(hits, radius, from, to);
    return second.power > first.power ? second : first;
  }

  #flagBlock(k: number): void {
    const coarse = this.#coarse;
    const column = coarse.column[k]!;
    const row = coarse.row[k]!;
    for (let i = -1; i <= 1; i++) for (let j = -1; j <= 1; j++) this.#promising[coarse.find(column + i, row + j)] = 1;
  }

  #searchFlagged(hits: PlaneHits, radius: number, from: number, to: number): Disc {
    const fine = this.#fine;
    const cell = radius / 2;
    const inverse = 1 / cell;
    fine.clear(Math.ceil((to - from) / this.#stride));
    for (let i = from; i < to; i += this.#stride) {
      if (this.#promising[this.#coarseSlot[i]!] === 0) continue;
      fine.add(Math.floor(hits.x[i]! * inverse), Math.floor(hits.y[i]! * inverse), hits.weight[i]!);
    }
    let best = fine.slots[0]!;
    let bestScore = -1;
    for (let i = 0; i < fine.used; i++) {
      const k = fine.slots[i]!;
      // The best disc covers at most 13 cells and part of their neighbours, so it holds one cell of this size.
      if (fine.sum[k]! < fine.highest / 20) continue;
      const score = fine.around(k, true);
      if (score > bestScore) {
        bestScore = score;
        best = k;
      }
    }
    return this.#climb(hits, (fine.column[best]! + 0.5) * cell, (fine.row[best]! + 0.5) * cell, radius, from, to);
  }

  /** Moves the disc to where it holds most: first to the mean of what it holds, then in steps of a quarter radius and less. */
  #climb(hits: PlaneHits, x0: number, y0: number, radius: number, from: number, to: number): Disc {
    const count = this.#gather(hits, x0, y0, 3 * radius, from, to);
    let x = x0;
    let y = y0;
    let power = this.#near(x, y, radius, count);
    for (let i = 0; i < 6 && power > 0; i++) {
      const tx = this.#meanX;
      const ty = this.#meanY;
      const p = this.#near(tx, ty, radius, count);
      if (p <= power) break;
      power = p;
      x = tx;
      y = ty;
    }
    for (let level = 0, step = radius / 4; level < this.#steps; level++, step /= 2) {
      for (let moved = true, tries = 0; moved && tries < 3; tries++) {
        moved = false;
        const fromX = x;
        const fromY = y;
        for (let k = 0; k < 8; k++) {
          const tx = fromX + step * eighths[k]!;
          const ty = fromY + step * eighths[(k + 6) & 7]!;
          const p = this.#near(tx, ty, radius, count);
          if (p > power) {
            power = p;
            x = tx;
            y = ty;
            moved = true;
          }
        }
      }
    }
    // The place may come from a part of the hits; the power is that of all.
    return { x, y, radius, power: this.#powerOfAll(hits, x, y, radius) };
  }

  /** Power on a disc inside the reach of the last gathering, of all its hits. */
  #powerOfAll(hits: PlaneHits, x: number, y: number, radius: number): number {
    const r2 = radius * radius;
    let sum = 0;
    for (let k = 0; k < this.#gathered; k++) {
      const i = this.#index[k]!;
      const dx = hits.x[i]! - x;
      const dy = hits.y[i]! - y;
      if (dx * dx + dy * dy <= r2) sum += hits.weight[i]!;
    }
    return sum;
  }

  /** Hits near a point, thinned evenly to what a climb needs. */
  #gather(hits: PlaneHits, x0: number, y0: number, reach: number, from: number, to: number): number {
    const near2 = reach * reach;
    let count = 0;
    for (let i = from; i < to; i++) {
      const dx = hits.x[i]! - x0;
      const dy = hits.y[i]! - y0;
      if (dx * dx + dy * dy <= near2) this.#index[count++] = i;
    }
    this.#gathered = count;
    const stride = Math.max(1, Math.floor(count / climbRays));
    let kept = 0;
    for (let k = 0; k < count; k += stride) {
      const i = this.#index[k]!;
      this.#nearX[kept] = hits.x[i]!;
      this.#nearY[kept] = hits.y[i]!;
      this.#nearW[kept] = hits.weight[i]!;
      kept++;
    }
    return kept;
  }

  #near(x: number, y: number, radius: number, count: number): number {
    const r2 = radius * radius;
    const nearX = this.#nearX;
    const nearY = this.#nearY;
    const nearW = this.#nearW;
    let sum = 0;
    let sumX = 0;
    let sumY = 0;
    for (let i = 0; i < count; i++) {
      const dx = nearX[i]! - x;
      const dy = nearY[i]! - y;
      if (dx * dx + dy * dy > r2) continue;
      const w = nearW[i]!;
      sum += w;
      sumX += w * dx;
      sumY += w * dy;
    }
    this.#meanX = sum > 0 ? x + sumX / sum : x;
    this.#meanY = sum > 0 ? y + sumY / sum : y;
    return sum;
  }

  /** Strip of twice the radius across the line; wider where the table could not resolve it. */
  #findAcross(hits: PlaneHits, asked: number, line: LineHint, from: number, to: number): Disc {
    const { ux, uy, at, half } = line;
    let low = Infinity;
    let high = -Infinity;
    let count = 0;
    const stretch = Math.max(half, asked);
    for (let i = from; i < to; i++) {
      if (Math.abs(hits.x[i]! * ux + hits.y[i]! * uy - at) > stretch) continue;
      const across = hits.y[i]! * ux - hits.x[i]! * uy;
      this.#nearX[count] = across;
      this.#nearW[count] = hits.weight[i]!;
      count++;
      if (across < low) low = across;
      if (across > high) high = across;
    }
    const sums = this.#fine.sum;
    const radius = Math.max(asked, (4 * (high - low)) / (sums.length - 16));
    if (count === 0) return { x: at * ux, y: at * uy, radius: asked, power: 0 };
    const step = radius / 4;
    const cells = Math.floor((high - low) / step) + 1;
    sums.fill(0, 0, cells);
    for (let i = 0; i < count; i++) {
      const k = Math.floor((this.#nearX[i]! - low) / step);
      sums[k] = sums[k]! + this.#nearW[i]!;
    }
    const { place, power } = bestWindow(sums, cells, 8);
    const across = low + step * place;
    return { x: at * ux - across * uy, y: at * uy + across * ux, radius, power };
  }
}

/** Middle and sum of the run of cells that holds most; of equal ones the middle one. */
function bestWindow(sums: Float64Array, cells: number, width: number): { readonly place: number; readonly power: number } {
  let run = 0;
  let power = 0;
  let first = 0;
  let last = 0;
  for (let k = 0; k < cells + width; k++) {
    if (k < cells) run += sums[k]!;
    if (k >= width) run -= sums[k - width] ?? 0;
    if (run > power * (1 + 1e-9)) {
      power = run;
      first = k;
      last = k;
    } else if (run > power * (1 - 1e-9) && last === k - 1) last = k;
  }
  return { place: (first + last) / 2 + 1 - width / 2, power };
}
