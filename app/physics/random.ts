/** Seeded low-discrepancy numbers and their turn into distributions. Same seed, same numbers, on every machine. */

/** Primitive polynomials and first direction integers by dimension. S. Joe and F. Y. Kuo, ACM TOMS 29, 2003 / SIAM 2008. */
const sobolRows: readonly (readonly [degree: number, coefficients: number, first: readonly number[]])[] = [
  [1, 0, [1]], [2, 1, [1, 3]], [3, 1, [1, 3, 1]], [3, 2, [1, 1, 1]], [4, 1, [1, 1, 3, 3]], [4, 4, [1, 3, 5, 13]],
  [5, 2, [1, 1, 5, 5, 17]], [5, 4, [1, 1, 5, 5, 5]], [5, 7, [1, 1, 7, 11, 19]], [5, 11, [1, 1, 5, 1, 1]],
  [5, 13, [1, 1, 1, 3, 11]], [5, 14, [1, 3, 5, 5, 31]],
];

export const sobolDimensions = sobolRows.length + 1;

function directionNumbers(dimension: number): Uint32Array {
  const v = new Uint32Array(32);
  if (dimension === 0) {
    for (let i = 0; i < 32; i++) v[i] = (1 << (31 - i)) >>> 0;
    return v;
  }
  const row = sobolRows[dimension - 1];
  if (row === undefined) throw new RangeError(`Sobol dimension is ${dimension}; it must lie in 0…${sobolRows.length}.`);
  const [degree, coefficients, first] = row;
  for (let i = 0; i < degree; i++) v[i] = ((first[i] ?? 1) << (31 - i)) >>> 0;
  for (let i = degree; i < 32; i++) {
    let value = (v[i - degree] ?? 0) ^ ((v[i - degree] ?? 0) >>> degree);
    for (let k = 1; k < degree; k++) {
      if (((coefficients >>> (degree - 1 - k)) & 1) === 1) value ^= v[i - k] ?? 0;
    }
    v[i] = value >>> 0;
  }
  return v;
}

/** Mixes 32 bits so that every bit depends on all the others. */
function mix32(value: number): number {
  let x = value >>> 0;
  x = Math.imul(x ^ (x >>> 16), 0x7feb352d);
  x = Math.imul(x ^ (x >>> 15), 0x846ca68b);
  return (x ^ (x >>> 16)) >>> 0;
}

function reverseBits(value: number): number {
  let x = value >>> 0;
  x = ((x >>> 1) & 0x55555555) | ((x & 0x55555555) << 1);
  x = ((x >>> 2) & 0x33333333) | ((x & 0x33333333) << 2);
  x = ((x >>> 4) & 0x0f0f0f0f) | ((x & 0x0f0f0f0f) << 4);
  x = ((x >>> 8) & 0x00ff00ff) | ((x & 0x00ff00ff) << 8);
  return ((x >>> 16) | (x << 16)) >>> 0;
}

/**
 * Nested scrambling of one coordinate by a hash that only carries upwards.
 *
 * @see S. Laine and T. Karras, Stratified sampling for stochastic transparency, 2011; A. B. Owen, 1995.
 */
function owenScramble(value: number, seed: number): number {
  let x = reverseBits(value);
  x = (x + seed) >>> 0;
  x = (x ^ Math.imul(x, 0x6c50b47c)) >>> 0;
  x = (x ^ Math.imul(x, 0xb82f1e52)) >>> 0;
  x = (x ^ Math.imul(x, 0xc7afe638)) >>> 0;
  x = (x ^ Math.imul(x, 0x8d22f6e6)) >>> 0;
  return reverseBits(x);
}

/** Plain Sobol coordinates, one dimension after the other: entry [dimension × count + index], in [0, 1). */
export function sobolPoints(dimensions: number, count: number, seed: number | null): Float64Array {
  const out = new Float64Array(dimensions * count);
  for (let d = 0; d < dimensions; d++) {
    const v = directionNumbers(d);
    const key = seed === null ? 0 : mix32(mix32(seed >>> 0) ^ Math.imul(d + 1, 0x9e3779b9));
    let state = 0;
    for (let i = 0; i < count; i++) {
      const bits = seed === null ? state : owenScramble(state, key);
      // Half a step off the grid keeps 0 out of the inverse distributions.
      out[d * count + i] = (bits + (seed === null ? 0 : 0.5)) / 4_294_967_296;
      let lowestZero = 0;
      while (((i >>> lowestZero) & 1) === 1) lowestZero++;
      state = (state ^ (v[lowestZero] ?? 0)) >>> 0;
    }
  }
  return out;
}

/**
 * Standard normal quantile. Relative error below 1.2e-9.
 *
 * @param p Probability inside (0, 1).
 * @see P. J. Acklam, An algorithm for computing the inverse normal cumulative distribution function, 2003.
 */
export function normalQuantile(p: number): number {
  const a = [-39.69683028665376, 220.9460984245205, -275.9285104469687, 138.357751867269, -30.66479806614716, 2.506628277459239] as const;
  const b = [-54.47609879822406, 161.5858368580409, -155.6989798598866, 66.80131188771972, -13.28068155288572] as const;
  const c = [-0.007784894002430293, -0.3223964580411365, -2.400758277161838, -2.549732539343734, 4.374664141464968, 2.938163982698783] as const;
  const d = [0.007784695709041462, 0.3224671290700398, 2.445134137142996, 3.754408661907416] as const;
  const tail = (q: number): number =>
    (((((c[0] * q + c[1]) * q + c[2]) * q + c[3]) * q + c[4]) * q + c[5]) / ((((d[0] * q + d[1]) * q + d[2]) * q + d[3]) * q + 1);
  if (p < 0.02425) return tail(Math.sqrt(-2 * Math.log(p)));
  if (p > 1 - 0.02425) return -tail(Math.sqrt(-2 * Math.log(1 - p)));
  const q = p - 0.5;
  const r = q * q;
  const top = (((((a[0] * r + a[1]) * r + a[2]) * r + a[3]) * r + a[4]) * r + a[5]) * q;
  return top / (((((b[0] * r + b[1]) * r + b[2]) * r + b[3]) * r + b[4]) * r + 1);
}
