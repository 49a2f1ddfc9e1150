import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { yearOfSun } from '#app/domain/year-of-sun.ts';
import rows from '#fixtures/reference/check-values.json';

const place = (latitudeDeg: number, longitudeDeg: number) => ({ latitudeDeg, longitudeDeg, elevationM: 0, pressureHpa: 1013.25, temperatureC: 12 });
const row = z
  .object({ source: z.string(), inputs: z.object({ date: z.string(), lat_deg: z.number(), lon_deg: z.number(), tz: z.string() }), expected: z.object({ sunrise_local: z.string(), sunset_local: z.string() }) })
  .parse(rows.find((one) => one.id === 'spa-05'));
const minutesOf = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3));

describe('the year as a picture', () => {
  test(`sunrise and sunset stand where ${row.source} puts them, to a minute and a half`, () => {
    const { days } = yearOfSun({ observer: place(row.inputs.lat_deg, row.inputs.lon_deg), zone: row.inputs.tz, firstOn: '2015-01-01', days: 365 });
    const day = days.find((one) => one.on === row.inputs.date);
    expect(Math.abs((day?.riseMin ?? 0) - minutesOf(row.expected.sunrise_local))).toBeLessThan(1.5);
    expect(Math.abs((day?.setMin ?? 0) - minutesOf(row.expected.sunset_local))).toBeLessThan(1.5);
  });

  test('the clock steps by an hour where summer time begins and ends, and the sun does not', () => {
    const { days } = yearOfSun({ observer: place(55.7, 12.4), zone: 'Europe/Copenhagen', firstOn: '2026-01-01', days: 365 });
    const rise = (on: string) => days.find((day) => day.on === on)?.riseMin ?? Number.NaN;
    // EU Directive 2000/84/EC: the last Sundays of March and October.
    expect(rise('2026-03-29') - rise('2026-03-28')).toBeGreaterThan(50);
    expect(rise('2026-10-25') - rise('2026-10-24')).toBeLessThan(-50);
    expect(new Set(days.map((day) => day.on)).size).toBe(365);
  });

  test('beyond the polar circle midsummer is one unbroken day and midwinter has none', () => {
    const { days } = yearOfSun({ observer: place(70, 25), zone: 'Europe/Oslo', firstOn: '2026-01-01', days: 365 });
    expect(days.find((day) => day.on === '2026-06-21')).toMatchObject({ riseMin: 0, setMin: 1440 });
    expect(days.find((day) => day.on === '2026-12-21')).toMatchObject({ riseMin: null, setMin: null });
  });

  test('a wall all round keeps the sun away below its height, and an opening away from its bearing', () => {
    const wall = { sigmaDeg: 0, points: [{ azimuthDeg: 0, elevationDeg: 30 }, { azimuthDeg: 180, elevationDeg: 30 }] };
    const observer = place(55.7, 12.4);
    // The noon sun of midwinter stands 90° − 55.7° − 23.4° = 10.9° high there, that of midsummer 57.7°.
    const walled = yearOfSun({ observer, zone: 'Europe/Copenhagen', firstOn: '2026-01-01', days: 365, skyline: wall });
    expect(walled.reach.some((span) => span.on === '2026-12-21')).toBe(false);
    expect(walled.reach.some((span) => span.on === '2026-06-21')).toBe(true);
    const opening = { azimuthDeg: 0, azimuthSigmaDeg: 0, halfWidthDeg: 40, transmittance: 1, transmittanceSource: '' };
    const north = yearOfSun({ observer, zone: 'Europe/Copenhagen', firstOn: '2026-01-01', days: 365, opening });
    expect(north.reach.some((span) => span.on === '2026-12-21')).toBe(false);
  });
});
