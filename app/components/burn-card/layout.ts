import type { CardLabel } from './labels.ts';
import { layoutLabels } from './labels.ts';
import type { BurnCardModel } from './model.ts';
import { joinRuns } from './model.ts';
import type { Slot, Stretch } from './slots.ts';
import { layoutDots, layoutSlots } from './slots.ts';
import { hourStep, timeAxis } from './time-axis.ts';
import type { TimeAxis } from './time-axis.ts';
import { clockWords, dateWords, localDate, wallToUtcMs } from './wall-clock.ts';

export type CardSize = 'S' | 'M' | 'L' | 'hero';

interface SizeRule {
  readonly bodyPx: number;
  readonly slotHalfPx: number;
  readonly dotRadiusPx: number;
  readonly dotPitchPx: number;
}
const sizeRules: Record<CardSize, SizeRule> = {
  S: { bodyPx: 18, slotHalfPx: 2.6, dotRadiusPx: 1.25, dotPitchPx: 4.2 },
  M: { bodyPx: 28, slotHalfPx: 4, dotRadiusPx: 2, dotPitchPx: 7 },
  L: { bodyPx: 60, slotHalfPx: 5, dotRadiusPx: 2.4, dotPitchPx: 7 },
  hero: { bodyPx: 132, slotHalfPx: 5, dotRadiusPx: 4, dotPitchPx: 13 },
};

export interface RulerTick {
  readonly x: number;
  readonly lengthPx: number;
}

/** A card drawn for one width: every figure in px, from the top left corner. */
export interface BurnCardLayout {
  readonly size: CardSize;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly bodyTopPx: number;
  readonly bodyPx: number;
  readonly severalDays: boolean;
  /** Daylight; where not covered by `cards` it has not been examined. */
  readonly bodies: readonly Stretch[];
  /** Daylight inside the window. */
  readonly cards: readonly Stretch[];
  readonly endBars: readonly number[];
  readonly hourLines: readonly number[];
  readonly shortLines: readonly number[];
  readonly slots: readonly Slot[];
  readonly dots: readonly Stretch[];
  readonly dotRadiusPx: number;
  readonly dotPitchPx: number;
  readonly foundX: number | null;
  readonly cursor: { readonly x: number; readonly words: string } | null;
  readonly rulerPx: number;
  readonly ticks: readonly RulerTick[];
  readonly figures: readonly { readonly x: number; readonly text: string }[];
  readonly breaks: TimeAxis['changes'];
  readonly labels: readonly CardLabel[];
}

const dayMs = 86_400_000;

function clip(axis: TimeAxis, from: string, to: string, startUtc: string, endUtc: string): Stretch[] {
  const start = Date.parse(from) > Date.parse(startUtc) ? from : startUtc;
  const end = Date.parse(to) < Date.parse(endUtc) ? to : endUtc;
  return Date.parse(end) > Date.parse(start) ? [{ x1: axis.x(start), x2: axis.x(end) }] : [];
}

function rulerTicks(axis: TimeAxis, size: CardSize, severalDays: boolean): RulerTick[] {
  if (severalDays) return axis.hours.filter((hour) => hour.hour % 6 === 0).map((hour) => ({ x: hour.x, lengthPx: hour.hour === 0 ? 9 : 5 }));
  const ticks: RulerTick[] = axis.hours.map((hour) => ({ x: hour.x, lengthPx: 9 }));
  if (size === 'M') return ticks.map((tick) => ({ ...tick, lengthPx: 6 }));
  const perHour = axis.pxPerHour >= 72 ? 6 : axis.pxPerHour >= 36 ? 2 : 1;
  for (const hour of [{ x: (axis.hours[0]?.x ?? 0) - axis.pxPerHour }, ...axis.hours]) {
    for (let part = 1; part < perHour; part += 1) {
      const x = hour.x + (axis.pxPerHour * part) / perHour;
      if (x >= 0 && x <= axis.widthPx) ticks.push({ x, lengthPx: part * 2 === perHour ? 6 : 3.5 });
    }
  }
  return ticks;
}

function rulerFigures(model: BurnCardModel, axis: TimeAxis, severalDays: boolean): { x: number; text: string }[] {
  if (!severalDays) {
    const step = hourStep(axis.pxPerHour, 34);
    return axis.hours.filter((hour) => hour.hour % step === 0).map((hour) => ({ x: hour.x, text: String(hour.hour).padStart(2, '0') }));
  }
  const dates = [...new Set(axis.hours.map((hour) => localDate(hour.utcMs, model.zone)))];
  const noon = (date: string) => wallToUtcMs(date, 720, model.zone);
  return dates
    .filter((date) => noon(date) >= Date.parse(model.fromUtc) && noon(date) <= Date.parse(model.toUtc))
    .map((date, index, all) => {
      const words = dateWords(date, false);
      return { x: axis.x(noon(date)), text: index === all.length - 1 ? words : words.split(' ').slice(0, 2).join(' ') };
    });
}

function cardLines(axis: TimeAxis, size: CardSize, severalDays: boolean): { hourLines: number[]; shortLines: number[] } {
  const step = severalDays ? 6 : hourStep(axis.pxPerHour, 30);
  const hourLines = axis.hours.filter((hour) => hour.hour % step === 0).map((hour) => hour.x);
  if (size === 'S' || severalDays) return { hourLines, shortLines: [] };
  const part = axis.pxPerHour >= 72 ? 6 : 2;
  const shortLines = axis.hours.flatMap((hour) => Array.from({ length: part - 1 }, (_, index) => hour.x + (axis.pxPerHour * (index + 1)) / part));
  const before = axis.hours[0]?.x ?? 0;
  const lead = Array.from({ length: part - 1 }, (_, index) => before - (axis.pxPerHour * (index + 1)) / part);
  return { hourLines, shortLines: [...lead, ...shortLines].filter((x) => x > 0 && x < axis.widthPx) };
}

function windowEnds({ window, goesOn }: BurnCardModel): string[] {
  if (!window) return [];
  return [...(goesOn?.before ? [] : [window.startUtc]), ...(goesOn?.after ? [] : [window.endUtc])];
}

/**
 * Draws a burn card for the width that it gets. Pure: the same model and width give the same drawing on server and
 * browser.
 *
 * @param widthPx Width of the axis. [px] at least 40
 * @throws RangeError if the span has no length.
 */
export function layoutBurnCard(model: BurnCardModel, widthPx: number, size: CardSize = 'L'): BurnCardLayout {
  const large = size === 'L' || size === 'hero';
  const severalDays = Date.parse(model.toUtc) - Date.parse(model.fromUtc) > dayMs + 3_600_000;
  const rule = sizeRules[size];
  const bodyPx = severalDays && large ? 30 : size === 'L' && widthPx < 640 ? 44 : rule.bodyPx;
  const axis = timeAxis(model.fromUtc, model.toUtc, model.zone, widthPx);
  const runs = joinRuns(model.runs);
  const window = model.window;
  const daylight = model.daylight.map((day) => ({ riseUtc: day.riseUtc, setUtc: day.setUtc }));
  const inSpan = (from: string, to: string) => clip(axis, from, to, model.fromUtc, model.toUtc);
  const cursor = model.cursorUtc ? { x: axis.x(model.cursorUtc), words: clockWords(model.cursorUtc, model.zone) } : null;
  const rulerPx = size === 'S' ? 0 : severalDays ? 12 : 28;
  const bodyTopPx = size === 'S' ? 8 : rulerPx + (cursor ? 18 : 0) + 2;
  const figures = size === 'S' ? [] : rulerFigures(model, axis, severalDays);
  const belowPx = severalDays && size !== 'S' ? 20 : 4;
  const labels = large && !severalDays ? layoutLabels(model, axis, { bodyTopPx, bodyPx }) : { labels: [], heightPx: 0 };
  const covers = (day: { riseUtc: string; setUtc: string }) =>
    window ? clip(axis, day.riseUtc, day.setUtc, window.startUtc, window.endUtc).filter(() => inSpan(day.riseUtc, day.setUtc).length > 0) : [];
  const visible = (utc: string) => Date.parse(utc) >= Date.parse(model.fromUtc) && Date.parse(utc) <= Date.parse(model.toUtc);
  return {
    size,
    widthPx,
    heightPx: bodyTopPx + bodyPx + Math.max(belowPx, labels.heightPx),
    bodyTopPx,
    bodyPx,
    severalDays,
    bodies: daylight.flatMap((day) => inSpan(day.riseUtc, day.setUtc)),
    cards: daylight.flatMap(covers).filter((stretch) => stretch.x2 > stretch.x1),
    endBars: windowEnds(model).filter(visible).map((utc) => axis.x(utc)),
    ...cardLines(axis, size, severalDays),
    slots: layoutSlots(model, runs.filter((run) => inSpan(run.fromUtc, run.toUtc).length > 0), axis, large && !severalDays, severalDays && large ? 4 : rule.slotHalfPx),
    dots: layoutDots(runs.filter((run) => inSpan(run.fromUtc, run.toUtc).length > 0), axis, rule.dotRadiusPx),
    dotRadiusPx: severalDays && large ? 2 : rule.dotRadiusPx,
    dotPitchPx: severalDays && large ? 7 : rule.dotPitchPx,
    foundX: model.foundAtUtc && visible(model.foundAtUtc) ? axis.x(model.foundAtUtc) : null,
    cursor,
    rulerPx,
    ticks: size === 'S' ? [] : rulerTicks(axis, size, severalDays),
    figures,
    breaks: axis.changes,
    labels: labels.labels,
  };
}
