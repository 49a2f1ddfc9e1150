import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { daylightOn } from '#app/physics/sun/daylight.ts';
import { heliocentricEarth } from '#app/physics/sun/ephemeris.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { decimalYear, deltaTPolynomialS, julianDay } from '#app/physics/sun/time-scales.ts';
import { degree } from '#app/physics/units.ts';
import { checkRow, numbers, rowIds, worstAbsolute } from './check-row.ts';

const site = z.object({
  local: z.string(), lat_deg: z.number(), lon_deg: z.number(), elev_m: z.number(), pressure_hPa: z.number(), temp_C: z.number(), delta_t_s: z.number(),
});

describe('Solar Position Algorithm, worked example', () => {
  const row = checkRow('spa-01', site, z.object({
    topocentric_zenith_deg: z.number(), azimuth_deg_eastward_from_north: z.number(), elevation_no_refraction_deg: z.number(), refraction_deg: z.number(), elevation_deg: z.number(),
  }));
  test(row.name, () => {
    const { inputs, expected } = row;
    const sun = solarPosition(Date.parse(inputs.local), {
      latitudeDeg: inputs.lat_deg, longitudeDeg: inputs.lon_deg, elevationM: inputs.elev_m, pressureHpa: inputs.pressure_hPa, temperatureC: inputs.temp_C,
    }, inputs.delta_t_s);
    const got = [90 - sun.apparentElevationDeg, sun.azimuthDeg, sun.airlessElevationDeg, sun.refractionDeg, sun.apparentElevationDeg];
    expect(worstAbsolute(got, Object.values(expected))).toBeLessThan(1e-4);
  });

  const orbit = checkRow('spa-02', site, z.object({ JD: z.number(), L_heliocentric_deg: z.number(), B_deg: z.number(), R_au: z.number() }));
  test(orbit.name, () => {
    const { inputs, expected } = orbit;
    const day = julianDay(Date.parse(inputs.local));
    const earth = heliocentricEarth((day + inputs.delta_t_s / 86_400 - 2_451_545) / 365_250);
    expect(Math.abs(day - expected.JD)).toBeLessThan(1e-6);
    expect(Math.abs(earth.longitudeDeg - expected.L_heliocentric_deg)).toBeLessThan(1e-5);
    expect(Math.abs(earth.latitudeDeg - expected.B_deg)).toBeLessThan(1e-6);
    expect(Math.abs(earth.distanceAu - expected.R_au)).toBeLessThan(1e-6);
  });
});

describe('sunrise, sunset and time', () => {
  const row = checkRow('spa-05', z.object({ date: z.string(), lat_deg: z.number(), lon_deg: z.number(), tz: z.string() }), z.object({ sunrise_local: z.string(), sunset_local: z.string() }));
  test(row.name, () => {
    const { inputs, expected } = row;
    const observer = { latitudeDeg: inputs.lat_deg, longitudeDeg: inputs.lon_deg, elevationM: 0, pressureHpa: 1013.25, temperatureC: 12 };
    const day = daylightOn(inputs.date, inputs.tz, observer);
    const published = (clock: string): number => Date.parse(`${inputs.date}T${clock}:00+08:00`);
    expect(Math.abs((day.sunriseMs ?? 0) - published(expected.sunrise_local))).toBeLessThan(90_000);
    expect(Math.abs((day.sunsetMs ?? 0) - published(expected.sunset_local))).toBeLessThan(90_000);
  });

  const drift = checkRow('spa-06', z.object({ year_month: z.array(z.string()) }), z.object({ delta_t_s: numbers }));
  test(drift.name, () => {
    const got = drift.inputs.year_month.map((text) => deltaTPolynomialS(decimalYear(Number(text.slice(0, 4)), Number(text.slice(5)))));
    expect(worstAbsolute(got, drift.expected.delta_t_s)).toBeLessThan(0.01);
  });

  const slip = checkRow('tri-01', z.object({ utc: z.string(), lat_deg: z.number(), lon_deg: z.number() }), z.object({ azimuth_shift_deg_at_elevation_84p8: z.number(), great_circle_shift_deg: z.number() }));
  test(slip.name, () => {
    const observer = { latitudeDeg: slip.inputs.lat_deg, longitudeDeg: slip.inputs.lon_deg, elevationM: 15, pressureHpa: 1011, temperatureC: 12 };
    const utcMs = Date.parse(slip.inputs.utc);
    const a = solarPosition(utcMs, observer);
    const b = solarPosition(utcMs - 430, observer);
    const azimuthShift = Math.abs(a.azimuthDeg - b.azimuthDeg);
    // The row gives orders of magnitude: a factor of two either way.
    expect(azimuthShift / slip.expected.azimuth_shift_deg_at_elevation_84p8).toBeGreaterThan(0.5);
    expect(azimuthShift / slip.expected.azimuth_shift_deg_at_elevation_84p8).toBeLessThan(2);
    const great = Math.hypot(azimuthShift * Math.cos(a.airlessElevationDeg * degree), a.airlessElevationDeg - b.airlessElevationDeg);
    expect(great / slip.expected.great_circle_shift_deg).toBeGreaterThan(0.5);
    expect(great / slip.expected.great_circle_shift_deg).toBeLessThan(2);
  });
});

describe('positions at places between the polar circle and the equator', () => {
  for (const id of rowIds('sun-')) {
    const row = checkRow(id, z.object({ lat_deg: z.number(), lon_deg: z.number(), alt_m: z.number(), utc: z.string(), temp_C: z.number(), pressure_hPa: z.number(), place: z.string() }), z.object({
      azimuth_deg: z.number(), elevation_airless_deg: z.number(), distance_au: z.number(), apparent_elevation_spa_deg: z.number(),
    }));
    test(`${row.name} — ${row.inputs.place}`, () => {
      const { inputs, expected } = row;
      const sun = solarPosition(Date.parse(inputs.utc), {
        latitudeDeg: inputs.lat_deg, longitudeDeg: inputs.lon_deg, elevationM: inputs.alt_m, pressureHpa: inputs.pressure_hPa, temperatureC: inputs.temp_C,
      });
      expect(Math.abs(sun.airlessElevationDeg - expected.elevation_airless_deg)).toBeLessThan(0.01);
      expect(Math.abs(sun.azimuthDeg - expected.azimuth_deg) * Math.cos(expected.elevation_airless_deg * degree)).toBeLessThan(0.01);
      expect(Math.abs(sun.distanceAu - expected.distance_au)).toBeLessThan(2e-5);
      const allowed = expected.elevation_airless_deg < 5 ? 0.1 : 0.02;
      expect(Math.abs(sun.apparentElevationDeg - expected.apparent_elevation_spa_deg)).toBeLessThan(allowed);
    });
  }
});
