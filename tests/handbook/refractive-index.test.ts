import { describe, expect, test } from 'vitest';
import { refractiveIndex } from '#app/physics/optics/trace/spectral.ts';
import type { RefractiveMaterialName } from '#app/physics/optics/optic.ts';
import { Check, outside } from './trace-rows.ts';

describe('refractive index by wavelength', () => {
  const cases: { id: string; material: RefractiveMaterialName; wavelengthUm: number[] }[] = [
    { id: 'idx-01', material: 'crown-glass', wavelengthUm: [0.4861327, 0.5875618, 0.6562725, 1.06] },
    { id: 'idx-02', material: 'water', wavelengthUm: [0.486, 0.5893, 0.8] },
    { id: 'idx-05', material: 'soda-lime-clear', wavelengthUm: [0.5876, 0.88] },
  ];
  for (const { id, material, wavelengthUm } of cases) test(new Check(id).name, () => {
    const check = new Check(id);
    const expected = check.numbers('n');
    expect(expected).toHaveLength(wavelengthUm.length);
    const misses = wavelengthUm.map((x, i) => outside(refractiveIndex(material, x), expected[i] ?? NaN, check.tolerance(1)));
    expect(misses).toEqual(wavelengthUm.map(() => null));
  });

  test('idx-01: the Abbe number follows from the three lines', () => {
    const [f, d, c] = [0.4861327, 0.5875618, 0.6562725].map((x) => refractiveIndex('crown-glass', x));
    expect(((d ?? 0) - 1) / ((f ?? 0) - (c ?? 0))).toBeCloseTo(new Check('idx-01').number('Vd'), 1);
  });
});
