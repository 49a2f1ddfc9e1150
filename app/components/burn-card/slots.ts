import type { BurnCardModel, BurnRun } from './model.ts';
import type { TimeAxis } from './time-axis.ts';

/** A stretch on the axis. [px] */
export interface Stretch {
  readonly x1: number;
  readonly x2: number;
}

/** Cut through the card; `profile` is the half-height along it, constant at small sizes. */
export interface Slot extends Stretch {
  readonly profile: readonly { readonly x: number; readonly halfPx: number }[];
}

const leastSlotPx = 3;
const leastGapPx = 2;

function stretchesOf(runs: readonly BurnRun[], verdict: BurnRun['verdict'], axis: TimeAxis): Stretch[] {
  return runs.filter((run) => run.verdict === verdict).map((run) => ({ x1: axis.x(run.fromUtc), x2: axis.x(run.toUtc) }));
}

/**
 * Slots at least 3 px long and gaps at least 2 px, so that rounding never joins two burns or hides a gap.
 *
 * @param stretches Burns in order of time; @param widthPx end of the axis.
 */
export function separateStretches(stretches: readonly Stretch[], widthPx: number): Stretch[] {
  const placed: { x1: number; x2: number }[] = [];
  for (const stretch of stretches) {
    const missing = Math.max(0, leastSlotPx - (stretch.x2 - stretch.x1));
    const earliest = placed.length === 0 ? 0 : (placed.at(-1)?.x2 ?? 0) + leastGapPx;
    const x1 = Math.max(earliest, stretch.x1 - missing / 2);
    placed.push({ x1, x2: Math.max(stretch.x2 + missing / 2, x1 + leastSlotPx) });
  }
  let latest = widthPx;
  for (const stretch of placed.toReversed()) {
    const over = stretch.x2 - latest;
    if (over > 0) {
      stretch.x2 = latest;
      stretch.x1 = Math.min(stretch.x1, latest - leastSlotPx);
    }
    latest = stretch.x1 - leastGapPx;
  }
  return placed;
}

/**
 * Half-height of a slot at the large size for a flux on the mark: log scale, 5 px at 1 kW/m² to 12 px at 1 MW/m².
 *
 * @param fluxKwm2 Middle estimate; null or not above zero when energy was not run.
 */
export function slotHalfHeightPx(fluxKwm2: number | null): number {
  if (fluxKwm2 === null || !(fluxKwm2 > 0)) return 5;
  return Math.min(12, Math.max(5, 5 + (7 * Math.log10(fluxKwm2)) / 3));
}

function profileOf(stretch: Stretch, model: BurnCardModel, axis: TimeAxis): Slot['profile'] {
  const inside = (model.flux ?? [])
    .map((sample) => ({ x: axis.x(sample.atUtc), halfPx: slotHalfHeightPx(sample.kwm2) }))
    .filter((sample) => sample.x >= stretch.x1 && sample.x <= stretch.x2);
  const first = inside[0];
  const last = inside.at(-1);
  if (!first || !last) return [{ x: stretch.x1, halfPx: 5 }, { x: stretch.x2, halfPx: 5 }];
  return [{ x: stretch.x1, halfPx: first.halfPx }, ...inside, { x: stretch.x2, halfPx: last.halfPx }];
}

/** Burns of a card; the flux shapes them only where `byFlux`. */
export function layoutSlots(model: BurnCardModel, runs: readonly BurnRun[], axis: TimeAxis, byFlux: boolean, halfPx: number): Slot[] {
  return separateStretches(stretchesOf(runs, 'sunlit', axis), axis.widthPx).map((stretch) => ({
    ...stretch,
    profile: byFlux ? profileOf(stretch, model, axis) : [{ x: stretch.x1, halfPx }, { x: stretch.x2, halfPx }],
  }));
}

/** Dotted stretches, kept a radius clear of slots and ends; one too short for that keeps its middle. */
export function layoutDots(runs: readonly BurnRun[], axis: TimeAxis, radiusPx: number): Stretch[] {
  return stretchesOf(runs, 'cannot-tell', axis).map((stretch) => {
    const inset = radiusPx + 1.5;
    if (stretch.x2 - stretch.x1 <= 2 * inset) {
      const middle = (stretch.x1 + stretch.x2) / 2;
      return { x1: middle, x2: middle };
    }
    return { x1: stretch.x1 + inset, x2: stretch.x2 - inset };
  });
}

/**
 * Outline of a slot about y = 0: both edges follow the profile, ends are round and never pointed.
 *
 * @returns SVG path data in px, x measured from the start of the slot.
 */
export function slotPath(slot: Slot): string {
  const length = slot.x2 - slot.x1;
  const first = slot.profile[0]?.halfPx ?? 5;
  const last = slot.profile.at(-1)?.halfPx ?? 5;
  const leftRadius = Math.min(first, length / 2);
  const rightRadius = Math.min(last, length / 2);
  const inner = slot.profile
    .map((point) => ({ x: point.x - slot.x1, halfPx: point.halfPx }))
    .filter((point) => point.x > leftRadius && point.x < length - rightRadius);
  const f = (value: number) => value.toFixed(2);
  const top = inner.map((point) => `L${f(point.x)} ${f(-point.halfPx)}`).join('');
  const bottom = inner.toReversed().map((point) => `L${f(point.x)} ${f(point.halfPx)}`).join('');
  const start = `M${f(leftRadius)} ${f(first)}A${f(leftRadius)} ${f(first)} 0 0 1 ${f(leftRadius)} ${f(-first)}`;
  const end = `L${f(length - rightRadius)} ${f(-last)}A${f(rightRadius)} ${f(last)} 0 0 1 ${f(length - rightRadius)} ${f(last)}`;
  return `${start}${top}${end}${bottom}Z`;
}
