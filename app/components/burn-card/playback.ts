/** The whole window takes about this long. [ms] Our own choosing: quick enough to see the way as one movement. */
export const playWindowMs = 12_000;
/** Without movement: as many minutes at once, at this interval. [min, ms] */
const jumpMinutes = 10;
const jumpEveryMs = 1_000;

export interface Playing {
  /** Minute from which it was started, as an index into the minutes of the window. */
  readonly fromIndex: number;
  /** Since it was started. [ms] */
  readonly elapsedMs: number;
  /** How many minutes the window has. */
  readonly count: number;
  /** The reader has asked the system for less movement. */
  readonly reducedMotion: boolean;
}

/** Minute under the line after so long; the last one is where it stops. */
export function playedTo({ fromIndex, elapsedMs, count, reducedMotion }: Playing): number {
  const last = Math.max(0, count - 1);
  const passed = reducedMotion ? jumpMinutes * Math.floor(elapsedMs / jumpEveryMs) : Math.floor((elapsedMs * last) / playWindowMs);
  return Math.min(last, fromIndex + passed);
}

/** Where it starts: from the line, or from the beginning when the line stands at the end. */
export const playFrom = (index: number, count: number): number => (index >= count - 1 ? 0 : Math.max(0, index));
