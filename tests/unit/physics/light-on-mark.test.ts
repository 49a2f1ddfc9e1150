import { describe, expect, test, vi } from 'vitest';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';

vi.setConfig({ testTimeout: 60_000 });

/** A pane at the equator that looks straight up, at an equinox: the sun passes overhead in its plane at 15° an hour. */
const overhead: ReconstructionInput = {
  place: { latitudeDeg: 0, longitudeDeg: 0, elevationM: 0, heightAboveGroundM: 0, zone: 'UTC' },
  window: { startUtc: '2025-03-20T11:00:00Z', endUtc: '2025-03-20T13:15:00Z', clockSigmaS: 0 },
  sky: { climateClass: 'temperate-rural' },
  optic: { kind: 'bowed-pane', widthM: 1, heightM: 1, centreBowM: 0.0001, reflectance: 0.3, slopeErrorMrad: 0, axisAzimuthDeg: 0, axisElevationDeg: 90 },
  mark: { bearingDeg: 0, bearingSigmaDeg: 0.1, elevationDeg: 90, elevationSigmaDeg: 0.1, distanceM: 6, distanceSigmaM: 0.05 },
  recurrenceFromUtc: '2025-03-20T00:00:00Z', recurrenceToUtc: '2025-03-22T00:00:00Z',
  rays: 4000, samples: 64, seed: 5,
};

const minutes = (list: readonly { readonly minutes: number }[]): number => list.reduce((sum, one) => sum + one.minutes, 0);

describe('lit apart from focused', () => {
  test('a nearly flat pane 1 m wide lights a mark 6 m away for (W/L)(180/π)/15 h = 38 minutes, and the width of the sun, 2 min, on top', () => {
    const { light, focus } = reconstruct(overhead);
    expect(light?.lit).toHaveLength(1);
    expect(minutes(light?.lit ?? [])).toBeGreaterThanOrEqual(36);
    expect(minutes(light?.lit ?? [])).toBeLessThanOrEqual(43);
    // Flat: its reflectance of the sun and no more, which never counts as focused.
    expect(light?.focused).toEqual([]);
    expect(focus?.discs.find((disc) => disc.disc === '5 mm' && disc.centre === 'mark')?.concentration.mid).toBeCloseTo(0.3, 1);
  });

  test('a pane bowed to focus at the mark is focused there for minutes while it lights it for longer', () => {
    // R = 0.110 a²/w₀ at the middle of a square plate (Timoshenko and Woinowsky-Krieger 1959): 9.2 mm give f = R/2 = 6 m.
    const { light } = reconstruct({ ...overhead, optic: { kind: 'bowed-pane', widthM: 1, heightM: 1, centreBowM: 0.0092, reflectance: 0.3, slopeErrorMrad: 0, axisAzimuthDeg: 0, axisElevationDeg: 90 } });
    const [lit, focused] = [minutes(light?.lit ?? []), minutes(light?.focused ?? [])];
    expect(focused).toBeGreaterThan(0);
    expect(lit).toBeGreaterThan(focused);
    expect(light?.focused[0]?.greatestSuns).toBeGreaterThan(1.5);
    for (const part of light?.focused ?? []) {
      expect(light?.lit.some((whole) => whole.fromUtc <= part.fromUtc && whole.toUtc >= part.toUtc)).toBe(true);
    }
  });

  test('is not stated without an optic or a mark', () => {
    const { mark: _mark, ...unmarked } = overhead;
    expect(reconstruct(unmarked).light).toBeNull();
  });
});
