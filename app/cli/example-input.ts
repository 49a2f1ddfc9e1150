import type { ReconstructionInput } from '#app/physics/model.ts';

/** A complete, invented input: a glass ball on a window shelf and a scorched curtain. Every optional field is shown. */
export const exampleInput: ReconstructionInput = {
  place: { latitudeDeg: 51.5, longitudeDeg: -0.1, elevationM: 20, heightAboveGroundM: 0, zone: 'Europe/London' },
  window: { startUtc: '2025-03-12T11:00:00Z', endUtc: '2025-03-12T16:00:00Z', clockSigmaS: 300 },
  sky: {
    climateClass: 'temperate-rural',
    pressureHpa: 1013.25,
    temperatureC: 12,
    ozoneCm: 0.3,
    waterCm: 1.5,
    aod500: 0.12,
    aod380: 0.17,
    solarConstantWm2: 1361.1,
    dniSeries: {
      basis: 'measured',
      source: 'invented station, 6 km west',
      stationDistanceKm: 6,
      values: [
        { startUtc: '2025-03-12T11:00:00Z', endUtc: '2025-03-12T14:00:00Z', dniWm2: 690 },
        { startUtc: '2025-03-12T14:00:00Z', endUtc: '2025-03-12T15:00:00Z', dniWm2: 742 },
        { startUtc: '2025-03-12T15:00:00Z', endUtc: '2025-03-12T16:00:00Z', dniWm2: 610 },
      ],
    },
  },
  opening: {
    azimuthDeg: 205,
    azimuthSigmaDeg: 1,
    halfWidthDeg: 75,
    lowestElevationDeg: 5,
    highestElevationDeg: 60,
    transmittance: 0.837,
    transmittanceSource: 'clear 3 mm pane, normal incidence (row ep-ts-clear-3mm)',
  },
  skyline: {
    points: [
      { azimuthDeg: 120, elevationDeg: 8, name: 'terrace roofs' },
      { azimuthDeg: 200, elevationDeg: 11, name: 'terrace roofs' },
      { azimuthDeg: 260, elevationDeg: 6 },
    ],
    sigmaDeg: 0.5,
  },
  optic: { kind: 'sphere', diameterM: 0.09, slopeErrorMrad: 0.3, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } },
  opticSigmaRel: 0.02,
  mark: {
    bearingDeg: 35,
    bearingSigmaDeg: 1,
    elevationDeg: -30,
    elevationSigmaDeg: 1,
    distanceM: 0.06,
    distanceSigmaM: 0.002,
    lengthMm: 12,
    widthMm: 3,
    trailHeadingDeg: 125,
    normalAzimuthDeg: 215,
    normalElevationDeg: 0,
  },
  target: { materialId: 'curtain-fabric', solarAbsorptance: 0.35, thicknessM: 0.0003 },
  recurrenceFromUtc: '2025-03-13T00:00:00Z',
  rays: 100_000,
  samples: 4096,
  seed: 20250312,
};
