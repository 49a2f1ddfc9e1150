import { zoneOffsetMin } from './wall-clock.ts';

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
const dayMs = 86_400_000;
const quarterMs = 900_000;

interface ClockChange {
  readonly atMs: number;
  readonly stepMs: number;
}

/** Asking the calendar is dear, so halves without a change of offset are left out; no civil clock changes twice in a day. */
function clockChanges(fromMs: number, toMs: number, zone: string): ClockChange[] {
  const stepMs = (zoneOffsetMin(toMs, zone) - zoneOffsetMin(fromMs, zone)) * 60_000;
  if (toMs - fromMs <= dayMs && stepMs === 0) return [];
  if (toMs - fromMs <= quarterMs) return stepMs === 0 ? [] : [{ atMs: toMs, stepMs }];
  const middle = Math.round((fromMs + toMs) / 2 / quarterMs) * quarterMs;
  const split = middle <= fromMs || middle >= toMs ? (fromMs + toMs) / 2 : middle;
  return [...clockChanges(fromMs, split, zone), ...clockChanges(split, toMs, zone)];
}

/** Full hours of the wall clock from `fromMs` to `toMs`, counted on from the offset in force. */
function fullHours(fromMs: number, toMs: number, zone: string, changes: readonly ClockChange[]): { utcMs: number; hour: number }[] {
  const hours: { utcMs: number; hour: number }[] = [];
  const starts = [fromMs, ...changes.map((change) => change.atMs)];
  let offsetMs = zoneOffsetMin(fromMs, zone) * 60_000;
  for (const [index, start] of starts.entries()) {
    if (index > 0) offsetMs += changes[index - 1]?.stepMs ?? 0;
    const end = starts[index + 1];
    for (let local = Math.ceil((start + offsetMs) / hourMs) * hourMs; end === undefined ? local - offsetMs <= toMs : local - offsetMs < end; local += hourMs) {
      hours.push({ utcMs: local - offsetMs, hour: (((local / hourMs) % 24) + 24) % 24 });
    }
  }
  return hours;
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
  const hours = fullHours(fromMs, toMs, zone, changes).map((hour) => ({ ...hour, x: x(hour.utcMs) }));
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
