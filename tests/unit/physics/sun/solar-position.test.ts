import { Body, Equator, Horizon, MakeTime, Observer as AstronomyObserver } from 'astronomy-engine';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { airlessElevationDeg, refractionDeg } from '#app/physics/sun/refraction.ts';
import { declinationOf, solarPosition } from '#app/physics/sun/solar-position.ts';
import { degree, wrap180 } from '#app/physics/units.ts';
import { demoSuns } from '#tests/unit/physics/demo-suns.ts';

const air = { pressureHpa: 1013.25, temperatureC: 12 };

describe('against astronomy-engine, a general-purpose ephemeris that shares no code with ours', () => {
  test('agrees within 0.003° of great circle from 1980 to 2060 at every latitude', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: Date.UTC(1980, 0, 1), max: Date.UTC(2060, 0, 1) }),
        fc.double({ min: -89, max: 89, noNaN: true }),
        fc.double({ min: -180, max: 180, noNaN: true }),
        (utcMs, latitudeDeg, longitudeDeg) => {
          const time = MakeTime(new Date(utcMs));
          const observer = new AstronomyObserver(latitudeDeg, longitudeDeg, 0);
          const equator = Equator(Body.Sun, time, observer, true, true);
          const theirs = Horizon(time, observer, equator.ra, equator.dec);
          const ours = solarPosition(utcMs, { latitudeDeg, longitudeDeg, elevationM: 0, ...air });
          const across = wrap180(ours.azimuthDeg - theirs.azimuth) * Math.cos(theirs.altitude * degree);
          // Their table of the earth's rotation is a prediction after 2025; a second is 0.004°.
          const allowed = utcMs > Date.UTC(2026, 0, 1) ? 0.02 : 0.005;
          expect(Math.abs(ours.airlessElevationDeg - theirs.altitude)).toBeLessThan(allowed);
          expect(Math.abs(across)).toBeLessThan(allowed);
        },
      ),
      { numRuns: 300, seed: 7 },
    );
  });
});

describe('against separately computed incidents', () => {
  for (const sun of demoSuns) {
    test(`${sun.name}: within the rounding of the printed position`, () => {
      const ours = solarPosition(Date.parse(sun.at), { latitudeDeg: sun.latitudeDeg, longitudeDeg: sun.longitudeDeg, elevationM: 0, ...air });
      expect(Math.abs(ours.apparentElevationDeg - sun.elevationDeg)).toBeLessThan(sun.azimuthDeg === null ? 0.6 : 0.2);
      if (sun.azimuthDeg !== null) expect(Math.abs(wrap180(ours.azimuthDeg - sun.azimuthDeg))).toBeLessThan(0.7);
    });
  }
});

describe('symmetry and inverses', () => {
  test('refraction taken away from an apparent elevation gives the airless one back', () => {
    for (let airless = -0.8; airless < 90; airless += 0.37) {
      const apparent = airless + refractionDeg(airless, 1013.25, 12);
      expect(airlessElevationDeg(apparent, 1013.25, 12)).toBeCloseTo(airless, 6);
    }
  });

  test('removes 0.40, 0.30, 0.24 and 0.17° at apparent elevations of 1, 2, 3 and 5° (figures of a separate code)', () => {
    const removed = [1, 2, 3, 5].map((apparent) => apparent - airlessElevationDeg(apparent, 1013.25, 12));
    for (const [k, published] of [0.4, 0.3, 0.24, 0.17].entries()) expect(Math.abs((removed[k] ?? 0) - published)).toBeLessThan(0.012);
  });

  test('the declination of a seen direction is that of the sun that stands there', () => {
    const observer = { latitudeDeg: 51.5, longitudeDeg: -0.1, elevationM: 20, ...air };
    for (let hour = 7; hour < 18; hour++) {
      const sun = solarPosition(Date.UTC(2025, 2, 12, hour), observer);
      const airless = airlessElevationDeg(sun.apparentElevationDeg, air.pressureHpa, air.temperatureC);
      expect(declinationOf(observer.latitudeDeg, sun.azimuthDeg, airless)).toBeCloseTo(sun.declinationDeg, 5);
    }
  });
});
