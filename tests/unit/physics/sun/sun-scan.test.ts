import { describe, expect, test } from 'vitest';
import { daylightOn } from '#app/physics/sun/daylight.ts';
import { scanSun } from '#app/physics/sun/sun-scan.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { localDay, nextDay, startOfLocalDay, zoneOffsetMs } from '#app/physics/sun/zone-days.ts';
import { angleBetween, fromAzimuthElevation } from '#app/physics/vector.ts';

const observer = { latitudeDeg: -33.9, longitudeDeg: 149.1, elevationM: 700, pressureHpa: 930, temperatureC: 20 };

test('the fast scan stays within 1e-6° of the full chain through a year', () => {
  const startMs = Date.UTC(2026, 0, 1, 0, 17);
  const scan = scanSun(observer, startMs, 60_000, 525_600);
  let worst = 0;
  for (let i = 0; i < scan.count; i += 1499) {
    const full = solarPosition(startMs + i * 60_000, observer);
    const airless = fromAzimuthElevation(full.azimuthDeg, full.airlessElevationDeg);
    worst = Math.max(worst, angleBetween(airless, [scan.east[i] ?? 0, scan.north[i] ?? 0, scan.up[i] ?? 0]));
  }
  expect((worst * 180) / Math.PI).toBeLessThan(1e-6);
});

describe('daylight', () => {
  const polar = { latitudeDeg: 78.2, longitudeDeg: 15.6, elevationM: 0, pressureHpa: 1013, temperatureC: 0 };
  test('says polar day and polar night instead of inventing a rise', () => {
    expect(daylightOn('2026-06-21', 'Arctic/Longyearbyen', polar)).toMatchObject({ sunriseMs: null, sunsetMs: null, polar: 'day' });
    expect(daylightOn('2026-12-21', 'Arctic/Longyearbyen', polar)).toMatchObject({ sunriseMs: null, sunsetMs: null, polar: 'night' });
  });
});

describe('local days of a zone', () => {
  test('begin at the first instant that exists where clocks skip midnight', () => {
    // Clocks in Beirut went from 00:00 to 01:00 on 27 March 2022.
    const start = startOfLocalDay('2022-03-27', 'Asia/Beirut');
    expect(new Date(start).toISOString()).toBe('2022-03-26T22:00:00.000Z');
    expect(localDay(start, 'Asia/Beirut')).toBe('2022-03-27');
    expect(localDay(start - 1, 'Asia/Beirut')).toBe('2022-03-26');
  });

  test('know both sides of a clock change and the leap day', () => {
    expect(zoneOffsetMs(Date.UTC(2026, 2, 29, 0, 59), 'Europe/London')).toBe(0);
    expect(zoneOffsetMs(Date.UTC(2026, 2, 29, 1, 0), 'Europe/London')).toBe(3_600_000);
    expect(nextDay('2028-02-28')).toBe('2028-02-29');
    expect(nextDay('2026-12-31')).toBe('2027-01-01');
  });

  test('an unknown zone is refused by name', () => {
    expect(() => localDay(0, 'Mars/Base')).toThrow(/place\.zone is "Mars\/Base"/);
  });
});
