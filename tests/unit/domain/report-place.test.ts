import { describe, expect, test } from 'vitest';
import { readPlace } from '#app/domain/coordinate-text.ts';
import { readReportPlaces, wallWords } from '#app/domain/report-place.ts';

describe('a place in one box', () => {
  const expected = { latitudeDeg: 53 + 29 / 60 + 46 / 3600, longitudeDeg: -(1 + 36 / 60 + 8 / 3600) };

  test.each(['53 29 46 N, 1 36 8 W', '53 29 46 N 1 36 8 W', '53°29\'46"N; 1°36\'8"W', '53:29:46, -1:36:8'])('%j is read as degrees, minutes and seconds', (text) => {
    const reading = readPlace(text);
    if (!reading.ok) throw new Error(reading.sentence);
    // A minute is a sixtieth of a degree, a second a sixtieth of a minute (ISO 80000-3).
    expect(reading.place.latitudeDeg).toBeCloseTo(expected.latitudeDeg, 9);
    expect(reading.place.longitudeDeg).toBeCloseTo(expected.longitudeDeg, 9);
  });

  test.each([['53.4961, -1.6022'], ['53.4961,-1.6022'], ['53,4961; -1,6022']])('%j is read as decimals', (text) => {
    expect(readPlace(text)).toMatchObject({ ok: true, place: { latitudeDeg: 53.4961, longitudeDeg: -1.6022 } });
  });

  test.each(['', 'roof', '53.4961', '91, 0', '0, 181', '53.5, -1.6, 12', '53 61 0 N, 1 0 0 W', '1 36 8 W, 53 29 46 N'])('%j gets a sentence', (text) => {
    expect(readPlace(text)).toMatchObject({ ok: false, sentence: expect.stringMatching(/\.$/u) });
  });
});

describe('the places of a report', () => {
  test('take degrees, minutes and seconds without a script', () => {
    const { places, errors } = readReportPlaces({ latitudeDeg: '53 29 46 N', longitudeDeg: '1 36 8 W', accuracyM: '6' });
    expect(errors).toEqual({});
    expect(places.position).toEqual({ latitudeDeg: expect.closeTo(53.496111, 6), longitudeDeg: expect.closeTo(-1.602222, 6), accuracyM: 6 });
  });

  test('keep pins of optic and mark together with the wall lines', () => {
    const { places } = readReportPlaces({ latitudeDeg: '53.5', longitudeDeg: '-1.6', opticPlace: '53.5001, -1.6', 'wall-1-from': '53.5, -1.6', 'wall-1-to': '53.5, -1.5995' });
    expect(places.onMap).toMatchObject({ optic: { latitudeDeg: 53.5001 }, mark: { latitudeDeg: 53.5 }, walls: [{ to: { longitudeDeg: -1.5995 } }] });
  });

  test('say length and both true directions of a wall', () => {
    // 0.0005° of longitude at 60° N: 55.800 km a degree (P. Osborne, The Mercator Projections, 2013), along the parallel.
    expect(wallWords({ from: { latitudeDeg: 60, longitudeDeg: 10 }, to: { latitudeDeg: 60, longitudeDeg: 10.0005 } })).toBe('27.9 m, running 90.0° and 270.0° true');
  });

  test.each([
    [{ latitudeDeg: '91', longitudeDeg: '0' }, 'latitudeDeg'],
    [{ latitudeDeg: '53.5', longitudeDeg: '200' }, 'longitudeDeg'],
    [{ latitudeDeg: '53.5' }, 'longitudeDeg'],
    [{ opticPlace: 'by the hatch' }, 'opticPlace'],
    [{ 'wall-2-from': '53.5, -1.6' }, 'wall-2-to'],
    [{ 'wall-1-from': '53.5, -1.6', 'wall-1-to': '53.5, -1.6' }, 'wall-1-to'],
    [{ 'wall-3-from': '53.5, -1.6', 'wall-3-to': '54.5, -1.6' }, 'wall-3-to'],
  ])('%j is refused beside its field, with a way out', (typed, field) => {
    const { errors } = readReportPlaces(typed);
    expect(Object.keys(errors)).toEqual([field]);
    expect(errors[field]?.[0]).toMatch(/[a-z].*\.$/u);
  });
});
