import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import { exampleInput } from '#app/cli/example-input.ts';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';
import { inputRanges, materialRanges, opticRanges, sealedUnitRanges, type InputRange } from '#app/physics/input-ranges.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { opticKinds } from '#app/physics/optics/optic.ts';
import { checkInput } from '#app/physics/reconstruction/checked-input.ts';
import { settle } from '#app/physics/reconstruction/setting.ts';

vi.setConfig({ testTimeout: 60_000 });

const { mark: _mark, ...unmarked } = exampleInput;
/** One valid optic of every kind. */
const optics: Readonly<Record<(typeof opticKinds)[number], NonNullable<ReconstructionInput['optic']>>> = {
  lens: { kind: 'lens', shape: 'biconvex', faceToSun: 'curved', diameterM: 0.05, focalLengthM: 0.2, centreThicknessM: 0.01, axisAzimuthDeg: 200, axisElevationDeg: 30, material: { name: 'acrylic' } },
  sphere: { kind: 'sphere', diameterM: 0.09, material: { name: 'explicit', refractiveIndex: 1.5, absorptionPerM: 2 } },
  cylinder: { kind: 'cylinder', diameterM: 0.07, lengthM: 0.2, axisAzimuthDeg: 90, axisElevationDeg: 0, material: { name: 'water' } },
  bowl: { kind: 'bowl', radiusM: 0.1, liquidDepthM: 0.08, material: { name: 'water' } },
  'concave-mirror': { kind: 'concave-mirror', figure: 'spherical', diameterM: 0.15, radiusM: 1, reflectance: 0.8, axisAzimuthDeg: 200, axisElevationDeg: 20 },
  'polished-bowl': { kind: 'polished-bowl', figure: 'spherical', diameterM: 0.3, radiusM: 0.3, reflectance: 0.6, axisAzimuthDeg: 200, axisElevationDeg: 60 },
  dish: { kind: 'dish', figure: 'parabolic', diameterM: 0.6, radiusM: 0.5, reflectance: 0.8, axisAzimuthDeg: 200, axisElevationDeg: 40 },
  facade: { kind: 'facade', radiusM: 60, chordM: 40, lengthM: 30, generators: 'vertical', paneWidthM: 1.5, paneTiltMrad: 2, paneBowM: 0.001, reflectance: 0.2, axisAzimuthDeg: 180, axisElevationDeg: 0 },
  'curved-metal': { kind: 'curved-metal', radiusM: 1, chordM: 0.5, lengthM: 2, generators: 'horizontal', reflectance: 0.6, axisAzimuthDeg: 180, axisElevationDeg: 30 },
  trough: { kind: 'trough', radiusM: 1, chordM: 0.8, lengthM: 2, generators: 'horizontal', reflectance: 0.6, axisAzimuthDeg: 180, axisElevationDeg: 60 },
  'bowed-pane': { kind: 'bowed-pane', widthM: 1, heightM: 1.2, centreBowM: 0.003, reflectance: 0.2, axisAzimuthDeg: 180, axisElevationDeg: 0, sealedUnit: { outerThicknessM: 0.004, innerThicknessM: 0.004, gapM: 0.016, sealPressureHpa: 1013, sealTemperatureC: 20, cavityTemperatureC: 0 } },
  fresnel: { kind: 'fresnel', widthM: 0.2, heightM: 0.28, focalLengthM: 0.3, transmittance: 0.8, axisAzimuthDeg: 200, axisElevationDeg: 40 },
  'ponded-dome': { kind: 'ponded-dome', radiusM: 0.8, pondDiameterM: 0.5 },
  telescope: { kind: 'telescope', diameterM: 0.05, focalLengthM: 0.2, transmittance: 0.8, axisAzimuthDeg: 200, axisElevationDeg: 40 },
};

type Path = readonly (string | number)[];
interface Place {
  readonly path: Path;
  readonly range: InputRange;
  readonly input: ReconstructionInput;
}

/** The input with one number changed; objects on the way are copied. */
function changed(input: unknown, [key, ...rest]: Path, value: number): unknown {
  if (key === undefined) return value;
  if (Array.isArray(input)) return input.map((one: unknown, index) => (index === key ? changed(one, rest, value) : one));
  return Object.fromEntries([...new Set([...Object.keys(input ?? {}), String(key)])].map((name) => {
    const held = Object.entries(input ?? {}).find(([own]) => own === name)?.[1];
    return [name, name === key ? changed(held, rest, value) : held];
  }));
}

const of = (input: ReconstructionInput, path: Path, ranges: Readonly<Record<string, InputRange>>): Place[] =>
  Object.entries(ranges).map(([name, range]) => ({ path: [...path, name], range, input }));

const coordinates: ReconstructionInput = { ...unmarked, markCoordinates: { eastM: 0.03, northM: 0.04, upM: -0.03, sigmaM: 0.001 } };
const places: readonly Place[] = [
  ...of(exampleInput, ['place'], inputRanges.place), ...of(exampleInput, ['window'], inputRanges.window), ...of(exampleInput, ['sky'], inputRanges.sky),
  ...of(exampleInput, ['sky', 'dniSeries'], inputRanges.dniSeries), ...of(exampleInput, ['sky', 'dniSeries', 'values', 1], inputRanges.dniValue),
  ...of(exampleInput, ['opening'], inputRanges.opening), ...of(exampleInput, ['occluders', 0], inputRanges.occluder), ...of(exampleInput, ['occluders', 1, 'corners', 2], inputRanges.corner),
  ...of(exampleInput, ['skyline'], inputRanges.skyline), ...of(exampleInput, ['skyline', 'points', 0], inputRanges.skylinePoint),
  ...of(exampleInput, ['mark'], inputRanges.mark), ...of(coordinates, ['markCoordinates'], inputRanges.markCoordinates), ...of(exampleInput, ['target'], inputRanges.target),
  ...of(exampleInput, [], inputRanges.root), ...of({ ...unmarked, optic: optics.sphere }, ['optic', 'material'], materialRanges), ...of({ ...unmarked, optic: optics['bowed-pane'] }, ['optic', 'sealedUnit'], sealedUnitRanges),
  ...opticKinds.flatMap((kind) => of({ ...unmarked, optic: optics[kind] }, ['optic'], opticRanges[kind])),
];
const dotted = (path: Path): string => path.reduce<string>((text, key) => (typeof key === 'number' ? `${text}[${key}]` : text === '' ? key : `${text}.${key}`), '');

/** What a test hands to the engine has the shape of an input by the way it was made. */
const asInput = (value: unknown): ReconstructionInput => {
  const parsed: unknown = JSON.parse(JSON.stringify(value), (_key, one: unknown) => (one === null ? Number.NaN : one));
  return parsed as ReconstructionInput;
};

describe('every number of an input', () => {
  test('is known to the table by the hundred', () => {
    expect(places.length).toBeGreaterThan(120);
    for (const { input } of places) expect(() => checkInput(input)).not.toThrow();
  });

  test('beyond its range is refused with field, value and interval, by the engine and by the contract alike', () => {
    const beyond = fc.record({ index: fc.nat(places.length - 1), above: fc.boolean(), by: fc.double({ min: 0.001, max: 1000, noNaN: true }) });
    fc.assert(fc.property(beyond, ({ index, above, by }) => {
      const place = places[index];
      if (place === undefined) return;
      const { path, range, input } = place;
      const value = above ? range.high + by * Math.max(1e-3, Math.abs(range.high)) : range.low - by * Math.max(1e-3, Math.abs(range.low));
      const bad = changed(input, path, value);
      let said = '';
      try {
        checkInput(asInput(bad));
      } catch (error) {
        expect(error).toBeInstanceOf(RangeError);
        said = error instanceof Error ? error.message : '';
      }
      expect(said).toContain(`${dotted(path)} is ${value}; it must lie in ${range.low}…${range.high}`);
      const contract = parseReconstructionInput(bad);
      expect(contract.ok ? [] : contract.problems.map((problem) => problem.field)).toContain(path.join('.'));
    }), { seed: 21, numRuns: 150 });
  });

  test('at the ends of its range is let through by the contract', () => {
    for (const { path, range, input } of places) {
      for (const value of [range.low, range.high]) {
        const contract = parseReconstructionInput(changed(input, path, value));
        expect(contract.ok ? [] : contract.problems, `${dotted(path)} = ${value}`).toEqual([]);
      }
    }
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY])('that is %s is refused', (value) => {
    for (const { path, input } of places) expect(() => checkInput(changed(input, path, value) as ReconstructionInput), dotted(path)).toThrow(RangeError);
  });

  test('that must be whole is refused in halves', () => {
    expect(() => checkInput({ ...exampleInput, rays: 1000.5 })).toThrow(/rays is 1000\.5; it must be a whole number/);
  });
});

describe('combinations that cannot be name the two fields', () => {
  const values = (pairs: readonly (readonly [string, string])[]) => pairs.map(([startUtc, endUtc]) => ({ startUtc, endUtc, dniWm2: 500 }));
  const series = (pairs: readonly (readonly [string, string])[]): Partial<ReconstructionInput> => ({ sky: { climateClass: 'temperate-rural', dniSeries: { basis: 'measured', source: 'invented', values: values(pairs) } } });
  test.each<readonly [string, Partial<ReconstructionInput>, RegExp]>([
    ['a window that ends first', { window: { ...exampleInput.window, endUtc: '2025-03-11T00:00:00Z' } }, /window\.startUtc and window\.endUtc disagree/],
    ['an opening upside down', { opening: { azimuthDeg: 180, azimuthSigmaDeg: 1, halfWidthDeg: 60, transmittance: 1, transmittanceSource: '', lowestElevationDeg: 50, highestElevationDeg: 10 } }, /lowestElevationDeg 50 and opening\.highestElevationDeg 10 disagree/],
    ['an interval turned round', series([['2025-03-12T12:00:00Z', '2025-03-12T11:00:00Z']]), /startUtc and endUtc disagree/],
    ['intervals that overlap', series([['2025-03-12T11:00:00Z', '2025-03-12T12:00:00Z'], ['2025-03-12T11:30:00Z', '2025-03-12T12:30:00Z']]), /begins before the one from 2025-03-12T11:00:00\.000Z ends/],
    ['a lens wider than its curve', { optic: { ...optics.lens, diameterM: 0.5 } as ReconstructionInput['optic'] & object }, /optic\.diameterM 0\.5 and optic\.focalLengthM 0\.2 disagree/],
    ['a lens thinner than its curve', { optic: { ...optics.lens, centreThicknessM: 0.0005 } as ReconstructionInput['optic'] & object }, /optic\.centreThicknessM 0\.0005 and optic\.diameterM 0\.05 disagree/],
    ['a mirror deeper than a sphere', { optic: { ...optics['concave-mirror'], diameterM: 3 } as ReconstructionInput['optic'] & object }, /optic\.diameterM 3 and optic\.radiusM 1 disagree/],
    ['a chord beyond the circle', { optic: { ...optics.trough, chordM: 3 } as ReconstructionInput['optic'] & object }, /optic\.chordM 3 and optic\.radiusM 1 disagree/],
    ['a pane wider than its façade', { optic: { ...optics.facade, paneWidthM: 20, chordM: 10 } as ReconstructionInput['optic'] & object }, /optic\.paneWidthM 20 and optic\.chordM 10 disagree/],
    ['a bowl deeper than it is', { optic: { ...optics.bowl, liquidDepthM: 1 } as ReconstructionInput['optic'] & object }, /optic\.liquidDepthM 1 and optic\.radiusM 0\.1 disagree/],
    ['a pond wider than its dome', { optic: { ...optics['ponded-dome'], pondDiameterM: 2 } as ReconstructionInput['optic'] & object }, /optic\.pondDiameterM 2 and optic\.radiusM 0\.8 disagree/],
    ['a mark given twice', { markCoordinates: { eastM: 1, northM: 0, upM: 0, sigmaM: 0 } }, /mark and markCoordinates disagree/],
  ])('%s', (_what, part, message) => {
    expect(() => settle({ ...exampleInput, ...part })).toThrow(message);
    expect(() => settle({ ...exampleInput, ...part })).toThrow(RangeError);
  });
});
