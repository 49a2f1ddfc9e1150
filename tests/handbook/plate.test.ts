import { describe, expect, test } from 'vitest';
import { centreDeflectionCoefficient, centreRadiusCoefficients, sealedUnitBow } from '#app/physics/optics/trace/plate.ts';
import { Check, outside } from './trace-rows.ts';

describe('bow of panes', () => {
  const deflection = new Check('plate-01');
  test(deflection.name, () => {
    const expected = deflection.numbers('w_max_over_qa4_D');
    const misses = [1, 1.2, 1.5, 2, 3].map((aspect, i) => {
      const e = expected[i] ?? NaN;
      return outside(centreDeflectionCoefficient(aspect), e, deflection.tolerance(e));
    });
    expect(misses).toEqual([null, null, null, null, null]);
  });

  const curvature = new Check('plate-02');
  test(curvature.name, () => {
    const short = curvature.numbers('R_short_over_a2_w0');
    const long = curvature.numbers('R_long_over_a2_w0');
    const misses = [1, 1.5, 2].flatMap((aspect, i) => {
      const actual = centreRadiusCoefficients(aspect);
      const [s, l] = [short[i] ?? NaN, long[i] ?? NaN];
      return [outside(actual.short, s, curvature.tolerance(s)), outside(actual.long, l, curvature.tolerance(l))];
    });
    expect(misses).toEqual(Array.from({ length: 6 }, () => null));
  });

  const unit = new Check('igu-01');
  test(unit.name, () => {
    const { pressureDifferencePa, outerDeflectionM } = sealedUnitBow({
      shortSideM: 1,
      longSideM: 1,
      outerThicknessM: 0.004,
      innerThicknessM: 0.004,
      gapM: 0.016,
      youngPa: 70e9,
      poisson: 0.23,
      sealPressurePa: 95752.125,
      sealTemperatureK: 293.15,
      pressurePa: 102500,
      temperatureK: 268.15,
    });
    const radiusM = centreRadiusCoefficients(1).short / Math.abs(outerDeflectionM);
    const misses = [
      outside(pressureDifferencePa, unit.number('pressure_difference_Pa'), unit.tolerance(unit.number('pressure_difference_Pa'))),
      outside(outerDeflectionM * 1000, unit.number('centre_deflection_mm'), unit.tolerance(unit.number('centre_deflection_mm'))),
      outside(radiusM, unit.number('R_m'), unit.tolerance(unit.number('R_m'))),
      outside(radiusM / 2, unit.number('focus_distance_m'), unit.tolerance(unit.number('focus_distance_m'))),
    ];
    expect(misses).toEqual([null, null, null, null]);
  });
});
