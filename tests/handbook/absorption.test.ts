import { describe, expect, test } from 'vitest';
import { beamMean, beamQuadrature, solarInternalTransmittance } from '#app/physics/optics/trace/spectral.ts';
import { Check, outside } from './trace-rows.ts';

describe('spectrum of the direct beam', () => {
  const power = (fromUm: number, toUm: number): number => beamQuadrature(fromUm, toUm).powerWm2.reduce((a, b) => a + b, 0);

  const total = new Check('spec-01');
  test(total.name, () => {
    expect(outside(power(0.28, 4), total.number('integral_W_m2'), total.tolerance(1))).toBeNull();
  });

  const shares = new Check('spec-03');
  test(shares.name, () => {
    const all = power(0.28, 4);
    const meanNm = shares.number('mean_wavelength_nm');
    expect(outside(power(0.7, 4) / all, shares.number('fraction_above_700nm'), shares.tolerance(1))).toBeNull();
    expect(outside(power(0.28, 0.4) / all, shares.number('fraction_below_400nm'), shares.tolerance(1))).toBeNull();
    // The row's tolerance is one of shares; taken as a share of the mean too.
    expect(outside(1000 * beamMean(0.28, 4, (x) => x), meanNm, shares.tolerance(1) * meanNm)).toBeNull();
  });
});

describe('internal transmittance for the direct solar beam', () => {
  const water = new Check('abs-01');
  test(water.name, () => {
    const actual = [0.01, 0.065, 0.1, 0.28].map((path) => solarInternalTransmittance('water', path));
    const expected = water.numbers('solar_weighted_internal_transmittance');
    expect(actual.map((t, i) => outside(t, expected[i] ?? NaN, water.tolerance(t)))).toEqual([null, null, null, null]);
  });

  const glass = new Check('abs-02');
  test(glass.name, () => {
    const actual = [0.004, 0.01, 0.05, 0.1].map((path) => solarInternalTransmittance('soda-lime-clear', path));
    const expected = glass.numbers('solar_weighted_internal_transmittance');
    expect(actual.map((t, i) => outside(t, expected[i] ?? NaN, glass.tolerance(t)))).toEqual([null, null, null, null]);
  });

  const clear = new Check('abs-03');
  test(clear.name, () => {
    const crown = [0.01, 0.1].map((path) => solarInternalTransmittance('crown-glass', path, 0.3, 2.5));
    const lowIron = [0.004, 0.1].map((path) => solarInternalTransmittance('soda-lime-low-iron', path));
    const expected = [...clear.numbers('NBK7'), ...clear.numbers('lowiron')];
    expect([...crown, ...lowIron].map((t, i) => outside(t, expected[i] ?? NaN, clear.tolerance(t)))).toEqual([null, null, null, null]);
  });
});
