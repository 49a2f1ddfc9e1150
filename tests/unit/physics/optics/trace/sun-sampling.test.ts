import { describe, expect, test } from 'vitest';
import { ScrambledSobol } from '#app/physics/sobol.ts';
import type { SunDisc } from '#app/physics/optics/trace/sun-sampling.ts';
import { buieChi, buieGamma, relativeRadiance, sampleSun } from '#app/physics/optics/trace/sun-sampling.ts';

const count = 65536;
const half = (0.2665 * Math.PI) / 180;

/** Sampled radii over the disc's edge, with weights. */
function sampled(sun: SunDisc): { readonly q: number[]; readonly weight: number[] } {
  const u = [new Float64Array(count), new Float64Array(count)] as const;
  new ScrambledSobol(2, 4, 0).fill(u, count);
  const [x, y, z, w] = [new Float64Array(count), new Float64Array(count), new Float64Array(count), new Float64Array(count)];
  sampleSun(sun, u[0], u[1], count, x, y, z, w);
  const [sx, sy, sz] = sun.direction;
  const q = Array.from(x, (_, i) => {
    const [a, b, c] = [x[i] ?? 0, y[i] ?? 0, z[i] ?? 0];
    return Math.hypot(b * sz - c * sy, c * sx - a * sz, a * sy - b * sx) / Math.sin(half);
  });
  return { q, weight: [...w] };
}

const share = (q: readonly number[], weight: readonly number[], inside: (q: number) => boolean): number =>
  q.reduce((sum, r, i) => sum + (inside(r) ? (weight[i] ?? 0) : 0), 0) / count;

describe('sampled sun', () => {
  const sun: SunDisc = { direction: [0.6, 0, 0.8], halfAngleRad: half, limbU: 0.56, circumsolarRatio: 0 };

  test('holds 29.6 % of the power inside half its radius at u 0.56 (closed form, row limb-01)', () => {
    const { q, weight } = sampled(sun);
    expect(share(q, weight, () => true)).toBeCloseTo(1, 4);
    expect(share(q, weight, (r) => r < 0.5)).toBeCloseTo(0.29612, 3);
    expect(Math.max(...q)).toBeLessThanOrEqual(1 + 1e-6);
  });

  test('is 1.2295 times brighter at the centre than on average and 0.44 of the centre at the edge (row limb-01)', () => {
    const [sx, sy, sz] = sun.direction;
    const centre = relativeRadiance(sun, sx, sy, sz);
    const off = (q: number): number => {
      const a = Math.asin(q * Math.sin(half));
      return relativeRadiance(sun, sx * Math.cos(a), Math.sin(a), sz * Math.cos(a));
    };
    expect(centre).toBeCloseTo(1.2295, 4);
    expect(off(0.999999) / centre).toBeCloseTo(0.44, 2);
    expect(off(1.001)).toBe(0);
    expect(relativeRadiance(sun, -sx, -sy, -sz)).toBe(0);
  });

  test.each([0.02, 0.1, 0.3])('sends a circumsolar share of %f from outside the disc, as its radiance does', (circumsolarRatio) => {
    const hazy: SunDisc = { ...sun, direction: [0, 0, 1], circumsolarRatio };
    const { q, weight } = sampled(hazy);
    expect(share(q, weight, () => true)).toBeCloseTo(1, 3);
    expect(share(q, weight, (r) => r > 1)).toBeCloseTo(circumsolarRatio, 3);
    // Ring by ring: 2πq·L integrated from 1 to the outer limit.
    let outside = 0;
    const limit = 43.6 / 4.65;
    for (let r = 1.0005; r < limit; r += 0.001) {
      const a = Math.asin(r * Math.sin(half));
      outside += 2 * r * relativeRadiance(hazy, Math.sin(a), 0, Math.cos(a)) * 0.001;
    }
    expect(outside).toBeCloseTo(circumsolarRatio, 2);
  });

  test('slope of the aureole follows the published formula, 2.2 ln(0.52·0.1)·0.1^0.43 − 0.1 = −2.517 at χ 0.1', () => {
    expect(buieGamma(0.1)).toBeCloseTo(-2.517, 2);
  });

  test.each([0.02, 0.05, 0.1, 0.2, 0.3])('the corrected χ makes the published profile carry the asked circumsolar ratio %f', (csr) => {
    // Disc cos(0.326 θ)/cos(0.308 θ) to 4.65 mrad, aureole e^κ θ^γ to 43.6 mrad, κ = 0.9 ln(13.5 χ) χ^−0.3.
    const chi = buieChi(csr);
    const kappa = 0.9 * Math.log(13.5 * chi) * chi ** -0.3;
    const integral = (from: number, to: number, profile: (mrad: number) => number): number => {
      const step = (to - from) / 4000;
      return Array.from({ length: 4000 }, (_, i) => from + (i + 0.5) * step).reduce((sum, r) => sum + profile(r) * r * step, 0);
    };
    const disc = integral(0, 4.65, (r) => Math.cos(0.326 * r) / Math.cos(0.308 * r));
    const aureole = integral(4.65, 43.6, (r) => Math.exp(kappa) * r ** buieGamma(chi));
    expect(Math.abs(aureole / (disc + aureole) - csr)).toBeLessThan(0.01);
  });
});
