/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
/**
 * Sobol points with Matoušek's random linear scramble and a random digital shift.
 *
 * Each batch is one independent randomisation, so the spread of batch means is an honest standard error.
 *
 * @see S. Joe and F. Y. Kuo, SIAM J. Sci. Comput. 30, 2635–2654, 2008 (direction numbers). doi:10.1137/070709359
 * @see J. Matoušek, J. Complexity 14, 527–556, 1998 (scramble). doi:10.1006/jcom.1998.0489
 */

/** Coefficients of the primitive polynomial and first direction numbers of dimensions 2 to 13. */
const primitive: readonly { readonly a: number; readonly m: readonly number[] }[] = [
  { a: 0, m: [1] },
  { a: 1, m: [1, 3] },
  { a: 1, m: [1, 3, 1] },
  { a: 2, m: [1, 1, 1] },
  { a: 1, m: [1, 1, 3, 3] },
  { a: 4, m: [1, 3, 5, 13] },
  { a: 2, m: [1, 1, 5, 5, 17] },
  { a: 4, m: [1, 1, 5, 5, 5] },
  { a: 7, m: [1, 1, 7, 11, 19] },
  { a: 11, m: [1, 1, 5, 1, 1] },
  { a: 13, m: [1, 1, 1, 3, 11] },
  { a: 14, m: [1, 3, 5, 5, 31] },
];

export const sobolDimensions = primitive.length + 1;

function directionNumbers(dimension: number): Uint32Array {
  const v = new Uint32Array(32);
  if (dimension === 0) {
    for (let i = 0; i < 32; i++) v[i] = (1 << (31 - i)) >>> 0;
    return v;
  }
  const { a, m } = primitive[dimension - 1] ?? { a: 0, m: [1] };
  const s = m.length;
  for (let i = 0; i < 32; i++) {
    if (i < s) {
      v[i] = ((m[i] ?? 1) << (31 - i)) >>> 0;
      continue;
    }
    const older = v[i - s] ?? 0;
    let next = older ^ (older >>> s);
    for (let k = 1; k < s; k++) if ((a >>> (s - 1 - k)) & 1) next ^= v[i - k] ?? 0;
    v[i] = next >>> 0;
  }
  return v;
}

/** Small counter-based generator (splitmix32): one 32-bit word per call. */
export function wordSource(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x21f0aaad);
    z = Math.imul(z ^ (z >>> 15), 0x735a2d97);
    return (z ^ (z >>> 15)) >>> 0;
  };
}

/** Replaces each digit by itself plus a random combination of the more significant ones. */
function scramble(v: Uint32Array, word: () => number): Uint32Array {
  const rows = new Uint32Array(32);
  for (let bit = 0; bit < 32; bit++) {
    const own = (1 << (31 - bit)) >>> 0;
    const above = bit === 0 ? 0 : (0xffffffff << (32 - bit)) >>> 0;
    rows[bit] = (own | (word() & above)) >>> 0;
  }
  return v.map((column) => {
    let out = 0;
    for (let bit = 0; bit < 32; bit++) {
      let x = (rows[bit] ?? 0) & column;
      x ^= x >>> 16;
      x ^= x >>> 8;
      x ^= x >>> 4;
      x ^= x >>> 2;
      x ^= x >>> 1;
      if (x & 1) out |= 1 << (31 - bit);
    }
    return out >>> 0;
  });
}

/** One randomised sequence; `fill` writes the next points, dimension by dimension. */
export class ScrambledSobol {
  readonly #columns: readonly Uint32Array[];
  readonly #state: Uint32Array;
  #index = 0;
  /** Number of trailing zeros of the points' numbers, shared by all dimensions. */
  #turns = new Uint8Array(0);

  /** @param seed Null for the plain sequence. @param batch Batches of one seed are independent of each other. */
  constructor(dimensions: number, seed: number | null, batch: number) {
    if (!(dimensions >= 1 && dimensions <= sobolDimensions)) {
      throw new RangeError(`dimensions = ${dimensions}; allowed 1 to ${sobolDimensions}`);
    }
    const word = wordSource(((seed ?? 0) ^ Math.imul(batch + 1, 0x85ebca6b)) >>> 0);
    for (let i = 0; i < 4; i++) word();
    this.#columns = Array.from({ length: dimensions }, (_, d) => (seed === null ? directionNumbers(d) : scramble(directionNumbers(d), word)));
    this.#state = Uint32Array.from({ length: dimensions }, () => (seed === null ? 0 : word()));
  }

  /** Writes `count` points, each in (0, 1), into one array per dimension. */
  fill(out: readonly Float64Array[], count: number): void {
    if (this.#turns.length < count) this.#turns = new Uint8Array(count);
    const turns = this.#turns;
    for (let i = 0; i < count; i++) {
      const next = this.#index + i + 1;
      turns[i] = 31 - Math.clz32(next & -next);
    }
    this.#columns.forEach((column, d) => {
      const target = out[d];
      if (target) this.#state[d] = fillColumn(target, count, column, turns, this.#state[d] ?? 0);
    });
    this.#index += count;
  }
}

/** One dimension by Gray code. @param turns Column that turns the next point. @returns The state after the last point. */
function fillColumn(target: Float64Array, count: number, column: Uint32Array, turns: Uint8Array, state: number): number {
  let x = state;
  for (let i = 0; i < count; i++) {
    target[i] = ((x >>> 0) + 0.5) * 2.3283064365386963e-10;
    x ^= column[turns[i]!]!;
  }
  return x >>> 0;
}
