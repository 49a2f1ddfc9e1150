import { describe, expect, test, vi } from 'vitest';
import { exampleInput } from '#app/cli/example-input.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';

// Whole runs with a year of recurrence: seconds on a busy machine.
vi.setConfig({ testTimeout: 60_000 });

const fast = { rays: 4000, samples: 256, seed: 3 } as const;

function place(latitudeDeg: number, longitudeDeg: number, zone: string): ReconstructionInput['place'] {
  return { latitudeDeg, longitudeDeg, elevationM: 20, heightAboveGroundM: 0, zone };
}

function window(startUtc: string, endUtc: string): ReconstructionInput['window'] {
  return { startUtc, endUtc, clockSigmaS: 60 };
}

/** Mark where an incident with this sun puts the focus of an optic without an axis. */
function opposite(azimuthDeg: number, elevationDeg: number, distanceM: number): NonNullable<ReconstructionInput['mark']> {
  return {
    bearingDeg: (azimuthDeg + 180) % 360, bearingSigmaDeg: 0.3, elevationDeg: -elevationDeg, elevationSigmaDeg: 0.3, distanceM, distanceSigmaM: 0.001,
  };
}

const rural = { climateClass: 'temperate-rural' } as const;

/** Best instants of the bands of a result. */
function returns(result: ReconstructionResult): readonly string[] {
  return result.recurrence.map((band) => band.bestUtc);
}

function expectReturn(result: ReconstructionResult, local: string): void {
  // The author's algorithm is good to ±0.1°: a day near an equinox is 0.4°, and a minute of the clock 0.25°.
  const wanted = Date.parse(local);
  const nearest = returns(result).reduce((least, best) => Math.min(least, Math.abs(Date.parse(best) - wanted)), Number.POSITIVE_INFINITY);
  expect(nearest).toBeLessThan(86_400_000 + 5 * 60_000);
  const clock = returns(result).map((best) => Math.abs(((Date.parse(best) - wanted + 43_200_000) % 86_400_000 + 86_400_000) % 86_400_000 - 43_200_000));
  expect(Math.min(...clock)).toBeLessThan(5 * 60_000);
}

describe('invented incidents, worked by their author with a separate algorithm', () => {
  test('shaving mirror: 41 mm of trail at 74.6 mm/h need about 27 minutes, and the focus lies on the curtain', () => {
    const result = reconstruct({
      ...fast, sky: rural, place: place(51.4, -2.9, 'Europe/London'), window: window('2025-12-14T10:50:00Z', '2025-12-14T12:31:00Z'),
      optic: { kind: 'concave-mirror', figure: 'spherical', diameterM: 0.15, radiusM: 0.6, reflectance: 0.85, axisAzimuthDeg: 181, axisElevationDeg: 10 },
      mark: { bearingDeg: 181, bearingSigmaDeg: 1, elevationDeg: 4.6, elevationSigmaDeg: 1, distanceM: 0.31, distanceSigmaM: 0.005, lengthMm: 41, widthMm: 8, trailHeadingDeg: 90 },
      target: { materialId: 'curtain-fabric' },
    });
    expect(Math.abs((result.focus?.trailSpeedMmPerH ?? 0) - 74.6)).toBeLessThan(0.4);
    expect(Math.abs((result.focus?.trailMinutesAtLeast ?? 0) - 27)).toBeLessThan(2.5);
    expect(result.totals.sunlit).toBeGreaterThan(20);
    expect(result.grade.word).not.toBe('inconsistent because');
  });

  test('acrylic sphere: the spot runs 22.9 mm/h, and the sun is back on 7 November at 10:20', () => {
    const result = reconstruct({
      ...fast, sky: rural, place: place(55.7, 12.4, 'Europe/Copenhagen'), window: window('2026-02-03T08:30:00Z', '2026-02-03T10:00:00Z'),
      optic: { kind: 'sphere', diameterM: 0.12, material: { name: 'acrylic' } },
      mark: { ...opposite(157, 15.2, 0.091), lengthMm: 12, widthMm: 5 },
      target: { materialId: 'wool-felt' },
    });
    expect(Math.abs((result.focus?.trailSpeedMmPerH ?? 0) - 22.9)).toBeLessThan(0.2);
    expectReturn(result, '2026-11-07T10:20:00+01:00');
  });

  test('pool deck: the concave face is back on 22 March at 12:28', () => {
    expectReturn(reconstruct({
      ...fast, sky: rural, place: place(-26.1, 32.9, 'Africa/Maputo'), window: window('2025-09-20T09:30:00Z', '2025-09-20T11:00:00Z'),
      optic: { kind: 'facade', radiusM: 50, chordM: 30, lengthM: 40, paneWidthM: 1.2, generators: 'vertical', reflectance: 0.3, axisAzimuthDeg: 0, axisElevationDeg: 0 },
      mark: { bearingDeg: 18, bearingSigmaDeg: 0.3, elevationDeg: -61.8, elevationSigmaDeg: 0.3, distanceM: 46, distanceSigmaM: 1 },
    }), '2026-03-22T12:28:00+02:00');
  });

  test('roof membrane: a line focus gives no minutes for the length of its mark, and is back on 3 August at 13:30', () => {
    const result = reconstruct({
      ...fast, sky: rural, place: place(53.5, -1.6, 'Europe/London'), window: window('2026-05-09T11:00:00Z', '2026-05-09T14:10:00Z'),
      optic: { kind: 'curved-metal', radiusM: 1.2, chordM: 0.55, lengthM: 1.9, generators: 'horizontal', reflectance: 0.65, axisAzimuthDeg: 187, axisElevationDeg: 20 },
      mark: { bearingDeg: 187, bearingSigmaDeg: 0.3, elevationDeg: -13.8, elevationSigmaDeg: 0.3, distanceM: 0.5, distanceSigmaM: 0.02, lengthMm: 1900, widthMm: 60 },
    });
    expect(result.focus?.focusKind).toBe('line');
    expect(result.focus?.trailMinutesAtLeast).toBeNull();
    expectReturn(result, '2026-08-03T13:30:00+01:00');
  });

  test('vinyl siding: the bowed pane is back on 19 November at 11:54, not at 12:20', () => {
    expectReturn(reconstruct({
      ...fast, sky: rural, place: place(42.9, -78.6, 'America/New_York'), window: window('2026-01-22T16:30:00Z', '2026-01-22T18:00:00Z'),
      optic: { kind: 'bowed-pane', widthM: 0.61, heightM: 0.91, centreBowM: 0.003, reflectance: 0.22, axisAzimuthDeg: 180, axisElevationDeg: 0 },
      mark: { bearingDeg: 182, bearingSigmaDeg: 0.3, elevationDeg: -27.6, elevationSigmaDeg: 0.3, distanceM: 6.9, distanceSigmaM: 0.1 },
      target: { materialId: 'vinyl-siding' },
    }), '2026-11-19T11:54:00-05:00');
  });

  test('courtyard: the pane is back on 24 August at 15:13', () => {
    expectReturn(reconstruct({
      ...fast, sky: rural, place: place(60.2, 24.7, 'Europe/Helsinki'), window: window('2026-04-18T11:30:00Z', '2026-04-18T12:40:00Z'),
      optic: { kind: 'bowed-pane', widthM: 1, heightM: 1.2, centreBowM: 0.004, reflectance: 0.25, axisAzimuthDeg: 214, axisElevationDeg: 0 },
      mark: { bearingDeg: 214, bearingSigmaDeg: 0.3, elevationDeg: -36.7, elevationSigmaDeg: 0.3, distanceM: 8, distanceSigmaM: 0.1 },
    }), '2026-08-24T15:13:00+03:00');
  });

  test('crystal bowl: no minute of 8 February passes a window that faces 355°', () => {
    const result = reconstruct({
      ...fast, sky: rural, place: place(57.1, -4.3, 'Europe/London'), window: window('2026-02-08T00:00:00Z', '2026-02-09T00:00:00Z'),
      opening: { azimuthDeg: 355, azimuthSigmaDeg: 2, halfWidthDeg: 90, transmittance: 0.7, transmittanceSource: 'clear double unit' },
      optic: { kind: 'bowl', radiusM: 0.1, liquidDepthM: 0.08, material: { name: 'water' } },
      mark: opposite(180, 20, 0.25),
    });
    expect(result.totals.notSunlit).toBe(1440);
    expect(result.grade.word).toBe('inconsistent because');
    expect(result.checks.find((check) => check.id === 'through-opening')?.passed).toBe(false);
  });

  test('page magnifier: the block opposite lets the sun by at 12:51, and 12:41–13:02 within 3° of bearing', () => {
    const block = [{ azimuthDeg: 139.99, elevationDeg: 0 }, { azimuthDeg: 140, elevationDeg: 34 }, { azimuthDeg: 186, elevationDeg: 34 }, { azimuthDeg: 186.01, elevationDeg: 0 }];
    const run = (sigmaDeg: number): ReconstructionResult => reconstruct({
      ...fast, sky: rural, place: place(48.2, 11.1, 'Europe/Berlin'), window: window('2026-02-17T08:00:00Z', '2026-02-17T14:00:00Z'),
      opening: { azimuthDeg: 170, azimuthSigmaDeg: 0, halfWidthDeg: 85, transmittance: 0.7, transmittanceSource: 'clear double unit' },
      skyline: { points: block, sigmaDeg },
    });
    const sharp = run(0);
    const cleared = sharp.runs.find((span) => Date.parse(span.fromUtc) > Date.UTC(2026, 1, 17, 9) && span.verdict !== 'not-sunlit');
    expect(Math.abs(Date.parse(cleared?.fromUtc ?? '') - Date.parse('2026-02-17T12:51:00+01:00'))).toBeLessThanOrEqual(3 * 60_000);
    // Two sigmas of 1.5° are the ±3°.
    const rough = run(1.5).runs.filter((span) => Date.parse(span.toUtc) > Date.UTC(2026, 1, 17, 10));
    const doubtful = rough.find((span) => span.reason === 'uncertainty-straddles');
    expect(Math.abs(Date.parse(doubtful?.fromUtc ?? '') - Date.parse('2026-02-17T12:41:00+01:00'))).toBeLessThanOrEqual(3 * 60_000);
    expect(Math.abs(Date.parse(doubtful?.toUtc ?? '') - Date.parse('2026-02-17T13:02:00+01:00'))).toBeLessThanOrEqual(3 * 60_000);
  });
});

describe('verdicts', () => {
  test('an unknown optic leaves day undecided but never hides the night', () => {
    const result = reconstruct({ ...fast, sky: rural, place: place(51.5, 0, 'Europe/London'), window: window('2026-03-01T00:00:00Z', '2026-03-02T00:00:00Z') });
    const reasons = new Set(result.runs.map((run) => run.reason));
    expect(reasons.has('night')).toBe(true);
    expect(reasons.has('optic-unknown')).toBe(true);
    expect(result.totals.sunlit).toBe(0);
    expect(result.grade.word).toBe('cannot tell because');
    expect(result.requiredSun).toBeNull();
  });

  test('an optic that people move has no calendar', () => {
    const result = reconstruct({
      ...fast, sky: rural, place: place(46.8, 8.9, 'Europe/Zurich'), window: window('2026-06-13T13:30:00Z', '2026-06-13T14:30:00Z'),
      optic: { kind: 'telescope', diameterM: 0.05, focalLengthM: 0.2, transmittance: 0.85, axisAzimuthDeg: 248, axisElevationDeg: 50 },
    });
    expect(result.recurrence).toEqual([]);
    expect(result.requiredSun).toBeNull();
    expect(result.focus).not.toBeNull();
  });

  test('measured overcast through the window refutes, an hourly mean with a chance of gaps does not', () => {
    const dull = (basis: 'measured' | 'hourly-archive'): ReconstructionResult => reconstruct({
      ...exampleInput, ...fast,
      sky: { climateClass: 'temperate-rural', dniSeries: { basis, source: 'invented station', values: [{ startUtc: '2025-03-12T11:00:00Z', endUtc: '2025-03-12T16:00:00Z', dniWm2: 60 }] } },
    });
    expect(dull('measured').tests.find((summary) => summary.test === 'weather')?.result).toBe('contradicts');
    expect(dull('hourly-archive').tests.find((summary) => summary.test === 'weather')?.result).toBe('inconclusive');
  });

  test('a trail that runs against the computed motion contradicts', () => {
    const mark = { ...exampleInput.mark, trailHeadingDeg: 305 };
    const result = reconstruct({ ...exampleInput, ...fast, mark: { ...opposite(215, 30, 0.06), ...mark } });
    expect(result.checks.find((check) => check.id === 'trail-heading')?.passed).toBe(false);
    expect(result.grade.word).toBe('inconsistent because');
  });

  test('only the four grade words are used, and no outcome speaks of a cause', () => {
    const text = JSON.stringify(reconstruct({ ...exampleInput, ...fast }));
    expect(text).not.toMatch(/caused by|proves|score|probab/i);
  });
});

describe('runs', () => {
  test('equal input gives byte-identical JSON, another seed does not', () => {
    const run = (seed: number): string => JSON.stringify(reconstruct({ ...exampleInput, rays: 4000, samples: 256, seed }));
    expect(run(9)).toBe(run(9));
    expect(run(9)).not.toBe(run(10));
  });

  test('four days of minutes stay under one megabyte, and the runs hold every minute', () => {
    const result = reconstruct({ ...exampleInput, ...fast, window: window('2025-06-10T00:00:00Z', '2025-06-14T00:00:00Z') });
    expect(JSON.stringify(result).length).toBeLessThan(1_000_000);
    expect(result.runs.reduce((sum, run) => sum + run.minutes, 0)).toBe(5760);
    expect(result.totals.sunlit + result.totals.notSunlit + result.totals.cannotTell).toBe(5760);
  });

  test('a mark by coordinates gives what the same mark by bearing gives', () => {
    const { mark, ...rest } = { ...exampleInput, ...fast };
    const { bearingDeg = 0, elevationDeg = 0, distanceM = 0 } = mark ?? {};
    const level = distanceM * Math.cos((elevationDeg * Math.PI) / 180);
    const result = reconstruct({
      ...rest,
      markCoordinates: {
        eastM: level * Math.sin((bearingDeg * Math.PI) / 180), northM: level * Math.cos((bearingDeg * Math.PI) / 180),
        upM: distanceM * Math.sin((elevationDeg * Math.PI) / 180), sigmaM: 0.001, normalAzimuthDeg: 215, normalElevationDeg: 0,
      },
    });
    expect(result.requiredSun).toEqual(reconstruct({ ...exampleInput, ...fast }).requiredSun);
    expect(() => reconstruct({ ...exampleInput, ...fast, markCoordinates: { eastM: 1, northM: 0, upM: 0, sigmaM: 0 } })).toThrow(/mark and markCoordinates disagree/);
  });

  test('what the input left open is listed under assumptions with its source', () => {
    const result = reconstruct({ ...fast, sky: rural, place: place(51.5, 0, 'Europe/London'), window: window('2026-03-01T11:00:00Z', '2026-03-01T12:00:00Z') });
    const fields = result.assumptions.map((assumption) => assumption.field);
    expect(fields).toEqual(expect.arrayContaining(['sky.pressureHpa', 'sky.temperatureC', 'sky.ozoneCm', 'sky.waterCm', 'sky.aod500', 'sky.aod380', 'sky.solarConstantWm2', 'skyline']));
    expect(result.assumptions.find((assumption) => assumption.field === 'sky.aod500')?.source.verified).toBe(false);
  });

  test('a spread that nobody stated is an assumption, and one that rests on no publication says so', () => {
    const { assumptions } = reconstruct({ ...exampleInput, ...fast });
    expect(assumptions.find(({ field }) => field === 'ignitionTimeSigmaRel')?.source.verified).toBe(false);
  });

  test('progress runs from low to all', () => {
    const seen: number[] = [];
    reconstruct({ ...exampleInput, ...fast }, (done, total) => seen.push(done / total));
    expect(seen.at(-1)).toBe(1);
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
  });
});

describe('input out of range', () => {
  const given = { ...exampleInput, ...fast };
  test('is refused with field, value and interval', () => {
    expect(() => reconstruct({ ...given, place: { ...given.place, latitudeDeg: 91 } })).toThrow(/place\.latitudeDeg is 91; it must lie in -90…90/);
    expect(() => reconstruct({ ...given, window: window('2025-03-12', '2025-03-12T11:00:00Z') })).toThrow(/window\.startUtc is "2025-03-12"/);
    expect(() => reconstruct({ ...given, target: { materialId: 'unobtainium' } })).toThrow(/target\.materialId is "unobtainium"; it must be one of/);
  });

  test('that contradicts itself names the two fields', () => {
    expect(() => reconstruct({ ...given, window: window('2025-03-12T12:00:00Z', '2025-03-12T11:00:00Z') })).toThrow(/window\.startUtc and window\.endUtc disagree/);
    expect(() => reconstruct({ ...given, recurrenceFromUtc: '2026-01-01T00:00:00Z', recurrenceToUtc: '2025-01-01T00:00:00Z' })).toThrow(/recurrenceFromUtc and recurrenceToUtc disagree/);
  });
});
