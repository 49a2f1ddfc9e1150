import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { requiredSunFor } from '#app/physics/alignment.ts';
import { hourAngleRateRadPerS } from '#app/physics/constants.ts';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import { recurrenceBands } from '#app/physics/recurrence.ts';
import { degree } from '#app/physics/units.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import { checkRow, numbers, worstRelative } from './check-row.ts';

const inputs = z.object({
  lat: z.number(), lon: z.number(), elev_m: z.number(), pressure_hPa: z.number(), temp_C: z.number(), year: z.number(), tolerance_deg: z.number(),
  mark_from_optic_bearing_deg: z.number().optional(), mark_bearing_deg: z.number().optional(), mark_elevation_deg: z.number(),
  pane_normal_az_deg: z.number().optional(), pane_normal_el_deg: z.number().optional(),
});
const expected = z.object({
  required_sun_az_el_deg: numbers, required_declination_deg: z.number(), days_utc: z.array(z.tuple([z.string(), z.string()])),
  minutes_within_tolerance: z.number(),
});

function opticOf(given: z.infer<typeof inputs>): Optic {
  if (given.pane_normal_az_deg === undefined) return { kind: 'sphere', diameterM: 0.1, material: { name: 'crown-glass' } };
  return {
    kind: 'bowed-pane', widthM: 0.6, heightM: 0.6, centreBowM: 0.003, reflectance: 0.3,
    axisAzimuthDeg: given.pane_normal_az_deg, axisElevationDeg: given.pane_normal_el_deg ?? 0,
  };
}

describe('required sun and the days on which it comes', () => {
  for (const [id, minuteSlack] of [['align-01', 1], ['align-02', 1], ['align-05', 0], ['align-06', 2]] as const) {
    const row = checkRow(id, inputs, expected);
    test(row.name, () => {
      const given = row.inputs;
      const observer = { latitudeDeg: given.lat, longitudeDeg: given.lon, elevationM: given.elev_m, pressureHpa: given.pressure_hPa, temperatureC: given.temp_C };
      const towardsMark = fromAzimuthElevation(given.mark_from_optic_bearing_deg ?? given.mark_bearing_deg ?? 0, given.mark_elevation_deg);
      const required = requiredSunFor(focusModelOf(opticOf(given)), towardsMark, observer, given.tolerance_deg);
      expect(required).not.toBeNull();
      if (required === null) return;
      const [azimuthDeg = 0, elevationDeg = 0] = row.expected.required_sun_az_el_deg;
      expect(Math.abs(required.azimuthDeg - azimuthDeg)).toBeLessThan(0.02);
      expect(Math.abs(required.apparentElevationDeg - elevationDeg)).toBeLessThan(0.02);
      expect(Math.abs(required.declinationDeg - row.expected.required_declination_deg)).toBeLessThan(0.015);
      expect(required.reachable).toBe(row.expected.days_utc.length > 0);
      const bands = recurrenceBands({
        observer, zone: 'UTC', required, toleranceDeg: given.tolerance_deg, skyline: null, opening: undefined,
        startMs: Date.UTC(given.year, 0, 1), minutes: 365 * 1440,
      });
      const days = new Map(bands.flatMap((band) => band.days).map((day) => [day.on, day]));
      for (const [on, clock] of row.expected.days_utc) {
        const day = days.get(on);
        expect(day, on).toBeDefined();
        expect(Math.abs(Date.parse(day?.bestUtc ?? '') - Date.parse(`${on}T${clock}:00Z`)), on).toBeLessThanOrEqual(60_000);
      }
      // One grazing day more at either end of a band is allowed by the row.
      expect(days.size - row.expected.days_utc.length).toBeLessThanOrEqual(2 * bands.length);
      const minutes = bands.reduce((sum, band) => sum + band.minutes, 0);
      expect(Math.abs(minutes - row.expected.minutes_within_tolerance)).toBeLessThanOrEqual(minuteSlack);
    });
  }
});

describe('motion', () => {
  const dwell = checkRow('motion-01', z.object({ angular_diameter_deg: z.number(), declination_deg: numbers }), z.object({ dwell_s_full_disc: numbers }));
  test(dwell.name, () => {
    const { angular_diameter_deg, declination_deg } = dwell.inputs;
    const got = declination_deg.map((delta) => (angular_diameter_deg * degree) / (hourAngleRateRadPerS * 2 * Math.cos(delta * degree)) * 2);
    expect(worstRelative(got, dwell.expected.dwell_s_full_disc)).toBeLessThan(0.005);
  });

  const speed = checkRow('motion-02', z.object({ focal_length_m: numbers }), z.object({ spot_speed_mm_per_min: numbers }));
  test(speed.name, () => {
    const got = speed.inputs.focal_length_m.map((focal) => focal * hourAngleRateRadPerS * 60_000);
    expect(worstRelative(got, speed.expected.spot_speed_mm_per_min)).toBeLessThan(0.002);
  });

  const patch = checkRow('lit-01', z.object({ pane_width_m: z.number(), distance_m: z.number() }), z.object({ patch_passage_min: z.number() }));
  test(patch.name, () => {
    const { pane_width_m, distance_m } = patch.inputs;
    expect(worstRelative([pane_width_m / distance_m / hourAngleRateRadPerS / 60], [patch.expected.patch_passage_min])).toBeLessThan(0.01);
  });
});
