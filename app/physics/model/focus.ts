import type { Band } from './stated.ts';

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
