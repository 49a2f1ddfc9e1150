/** A time axis on which long stretches without any change are folded to one width, with their days in words. */
export interface FoldedScale {
  readonly x: (at: Date) => number;
  readonly folds: readonly { readonly from: number; readonly to: number; readonly days: number }[];
  /** The instants that stand on the axis, in order. */
  readonly stops: readonly { readonly at: Date; readonly x: number }[];
}

const dayMs = 86_400_000;
/** A stretch longer than this is folded. [days] */
const foldAfterDays = 3;
/** Width of a folded stretch, and the least width of any, as so many days. */
const foldedAsDays = 2;
const leastDays = 0.7;

/**
 * @param instants moments at which something changes; the first and the last are the ends of the axis.
 * @param from x of the first, `to` x of the last.
 */
export function foldedScale(instants: readonly Date[], from: number, to: number): FoldedScale {
  const times = [...new Set(instants.map((instant) => instant.getTime()))].sort((a, b) => a - b);
  const gaps = times.slice(1).map((time, index) => (time - (times[index] ?? time)) / dayMs);
  const weights = gaps.map((days) => (days > foldAfterDays ? foldedAsDays : Math.max(days, leastDays)));
  const total = weights.reduce((sum, weight) => sum + weight, 0) || 1;
  const xs = [from];
  for (const weight of weights) xs.push((xs.at(-1) ?? from) + (weight / total) * (to - from));
  const xAt = (index: number) => xs[index] ?? from;
  return {
    x: (at) => {
      const time = at.getTime();
      const after = times.findIndex((known) => known >= time);
      if (after === -1) return to;
      const end = times[after] ?? time;
      if (after === 0 || end === time) return xAt(after);
      const start = times[after - 1] ?? end;
      return xAt(after - 1) + ((time - start) / (end - start)) * (xAt(after) - xAt(after - 1));
    },
    folds: gaps.flatMap((days, index) => (days > foldAfterDays ? [{ from: xAt(index), to: xAt(index + 1), days: Math.round(days) }] : [])),
    stops: times.map((time, index) => ({ at: new Date(time), x: xAt(index) })),
  };
}
