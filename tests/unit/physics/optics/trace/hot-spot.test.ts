import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { PlaneHits } from '#app/physics/optics/trace/bundle.ts';
import { emptyHits } from '#app/physics/optics/trace/bundle.ts';
import { batchMean, discPowers } from '#app/physics/optics/trace/disc-power.ts';
import { enclosingRadii, profileAlong, widthAbove } from '#app/physics/optics/trace/flux-map.ts';
import { SpotFinder } from '#app/physics/optics/trace/hot-spot.ts';
import { wordSource } from '#app/physics/sobol.ts';

/** Uniform round patches: centre, radius, number of hits. */
function patches(list: readonly { x: number; y: number; r: number; n: number }[], seed: number): PlaneHits {
  const word = wordSource(seed);
  const next = (): number => word() / 4294967296;
  const hits = emptyHits(list.reduce((sum, p) => sum + p.n, 0));
  for (const { x, y, r, n } of list) {
    for (let i = 0; i < n; i++) {
      const radius = r * Math.sqrt(next());
      const turn = 2 * Math.PI * next();
      hits.x[hits.count] = x + radius * Math.cos(turn);
      hits.y[hits.count] = y + radius * Math.sin(turn);
      hits.weight[hits.count] = 1;
      hits.count++;
    }
  }
  hits.batchEnd.push(hits.count);
  return hits;
}

describe('search for the hot spot', () => {
  test('finds a small bright patch beside a wide one that holds more power', () => {
    fc.assert(
      fc.property(fc.double({ min: -0.3, max: 0.3, noNaN: true }), fc.double({ min: -0.3, max: 0.3, noNaN: true }), fc.nat(), (x, y, seed) => {
        const hits = patches([{ x: 0.5, y: 0, r: 0.1, n: 20000 }, { x, y, r: 0.001, n: 500 }], seed);
        const spot = new SpotFinder(hits.count).find(hits, 0.001, null, 10);
        expect(Math.hypot((spot?.x ?? NaN) - x, (spot?.y ?? NaN) - y)).toBeLessThan(0.0003);
      }),
      { numRuns: 20, seed: 7 },
    );
  });

  test('never reports less when the window of hits grows', () => {
    const hits = patches([{ x: 0, y: 0, r: 0.02, n: 4000 }, { x: 0.03, y: 0.01, r: 0.004, n: 3000 }, { x: -0.05, y: 0, r: 0.002, n: 2000 }], 5);
    const finder = new SpotFinder(hits.count);
    let before = 0;
    for (const to of [1000, 4000, 6000, 7000, 8000, 9000]) {
      const power = finder.find(hits, 0.002, null, 1, 'exact', 0, to)?.concentration ?? 0;
      expect(power).toBeGreaterThanOrEqual(before * 0.999);
      before = power;
    }
  });

  test('does not depend on where the grid of cells begins', () => {
    const at = (shift: number): number => {
      const hits = patches([{ x: shift, y: -shift, r: 0.003, n: 20000 }], 9);
      const spot = new SpotFinder(hits.count).find(hits, 0.002, null, 1);
      return discPowers(hits, spot?.x ?? NaN, spot?.y ?? NaN, 0.002)[0] ?? 0;
    };
    const values = [0, 0.0003, 0.0007, 0.1].map(at);
    expect(Math.max(...values) / Math.min(...values)).toBeLessThan(1.02);
  });

  test('widens the disc until rays enough lie in it', () => {
    const hits = patches([{ x: 0, y: 0, r: 1, n: 1000 }], 3);
    const spot = new SpotFinder(hits.count).find(hits, 0.001, null, 60);
    expect(spot?.rays).toBeGreaterThanOrEqual(60);
    expect(spot?.radius).toBeGreaterThan(0.1);
  });

  test('finds a line across its direction and stays at the asked place along it', () => {
    const hits = patches(Array.from({ length: 200 }, (_, i) => ({ x: 0.02, y: -0.1 + 0.001 * i, r: 0.001, n: 50 })), 2);
    const spot = new SpotFinder(hits.count).find(hits, 0.001, { ux: 0, uy: 1, at: 0.01, half: 0.05 }, 1);
    expect(spot?.x).toBeCloseTo(0.02, 3);
    expect(spot?.y).toBeCloseTo(0.01, 9);
  });

  test('has no answer without hits', () => {
    expect(new SpotFinder(8).find(emptyHits(8), 0.001, null, 1)).toBeNull();
  });
});

describe('maps of a uniform round patch', () => {
  const radius = 0.004;
  const hits = patches([{ x: 0, y: 0, r: radius, n: 200_000 }], 6);
  const level = 200_000 / (Math.PI * radius * radius);

  test('half of the power lies within 1/√2 of its radius, 80 % within √0.8', () => {
    const [r50, r80] = enclosingRadii(hits, 0, 0, [0.5, 0.8]);
    expect((r50 ?? 0) / (radius * Math.SQRT1_2)).toBeCloseTo(1, 1.9);
    expect((r80 ?? 0) / (radius * Math.sqrt(0.8))).toBeCloseTo(1, 1.9);
  });

  test('the contour at half of its level is as wide as the patch, above its level there is none', () => {
    const profile = profileAlong(hits, 0, 0, 0.6, 0.8, 0.0005, 0.02);
    expect(widthAbove(profile, level / 2) / (2 * radius)).toBeCloseTo(1, 1.7);
    expect(widthAbove(profile, 1.5 * level)).toBe(0);
  });

  test('batch values give the mean of the whole and the error of that mean', () => {
    // Four batches of sums 1, 2, 3, 2: scaled by four they are 4, 8, 12, 8 with mean 8 and standard error √(32/12).
    const { mean, stdError } = batchMean([1, 2, 3, 2]);
    expect(mean).toBe(8);
    expect(stdError).toBeCloseTo(Math.sqrt(32 / 12), 12);
  });
});
