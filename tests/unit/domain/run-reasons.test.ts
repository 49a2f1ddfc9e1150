import { describe, expect, test } from 'vitest';
import { reasonReader } from '#app/domain/run-reasons.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';

const plain: ReconstructionInput = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, heightAboveGroundM: 0, zone: 'Europe/London' },
  window: { startUtc: '2026-05-09T05:00:00.000Z', endUtc: '2026-05-09T08:00:00.000Z', clockSigmaS: 60 },
  sky: { climateClass: 'temperate-rural' },
  recurrenceToUtc: '2026-06-01T00:00:00.000Z',
  rays: 1_000,
  samples: 64,
  seed: 7,
};
const wordsOf = (input: ReconstructionInput) => {
  const why = reasonReader(input);
  return new Set(reconstruct(input).minutes.filter((minute) => minute.reason === 'uncertainty-straddles' || minute.reason === 'below-skyline').map(why));
};

describe('why a minute cannot be told', () => {
  test('names the skyline while the sun stands within its ±, and the building while it is below', () => {
    const words = wordsOf({ ...plain, skyline: { sigmaDeg: 0.5, points: [{ azimuthDeg: 0, elevationDeg: 15, name: 'Grain House' }, { azimuthDeg: 90, elevationDeg: 15, name: 'Grain House' }, { azimuthDeg: 180, elevationDeg: 15 }] } });
    expect(words).toContain('the ±0.5° of the skyline straddles');
    expect(words).toContain('behind Grain House');
  });

  test('names the opening while the sun stands within its ±', () => {
    const words = wordsOf({ ...plain, opening: { azimuthDeg: 155, azimuthSigmaDeg: 2, halfWidthDeg: 60, transmittance: 0.8, transmittanceSource: 'test' } });
    expect([...words]).toEqual(['the ±2° of the opening straddles']);
  });

  test('names the survey of the mark when neither stands in the way', () => {
    const words = wordsOf({
      ...plain, place: { ...plain.place, latitudeDeg: 55.7, longitudeDeg: 12.4, zone: 'Europe/Copenhagen' }, window: { ...plain.window, startUtc: '2026-02-03T08:30:00.000Z', endUtc: '2026-02-03T10:30:00.000Z' }, recurrenceToUtc: '2026-03-01T00:00:00.000Z',
      optic: { kind: 'sphere', diameterM: 0.12, material: { name: 'acrylic' } }, mark: { bearingDeg: 336.6, bearingSigmaDeg: 3, elevationDeg: -15.2, elevationSigmaDeg: 1.6, distanceM: 0.091, distanceSigmaM: 0.002 },
    });
    expect([...words]).toEqual(['the ± of the mark’s survey straddles']);
  });
});
