import type { Band } from './stated.ts';

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
