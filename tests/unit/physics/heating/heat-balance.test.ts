import { describe, expect, test } from 'vitest';
import { scaledErfc, surfaceTemperatureK, thickRiseK } from '#app/physics/heating/heat-balance.ts';
import { targetMaterials } from '#app/physics/heating/target-materials.data.ts';
import { heatingOf, lowestHarmfulFluxKwm2 } from '#app/physics/heating/outcomes.ts';
import materialRows from '#fixtures/reference/materials.json';

test('the scaled complementary error function is that of scipy.special.erfcx', () => {
  expect(scaledErfc(0.5)).toBeCloseTo(0.6156903442, 7);
  expect(scaledErfc(1)).toBeCloseTo(0.4275835762, 7);
  expect(scaledErfc(4.99)).toBeCloseTo(0.1109183704, 6);
  expect(scaledErfc(5.01)).toBeCloseTo(0.1104917132, 9);
});

describe('surface temperature', () => {
  const wood = { conductivityWmk: 0.12, densityKgm3: 500, heatCapacityJkgk: 1600, sheetM: null };
  const around = { airK: 293.15, convectionWm2k: 10, emittance: 0.9 };

  test('starts like a thick solid without losses', () => {
    const rise = surfaceTemperatureK(20_000, wood, 1, 0.05, around) - 293.15;
    expect(rise / thickRiseK(20_000, 0.12, 500, 1600, 0.05)).toBeGreaterThan(0.97);
  });

  test('a smaller spot stays cooler, a longer exposure gets hotter', () => {
    const at = (radius: number, time: number): number => surfaceTemperatureK(30_000, wood, radius, time, around);
    expect(at(0.0005, 60)).toBeLessThan(at(0.0025, 60));
    expect(at(0.0025, 60)).toBeLessThan(at(0.05, 60));
    expect(at(0.0025, 1)).toBeLessThan(at(0.0025, 10));
  });
});

describe('target materials', () => {
  const known = new Set(materialRows.map((row) => row.id));

  test('every row id that a material names is in the reference data', () => {
    const missing: string[] = [];
    for (const material of targetMaterials.values()) {
      const parts = [material.absorptanceFresh, material.absorptanceCharred, material.thermalSource, material.softeningC, material.smoulder, material.criticalFlux, ...material.ignition];
      for (const part of parts) missing.push(...(part?.rowIds.filter((id) => !known.has(id) && id !== 'pvc-hdt') ?? []));
    }
    expect(missing).toEqual([]);
  });

  test('what is unknown is answered "cannot tell", never guessed', () => {
    const grass = targetMaterials.get('mulch-or-dry-grass');
    expect(grass).toBeDefined();
    if (grass === undefined) return;
    const result = heatingOf('mulch-or-dry-grass', grass, { materialId: 'mulch-or-dry-grass' }, {
      fluxKwm2: { low: 50, mid: 60, high: 80 }, dwellS: { low: 300, mid: 300, high: 300 }, airC: 20, spotRadiusM: 0.0025,
    });
    expect(result.outcomes.every((outcome) => outcome.answer === 'cannot tell')).toBe(true);
  });

  test('two to three suns hold dark vinyl siding at its softening point (trade notes on reflected sunlight)', () => {
    const flux = lowestHarmfulFluxKwm2(targetMaterials.get('vinyl-siding') ?? null, 20);
    expect(flux).toBeGreaterThan(0.5);
    expect(flux).toBeLessThan(2);
  });
});
