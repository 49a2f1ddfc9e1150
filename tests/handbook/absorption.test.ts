import { describe, expect, test } from 'vitest';
import { solarInternalTransmittance } from '#app/physics/optics/trace/spectral.ts';
import { Check, outside } from './trace-rows.ts';

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
