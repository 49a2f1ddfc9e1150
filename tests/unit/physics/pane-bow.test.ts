import { describe, expect, test } from 'vitest';
import type { PaneInput } from '#app/physics/optics/optic.ts';
import { readyOptic } from '#app/physics/reconstruction/pane-bow.ts';

const pane = { kind: 'bowed-pane', widthM: 1, heightM: 1, reflectance: 0.2, axisAzimuthDeg: 180, axisElevationDeg: 0 } as const;
const unit = { outerThicknessM: 0.004, innerThicknessM: 0.004, gapM: 0.016, sealPressureHpa: 1013.25, sealTemperatureC: 20, cavityTemperatureC: 20 };
const bow = (given: PaneInput, pressureHpa: number): number => {
  const { optic } = readyOptic(given, pressureHpa);
  return optic.kind === 'bowed-pane' ? optic.centreBowM : NaN;
};

describe('bow of a pane', () => {
  test('of a 4/16/4 unit, 1 m square, 25 K colder and at 67 hPa more than when it was sealed, is 2.7 mm inward (plate and cavity by a separate code)', () => {
    expect(bow({ ...pane, sealedUnit: { ...unit, cavityTemperatureC: -5 } }, 1013.25 + 67) * 1000).toBeCloseTo(2.7, 1);
  });

  test('vanishes where nothing has changed since sealing, and turns outward in heat and low pressure', () => {
    expect(bow({ ...pane, sealedUnit: unit }, 1013.25)).toBeCloseTo(0, 9);
    expect(bow({ ...pane, sealedUnit: { ...unit, cavityTemperatureC: 40 } }, 950)).toBeLessThan(0);
  });

  test('goes by the measurement where there is one, and says so', () => {
    const { optic, assumptions } = readyOptic({ ...pane, centreBowM: 0.003, sealedUnit: { ...unit, cavityTemperatureC: -5 } }, 1000);
    expect(optic).toMatchObject({ centreBowM: 0.003 });
    expect(assumptions.map((one) => one.field)).toEqual(['optic.sealedUnit']);
  });

  test('from theory is listed as unverified', () => {
    const { assumptions } = readyOptic({ ...pane, sealedUnit: { ...unit, cavityTemperatureC: -5 } }, 1040);
    expect(assumptions).toMatchObject([{ field: 'optic.centreBowM', source: { verified: false } }]);
  });

  test('is asked for where neither is given, and a unit that nobody builds is refused by name', () => {
    expect(() => readyOptic(pane, 1000)).toThrow(/centreBowM and optic\.sealedUnit are both left out/);
    expect(() => readyOptic({ ...pane, sealedUnit: { ...unit, gapM: 0.5 } }, 1000)).toThrow(/optic\.sealedUnit\.gapM is 0\.5; it must lie in 0\.002…0\.1 m/);
  });
});
