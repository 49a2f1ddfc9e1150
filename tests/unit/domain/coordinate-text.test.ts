import { describe, expect, it } from 'vitest';
import type { CoordinateReading } from '#app/domain/coordinate-text.ts';
import { coordinateText, degreesWithLetter, readCoordinate, stepped } from '#app/domain/coordinate-text.ts';

function value(reading: CoordinateReading): number {
  if (!reading.ok) throw new Error(reading.sentence);
  return reading.valueDeg;
}

describe('reading a coordinate as people write it', () => {
  // A minute is a sixtieth of a degree and a second a sixtieth of a minute: the definition in ISO 80000-3.
  const degrees = 53 + 29 / 60 + 46 / 3600;

  it.each([
    ['53.4961111', 53.4961111], ['53 29 46', degrees], ['53°29\'46"N', degrees], ['N 53° 29′ 46″', degrees],
    ['53:29:46', degrees], ['53 29.766667', degrees], ['53,4961111', 53.4961111],
  ])('reads %s', (text, expected) => {
    expect(value(readCoordinate(text, 'latitude'))).toBeCloseTo(expected, 6);
  });

  it('takes south and west as negative, by letter or by sign', () => {
    expect(value(readCoordinate('26.1 S', 'latitude'))).toBe(-26.1);
    expect(value(readCoordinate('-26.1', 'latitude'))).toBe(-26.1);
    expect(value(readCoordinate('\u22121 36 0', 'longitude'))).toBeCloseTo(-1.6, 9);
    expect(value(readCoordinate('1 36 0 W', 'longitude'))).toBeCloseTo(-1.6, 9);
  });

  it.each([
    ['-26.1 S', 'latitude', /not both/], ['91', 'latitude', /between -90 and 90/], ['181', 'longitude', /between -180 and 180/],
    ['53 60 0', 'latitude', /under 60/], ['53.5 30', 'latitude', /under 60/], ['12 E', 'latitude', /only N or S/],
    ['', 'latitude', /Write degrees/], ['by the hatch', 'longitude', /only E or W/], ['1 2 3 4', 'longitude', /under 60/],
  ] as const)('refuses %s as a %s and says how to mend it', (text, axis, sentence) => {
    const reading = readCoordinate(text, axis);
    expect(reading.ok).toBe(false);
    if (!reading.ok) expect(reading.sentence).toMatch(sentence);
  });

  it('writes what it can read back, and never a minus zero', () => {
    expect(coordinateText(-0.0000001)).toBe('0.000000');
    expect(value(readCoordinate(coordinateText(-1.602222), 'longitude'))).toBe(-1.602222);
    expect(degreesWithLetter(-33.9, 'latitude', 1)).toBe('33.9° S');
    expect(degreesWithLetter(0, 'longitude', 0)).toBe('0°');
  });
});

describe('stepping a place by metres', () => {
  // The international nautical mile is 1852 m (First International Extraordinary Hydrographic Conference, Monaco 1929),
  // chosen as a mean minute of latitude; on the ellipsoid a minute runs from 1843 to 1861 m.
  it('goes a minute of latitude north in a nautical mile, within half a per cent', () => {
    const next = stepped({ latitudeDeg: 45, longitudeDeg: 0 }, 0, 1852);
    expect((next.latitudeDeg - 45) * 60).toBeGreaterThan(0.995);
    expect((next.latitudeDeg - 45) * 60).toBeLessThan(1.005);
  });

  it('goes twice as far in longitude at 60 degrees as at the equator, the cosine being one half', () => {
    const equator = stepped({ latitudeDeg: 0, longitudeDeg: 0 }, 1000, 0).longitudeDeg;
    const north = stepped({ latitudeDeg: 60, longitudeDeg: 0 }, 1000, 0).longitudeDeg;
    expect(north / equator).toBeCloseTo(2, 6);
  });

  it('comes round the date line instead of leaving the range', () => {
    expect(stepped({ latitudeDeg: 0, longitudeDeg: 179.9999 }, 100, 0).longitudeDeg).toBeLessThan(-179);
  });
});
