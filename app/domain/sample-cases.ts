import type { ReconstructionInput } from '#app/physics/model/input.ts';

/** Three invented cases that the first page shows. What people found is told here; what the sun did is computed. */
export interface SampleCase {
  readonly key: 'parapet' | 'magnifier' | 'grass';
  readonly title: string;
  readonly found: string;
  readonly foundUtc: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly input: ReconstructionInput;
}

const place = (latitudeDeg: number, longitudeDeg: number, elevationM: number, zone: string) => ({ latitudeDeg, longitudeDeg, elevationM, zone, heightAboveGroundM: 10 });

export const sampleCases: readonly SampleCase[] = [
  {
    key: 'parapet',
    title: 'Scorch band on a roof membrane',
    found: 'probable, a curved steel edge',
    foundUtc: '2026-05-09T14:10:00.000Z',
    latitudeDeg: 53.5,
    longitudeDeg: -1.6,
    input: {
      place: place(53.5, -1.6, 95, 'Europe/London'),
      window: { startUtc: '2026-05-09T04:20:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', clockSigmaS: 60 },
      sky: { climateClass: 'temperate-rural' },
      optic: { kind: 'curved-metal', radiusM: 1.2, chordM: 0.55, lengthM: 4, generators: 'horizontal', reflectance: 0.62, axisAzimuthDeg: 181, axisElevationDeg: 15.9 },
      opticSigmaRel: 0.02,
      mark: { bearingDeg: 175, bearingSigmaDeg: 2, elevationDeg: -22, elevationSigmaDeg: 2, distanceM: 0.5, distanceSigmaM: 0.01, widthMm: 60, lengthMm: 1900, normalAzimuthDeg: 0, normalElevationDeg: 45 },
      target: { materialId: 'single-ply-membrane' },
      seed: 1,
    },
  },
  {
    key: 'magnifier',
    title: 'Page magnifier blamed for a bin fire',
    found: 'ruled out, the block opposite stood in the way',
    foundUtc: '2026-02-17T10:40:00.000Z',
    latitudeDeg: 48.2,
    longitudeDeg: 11.1,
    input: {
      place: place(48.2, 11.1, 520, 'Europe/Berlin'),
      window: { startUtc: '2026-02-17T09:15:00.000Z', endUtc: '2026-02-17T10:40:00.000Z', clockSigmaS: 60 },
      sky: { climateClass: 'temperate-rural' },
      skyline: { sigmaDeg: 1, points: [{ azimuthDeg: 139.5, elevationDeg: 9 }, { azimuthDeg: 140, elevationDeg: 34 }, { azimuthDeg: 186, elevationDeg: 34 }, { azimuthDeg: 186.5, elevationDeg: 10 }] },
      optic: { kind: 'fresnel', widthM: 0.21, heightM: 0.297, focalLengthM: 0.3, transmittance: 0.8, axisAzimuthDeg: 165, axisElevationDeg: 30 },
      opticSigmaRel: 0.1,
      mark: { bearingDeg: 343, bearingSigmaDeg: 4, elevationDeg: -28.5, elevationSigmaDeg: 4, distanceM: 0.32, distanceSigmaM: 0.02 },
      target: { materialId: 'paper-or-board' },
      seed: 2,
    },
  },
  {
    key: 'grass',
    title: 'Dry grass beside jar glass',
    found: 'undetermined, the glass had been moved',
    foundUtc: '2025-07-29T22:40:00.000Z',
    latitudeDeg: 38.7,
    longitudeDeg: -120.9,
    input: {
      place: place(38.7, -120.9, 480, 'America/Los_Angeles'),
      window: { startUtc: '2025-07-29T20:30:00.000Z', endUtc: '2025-07-29T22:40:00.000Z', clockSigmaS: 60 },
      sky: { climateClass: 'clean-dry-mountain' },
      target: { materialId: 'mulch-or-dry-grass' },
      seed: 3,
    },
  },
];
