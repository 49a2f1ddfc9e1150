import type { OpticInput } from '#app/physics/optics/optic.ts';

/**
 * What goes into a reconstruction.
 *
 * Input and result are plain JSON. Instants are ISO 8601 strings in UTC (`2026-02-03T09:50:00.000Z`), one minute apart
 * where they form a series. Lengths are metres unless the name says mm, fluxes kW/m² or W/m² as the name says.
 */

/** Climate classes with published or stated medians of aerosol and water; see `sky/climate-classes.ts`. */
export const climateClasses = [
  'clean-dry-mountain',
  'temperate-rural',
  'urban-maritime',
  'humid-tropics',
  'dusty-desert',
] as const;
export type ClimateClass = (typeof climateClasses)[number];

export interface PlaceInput {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  /** Height of the optic above the surrounding ground; sets the dip of the horizon. */
  readonly heightAboveGroundM: number;
  /** IANA zone, used only to name local days and clock times in the recurrence calendar. */
  readonly zone: string;
}

export interface SkyInput {
  readonly climateClass: ClimateClass;
  readonly pressureHpa?: number;
  readonly temperatureC?: number;
  readonly ozoneCm?: number;
  readonly waterCm?: number;
  readonly aod500?: number;
  readonly aod380?: number;
  readonly solarConstantWm2?: number;
  /** Share of the direct irradiance that comes from the aureole round the disc; left out: 0. 0…0.5 */
  readonly circumsolarRatio?: number;
  /** Measured or archived direct normal irradiance, each value the mean over [startUtc, endUtc). */
  readonly dniSeries?: {
    readonly basis: 'measured' | 'derived' | 'hourly-archive';
    readonly source: string;
    readonly stationDistanceKm?: number;
    readonly values: readonly { readonly startUtc: string; readonly endUtc: string; readonly dniWm2: number }[];
  };
}

/** Window, rooflight or other opening that the light must pass, seen from the optic. */
export interface OpeningInput {
  /** Direction in which the opening looks, outward. */
  readonly azimuthDeg: number;
  readonly azimuthSigmaDeg: number;
  /** Half-angle to the left and right within which the sun can enter. [°] 0…90 */
  readonly halfWidthDeg: number;
  readonly lowestElevationDeg?: number;
  readonly highestElevationDeg?: number;
  /** Solar transmittance of the glass in the path at normal incidence, 1 where there is none. */
  readonly transmittance: number;
  readonly transmittanceSource: string;
}

/**
 * Flat obstacle or opening near the optic, by its corners. A `block` (mullion, bar, sill, fin) stops the rays that meet
 * it; an `opening` stops the rays that miss every opening of its plane. Rays are tested one by one.
 */
export interface OccluderInput {
  readonly kind: 'block' | 'opening';
  readonly name?: string;
  /** Three corners or more in order, in one plane within 1 mm, from the optic's origin. */
  readonly corners: readonly { readonly eastM: number; readonly northM: number; readonly upM: number }[];
  /** Openings only: depth of the reveal outward of the outline, square to its plane. [m] */
  readonly revealDepthM?: number;
}

export interface SkylineInput {
  /** Apparent elevation of the skyline by bearing; linear between points, closed round the circle. */
  readonly points: readonly { readonly azimuthDeg: number; readonly elevationDeg: number; readonly name?: string }[];
  readonly sigmaDeg: number;
}

/** Position of the mark, as surveyed from the optic's origin (sphere centre, mirror vertex, pane centre, lens node). */
export interface MarkInput {
  readonly bearingDeg: number;
  readonly bearingSigmaDeg: number;
  readonly elevationDeg: number;
  readonly elevationSigmaDeg: number;
  readonly distanceM: number;
  readonly distanceSigmaM: number;
  readonly lengthMm?: number;
  readonly widthMm?: number;
  /** Direction in which the trail was found to run, if it has one. */
  readonly trailHeadingDeg?: number;
  /** Outward normal of the target's surface; left out: faces the optic. */
  readonly normalAzimuthDeg?: number;
  readonly normalElevationDeg?: number;
}

/** Position of the mark by coordinates from the optic's origin, instead of bearing, elevation and distance. */
export interface MarkCoordinatesInput extends Pick<MarkInput, 'lengthMm' | 'widthMm' | 'trailHeadingDeg' | 'normalAzimuthDeg' | 'normalElevationDeg'> {
  readonly eastM: number;
  readonly northM: number;
  readonly upM: number;
  /** One sigma of each coordinate. [m] */
  readonly sigmaM: number;
}

export interface TargetInput {
  /** Id of a row of `heating/target-materials.ts`. */
  readonly materialId: string;
  /** Solar absorptance as measured; left out: the row's fresh-to-charred range. */
  readonly solarAbsorptance?: number;
  readonly thicknessM?: number;
}

export interface ReconstructionInput {
  readonly place: PlaceInput;
  readonly window: { readonly startUtc: string; readonly endUtc: string; readonly clockSigmaS: number };
  readonly sky: SkyInput;
  readonly opening?: OpeningInput;
  readonly occluders?: readonly OccluderInput[];
  /** One sigma of the corners of the occluders. [m] Left out: 0.01. */
  readonly occluderSigmaM?: number;
  readonly skyline?: SkylineInput;
  /** Left out when unknown: only sun, sky and daylight are then computed. */
  readonly optic?: OpticInput;
  /** Relative one-sigma of the optic's focal length or radius. Left out: 0.02 measured, 0.30 type default. */
  readonly opticSigmaRel?: number;
  readonly mark?: MarkInput;
  /** Given instead of `mark`, never beside it. */
  readonly markCoordinates?: MarkCoordinatesInput;
  readonly target?: TargetInput;
  /** Span for which recurrence is listed, at most five years; left out: the twelve months after the window. */
  readonly recurrenceFromUtc?: string;
  readonly recurrenceToUtc?: string;
  readonly rays?: number;
  readonly samples?: number;
  readonly seed: number;
}
