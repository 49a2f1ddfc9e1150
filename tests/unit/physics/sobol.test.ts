import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { ScrambledSobol, sobolDimensions } from '#app/physics/sobol.ts';

function points(dimensions: number, seed: number | null, batch: number, count: number): Float64Array[] {
  const out = Array.from({ length: dimensions }, () => new Float64Array(count));
  new ScrambledSobol(dimensions, seed, batch).fill(out, count);
  return out;
}

test('plain Sobol points are those of scipy.stats.qmc.Sobol 1.17 without scrambling', () => {
  // Rows 4 and 7 of Sobol(13, scramble=False).random(8); ours stand in the middle of their 2⁻³² cells.
  const fourth = [0.375, 0.375, 0.625, 0.875, 0.375, 0.125, 0.375, 0.875, 0.875, 0.625, 0.875, 0.375, 0.375];
  const seventh = [0.125, 0.625, 0.375, 0.125, 0.125, 0.375, 0.625, 0.625, 0.625, 0.875, 0.625, 0.125, 0.625];
  const columns = points(sobolDimensions, null, 0, 8);
  for (const [row, expected] of [[4, fourth], [7, seventh]] as const) {
    columns.forEach((column, d) => expect(column[row]).toBeCloseTo(expected[d] ?? NaN, 8));
  }
});

describe('scrambled Sobol points', () => {
  test('every dimension puts one of 256 points into each 256th of the interval, whatever the scramble', () => {
    fc.assert(
      fc.property(fc.integer(), fc.nat(7), (seed, batch) => {
        for (const column of points(sobolDimensions, seed, batch, 256)) {
          expect(new Set(Array.from(column, (x) => Math.floor(x * 256))).size).toBe(256);
        }
      }),
      { numRuns: 20, seed: 1 },
    );
  });

  test('the first two dimensions fill every elementary box of a 256-point net', () => {
    const [x, y] = points(2, 99, 3, 256);
    for (const split of [1, 2, 4, 8, 16, 32, 64, 128, 256]) {
      const boxes = new Set(Array.from(x ?? [], (u, i) => `${Math.floor(u * split)}/${Math.floor((y?.[i] ?? 0) * (256 / split))}`));
      expect(boxes.size).toBe(256);
    }
  });

  test('pieces of a sequence join without a seam', () => {
    const whole = points(3, 5, 0, 100);
    const sequence = new ScrambledSobol(3, 5, 0);
    const parts = [37, 63].map((count) => {
      const out = Array.from({ length: 3 }, () => new Float64Array(count));
      sequence.fill(out, count);
      return out;
    });
    expect([...(parts[0]?.[2] ?? []), ...(parts[1]?.[2] ?? [])]).toEqual([...(whole[2] ?? [])]);
  });

  test('seed and batch both change the points, the same pair gives them again', () => {
    expect(points(2, 1, 0, 8)).toEqual(points(2, 1, 0, 8));
    expect(points(2, 1, 1, 8)).not.toEqual(points(2, 1, 0, 8));
    expect(points(2, 2, 0, 8)).not.toEqual(points(2, 1, 0, 8));
  });

  test('refuses more dimensions than it has direction numbers for', () => {
    expect(() => new ScrambledSobol(14, 1, 0)).toThrow(RangeError);
  });
});
