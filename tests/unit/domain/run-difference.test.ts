import { describe, expect, test } from 'vitest';
import { compareInputs, fieldWords } from '#app/domain/run-difference.ts';

describe('names of fields', () => {
  test.each([
    ['bearingDeg', 'bearing', '°'],
    ['bearingSigmaDeg', 'bearing, ± (one sigma)', '°'],
    ['distanceM', 'distance', 'm'],
    ['clockSigmaS', 'clock, ± (one sigma)', 's'],
    ['slopeErrorMrad', 'slope error', 'mrad'],
    ['dniWm2', 'dni', 'W/m²'],
    ['seed', 'seed', ''],
    ['rays', 'rays', ''],
  ])('%s is "%s" in "%s"', (name, words, unit) => expect(fieldWords(name)).toEqual({ words, unit }));
});

describe('differences of two inputs', () => {
  const before = { place: { latitudeDeg: 55.7, zone: 'Europe/Copenhagen' }, mark: { bearingDeg: 331.7, distanceM: 0.091 }, skyline: { points: [{ azimuthDeg: 90, elevationDeg: 5 }] }, seed: 118 };

  test('are listed field by field with unit and difference; the same ones are only counted', () => {
    const { changed, same } = compareInputs(before, { ...before, mark: { ...before.mark, bearingDeg: 336.6 } });
    expect(changed).toEqual([{ group: 'Mark', field: 'bearing', unit: '°', before: '331.7', after: '336.6', difference: '+4.9' }]);
    expect(same).toBe(6);
  });

  test('of bearings go the shorter way round north', () => {
    const { changed } = compareInputs({ mark: { bearingDeg: 358 } }, { mark: { bearingDeg: 2 } });
    expect(changed[0]?.difference).toBe('+4');
    expect(compareInputs({ mark: { bearingDeg: 2 } }, { mark: { bearingDeg: 358 } }).changed[0]?.difference).toBe('−4');
  });

  test('name what one of them does not have, whatever its depth, in the order of the light', () => {
    const { changed } = compareInputs(before, { ...before, skyline: { points: [{ azimuthDeg: 90, elevationDeg: 7, name: 'Grain House' }] }, opening: { azimuthDeg: 155 } });
    expect(changed).toEqual([
      { group: 'Opening', field: 'azimuth', unit: '°', before: 'not given', after: '155', difference: null },
      { group: 'Skyline', field: 'points 1, elevation', unit: '°', before: '5', after: '7', difference: '+2' },
      { group: 'Skyline', field: 'points 1, name', unit: '', before: 'not given', after: 'Grain House', difference: null },
    ]);
  });
});
