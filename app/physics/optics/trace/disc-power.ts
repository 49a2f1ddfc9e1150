/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { PlaneHits } from './bundle.ts';

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
