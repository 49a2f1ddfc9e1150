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
