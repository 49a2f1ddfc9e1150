import { describe, expect, test } from 'vitest';
import { openingTransmittance } from '#app/domain/optic-class-values.ts';
import { reconstructionInput } from '#app/domain/reconstruction-input.ts';
import type { SceneTimes } from '#app/domain/reconstruction-input.ts';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import type { SceneOptic, SceneOpticKind } from '#app/domain/scene.ts';

const site = { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, zone: 'Europe/London', skyline: null };
const times: SceneTimes = {
  onsetEarliestAt: new Date('2026-05-09T09:00:00Z'),
  onsetLatestAt: new Date('2026-05-09T14:10:00Z'),
  foundAt: new Date('2026-05-09T14:20:00Z'),
  foundClockErrorS: 0,
  foundPrecision: 'exact',
};
const m = (value: number, plusMinus?: number) => ({ value, method: 'measured' as const, ...(plusMinus === undefined ? {} : { plusMinus }) });
const pose = { faceAzimuthDeg: m(180), faceTiltDeg: m(5) };

function build(scene: unknown, changed: Partial<SceneTimes> = {}) {
  return reconstructionInput({ scene: sceneSchema.parse(scene), site, times: { ...times, ...changed }, seed: 118, recurrenceToUtc: '2027-05-09T00:00:00.000Z' });
}

type Fields = Omit<Partial<Record<keyof SceneOptic, unknown>>, 'kind'>;
const kinds: readonly [SceneOpticKind, Fields, Record<string, unknown>][] = [
  ['curved-mirror', { ...pose, diameterMm: m(150), focalLengthMm: m(300) }, { kind: 'concave-mirror', diameterM: 0.15, radiusM: 0.6, axisAzimuthDeg: 180, axisElevationDeg: 5 }],
  ['glass-ball', { diameterMm: m(120), material: 'acrylic' }, { kind: 'sphere', diameterM: 0.12, material: { name: 'acrylic' } }],
  ['bowl-or-vase', { diameterMm: m(200), liquidDepthMm: m(80) }, { kind: 'bowl', radiusM: 0.1, liquidDepthM: 0.08, material: { name: 'water' } }],
  ['bowl-or-vase', { diameterMm: m(200), liquidDepthMm: m(200) }, { kind: 'sphere', diameterM: 0.2, material: { name: 'water' } }],
  ['bottle', { diameterMm: m(65), heightMm: m(180) }, { kind: 'cylinder', diameterM: 0.065, lengthM: 0.18, axisElevationDeg: 90 }],
  ['window-pane', { ...pose, widthMm: m(900), heightMm: m(1200), centreBowMm: m(4) }, { kind: 'bowed-pane', widthM: 0.9, heightM: 1.2, centreBowM: 0.004 }],
  ['curved-building-face', { ...pose, radiusOfCurvatureM: m(40), widthMm: m(30_000), heightMm: m(50_000), paneWidthMm: m(1500) }, { kind: 'facade', radiusM: 40, chordM: 30, lengthM: 50, paneWidthM: 1.5, generators: 'vertical' }],
  ['metal-trim', { ...pose, radiusOfCurvatureM: m(1.2), widthMm: m(550), heightMm: m(4000) }, { kind: 'curved-metal', radiusM: 1.2, chordM: 0.55, lengthM: 4, generators: 'horizontal' }],
  ['dish', { ...pose, diameterMm: m(1200), focalLengthMm: m(500) }, { kind: 'dish', figure: 'parabolic', diameterM: 1.2, radiusM: 1 }],
  ['magnifier', { ...pose, diameterMm: m(90), focalLengthMm: m(250), faceToSun: 'flat' }, { kind: 'lens', diameterM: 0.09, focalLengthM: 0.25, faceToSun: 'flat' }],
  ['flat-plastic-lens', { ...pose, widthMm: m(280), heightMm: m(200), focalLengthMm: m(330) }, { kind: 'fresnel', widthM: 0.28, heightM: 0.2, focalLengthM: 0.33 }],
  ['telescope', { ...pose, diameterMm: m(80), focalLengthMm: m(910) }, { kind: 'telescope', diameterM: 0.08, focalLengthM: 0.91 }],
  ['water-on-dome', { radiusOfCurvatureM: m(1.5), diameterMm: m(600) }, { kind: 'ponded-dome', radiusM: 1.5, pondDiameterM: 0.6 }],
];

describe('each kind of optic', () => {
  test.each(kinds)('%s becomes the engine’s own kind, in metres, and passes its contract', (kind, fields, expected) => {
    const { input, missing } = build({ optic: { kind, ...fields } });
    expect(input?.optic).toMatchObject(expected);
    expect(missing.filter((sentence) => !/mark|skyline|target/iu.test(sentence))).toEqual([]);
    expect(parseReconstructionInput(input)).toMatchObject({ ok: true });
  });

  test.each(kinds)('%s without its measures is left out with what to measure, never made up', (kind) => {
    const { input, missing } = build({ optic: { kind } });
    expect(input?.optic).toBeUndefined();
    expect(missing.length).toBeGreaterThan(2);
  });

  test('one that nobody knows is left out, and asked for', () => {
    const { input, missing } = build({});
    expect(input).not.toHaveProperty('optic');
    expect(missing).toContain('Say what kind of optic it was.');
  });

  test('a class value in place of a measured one widens the spread to 30 %, and both are listed as assumed and unverified', () => {
    const { input, origins } = build({ optic: { kind: 'curved-mirror', ...pose, diameterMm: m(150) } });
    expect(input?.opticSigmaRel).toBe(0.3);
    const assumed = origins.filter((one) => one.origin === 'assumed' && !one.verified).map((one) => one.field);
    expect(assumed).toEqual(expect.arrayContaining(['Radius of curvature', 'Spread of the optic']));
  });

  test('a stated ± becomes the spread', () => {
    const { input } = build({ optic: { kind: 'curved-mirror', ...pose, diameterMm: m(150), focalLengthMm: m(300, 9) } });
    expect(input?.opticSigmaRel).toBeCloseTo(0.03, 10);
  });
});

describe('the window', () => {
  test('runs from the earliest to the latest onset', () => {
    expect(build({}).input?.window).toMatchObject({ startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z' });
  });

  test('ends when the mark was found, less the error of the clock, where no latest onset is known', () => {
    const { input } = build({}, { onsetLatestAt: null, foundClockErrorS: 360 });
    expect(input?.window.endUtc).toBe('2026-05-09T14:14:00.000Z');
  });

  test('goes back eight hours where nobody saw the place sound, and says so', () => {
    const { input, origins } = build({}, { onsetEarliestAt: null });
    expect(input?.window.startUtc).toBe('2026-05-09T06:10:00.000Z');
    expect(origins).toContainEqual(expect.objectContaining({ field: 'Start of the window', origin: 'assumed' }));
  });

  test('is cut to fourteen days, and says so', () => {
    const { input, origins } = build({}, { onsetEarliestAt: new Date('2026-03-01T00:00:00Z') });
    expect(input?.window.startUtc).toBe('2026-04-25T14:10:00.000Z');
    expect(origins).toContainEqual(expect.objectContaining({ field: 'Window, cut', origin: 'assumed' }));
  });

  test('that ends before it begins is refused with what to mend', () => {
    const { input, missing } = build({}, { onsetEarliestAt: new Date('2026-05-09T15:00:00Z') });
    expect(input).toBeNull();
    expect(missing.join(' ')).toContain('earliest onset must lie before');
  });

  test('without any time there is no input', () => {
    const { input, missing } = build({}, { onsetEarliestAt: null, onsetLatestAt: null, foundAt: null });
    expect(input).toBeNull();
    expect(missing.join(' ')).toContain('Give the time');
  });
});

describe('the way of the light', () => {
  test('glass in the opening becomes a transmittance with its source', () => {
    const { input, origins } = build({ opening: { azimuthDeg: m(180), glass: 'double-low-e' } });
    expect(input?.opening).toMatchObject({ transmittance: openingTransmittance['double-low-e'].value, transmittanceSource: openingTransmittance['double-low-e'].source });
    expect(origins.find((one) => one.field === 'Glass in the path')).toMatchObject({ origin: 'reported', verified: true });
  });

  test('glass of an unknown kind counts as assumed', () => {
    const { origins } = build({ opening: { azimuthDeg: m(180) } });
    expect(origins.find((one) => one.field === 'Glass in the path')).toMatchObject({ origin: 'assumed' });
  });

  test('a mark needs bearing, elevation and distance; two of them are not enough', () => {
    expect(build({ mark: { bearingDeg: m(336), elevationDeg: m(-15) } }).input).not.toHaveProperty('mark');
    expect(build({ mark: { bearingDeg: m(336), elevationDeg: m(-15), distanceMm: m(91, 2) } }).input?.mark).toMatchObject({ distanceM: 0.091, distanceSigmaM: 0.002 });
  });

  test('the skyline of the case goes before that of its site', () => {
    const skyline = { plusMinusDeg: 1, source: 'panorama' as const, points: [{ azimuthDeg: 90, elevationDeg: 3 }] };
    const own = { ...skyline, points: [{ azimuthDeg: 120, elevationDeg: 9 }] };
    const both = reconstructionInput({ scene: sceneSchema.parse({ skyline: own }), site: { ...site, skyline }, times, seed: 1, recurrenceToUtc: '2027-05-09T00:00:00.000Z' });
    expect(both.input?.skyline?.points[0]?.azimuthDeg).toBe(120);
    const sites = reconstructionInput({ scene: sceneSchema.parse({}), site: { ...site, skyline }, times, seed: 1, recurrenceToUtc: '2027-05-09T00:00:00.000Z' });
    expect(sites.input?.skyline?.points[0]?.azimuthDeg).toBe(90);
  });

  test('the seed is the one given, so that a run can be repeated', () => {
    expect(build({}).input?.seed).toBe(118);
  });
});

describe('the origin of a value', () => {
  const record = { number: 2, nature: 'station' as const, sourceName: 'Moor station', station: 'Moor', stationDistanceKm: 4, intervalMin: 10, values: [{ startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', directWm2: 700 }] };
  const withRecord = (kind: 'hand' | 'file') => {
    const weather = [{ ...record, kind }];
    return reconstructionInput({ scene: sceneSchema.parse({}), site, times, weather, seed: 118, recurrenceToUtc: '2027-05-09T00:00:00.000Z' }).origins.find((one) => one.field === 'Direct irradiance')?.origin;
  };

  test('is the file for irradiance that was imported, and a person for what was entered by hand', () => {
    expect(withRecord('file')).toBe('file');
    expect(withRecord('hand')).toBe('measured');
  });

  test('is told for the place and for every measure of the mark', () => {
    const { origins } = build({ mark: { bearingDeg: m(330, 3), elevationDeg: m(-45, 3), distanceMm: m(91, 2), lengthMm: { ...m(12), method: 'photo' }, widthMm: m(4), surfaceAzimuthDeg: { value: 156, method: 'estimated' } } });
    expect(origins.find((one) => one.field === 'Place')).toMatchObject({ value: '53.50, -1.60, 60 m above sea', origin: 'reported' });
    expect(origins.find((one) => one.field === 'Mark, length')).toMatchObject({ value: '12 mm', origin: 'measured', note: 'from a photo' });
    expect(origins.find((one) => one.field === 'Surface of the target faces')).toMatchObject({ origin: 'reported', note: 'estimated' });
  });
});
