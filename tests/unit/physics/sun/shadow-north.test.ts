import { expect, test } from 'vitest';
import { northFromShadow } from '#app/physics/sun/shadow-north.ts';

// ERFA by way of astropy puts the sun at 179.064° at Greenwich on 2020-06-21 12:00 UTC (row sun-01 of check-values.json).
const greenwich = { latitudeDeg: 51.4779, longitudeDeg: -0.0015, elevationM: 46, pressureHpa: 1007.74, temperatureC: 12 };
const noon = Date.UTC(2020, 5, 21, 12);

test('a shadow falls opposite the sun, and the reading’s error is what has to be added', () => {
  const north = northFromShadow(noon, greenwich, 1.5);
  expect(Math.abs(north.shadowAzimuthDeg - 359.064)).toBeLessThan(0.02);
  expect(Math.abs(north.correctionDeg + 2.436)).toBeLessThan(0.02);
});

test('a sun too low or too high to read is refused with its elevation', () => {
  expect(() => northFromShadow(Date.UTC(2020, 5, 21, 0), greenwich, 0)).toThrow(/The sun stands at -/);
});
