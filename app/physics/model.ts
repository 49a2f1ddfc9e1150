import type { OpticInput } from '#app/physics/optics/optic.ts';

/**
 * The contract of the engine: what goes into a reconstruction and what comes out of it.
 *
 * Everything here is plain JSON. Instants are ISO 8601 strings in UTC (`2026-02-03T09:50:00.000Z`), one minute apart
 * where they form a series. Lengths are metres unless the name says mm, fluxes kW/m² or W/m² as the name says.
 */

export const engineVersion = '0.2.0';

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

export type MinuteVerdict = 'sunlit' | 'not-sunlit' | 'cannot-tell';

/** Why a minute got its verdict; the words for the screen are in `app/domain/run-words.ts`. */
export const minuteReasons = [
  'sun-on-mark',
  'night',
  'near-horizon',
  'below-skyline',
  'outside-opening',
  'blocked',
  'wrong-side',
  'beam-misses',
  'uncertainty-straddles',
  'skyline-unknown',
  'optic-unknown',
  'mark-unknown',
] as const;
export type MinuteReason = (typeof minuteReasons)[number];

/** One minute of the window. Angles of the sun are apparent unless the name says airless. */
export interface MinuteResult {
  readonly atUtc: string;
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
  readonly verdict: MinuteVerdict;
  readonly reason: MinuteReason;
  /** Lateral and axial distance of the focus from the mark, where an optic and a mark are known. */
  readonly missLateralMm: number | null;
  readonly missAxialMm: number | null;
  /** Likely flux on the 5 mm disc centred on the mark. */
  readonly fluxKwm2: number | null;
}

/** Consecutive minutes with one verdict and reason; `toUtc` is the end of the last minute. */
export interface MinuteRun {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly minutes: number;
  readonly verdict: MinuteVerdict;
  readonly reason: MinuteReason;
}

/** Low, middle and high of a quantity: P5, P50 and P95 where sampled, else the stated band. */
export interface Band {
  readonly low: number;
  readonly mid: number;
  readonly high: number;
}

export interface SourceRef {
  readonly text: string;
  /** False for values from memory: the screen then says "unverified". */
  readonly verified: boolean;
}

export interface Assumption {
  readonly field: string;
  readonly value: string;
  readonly source: SourceRef;
}

export interface DniResult {
  readonly likelyWm2: number | null;
  readonly secondModelWm2: number | null;
  readonly boundWm2: number | null;
  readonly measuredWm2: number | null;
  readonly atOpticLikelyWm2: number | null;
  readonly atOpticBoundWm2: number | null;
  readonly basis: string;
}

export interface FluxDisc {
  readonly disc: 'sun-image' | '1 mm' | '5 mm';
  readonly diameterMm: number;
  readonly centre: 'hot spot' | 'mark';
  readonly concentration: Band;
  readonly fluxKwm2: Band;
}

export interface BestMoment {
  readonly atUtc: string;
  readonly sun: {
    readonly azimuthDeg: number;
    readonly airlessElevationDeg: number;
    readonly apparentElevationDeg: number;
    readonly declinationDeg: number;
    readonly distanceAu: number;
    readonly angularDiameterDeg: number;
    readonly equationOfTimeMin: number;
  };
  readonly dni: DniResult;
  readonly missLateralMm: number | null;
  readonly missAxialMm: number | null;
  readonly toleranceLateralMm: number | null;
  readonly toleranceAxialMm: number | null;
}

export interface FocusResult {
  readonly method: 'closed-form' | 'ray-trace';
  readonly focusKind: 'point' | 'line';
  readonly focalLengthM: number;
  readonly spotDiameterMm: Band;
  readonly discs: readonly FluxDisc[];
  readonly plane: string;
  /** Spot or line width against distance from the optic's origin. */
  readonly spotAtDistance: readonly { readonly distanceM: number; readonly diameterMm: number; readonly fluxKwm2: number }[];
  /** Stretch along the beam with this flux on 5 mm, and how wide it is in the plane of `plane`; the width is left out by engines before 0.2. */
  readonly dangerZone: { readonly thresholdKwm2: number; readonly nearM: number; readonly farM: number; readonly widthMm?: number } | null;
  readonly trailSpeedMmPerH: number | null;
  readonly trailHeadingDeg: number | null;
  /** Sunlit minutes that the found trail needs at least; null for a line focus, which carries no time. */
  readonly trailMinutesAtLeast: number | null;
  readonly dwellS: readonly { readonly thresholdKwm2: number; readonly seconds: Band }[];
  /** What only the ray trace gives; null where the closed form alone was possible. */
  readonly traced?: TracedFocusResult | null;
}

/** Figures of the ray trace at the best minute, in the plane that `plane` names. */
export interface TracedFocusResult {
  readonly rays: number;
  /** Share of the light towards the optic that openings and bars stop; left out by engines before 0.2. */
  readonly blockedFraction?: number;
  /** Share of the power meeting the optic that leaves it towards the focus. */
  readonly transmittedFraction: number;
  /** Radii round the hot spot that hold half and four fifths of the power in the plane. */
  readonly r50Mm: number;
  readonly r80Mm: number;
  /** Distance of the 5 mm hot spot from the mark; null without a mark. */
  readonly hotSpotOffsetMm: number | null;
  /** One-sigma noise of the 5 mm hot-spot concentration. */
  readonly stdError: number;
  /** Closed-form concentration on the same disc, for comparison. */
  readonly closedForm: number;
  /** Second, independent answer traced back from the target; `agrees` is false where the two differ by more than their errors. */
  readonly backTraced: { readonly centre: 'hot spot' | 'mark'; readonly concentration: number; readonly stdError: number; readonly forward: number; readonly agrees: boolean } | null;
  /** Sharpest distance for each disc. */
  readonly bestPlanes: readonly { readonly disc: string; readonly distanceM: number; readonly concentration: number }[];
  /** Concentration in suns on a square grid round the hot spot, row by row. */
  readonly map: { readonly cells: number; readonly sizeMm: number; readonly suns: readonly number[] } | null;
}

/** One way in which the target may respond. The band is seconds of steady sun on one point. */
export interface TargetOutcome {
  readonly id: 'softening' | 'scorch' | 'smoulder' | 'flaming' | 'skin-burn';
  readonly answer: 'reached' | 'not reached' | 'cannot tell';
  readonly timeS: Band | null;
  readonly sentence: string;
  readonly basis: string;
  readonly sampleSizeMm: number | null;
  readonly source: SourceRef;
}

export interface HeatingResult {
  readonly materialId: string;
  readonly surfaceTemperatureC: readonly { readonly timeS: number; readonly celsius: Band }[];
  readonly outcomes: readonly TargetOutcome[];
}

export type TestName = 'geometry' | 'weather' | 'energy' | 'mark';
export type TestResult = 'supports' | 'contradicts' | 'inconclusive' | 'not tested';

/** One contradiction check. `passed` false refutes; null means that it could not be made. */
export interface Check {
  readonly id: string;
  readonly test: TestName;
  readonly passed: boolean | null;
  readonly margin: number | null;
  readonly unit: string;
  readonly sentence: string;
}

export interface TestSummary {
  readonly test: TestName;
  readonly result: TestResult;
  readonly sentence: string;
  readonly margin: { readonly value: number; readonly low: number; readonly high: number; readonly unit: string; readonly agreeFrom: number | null; readonly agreeTo: number | null } | null;
}

/** Days on which the same alignment comes back. Dates are local days of the place, instants UTC. */
export interface RecurrenceBand {
  readonly firstOn: string;
  readonly lastOn: string;
  readonly days: readonly { readonly on: string; readonly bestUtc: string; readonly fromUtc: string; readonly toUtc: string; readonly minutes: number; readonly separationDeg: number }[];
  readonly bestUtc: string;
  readonly minutes: number;
}

export interface Grade {
  readonly word: 'consistent' | 'not refuted' | 'inconsistent because' | 'cannot tell because';
  readonly because: readonly string[];
}

/** The trace table that the sampling reads: every axis with its nodes, and the rays that each node rests on. */
export interface TraceTableResult {
  readonly traces: number;
  readonly raysEach: number;
  readonly axes: readonly { readonly axis: string; readonly unit: string; readonly nodes: readonly number[] }[];
}

/** What the seeded sampling over the inputs' uncertainties found; null without optic, mark or beam. */
export interface SamplingResult {
  readonly samples: number;
  /** Share of samples whose focus comes within reach of the mark at some minute of the window. */
  readonly alignedShare: number;
  readonly missLateralMm: Band;
  /** Flux on a 5 mm disc at the part of the mark nearest to the spot, at the best minute. */
  readonly fluxKwm2: Band;
  readonly fluxOver: readonly { readonly thresholdKwm2: number; readonly share: number }[];
  /**
   * Share of samples in which the measured time to ignition of 100 mm samples with a spark is shorter than the rest of
   * the spot on one point; null where no such time is on file. Left out by engines before 0.2.
   */
  readonly ignitedWithinDwellShare?: number | null;
  /** By how much the median flux moves from half of the samples to all of them. */
  readonly convergenceKwm2: number;
  /** Median flux of the first half of the samples. Left out by engines before 0.2. */
  readonly halfSampleMedianKwm2?: number;
  /** Null where nothing could be traced, and the closed form was sampled. Left out by engines before 0.2. */
  readonly table?: TraceTableResult | null;
  /** One input at a time, one sigma either way, greatest effect first. */
  readonly tornado: readonly { readonly input: string; readonly lowKwm2: number; readonly highKwm2: number }[];
}

/** Consecutive minutes with light on the mark; `toUtc` is the end of the last minute. */
export interface LightInterval {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly minutes: number;
  /** Greatest likely concentration on the 5 mm disc at the mark, in suns. */
  readonly greatestSuns: number;
}

/** When any part of the optic throws sunlight on the mark, apart from when that light is focused there. */
export interface LightOnMark {
  readonly lit: readonly LightInterval[];
  readonly focused: readonly LightInterval[];
  /** Concentrations on the 5 mm disc at the mark from which light counts as lit and as focused. [suns] */
  readonly litFromSuns: number;
  readonly focusedFromSuns: number;
}

export interface ReconstructionResult {
  readonly engineVersion: string;
  readonly seed: number;
  readonly window: { readonly startUtc: string; readonly endUtc: string; readonly minutes: number };
  /** Sunrise and sunset (upper limb, refracted) on each local day that the window touches; null where there is none. */
  readonly daylight: readonly { readonly on: string; readonly sunriseUtc: string | null; readonly sunsetUtc: string | null; readonly polar: 'day' | 'night' | null }[];
  /** Every minute except those of night, which `runs` and `totals` hold. */
  readonly minutes: readonly MinuteResult[];
  readonly runs: readonly MinuteRun[];
  readonly totals: { readonly sunlit: number; readonly notSunlit: number; readonly cannotTell: number };
  /** Null without optic or mark; left out by engines before 0.2. */
  readonly light?: LightOnMark | null;
  readonly best: BestMoment | null;
  readonly focus: FocusResult | null;
  readonly heating: HeatingResult | null;
  readonly recurrence: readonly RecurrenceBand[];
  /** What the recurrence needs of the sun; null where the optic or mark is unknown or the optic moves. */
  readonly requiredSun: { readonly azimuthDeg: number; readonly apparentElevationDeg: number; readonly declinationDeg: number; readonly reachable: boolean } | null;
  readonly checks: readonly Check[];
  readonly tests: readonly TestSummary[];
  readonly grade: Grade;
  /** Null where nothing could be sampled. */
  readonly sampling?: SamplingResult | null;
  readonly assumptions: readonly Assumption[];
  readonly warnings: readonly string[];
}
