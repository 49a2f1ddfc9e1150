import { describe, expect, test } from 'vitest';
import { sceneSchema } from '#app/domain/scene.ts';
import type { Scene } from '#app/domain/scene.ts';
import { readSceneForm } from '#app/domain/scene-form.ts';
import { sceneToFields } from '#app/domain/scene-form-fields.ts';
import { allSceneFields, fieldName } from '#app/domain/scene-fields.ts';
import { readDniLines, readNumber, readSkylineLines } from '#app/domain/scene-lines.ts';

const frames = { declinationDeg: 4.9, declinationSource: 'WMM-2025, 2026-02-03' };
const empty = sceneToFields(sceneSchema.parse({}));
const read = (typed: Record<string, string>) => readSceneForm({ ...empty, ...typed }, frames);
const measured = (name: string, value: string, more: Record<string, string> = {}) => ({ [name]: value, [`${name}.method`]: 'measured', ...Object.fromEntries(Object.entries(more).map(([key, text]) => [`${name}.${key}`, text])) });

function sceneOf(typed: Record<string, string>): Scene {
  const reading = read(typed);
  if (!reading.ok) throw new Error(JSON.stringify(reading.fieldErrors));
  return reading.scene;
}
function errorsOf(typed: Record<string, string>): Record<string, string[]> {
  const reading = read(typed);
  if (reading.ok) throw new Error('It was taken.');
  return reading.fieldErrors;
}

describe('a measurements form', () => {
  test('left empty is a scene in which everything stays unknown', () => {
    expect(sceneOf({})).toEqual(sceneSchema.parse({}));
  });

  test('sent back unchanged gives the same scene', () => {
    const scene = sceneSchema.parse({
      optic: { kind: 'metal-trim', widthMm: { value: 550, plusMinus: 5, method: 'measured' }, radiusOfCurvatureM: { value: 1.2, method: 'drawing' }, faceAzimuthDeg: { value: 187.5, plusMinus: 3, method: 'photo' }, material: 'unknown', coatingSurface: 2, generators: 'horizontal', movedSince: 'no' },
      opening: { azimuthDeg: { value: 182, method: 'drawing' }, halfWidthDeg: 60, lowestElevationDeg: 2, glass: 'double-clear' },
      mark: { bearingDeg: { value: 7, plusMinus: 3, method: 'measured' }, elevationDeg: { value: -53.8, method: 'measured' }, shape: 'band', damage: 'discolour' },
      target: { material: 'single-ply-membrane', colour: 'grey', thicknessMm: { value: 1.5, method: 'maker' }, sampleKept: 'yes' },
      skyline: { points: [{ azimuthDeg: 100, elevationDeg: 9, name: 'Grain House' }, { azimuthDeg: 150, elevationDeg: 11.5 }], plusMinusDeg: 0.5, source: 'panorama' },
      air: { climateClass: 'urban-maritime', temperatureC: -4, pressureHpa: 1011, dni: { source: 'airfield', stationDistanceKm: 14, basis: 'derived', values: [{ startUtc: '2026-02-03T09:00:00.000Z', endUtc: '2026-02-03T10:00:00.000Z', dniWm2: 640 }] } },
    });
    expect(sceneOf(sceneToFields(scene))).toEqual(scene);
  });

  test('takes lengths in the unit that is typed after them', () => {
    const scene = sceneOf({ ...measured('optic.diameterMm', '2 in', { plusMinus: '0.1 cm' }), ...measured('optic.radiusOfCurvatureM', '4 ft'), ...measured('mark.distanceMm', '1,25 m') });
    expect(scene.optic.diameterMm).toEqual({ value: 50.8, plusMinus: 1, method: 'measured' });
    expect(scene.optic.radiusOfCurvatureM?.value).toBe(1.2192);
    expect(scene.mark.distanceMm?.value).toBe(1250);
  });

  test('does not take a length unit after an angle', () => {
    expect(errorsOf(measured('mark.elevationDeg', '20 mm'))['mark.elevationDeg']).toHaveLength(1);
    expect(sceneOf(measured('mark.elevationDeg', '−20,5°')).mark.elevationDeg?.value).toBe(-20.5);
  });

  test('adds an east declination to a magnetic bearing and says so', () => {
    const reading = read(measured('mark.bearingDeg', '331.7', { north: 'magnetic' }));
    expect(reading.ok && reading.scene.mark.bearingDeg?.value).toBe(336.6);
    expect(reading.ok && reading.bearingNotes).toEqual(['Bearing, optic to mark: 331.7° magnetic, declination +4.9°, WMM-2025, 2026-02-03, is 336.6° true.']);
  });

  test('carries a turned bearing across north', () => {
    expect(sceneOf(measured('mark.bearingDeg', '358', { north: 'magnetic' })).mark.bearingDeg?.value).toBe(2.9);
    expect(sceneOf({ ...measured('mark.bearingDeg', '1', { north: 'grid' }), gridConvergenceDeg: '-1.5' }).mark.bearingDeg?.value).toBe(359.5);
  });

  test('refuses a bearing without its north, a grid bearing without convergence, and a magnetic one without a model', () => {
    expect(errorsOf(measured('mark.bearingDeg', '10'))['mark.bearingDeg']?.[0]).toContain('which north');
    expect(errorsOf(measured('mark.bearingDeg', '10', { north: 'grid' }))['mark.bearingDeg']?.[0]).toContain('convergence');
    const reading = readSceneForm({ ...empty, ...measured('mark.bearingDeg', '10', { north: 'magnetic' }) }, { declinationDeg: null, declinationSource: '2040-01-01' });
    expect(!reading.ok && reading.fieldErrors['mark.bearingDeg']?.[0]).toContain('2040-01-01');
  });

  test('asks how each number was got', () => {
    expect(errorsOf({ 'optic.diameterMm': '120' })['optic.diameterMm']?.[0]).toContain('how it was got');
  });

  test.each(allSceneFields.map((field) => [fieldName(field), field] as const))('refuses %s beyond its range, with the range in the sentence', (name, field) => {
    for (const value of [field.min - 1, field.max + 1]) {
      const sentences = errorsOf(measured(name, String(value), { north: 'true' }))[name] ?? [];
      expect(sentences[0]).toContain(`between ${field.min} and ${field.max}`);
    }
    expect(Object.keys(errorsOf(measured(name, 'about ten', { north: 'true' })))).toEqual([name]);
  });

  test('wants the source of an irradiance series', () => {
    expect(Object.keys(errorsOf({ 'dni.values': '2026-02-03T09:00Z 2026-02-03T10:00Z 640' }))).toEqual(['dni.source']);
  });

  test('names the field of a list choice that does not exist', () => {
    expect(errorsOf({ 'optic.kind': 'laser' })['optic.kind']).toEqual(['Choose one of the list.']);
    expect(errorsOf({ 'air.pressureHpa': '20' })['air.pressureHpa']).toEqual(['At least 300.']);
    expect(errorsOf({ 'air.temperatureC': 'mild' })['air.temperatureC']?.[0]).toContain('number');
  });
});

describe('a pasted skyline', () => {
  test('takes spaces, tabs and semicolons, comma decimals, empty lines and names', () => {
    expect(readSkylineLines('100\t9,5\n\n 150;11.5 Grain House \r\n')).toEqual({ ok: true, values: [{ azimuthDeg: 100, elevationDeg: 9.5 }, { azimuthDeg: 150, elevationDeg: 11.5, name: 'Grain House' }] });
  });
  test.each([['north 9', 'Line 1'], ['100 9\n361 4', 'Line 2'], ['100 91\n120 4', 'elevation'], ['100 9', 'two points']])('refuses %j and says where', (text, word) => {
    const reading = readSkylineLines(text);
    expect(!reading.ok && reading.sentence).toContain(word);
  });
});

describe('a pasted irradiance series', () => {
  test('turns times with an offset into UTC', () => {
    expect(readDniLines('2026-02-03T10:00+01:00 2026-02-03T11:00+0100 640')).toEqual({ ok: true, values: [{ startUtc: '2026-02-03T09:00:00.000Z', endUtc: '2026-02-03T10:00:00.000Z', dniWm2: 640 }] });
  });
  test.each([
    ['2026-02-03T10:00 2026-02-03T11:00 640', 'offset'],
    ['2026-02-03T11:00Z 2026-02-03T10:00Z 640', 'before the start'],
    ['2026-02-03T10:00Z 2026-02-03T11:00Z', 'a number'],
    ['2026-02-03T10:00Z 2026-02-03T11:00Z 1500', '1400'],
    ['2026-13-03T10:00Z 2026-02-03T11:00Z 10', 'offset'],
  ])('refuses %j', (text, word) => {
    const reading = readDniLines(text);
    expect(!reading.ok && reading.sentence).toContain(word);
  });
});

test.each([['12.5', 12.5], ['12,5', 12.5], ['−3', -3], [' +.5 ', 0.5], ['1e3', Number.NaN], ['', Number.NaN], ['12 5', Number.NaN], ['0x10', Number.NaN]])('a typed number %j reads as %d', (text, value) => {
  expect(readNumber(text)).toBe(value);
});
