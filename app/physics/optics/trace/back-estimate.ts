/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { Vector } from '#app/physics/vector.ts';
import type { LocalPlane } from './bundle.ts';
import { frameAbout } from './frame.ts';
import type { BackTrace } from './kernel.ts';
import { batchCount } from './kernel.ts';
import { ScrambledSobol } from '#app/physics/sobol.ts';

/**
 * Concentration on a disc by tracing back from it: independent of the forward rays and exact by the invariance of
 * radiance. Receiver cosine and transmittance stand inside the integral.
 *
 * @param centre Centre of the disc in local axes.
 * @param paths Paths in all batches together.
 */
export function backEstimate(back: BackTrace, centre: Vector, plane: LocalPlane, diameterM: number, paths: number, seed: number): { readonly concentration: number; readonly stdError: number } {
  const perBatch = Math.ceil(paths / batchCount);
  const dimensions = back.dimensions + 2;
  const columns = Array.from({ length: dimensions }, () => new Float64Array(perBatch));
  const u = new Float64Array(back.dimensions);
  const { x: ex, y: ey } = frameAbout(plane.normal, [0, 1, 0]);
  const means: number[] = [];
  for (let batch = 0; batch < batchCount; batch++) {
    new ScrambledSobol(dimensions, seed ^ 0x2545f491, batch).fill(columns, perBatch);
    let sum = 0;
    for (let i = 0; i < perBatch; i++) {
      for (let d = 0; d < back.dimensions; d++) u[d] = columns[d]![i]!;
      const r = (diameterM / 2) * Math.sqrt(columns[back.dimensions]![i]!);
      const turn = 2 * Math.PI * columns[back.dimensions + 1]![i]!;
      const a = r * Math.cos(turn);
      const b = r * Math.sin(turn);
      const at: Vector = [centre[0] + a * ex[0] + b * ey[0], centre[1] + a * ex[1] + b * ey[1], centre[2] + a * ex[2] + b * ey[2]];
      sum += back.path(at, plane.normal, u);
    }
    means.push(sum / perBatch);
  }
  const concentration = means.reduce((a, b) => a + b, 0) / batchCount;
  const spread = means.reduce((a, b) => a + (b - concentration) ** 2, 0);
  return { concentration, stdError: Math.sqrt(spread / (batchCount * (batchCount - 1))) };
}
