import { describe, expect, test } from 'vitest';
import { readMark } from '#app/physics/alignment.ts';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { solarPosition, type Observer } from '#app/physics/sun/solar-position.ts';
import { angularDiameterDeg, halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { spotMotion, trailMinutesAtLeast } from '#app/physics/trail.ts';
import { degree } from '#app/physics/units.ts';

const sphere = focusModelOf({ kind: 'sphere', diameterM: 0.1, material: { name: 'crown-glass' } });

/** Motion over a level surface under the focus. */
function motionAt(observer: Observer, utcMs: number) {
  const sun = solarPosition(utcMs, observer);
  const mark = readMark({
    bearingDeg: (sun.azimuthDeg + 180) % 360, bearingSigmaDeg: 1, elevationDeg: -sun.apparentElevationDeg, elevationSigmaDeg: 1, distanceM: 0.07, distanceSigmaM: 0.001,
    normalAzimuthDeg: 0, normalElevationDeg: 90,
  }, [0, 0, 0]);
  return spotMotion(sphere, mark, observer, utcMs);
}

const air = { elevationM: 0, pressureHpa: 1013, temperatureC: 10 };
const eastward = (headingDeg: number | undefined): boolean => headingDeg !== undefined && headingDeg > 45 && headingDeg < 135;
const westward = (headingDeg: number | undefined): boolean => headingDeg !== undefined && headingDeg > 225 && headingDeg < 315;

describe('heading of the trail', () => {
  test('runs west to east at noon in both hemispheres', () => {
    expect(eastward(motionAt({ latitudeDeg: 50, longitudeDeg: 0, ...air }, Date.UTC(2026, 3, 10, 12))?.headingDeg)).toBe(true);
    expect(eastward(motionAt({ latitudeDeg: -40, longitudeDeg: 0, ...air }, Date.UTC(2026, 3, 10, 12))?.headingDeg)).toBe(true);
  });

  test('runs east to west under the midnight sun', () => {
    expect(westward(motionAt({ latitudeDeg: 78.2, longitudeDeg: 0, ...air }, Date.UTC(2026, 5, 21, 0))?.headingDeg)).toBe(true);
  });
});

describe('minutes of a trail', () => {
  test('are its length less the spot over the speed, and never below none', () => {
    expect(trailMinutesAtLeast(sphere, 0.012, 0.005, 22.9e-3 / 3600)).toBeCloseTo(18.34, 1);
    expect(trailMinutesAtLeast(sphere, 0.004, 0.005, 22.9e-3 / 3600)).toBe(0);
  });

  test('are not stated for a line focus', () => {
    const bottle = focusModelOf({ kind: 'cylinder', diameterM: 0.066, lengthM: 0.2, material: { name: 'water' }, axisAzimuthDeg: 0, axisElevationDeg: 0 });
    expect(trailMinutesAtLeast(bottle, 0.1, 0.001, 1e-5)).toBeNull();
  });
});

test('the flux in a perfect image is the same in January and in July: radiance does not know the season', () => {
  const objective = focusModelOf({ kind: 'telescope', diameterM: 0.02, focalLengthM: 1, transmittance: 1, slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 30 });
  const sun = [0, -Math.cos(30 * degree), Math.sin(30 * degree)] as const;
  const fluxAt = (distanceAu: number): number => {
    const beam = objective.beamFor(sun, halfAngleRad(distanceAu));
    return (beam?.concentration(1, 0, angularDiameterDeg(distanceAu) * degree) ?? 0) * extraterrestrialWm2(distanceAu);
  };
  expect(fluxAt(0.98329) / fluxAt(1.01671)).toBeCloseTo(1, 3);
});
