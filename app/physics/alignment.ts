import type { MarkCoordinatesInput, MarkInput } from './model/input.ts';
import type { Beam, FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import { airlessElevationDeg } from '#app/physics/sun/refraction.ts';
import { declinationOf, type Observer } from '#app/physics/sun/solar-position.ts';
import { degree, wrap180 } from './units.ts';
import { add, azimuthOf, dot, elevationOf, fromAzimuthElevation, lengthOf, scale, subtract, unit, type Vector } from './vector.ts';

/** A surveyed mark, seen from the point from which the chief ray starts. */
export interface Mark {
  readonly towards: Vector;
  readonly distanceM: number;
  readonly position: Vector;
  /** As surveyed, from the optic's origin. [m] */
  readonly surveyed: Vector;
  /** One sigma across the line of sight, level and upright, and along it. [m] */
  readonly sigmaLevelM: number;
  readonly sigmaUprightM: number;
  readonly sigmaAxialM: number;
  readonly halfLengthM: number;
  readonly halfWidthM: number;
  readonly trailHeadingDeg: number | null;
  /** Outward normal of the target's surface; the surface faces the optic where it was not recorded. */
  readonly normal: Vector;
}

/** Bearing, elevation and distance of a mark that was surveyed by coordinates, with its uncertainty carried over. */
export function markFromCoordinates(given: MarkCoordinatesInput): MarkInput {
  const { eastM, northM, upM, sigmaM, ...rest } = given;
  const position: Vector = [eastM, northM, upM];
  const distanceM = lengthOf(position);
  if (distanceM < 0.001) throw new RangeError('markCoordinates lie in the optic’s origin; the mark must be at least 0.001 m from it.');
  return {
    ...rest,
    bearingDeg: azimuthOf(position),
    bearingSigmaDeg: Math.atan2(sigmaM, Math.hypot(eastM, northM)) / degree,
    elevationDeg: elevationOf(position),
    elevationSigmaDeg: Math.atan2(sigmaM, distanceM) / degree,
    distanceM,
    distanceSigmaM: sigmaM,
  };
}

/** @param startsAt Where the chief ray starts, from the origin of the survey. [m] */
export function readMark(input: MarkInput, startsAt: Vector): Mark {
  const surveyed = scale(fromAzimuthElevation(input.bearingDeg, input.elevationDeg), input.distanceM);
  const position = subtract(surveyed, startsAt);
  const towards = unit(position);
  const faces = input.normalAzimuthDeg !== undefined || input.normalElevationDeg !== undefined;
  return {
    towards,
    distanceM: lengthOf(position),
    position,
    surveyed,
    sigmaLevelM: input.distanceM * Math.cos(input.elevationDeg * degree) * input.bearingSigmaDeg * degree,
    sigmaUprightM: input.distanceM * input.elevationSigmaDeg * degree,
    sigmaAxialM: input.distanceSigmaM,
    halfLengthM: (input.lengthMm ?? 0) / 2000,
    halfWidthM: (input.widthMm ?? 0) / 2000,
    trailHeadingDeg: input.trailHeadingDeg ?? null,
    normal: faces ? fromAzimuthElevation(input.normalAzimuthDeg ?? input.bearingDeg + 180, input.normalElevationDeg ?? 0) : scale(towards, -1),
  };
}

/** How far the focus lies from the mark. [m] */
export interface Miss {
  /** Distance of the mark from the chief ray; for a line focus, across the line, beyond its ends included. */
  readonly lateralM: number;
  /** Signed offset as a beam's `concentration` wants it. */
  readonly offsetM: number;
  /** Mark minus focus along the chief ray: positive where the mark lies beyond the focus. */
  readonly axialM: number;
  /** Distance of the mark from the origin along the chief ray. */
  readonly alongM: number;
  /** Vector from the chief ray to the mark, at right angles to the ray. */
  readonly sideways: Vector;
}

/** Distance between a mark and the focus, sideways and along the chief ray. */
export function missOf(beam: Beam, model: FocusModel, mark: Mark, position = mark.position): Miss {
  const { direction, across } = beam;
  if (across === null || model.generator === null) {
    const alongM = dot(position, direction);
    const sideways = subtract(position, scale(direction, alongM));
    const lateralM = lengthOf(sideways);
    return { lateralM, offsetM: lateralM, axialM: alongM - beam.focusM, alongM, sideways };
  }
  const g = model.generator;
  const offsetM = dot(position, across);
  const cosine = dot(g, direction);
  const inPlane = subtract(position, scale(across, offsetM));
  const sinSquared = 1 - cosine * cosine;
  const alongLineM = (dot(inPlane, g) - cosine * dot(inPlane, direction)) / sinSquared;
  const alongM = (dot(inPlane, direction) - cosine * dot(inPlane, g)) / sinSquared;
  const beyondEndM = Math.max(0, Math.abs(alongLineM) - model.lineHalfLengthM - mark.halfLengthM);
  const sideways = add(scale(across, offsetM), scale(g, Math.sign(alongLineM) * beyondEndM));
  return { lateralM: Math.hypot(offsetM, beyondEndM), offsetM: beyondEndM > 0 ? Math.sign(offsetM || 1) * Math.hypot(offsetM, beyondEndM) : offsetM, axialM: alongM - beam.focusM, alongM, sideways };
}

/** What the sun must do to put the focus on a mark. */
export interface RequiredSun {
  readonly towards: Vector;
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
  readonly declinationDeg: number;
  /** False where no day of the year has this declination. */
  readonly reachable: boolean;
}

/** Greatest declination of the sun's centre, with its radius, refraction and margin. [°] */
const highestDeclinationDeg = 23.44;
const declinationMarginDeg = 0.27 + 0.05;

/**
 * Direction and declination of the sun that sends the chief ray to a mark.
 *
 * The direction is apparent; refraction is taken away before the declination is computed.
 *
 * @param toleranceDeg Angular tolerance of the survey. [°]
 * @returns Null where no direction of the sun does it.
 */
export function requiredSunFor(model: FocusModel, towardsMark: Vector, observer: Observer, toleranceDeg: number): RequiredSun | null {
  const towards = model.requiredSun(towardsMark);
  if (towards === null) return null;
  const azimuthDeg = azimuthOf(towards);
  const apparentElevationDeg = elevationOf(towards);
  const airless = airlessElevationDeg(apparentElevationDeg, observer.pressureHpa, observer.temperatureC);
  const declinationDeg = declinationOf(observer.latitudeDeg, azimuthDeg, airless);
  return {
    towards,
    azimuthDeg,
    apparentElevationDeg,
    declinationDeg,
    reachable: Math.abs(declinationDeg) <= highestDeclinationDeg + declinationMarginDeg + toleranceDeg && apparentElevationDeg > -1,
  };
}

/** Signed difference of two headings, −180…180. [°] */
export function headingDifferenceDeg(aDeg: number, bDeg: number): number {
  return wrap180(aDeg - bDeg);
}
