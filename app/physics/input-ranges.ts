import { inRange } from './units.ts';

/** Interval in which a number of the input must lie, ends included. */
export interface InputRange {
  readonly low: number;
  readonly high: number;
  readonly unit: string;
  readonly whole?: true;
}

const range = (low: number, high: number, unit = ''): InputRange => ({ low, high, unit });
const whole = (low: number, high: number): InputRange => ({ low, high, unit: '', whole: true });

const azimuth = range(0, 360, '°');
const elevation = range(-90, 90, '°');
const sigmaDeg = range(0, 90, '°');
const coordinate = range(-1000, 1000, 'm');
const share = range(0, 1);
const small = range(0.001, 10, 'm');
const mark = { lengthMm: range(0, 1_000_000, 'mm'), widthMm: range(0, 1_000_000, 'mm'), trailHeadingDeg: azimuth, normalAzimuthDeg: azimuth, normalElevationDeg: elevation } as const;
const common = { slopeErrorMrad: range(0, 100, 'mrad') } as const;
const pose = { axisAzimuthDeg: azimuth, axisElevationDeg: elevation } as const;
const mirror = { ...common, ...pose, diameterM: range(0.005, 30, 'm'), radiusM: range(0.005, 500, 'm'), reflectance: share } as const;
const curved = {
  ...common, ...pose, radiusM: range(0.01, 2000, 'm'), chordM: range(0.01, 500, 'm'), lengthM: range(0.01, 500, 'm'), paneWidthM: range(0.01, 20, 'm'),
  paneTiltMrad: range(0, 50, 'mrad'), paneBowM: range(-0.1, 0.1, 'm'), reflectance: share,
} as const;

/** Ranges of the numbers of an optic, by its kind. */
export const opticRanges = {
  lens: { ...common, ...pose, diameterM: small, focalLengthM: range(0.005, 100, 'm'), centreThicknessM: range(0.0005, 1, 'm') },
  sphere: { ...common, diameterM: small },
  cylinder: { ...common, ...pose, diameterM: small, lengthM: range(0.001, 100, 'm') },
  bowl: { ...common, radiusM: small, liquidDepthM: range(0.001, 20, 'm') },
  'concave-mirror': mirror,
  'polished-bowl': mirror,
  dish: mirror,
  facade: curved,
  'curved-metal': curved,
  trough: curved,
  'bowed-pane': { ...common, ...pose, widthM: range(0.05, 20, 'm'), heightM: range(0.05, 20, 'm'), centreBowM: range(-0.2, 0.2, 'm'), reflectance: share },
  fresnel: { ...common, ...pose, widthM: range(0.01, 10, 'm'), heightM: range(0.01, 10, 'm'), focalLengthM: range(0.01, 20, 'm'), transmittance: share },
  'ponded-dome': { ...common, radiusM: range(0.01, 50, 'm'), pondDiameterM: range(0.01, 50, 'm') },
  telescope: { ...common, ...pose, diameterM: small, focalLengthM: range(0.01, 100, 'm'), transmittance: share },
} as const;

export const materialRanges = { refractiveIndex: range(1.05, 3), absorptionPerM: range(0, 10_000, '1/m') } as const;

export const sealedUnitRanges = {
  outerThicknessM: range(0.001, 0.05, 'm'), innerThicknessM: range(0.001, 0.05, 'm'), gapM: range(0.002, 0.1, 'm'),
  sealPressureHpa: range(500, 1100, 'hPa'), sealTemperatureC: range(-30, 60, '°C'), cavityTemperatureC: range(-60, 90, '°C'),
} as const;

/** Ranges of all other numbers of an input, by the object that holds them; lists hold one entry for all their members. */
export const inputRanges = {
  place: { latitudeDeg: range(-90, 90, '°'), longitudeDeg: range(-180, 180, '°'), elevationM: range(-500, 9000, 'm'), heightAboveGroundM: range(0, 1000, 'm') },
  window: { clockSigmaS: range(0, 86_400, 's') },
  sky: {
    pressureHpa: range(300, 1100, 'hPa'), temperatureC: range(-90, 60, '°C'), ozoneCm: range(0, 1, 'cm'), waterCm: range(0, 10, 'cm'), aod500: range(0, 5), aod380: range(0, 5),
    solarConstantWm2: range(1300, 1400, 'W/m²'), circumsolarRatio: range(0, 0.5),
  },
  dniSeries: { stationDistanceKm: range(0, 20_000, 'km') },
  dniValue: { dniWm2: range(0, 1500, 'W/m²') },
  opening: { azimuthDeg: azimuth, azimuthSigmaDeg: sigmaDeg, halfWidthDeg: range(0, 90, '°'), lowestElevationDeg: elevation, highestElevationDeg: elevation, transmittance: share },
  corner: { eastM: coordinate, northM: coordinate, upM: coordinate },
  occluder: { revealDepthM: range(0, 10, 'm') },
  skyline: { sigmaDeg },
  skylinePoint: { azimuthDeg: azimuth, elevationDeg: range(-30, 90, '°') },
  mark: {
    ...mark, bearingDeg: azimuth, bearingSigmaDeg: sigmaDeg, elevationDeg: elevation, elevationSigmaDeg: sigmaDeg, distanceM: range(0.001, 1000, 'm'), distanceSigmaM: range(0, 1000, 'm'),
  },
  markCoordinates: { ...mark, eastM: coordinate, northM: coordinate, upM: coordinate, sigmaM: range(0, 1000, 'm') },
  target: { solarAbsorptance: share, thicknessM: range(0.00001, 10, 'm') },
  root: { opticSigmaRel: share, occluderSigmaM: range(0, 10, 'm'), rays: whole(1000, 5_000_000), samples: whole(64, 65_536), seed: whole(0, 4_294_967_295) },
} as const;

/** Checks the numbers of one object; what was left out is not looked at. @throws RangeError naming field, value and interval. */
export function checkRanges(path: string, holder: object | undefined, ranges: Readonly<Record<string, InputRange>>): void {
  if (holder === undefined) return;
  for (const [name, value] of Object.entries(holder)) {
    const allowed = ranges[name];
    if (allowed === undefined || value === undefined) continue;
    const field = path === '' ? name : `${path}.${name}`;
    inRange(field, Number(value), allowed.low, allowed.high, allowed.unit);
    if (allowed.whole === true && !Number.isInteger(value)) throw new RangeError(`${field} is ${String(value)}; it must be a whole number in ${allowed.low}…${allowed.high}.`);
  }
}
