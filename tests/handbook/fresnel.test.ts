import { describe, expect, test } from 'vitest';
import { brewsterAngle, fresnelReflectance, fresnelReflectances } from '#app/physics/optics/refraction.ts';
import { Check, outside } from './trace-rows.ts';

describe('reflectance of a bare interface', () => {
  const normal = new Check('fresnel-01');
  test(normal.name, () => {
    const expected = normal.numbers('R');
    const misses = [1.333, 1.49, 1.5168, 1.586].map((n, i) => outside(fresnelReflectance(1, n), expected[i] ?? NaN, normal.tolerance(1)));
    expect(misses).toEqual([null, null, null, null]);
  });

  const oblique = new Check('fresnel-02');
  test(oblique.name, () => {
    const s = oblique.numbers('Rs');
    const p = oblique.numbers('Rp');
    const misses = [45, 60, 75, 85].flatMap((degrees, i) => {
      const [rs, rp] = fresnelReflectances(1, 1.5168, Math.cos((degrees * Math.PI) / 180));
      const unpolarised = ((s[i] ?? NaN) + (p[i] ?? NaN)) / 2;
      return [
        outside(rs, s[i] ?? NaN, oblique.tolerance(1)), outside(rp, p[i] ?? NaN, oblique.tolerance(1)),
        outside(fresnelReflectance(Math.cos((degrees * Math.PI) / 180), 1.5168), unpolarised, oblique.tolerance(1)),
      ];
    });
    expect(misses).toEqual(Array.from({ length: 12 }, () => null));
    expect((brewsterAngle(1, 1.5168) * 180) / Math.PI).toBeCloseTo(oblique.number('brewster_deg'), 3);
  });
});
