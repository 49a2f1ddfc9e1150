import { describe, expect, test } from 'vitest';
import { normalQuantile, sobolDimensions, sobolPoints } from '#app/physics/random.ts';

describe('Sobol points', () => {
  test('are those of scipy.stats.qmc.Sobol 1.17 without scrambling', () => {
    // Rows 4 and 7 of Sobol(13, scramble=False).random(8).
    const fourth = [0.375, 0.375, 0.625, 0.875, 0.375, 0.125, 0.375, 0.875, 0.875, 0.625, 0.875, 0.375, 0.375];
    const seventh = [0.125, 0.625, 0.375, 0.125, 0.125, 0.375, 0.625, 0.625, 0.625, 0.875, 0.625, 0.125, 0.625];
    const points = sobolPoints(sobolDimensions, 8, null);
    expect(Array.from({ length: 13 }, (_unused, d) => points[d * 8 + 4])).toEqual(fourth);
    expect(Array.from({ length: 13 }, (_unused, d) => points[d * 8 + 7])).toEqual(seventh);
  });

  test('scrambled, still put one point in every interval of every dimension', () => {
    const count = 256;
    const points = sobolPoints(sobolDimensions, count, 42);
    for (let d = 0; d < sobolDimensions; d++) {
      const cells = new Set(Array.from(points.subarray(d * count, (d + 1) * count), (x) => Math.floor(x * count)));
      expect(cells.size).toBe(count);
    }
  });

  test('depend on the seed and on nothing else', () => {
    expect(sobolPoints(4, 64, 5)).toEqual(sobolPoints(4, 64, 5));
    expect(sobolPoints(4, 64, 5)).not.toEqual(sobolPoints(4, 64, 6));
  });
});

test('normal quantiles are those of the printed tables (1.959964, 2.326348, 1.644854)', () => {
  expect(normalQuantile(0.975)).toBeCloseTo(1.959964, 6);
  expect(normalQuantile(0.01)).toBeCloseTo(-2.326348, 6);
  expect(normalQuantile(0.95)).toBeCloseTo(1.644854, 6);
  expect(normalQuantile(0.5)).toBe(0);
});
