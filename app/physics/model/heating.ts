import type { Band, SourceRef } from './stated.ts';

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
