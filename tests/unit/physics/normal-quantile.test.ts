import { expect, test } from 'vitest';
import { normalQuantile, normalShare } from '#app/physics/normal-quantile.ts';

test('normal quantiles are those of the printed tables (1.959964, 2.326348, 1.644854)', () => {
  expect(normalQuantile(0.975)).toBeCloseTo(1.959964, 6);
  expect(normalQuantile(0.01)).toBeCloseTo(-2.326348, 6);
  expect(normalQuantile(0.95)).toBeCloseTo(1.644854, 6);
  expect(normalQuantile(0.5)).toBe(0);
});

test('shares below z are those of the printed tables (0.975002, 0.841345, 0.022750)', () => {
  expect(normalShare(1.96)).toBeCloseTo(0.975002, 6);
  expect(normalShare(1)).toBeCloseTo(0.841345, 6);
  expect(normalShare(-2)).toBeCloseTo(0.02275, 6);
});
