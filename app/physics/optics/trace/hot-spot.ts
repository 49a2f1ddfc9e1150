import type { PlaneHits } from './bundle.ts';

export interface Spot {
  readonly x: number;
  readonly y: number;
  /** Radius with which it was sought; larger than asked where rays are few. */
  readonly radius: number;
  /** Power inside that radius. */
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

const fewestRays = 60;

/** Hash grid over plane hits; its arrays are reused from search to search. */
export class SpotFinder {
  readonly #size: number;
  readonly #column: Int32Array;
  readonly #row: Int32Array;
  readonly #sum: Float64Array;
  readonly #slots: Int32Array;
  readonly #nearX: Float64Array;
  readonly #nearY: Float64Array;
  readonly #nearW: Float64Array;

  constructor(capacity: number) {
    this.#size = 2 ** Math.ceil(Math.log2(Math.max(64, 2 * capacity)));
    this.#column = new Int32Array(this.#size);
    this.#row = new Int32Array(this.#size);
    this.#sum = new Float64Array(this.#size);
    this.#slots = new Int32Array(this.#size);
    this.#nearX = new Float64Array(capacity);
    this.#nearY = new Float64Array(capacity);
    this.#nearW = new Float64Array(capacity);
  }

  /** Centre of the disc of a radius that takes most power; null without hits. */
  find(hits: PlaneHits, radius: number, line: LineHint | null): Spot | null {
    if (hits.count === 0) return null;
    let total = 0;
    for (let i = 0; i < hits.count; i++) total += hits.weight[i]!;
    const enough = (total / hits.count) * Math.min(fewestRays, hits.count / 4);
    for (let r = radius; ; r *= 2) {
      const spot = line ? this.#findAcross(hits, r, line) : this.#findOnGrid(hits, r);
      if (spot.power >= enough) return spot;
    }
  }

  #slot(column: number, row: number, mask: number): number {
    let k = (Math.imul(column, 73856093) ^ Math.imul(row, 19349663)) & mask;
    while (this.#sum[k]! > 0 && (this.#column[k] !== column || this.#row[k] !== row)) k = (k + 1) & mask;
    return k;
  }

  #findOnGrid(hits: PlaneHits, radius: number): Spot {
    const cell = radius / 2;
    const mask = Math.min(this.#size, 2 ** Math.ceil(Math.log2(2 * hits.count + 64))) - 1;
    this.#sum.fill(0, 0, mask + 1);
    let used = 0;
    let highest = 0;
    for (let i = 0; i < hits.count; i++) {
      const column = Math.floor(hits.x[i]! / cell);
      const row = Math.floor(hits.y[i]! / cell);
      const k = this.#slot(column, row, mask);
      if (this.#sum[k] === 0) {
        this.#column[k] = column;
        this.#row[k] = row;
        this.#slots[used++] = k;
      }
      const sum = this.#sum[k]! + hits.weight[i]!;
      this.#sum[k] = sum;
      if (sum > highest) highest = sum;
    }
    let best = -1;
    let bestScore = -1;
    for (let i = 0; i < used; i++) {
      const k = this.#slots[i]!;
      // The best disc covers at most 13 cells and part of their neighbours, so it holds one cell of this size.
      if (this.#sum[k]! < highest / 20) continue;
      const score = this.#score(k, mask);
      if (score > bestScore) {
        bestScore = score;
        best = k;
      }
    }
    return this.#climb(hits, (this.#column[best]! + 0.5) * cell, (this.#row[best]! + 0.5) * cell, radius);
  }

  #score(k: number, mask: number): number {
    const column = this.#column[k]!;
    const row = this.#row[k]!;
    let score = 0;
    for (let i = -2; i <= 2; i++) {
      const reach = i === -2 || i === 2 ? 0 : i === 0 ? 2 : 1;
      for (let j = -reach; j <= reach; j++) score += this.#sum[this.#slot(column + i, row + j, mask)]!;
    }
    return score;
  }

  /** Moves the disc to where it holds most, in steps from half a radius down to a sixteenth. */
  #climb(hits: PlaneHits, x0: number, y0: number, radius: number): Spot {
    const near2 = (3.2 * radius) ** 2;
    let count = 0;
    for (let i = 0; i < hits.count; i++) {
      const dx = hits.x[i]! - x0;
      const dy = hits.y[i]! - y0;
      if (dx * dx + dy * dy > near2) continue;
      this.#nearX[count] = hits.x[i]!;
      this.#nearY[count] = hits.y[i]!;
      this.#nearW[count] = hits.weight[i]!;
      count++;
    }
    let x = x0;
    let y = y0;
    let power = this.#near(x, y, radius, count);
    for (let step = radius / 2; step > radius / 20; step /= 2) {
      for (let moved = true, tries = 0; moved && tries < 8; tries++) {
        moved = false;
        const fromX = x;
        const fromY = y;
        for (let k = 0; k < 8; k++) {
          const turn = (k * Math.PI) / 4;
          const tx = fromX + step * Math.cos(turn);
          const ty = fromY + step * Math.sin(turn);
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
    return { x, y, radius, power };
  }

  #near(x: number, y: number, radius: number, count: number): number {
    const r2 = radius * radius;
    let sum = 0;
    for (let i = 0; i < count; i++) {
      const dx = this.#nearX[i]! - x;
      const dy = this.#nearY[i]! - y;
      if (dx * dx + dy * dy <= r2) sum += this.#nearW[i]!;
    }
    return sum;
  }

  #findAcross(hits: PlaneHits, radius: number, line: LineHint): Spot {
    const step = radius / 8;
    const { ux, uy, at, half } = line;
    const stretch = Math.max(half, radius);
    let low = Infinity;
    let high = -Infinity;
    let count = 0;
    for (let i = 0; i < hits.count; i++) {
      if (Math.abs(hits.x[i]! * ux + hits.y[i]! * uy - at) > stretch) continue;
      const across = hits.y[i]! * ux - hits.x[i]! * uy;
      this.#nearX[count] = across;
      this.#nearW[count] = hits.weight[i]!;
      count++;
      low = Math.min(low, across);
      high = Math.max(high, across);
    }
    if (count === 0) return { x: at * ux, y: at * uy, radius, power: 0 };
    const cells = Math.min(this.#size, Math.ceil((high - low) / step) + 1);
    const width = Math.max(step, (high - low) / cells);
    this.#sum.fill(0, 0, cells);
    for (let i = 0; i < count; i++) {
      const k = Math.min(cells - 1, Math.floor((this.#nearX[i]! - low) / width));
      this.#sum[k] = this.#sum[k]! + this.#nearW[i]!;
    }
    const window = Math.max(1, Math.round((2 * radius) / width));
    let run = 0;
    let best = 0;
    let bestAt = 0;
    for (let k = 0; k < cells; k++) {
      run += this.#sum[k]!;
      if (k >= window) run -= this.#sum[k - window]!;
      if (run > best) {
        best = run;
        bestAt = k;
      }
    }
    const across = low + width * (bestAt + 1 - window / 2);
    const x = at * ux - across * uy;
    const y = at * uy + across * ux;
    // Share of the stretch that a disc of this radius covers, so that the count is that of a disc.
    return { x, y, radius, power: (best * Math.PI * radius) / (4 * stretch) };
  }
}

/** Power in a disc, batch by batch. */
export function discPowers(hits: PlaneHits, x: number, y: number, radius: number): number[] {
  const r2 = radius * radius;
  let i = 0;
  return hits.batchEnd.map((end) => {
    let sum = 0;
    for (; i < end; i++) {
      const dx = hits.x[i]! - x;
      const dy = hits.y[i]! - y;
      if (dx * dx + dy * dy <= r2) sum += hits.weight[i]!;
    }
    return sum;
  });
}

/** Power in a strip along the plane's row direction (or across it), batch by batch: |across − at| ≤ half. */
export function stripPowers(hits: PlaneHits, at: number, half: number, alongLow: number, alongHigh: number): number[] {
  let i = 0;
  return hits.batchEnd.map((end) => {
    let sum = 0;
    for (; i < end; i++) {
      const y = hits.y[i]!;
      if (Math.abs(hits.x[i]! - at) <= half && y >= alongLow && y <= alongHigh) sum += hits.weight[i]!;
    }
    return sum;
  });
}

/** Mean and standard error of batch values that add up to the whole. */
export function batchMean(parts: readonly number[]): { readonly mean: number; readonly stdError: number } {
  const n = parts.length;
  const mean = parts.reduce((a, b) => a + b, 0);
  const spread = parts.reduce((a, b) => a + (b * n - mean) ** 2, 0);
  return { mean, stdError: n > 1 ? Math.sqrt(spread / (n * (n - 1))) : Infinity };
}
