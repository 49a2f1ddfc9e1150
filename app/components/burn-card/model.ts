/** Stretch of minutes with one result and one reason; `toUtc` is the end of the last minute. */
export interface BurnRun {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell';
  /** "behind Grain House skyline". */
  readonly reasonWords: string;
}

/**
 * What a burn card draws: one stretch of clock time in one place. Instants are ISO 8601 in UTC; the axis is the wall
 * clock of `zone`.
 */
export interface BurnCardModel {
  readonly zone: string;
  readonly fromUtc: string;
  readonly toUtc: string;
  /** Sunrise to sunset (upper limb, refracted), one a day; clipped to the span when drawn. */
  readonly daylight: readonly { readonly riseUtc: string; readonly setUtc: string }[];
  /** Sun up or down for the whole span, so that the words can say so. */
  readonly polar?: 'day' | 'night' | null;
  /** Onset window; null while nothing has been examined. */
  readonly window: { readonly startUtc: string; readonly endUtc: string } | null;
  /** The window goes on beyond this card, which shows one day of it: no end bar there. */
  readonly goesOn?: { readonly before: boolean; readonly after: boolean };
  readonly runs: readonly BurnRun[];
  /** Found or alarm time, corrected for clock error. */
  readonly foundAtUtc?: string | null;
  readonly cursorUtc?: string | null;
  /** Middle estimate of flux on the mark; left out when energy was not run. */
  readonly flux?: readonly { readonly atUtc: string; readonly kwm2: number }[];
  /** One or two lines beside the start of the window, such as "08:40 last / seen sound". Large card only. */
  readonly startWords?: readonly string[];
  /** One or two lines beside the end, such as "10:56 panel alarm, / 11:02 less 6 min clock error". Large card only. */
  readonly endWords?: readonly string[];
}

const halfHourMs = 1_800_000;

/**
 * Span of a case header: the window and a fifth on each side, to half hours outward.
 *
 * @returns Instants in UTC; half hours of UTC are half hours of every civil zone in use but those off by a quarter.
 */
export function headerSpan(window: { readonly startUtc: string; readonly endUtc: string }): { fromUtc: string; toUtc: string } {
  const start = Date.parse(window.startUtc);
  const end = Date.parse(window.endUtc);
  const margin = Math.max((end - start) * 0.2, halfHourMs);
  return {
    fromUtc: new Date(Math.floor((start - margin) / halfHourMs) * halfHourMs).toISOString(),
    toUtc: new Date(Math.ceil((end + margin) / halfHourMs) * halfHourMs).toISOString(),
  };
}

/** Joins neighbours with the same result; their reasons are listed in order, each once. */
export function joinRuns(runs: readonly BurnRun[]): BurnRun[] {
  const joined: BurnRun[] = [];
  for (const run of runs) {
    const last = joined.at(-1);
    if (!last || last.verdict !== run.verdict || last.toUtc !== run.fromUtc) {
      joined.push(run);
      continue;
    }
    const reasons = [...new Set([...last.reasonWords.split(', then '), run.reasonWords])].filter(Boolean);
    joined[joined.length - 1] = { ...last, toUtc: run.toUtc, reasonWords: reasons.join(', then ') };
  }
  return joined;
}

export function runMinutes(run: { readonly fromUtc: string; readonly toUtc: string }): number {
  return Math.round((Date.parse(run.toUtc) - Date.parse(run.fromUtc)) / 60_000);
}
