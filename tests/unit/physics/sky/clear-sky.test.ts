import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { standardPressureAtPa } from '#app/physics/sky/air-mass.ts';
import { climateAir } from '#app/physics/sky/climate-classes.data.ts';
import { clearSkyAt, type Air } from '#app/physics/sky/clear-sky.ts';
import { directBeamAt, readDniSeries } from '#app/physics/sky/direct-beam.ts';
import { paneTransmittance } from '#app/physics/sky/pane-transmittance.ts';
import { degree } from '#app/physics/units.ts';

function airWith(aod500: number, waterCm: number): Air {
  return { pressureHpa: 1013.25, temperatureC: 12, ozoneCm: 0.3, waterCm, aod500, aod380: aod500 * (500 / 380) ** 1.3, solarConstantWm2: 1361.1 };
}

describe('clear sky', () => {
  const aerosol = fc.double({ min: 0, max: 1, noNaN: true });
  const elevation = fc.double({ min: 3, max: 90, noNaN: true });

  test('more aerosol never brightens the beam, and no air beats the bound', () => {
    fc.assert(fc.property(aerosol, aerosol, elevation, (a, b, h) => {
      const clear = clearSkyAt(h, 1361.1, 0, airWith(Math.min(a, b), 1.5));
      const hazy = clearSkyAt(h, 1361.1, 0, airWith(Math.max(a, b), 1.5));
      expect(hazy?.likelyWm2 ?? 0).toBeLessThanOrEqual((clear?.likelyWm2 ?? 0) + 1e-9);
      expect(clear?.likelyWm2 ?? 0).toBeLessThanOrEqual(clear?.boundWm2 ?? 0);
    }), { seed: 11, numRuns: 300 });
  });

  test('a lower sun never brightens the beam by either model', () => {
    fc.assert(fc.property(aerosol, elevation, elevation, (a, p, q) => {
      const low = clearSkyAt(Math.min(p, q), 1361.1, 0, airWith(a, 1.5));
      const high = clearSkyAt(Math.max(p, q), 1361.1, 0, airWith(a, 1.5));
      expect(low?.birdWm2 ?? 0).toBeLessThanOrEqual((high?.birdWm2 ?? 0) + 1e-9);
      expect(low?.ineichenWm2 ?? 0).toBeLessThanOrEqual((high?.ineichenWm2 ?? 0) + 1e-9);
    }), { seed: 12, numRuns: 300 });
  });

  test('the likely figure has no step: over a hundredth of a degree it changes by less than 1 %, and never brightens as the sun sinks', () => {
    fc.assert(fc.property(aerosol, fc.double({ min: 3, max: 89.9, noNaN: true }), (a, h) => {
      const low = clearSkyAt(h, 1361.1, 0, airWith(a, 1.5))?.likelyWm2 ?? 0;
      const high = clearSkyAt(h + 0.01, 1361.1, 0, airWith(a, 1.5))?.likelyWm2 ?? 0;
      expect(high).toBeGreaterThanOrEqual(low - 1e-9);
      expect(high - low).toBeLessThan(0.01 * high + 0.05);
    }), { seed: 13, numRuns: 1000 });
    // The two joints themselves, from both sides.
    for (const joint of [6, 10]) {
      const [below, above] = [joint - 1e-9, joint + 1e-9].map((h) => clearSkyAt(h, 1361.1, 0, airWith(0.12, 1.5))?.likelyWm2 ?? 0);
      expect(Math.abs((above ?? 0) - (below ?? 0))).toBeLessThan(1e-4);
    }
  });

  test('below 3° no figure is given', () => {
    expect(clearSkyAt(2.9, 1361.1, 0, airWith(0.1, 1.5))).toBeNull();
  });

  test('class medians are those of a separate code at 60, 30, 10 and 5° (Bird; 1 W/m²)', () => {
    const table = {
      'clean-dry-mountain': [1020, 919, 645, 452], 'temperate-rural': [906, 767, 431, 238], 'urban-maritime': [821, 659, 299, 128],
      'humid-tropics': [758, 584, 225, 79], 'dusty-desert': [727, 534, 171, 47],
    } as const;
    for (const [name, air] of Object.entries(climateAir)) {
      const elevationM = name === 'clean-dry-mountain' ? 2000 : 0;
      const expected = Object.entries(table).find(([key]) => key === name)?.[1] ?? [];
      const got = [60, 30, 10, 5].map((h) => clearSkyAt(h, 1361.1, elevationM, { ...airWith(air.aod500, air.waterCm), pressureHpa: standardPressureAtPa(elevationM) / 100 })?.birdWm2 ?? 0);
      for (const [k, value] of got.entries()) expect(Math.abs(value - (expected[k] ?? 0)), `${name} ${k}`).toBeLessThanOrEqual(1);
    }
  });
});

describe('glass in the path', () => {
  test('keeps its table value at normal incidence and passes nothing at grazing', () => {
    expect(paneTransmittance(0.819, 1)).toBeCloseTo(0.819, 12);
    expect(paneTransmittance(0.819, 0)).toBe(0);
  });

  test('of clear 4 mm is 0.802, 0.761, 0.621 and 0.376 at 40, 55, 70 and 80° (row espr-ang-clear-4-mm)', () => {
    for (const [angle, expected] of [[40, 0.802], [55, 0.761], [70, 0.621], [80, 0.376]] as const) {
      expect(paneTransmittance(0.819, Math.cos(angle * degree))).toBeCloseTo(expected, 9);
    }
  });
});

describe('measured irradiance', () => {
  const series = readDniSeries({
    climateClass: 'temperate-rural',
    dniSeries: { basis: 'measured', source: 'station', values: [{ startUtc: '2026-01-01T12:00:00Z', endUtc: '2026-01-01T13:00:00Z', dniWm2: 512 }] },
  });
  const at = (utc: string) => directBeamAt(Date.parse(utc), 180, 30, 1, 0, airWith(0.12, 1.5), series, undefined);

  test('goes before the clear-sky median inside its hour and not outside it', () => {
    expect(at('2026-01-01T12:59:00Z').likelyWm2).toBe(512);
    expect(at('2026-01-01T13:00:00Z').measuredWm2).toBeNull();
    expect(at('2026-01-01T13:00:00Z').likelyWm2).toBe(at('2026-01-01T13:00:00Z').birdWm2);
  });

  test('that ends before it starts is refused by both names', () => {
    expect(() => readDniSeries({
      climateClass: 'temperate-rural',
      dniSeries: { basis: 'measured', source: 'station', values: [{ startUtc: '2026-01-01T13:00:00Z', endUtc: '2026-01-01T12:00:00Z', dniWm2: 1 }] },
    })).toThrow(/startUtc and endUtc disagree/);
  });
});
