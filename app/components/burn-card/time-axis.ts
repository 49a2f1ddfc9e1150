import { wallTime, zoneOffsetMin } from './wall-clock.ts';

/** Wall-clock axis of a card: elapsed time, with room left for an hour that the clock skips. */
export interface TimeAxis {
  readonly widthPx: number;
  readonly pxPerHour: number;
  /** Place of an instant; beyond the span it is clamped. [px] */
  readonly x: (utc: string | number) => number;
  /** White breaks where the clock went forward, and marks where an hour is ruled twice. */
  readonly changes: readonly { readonly kind: 'skipped' | 'repeated'; readonly x: number; readonly widthPx: number }[];
  /** Every full hour of the wall clock in the span, in order; a repeated hour occurs twice. */
  readonly hours: readonly { readonly utcMs: number; readonly x: number; readonly hour: number }[];
}

const hourMs = 3_600_000;
const quarterMs = 900_000;

interface ClockChange {
  readonly atMs: number;
  readonly stepMs: number;
}

function clockChanges(fromMs: number, toMs: number, zone: string): ClockChange[] {
  const changes: ClockChange[] = [];
  let before = zoneOffsetMin(fromMs, zone);
  // Civil clocks change on a quarter hour of UTC.
  for (let at = Math.ceil(fromMs / quarterMs) * quarterMs; at < toMs; at += quarterMs) {
    const now = zoneOffsetMin(at, zone);
    if (now !== before) changes.push({ atMs: at, stepMs: (now - before) * 60_000 });
    before = now;
  }
  return changes;
}

/** @throws RangeError if the span is empty. */
export function timeAxis(fromUtc: string, toUtc: string, zone: string, widthPx: number): TimeAxis {
  const fromMs = Date.parse(fromUtc);
  const toMs = Date.parse(toUtc);
  if (!(toMs > fromMs)) throw new RangeError(`The span of a burn card must have a length; got ${fromUtc} to ${toUtc}.`);
  const changes = clockChanges(fromMs, toMs, zone);
  const skippedBefore = (ms: number) => changes.reduce((sum, change) => sum + (change.stepMs > 0 && ms >= change.atMs ? change.stepMs : 0), 0);
  const lengthMs = toMs - fromMs + skippedBefore(toMs);
  const x = (utc: string | number) => {
    const ms = Math.min(toMs, Math.max(fromMs, typeof utc === 'number' ? utc : Date.parse(utc)));
    return ((ms - fromMs + skippedBefore(ms)) / lengthMs) * widthPx;
  };
  const toPx = (ms: number) => (ms / lengthMs) * widthPx;
  const hours: { utcMs: number; x: number; hour: number }[] = [];
  for (let at = Math.ceil(fromMs / quarterMs) * quarterMs; at <= toMs; at += quarterMs) {
    const wall = wallTime(at, zone);
    if (wall.minute === 0) hours.push({ utcMs: at, x: x(at), hour: wall.hour });
  }
  return {
    widthPx,
    pxPerHour: toPx(hourMs),
    x,
    changes: changes.map((change) =>
      change.stepMs > 0
        ? { kind: 'skipped', x: x(change.atMs) - toPx(change.stepMs), widthPx: toPx(change.stepMs) }
        : { kind: 'repeated', x: x(change.atMs), widthPx: toPx(-change.stepMs) },
    ),
    hours,
  };
}

/** Hours between figures so that they never touch: 1, 2, 3, 4, 6 or 12. */
export function hourStep(pxPerHour: number, leastPx: number): number {
  return [1, 2, 3, 4, 6, 12].find((step) => step * pxPerHour >= leastPx) ?? 24;
}
