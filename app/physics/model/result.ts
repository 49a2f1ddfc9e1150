import type { BestMoment, FocusResult } from './focus.ts';
import type { HeatingResult } from './heating.ts';
import type { LightOnMark, MinuteResult, MinuteRun } from './minutes.ts';
import type { SamplingResult } from './sampling.ts';
import type { Assumption } from './stated.ts';
import type { Check, Grade, TestSummary } from './tests.ts';

/** Days on which the same alignment comes back. Dates are local days of the place, instants UTC. */
export interface RecurrenceBand {
  readonly firstOn: string;
  readonly lastOn: string;
  readonly days: readonly { readonly on: string; readonly bestUtc: string; readonly fromUtc: string; readonly toUtc: string; readonly minutes: number; readonly separationDeg: number }[];
  readonly bestUtc: string;
  readonly minutes: number;
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
