/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */

/** Sums of weights by square cell, in an open-addressed table. */
export class CellSums {
  readonly #size: number;
  readonly column: Int32Array;
  readonly row: Int32Array;
  readonly sum: Float64Array;
  /** Slots in use, in order of first use. */
  readonly slots: Int32Array;
  used = 0;
  highest = 0;
  mask = 0;

  constructor(capacity: number) {
    this.#size = 2 ** Math.ceil(Math.log2(Math.max(64, 2 * capacity)));
    this.column = new Int32Array(this.#size);
    this.row = new Int32Array(this.#size);
    this.sum = new Float64Array(this.#size);
    this.slots = new Int32Array(this.#size);
  }

  clear(entries: number): void {
    this.mask = Math.min(this.#size, 2 ** Math.ceil(Math.log2(2 * entries + 64))) - 1;
    this.sum.fill(0, 0, this.mask + 1);
    this.used = 0;
    this.highest = 0;
  }

  add(column: number, row: number, weight: number): number {
    const k = this.find(column, row);
    if (this.sum[k] === 0) {
      this.column[k] = column;
      this.row[k] = row;
      this.slots[this.used++] = k;
    }
    const sum = this.sum[k]! + weight;
    this.sum[k] = sum;
    if (sum > this.highest) this.highest = sum;
    return k;
  }

  /** Slot of a cell, or the free slot where it would go. */
  find(column: number, row: number): number {
    let k = (Math.imul(column, 73856093) ^ Math.imul(row, 19349663)) & this.mask;
    while (this.sum[k]! > 0 && (this.column[k] !== column || this.row[k] !== row)) k = (k + 1) & this.mask;
    return k;
  }

  /** Sum over the cells round one: a disc of two cells' radius, or the block of 3 × 3. */
  around(k: number, disc: boolean): number {
    const column = this.column[k]!;
    const row = this.row[k]!;
    const far = disc ? 2 : 1;
    let sum = 0;
    for (let i = -far; i <= far; i++) {
      const reach = !disc ? 1 : i === -2 || i === 2 ? 0 : i === 0 ? 2 : 1;
      for (let j = -reach; j <= reach; j++) sum += this.sum[this.find(column + i, row + j)]!;
    }
    return sum;
  }
}
