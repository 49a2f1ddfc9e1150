import { describe, expect, test } from 'vitest';
import { farM, lineOnGround, metresPerDegree, offsetM, placeAt } from '#app/domain/ground.ts';

describe('metres in a degree on WGS 84', () => {
  // P. Osborne, The Mercator Projections, 2013, as tabulated in the encyclopaedia articles "Latitude" and "Longitude"
  // of Wikipedia: length of one degree in km on WGS 84.
  test.each([
    [0, 110.574, 111.32],
    [15, 110.649, 107.55],
    [30, 110.852, 96.486],
    [45, 111.132, 78.847],
    [60, 111.412, 55.8],
    [75, 111.618, 28.902],
  ])('at %d° are the tabulated ones', (latitudeDeg, northKm, eastKm) => {
    const per = metresPerDegree(latitudeDeg);
    // The table is rounded to a metre.
    expect(Math.abs(per.northM / 1000 - northKm)).toBeLessThan(0.0006);
    expect(Math.abs(per.eastM / 1000 - eastKm)).toBeLessThan(0.0006);
  });
});

describe('a line on the ground', () => {
  const corner = { latitudeDeg: 53.5, longitudeDeg: -1.6 };

  test('due north bears 0°, due east 90°, and three by four metres is five metres long', () => {
    expect(lineOnGround(corner, placeAt(corner, { eastM: 0, northM: 40 })).bearingDeg).toBeCloseTo(0, 6);
    expect(lineOnGround(corner, placeAt(corner, { eastM: 40, northM: 0 })).bearingDeg).toBeCloseTo(90, 6);
    const line = lineOnGround(corner, placeAt(corner, { eastM: 3, northM: 4 }));
    expect(line.lengthM).toBeCloseTo(5, 5);
    // The bearing of a 3-4-5 triangle: arctan(3 ÷ 4).
    expect(line.bearingDeg).toBeCloseTo(36.8699, 3);
  });

  test('the other way round bears the opposite', () => {
    const far = placeAt(corner, { eastM: -20, northM: 7 });
    expect(((lineOnGround(corner, far).bearingDeg - lineOnGround(far, corner).bearingDeg) % 360 + 360) % 360).toBeCloseTo(180, 6);
  });

  test('crosses the date line by the short way', () => {
    expect(offsetM({ latitudeDeg: 0, longitudeDeg: 179.9995 }, { latitudeDeg: 0, longitudeDeg: -179.9995 }).eastM).toBeCloseTo(111.32, 1);
  });

  test('is as long as a nautical mile for a minute of latitude, within the 1852 ± 10 m that the minute varies', () => {
    expect(Math.abs(lineOnGround({ latitudeDeg: 45, longitudeDeg: 0 }, { latitudeDeg: 45 + 1 / 60, longitudeDeg: 0 }).lengthM - 1852)).toBeLessThan(10);
  });
});

test('half way round the earth is half of the circumference of its mean sphere, 20 015 km', () => {
  // IUGG mean radius R1 = 6 371 008.8 m; π R1.
  expect(farM({ latitudeDeg: 0, longitudeDeg: 0 }, { latitudeDeg: 0, longitudeDeg: 180 }) / 1000).toBeCloseTo(20_015.1, 0);
});
