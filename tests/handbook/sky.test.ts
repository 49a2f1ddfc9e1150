import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { absoluteAirMass, kasten1966AirMass, kastenYoungAirMass, standardPressureAtPa } from '#app/physics/sky/air-mass.ts';
import { birdAsPrinted, birdClearSky, broadbandAerosolDepth } from '#app/physics/sky/bird.ts';
import { clearSkyAt } from '#app/physics/sky/clear-sky.ts';
import { eccentricityFactor, extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { ineichenPerezClearSky, kastenLinkeTurbidity } from '#app/physics/sky/ineichen-perez.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { checkRow, numbers, worstAbsolute, worstRelative } from './check-row.ts';

describe('air mass and pressure', () => {
  const spencer = checkRow('etr-01', z.object({ day_of_year: z.number(), solar_constant: z.number() }), z.object({ etr_W_m2: z.number() }));
  test(spencer.name, () => {
    expect(Math.abs(spencer.inputs.solar_constant * eccentricityFactor(spencer.inputs.day_of_year) - spencer.expected.etr_W_m2)).toBeLessThan(0.01);
  });

  const young = checkRow('am-01', z.object({ apparent_zenith_deg: numbers }), z.object({ air_mass: numbers }));
  test(young.name, () => {
    expect(worstAbsolute(young.inputs.apparent_zenith_deg.map(kastenYoungAirMass), young.expected.air_mass)).toBeLessThan(0.001);
  });

  const kasten = checkRow('am-03', z.object({ apparent_zenith_deg: numbers }), z.object({ air_mass: numbers }));
  test(kasten.name, () => {
    expect(worstAbsolute(kasten.inputs.apparent_zenith_deg.map(kasten1966AirMass), kasten.expected.air_mass)).toBeLessThan(0.001);
  });

  const scaled = checkRow('am-04', z.object({ relative_air_mass: z.number(), pressure_Pa: z.number() }), z.object({ absolute_air_mass: z.number() }));
  test(scaled.name, () => {
    expect(Math.abs(absoluteAirMass(scaled.inputs.relative_air_mass, scaled.inputs.pressure_Pa) - scaled.expected.absolute_air_mass)).toBeLessThan(0.001);
  });

  const pressure = checkRow('press-01', z.object({ altitude_m: numbers }), z.object({ pressure_Pa: numbers }));
  test(pressure.name, () => {
    expect(worstRelative(pressure.inputs.altitude_m.map(standardPressureAtPa), pressure.expected.pressure_Pa)).toBeLessThan(5e-4);
  });
});

describe('Bird and Hulstrom as printed', () => {
  const inputs = z.object({
    zenith_deg: z.number(), relative_air_mass_kasten1966: z.number(), pressure_mbar: z.number(), ozone_cm: z.number(), water_cm: z.number(),
    aod500: z.number(), aod380: z.number(), etr_W_m2: z.number(), Ba: z.number(), albedo: z.number(),
  });
  const expected = z.object({
    T_rayleigh: z.number(), T_ozone: z.number(), T_gases: z.number(), T_water: z.number(), T_aerosol: z.number(),
    dni_W_m2: z.number(), direct_horizontal_W_m2: z.number(), ghi_W_m2: z.number(),
  });
  for (const id of ['bird-01', 'bird-03', 'bird-04', 'bird-06']) {
    const row = checkRow(id, inputs, expected);
    test(row.name, () => {
      const given = row.inputs;
      // The sheet divides the pressure by 1013 mbar.
      const absolute = (given.relative_air_mass_kasten1966 * given.pressure_mbar) / 1013;
      const got = birdAsPrinted(given.zenith_deg, given.relative_air_mass_kasten1966, absolute, given.etr_W_m2, {
        ozoneCm: given.ozone_cm, waterCm: given.water_cm, aod380: given.aod380, aod500: given.aod500, forwardScatter: given.Ba, groundAlbedo: given.albedo,
      });
      const { T_rayleigh, T_ozone, T_gases, T_water, T_aerosol, dni_W_m2, ghi_W_m2 } = row.expected;
      expect(worstRelative([got.rayleigh, got.ozone, got.mixedGases, got.water, got.aerosol], [T_rayleigh, T_ozone, T_gases, T_water, T_aerosol])).toBeLessThan(1.5e-4);
      expect(worstRelative([got.dniWm2, got.ghiWm2], [dni_W_m2, ghi_W_m2])).toBeLessThan(1e-3);
    });
  }

  const library = checkRow('bird-12', z.object({
    zenith_deg: z.number(), relative_air_mass: z.number(), aod380: z.number(), aod500: z.number(), water_cm: z.number(), ozone_cm: z.number(),
    pressure_Pa: z.number(), etr_W_m2: z.number(), Ba: z.number(), albedo: z.number(),
  }), z.object({ dni_W_m2: z.number(), ghi_W_m2: z.number() }));
  test(library.name, () => {
    const given = library.inputs;
    const got = birdAsPrinted(given.zenith_deg, given.relative_air_mass, absoluteAirMass(given.relative_air_mass, given.pressure_Pa), given.etr_W_m2, {
      ozoneCm: given.ozone_cm, waterCm: given.water_cm, aod380: given.aod380, aod500: given.aod500, forwardScatter: given.Ba, groundAlbedo: given.albedo,
    });
    expect(worstRelative([got.dniWm2, got.ghiWm2], [library.expected.dni_W_m2, library.expected.ghi_W_m2])).toBeLessThan(1e-3);
  });

  const depth = checkRow('bird-07', z.object({ aod380: z.number(), aod500: z.number() }), z.object({ broadband_aod_sheet: z.number() }));
  test(depth.name, () => {
    expect(Math.abs(broadbandAerosolDepth(depth.inputs.aod380, depth.inputs.aod500) - depth.expected.broadband_aod_sheet)).toBeLessThan(2e-4);
  });
});

describe('Ineichen and Perez', () => {
  for (const id of ['ineichen-01', 'ineichen-03']) {
    const row = checkRow(id, z.object({
      apparent_zenith_deg: z.number(), absolute_air_mass: z.number(), linke_turbidity: z.number(), altitude_m: z.number(), etr_W_m2: z.number(),
    }), z.object({ dni_W_m2: z.number(), ghi_W_m2: z.number() }));
    test(row.name, () => {
      const given = row.inputs;
      const got = ineichenPerezClearSky(given.apparent_zenith_deg, given.absolute_air_mass, given.linke_turbidity, given.altitude_m, given.etr_W_m2);
      expect(worstRelative([got.dniWm2, got.ghiWm2], [row.expected.dni_W_m2, row.expected.ghi_W_m2])).toBeLessThan(1e-4);
    });
  }

  const linke = checkRow('linke-01', z.object({ absolute_air_mass: z.number(), water_cm: z.number(), aod_broadband: z.number() }), z.object({ linke_turbidity: z.number() }));
  test(linke.name, () => {
    const given = linke.inputs;
    expect(worstRelative([kastenLinkeTurbidity(given.absolute_air_mass, given.water_cm, given.aod_broadband)], [linke.expected.linke_turbidity])).toBeLessThan(0.005);
  });
});

describe('a measured clear day: NOAA SURFRAD, Alamosa, 1 January 2016, by the minute', () => {
  const lines = readFileSync(new URL('../../fixtures/reference/clear-day-alamosa-2016-01-01.csv', import.meta.url), 'utf8').trim().split('\n').slice(1);
  const minutes = lines.map((line) => {
    const [utc = '', zenithDeg, dniWm2, flag, temperatureC, pressureHpa] = line.split(',');
    return { utcMs: Date.parse(utc), zenithDeg: Number(zenithDeg), dniWm2: Number(dniWm2), good: flag === '0', temperatureC: Number(temperatureC), pressureHpa: Number(pressureHpa) };
  });
  const place = { latitudeDeg: 37.7, longitudeDeg: -105.92, elevationM: 2317 };

  test('our sun stands where the station’s own zenith column puts it', () => {
    // The column comes from a low-precision algorithm with its own refraction.
    const up = minutes.filter((minute) => minute.zenithDeg < 85);
    const worst = up.reduce((most, minute) => {
      const sun = solarPosition(minute.utcMs, { ...place, pressureHpa: minute.pressureHpa, temperatureC: minute.temperatureC });
      return Math.max(most, Math.abs(90 - sun.apparentElevationDeg - minute.zenithDeg));
    }, 0);
    expect(up.length).toBeGreaterThan(400);
    expect(worst).toBeLessThan(0.15);
  });

  test('the clean-air bound lies above every good minute, and not by half', () => {
    const shares = minutes.flatMap((minute) => {
      if (!minute.good) return [];
      const sun = solarPosition(minute.utcMs, { ...place, pressureHpa: minute.pressureHpa, temperatureC: minute.temperatureC });
      const clear = clearSkyAt(sun.apparentElevationDeg, extraterrestrialWm2(sun.distanceAu), place.elevationM, {
        pressureHpa: minute.pressureHpa, temperatureC: minute.temperatureC, ozoneCm: 0.3, waterCm: 0.6, aod500: 0.04, aod380: 0.057, solarConstantWm2: 1361.1,
      });
      return clear === null ? [] : [{ share: minute.dniWm2 / clear.boundWm2, elevationDeg: sun.apparentElevationDeg }];
    });
    expect(shares.length).toBeGreaterThan(400);
    expect(Math.max(...shares.map(({ share }) => share))).toBeLessThan(1);
    const high = shares.filter(({ elevationDeg }) => elevationDeg > 15);
    expect(Math.min(...high.map(({ share }) => share))).toBeGreaterThan(0.66);
  });
});

test('the held Rayleigh term never brightens a setting sun: SERI/TR-642-761 as printed does beyond air mass 14.09', () => {
  const air = { ozoneCm: 0.3, waterCm: 0.2, aod380: 0, aod500: 0 };
  const at = (model: typeof birdClearSky, m: number): number => model(80, m, m, 1361.1, air).rayleigh;
  const masses = Array.from({ length: 150 }, (_unused, k) => 1 + k * 0.25);
  for (const [k, m] of masses.entries()) {
    const next = masses[k + 1];
    if (next !== undefined) expect(at(birdClearSky, next)).toBeLessThanOrEqual(at(birdClearSky, m) + 1e-12);
  }
  expect(at(birdAsPrinted, 30)).toBeGreaterThan(1);
});
