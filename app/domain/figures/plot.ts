import type { FigureMark } from '#app/domain/report-document.ts';
import { formatClock, formatDay } from '#app/domain/local-time.ts';
import type { FigureBox } from './clip.ts';
import { textWidth } from './text-size.ts';

export const linear = ([from, to]: readonly [number, number], [start, end]: readonly [number, number]) => (value: number): number => start + ((value - from) / (to - from)) * (end - start);

/** Lengths and places in a figure need no more digits than a printer has. */
export const to2 = (value: number): number => Math.round(value * 100) / 100;

/** Step of 1, 2 or 5 times a power of ten that parts a span into about so many. Common practice. */
function roundStep(span: number, about: number): number {
  const power = 10 ** Math.floor(Math.log10(span / about));
  return ([1, 2, 5].find((step) => span / (step * power) <= about) ?? 10) * power;
}

export function roundTicks(from: number, to: number, about: number): number[] {
  const step = roundStep(to - from, about);
  const first = Math.ceil(from / step - 1e-9);
  return Array.from({ length: Math.floor(to / step + 1e-9) - first + 1 }, (_, index) => Number(((first + index) * step).toPrecision(12)));
}

/** The next round tick at or above a value, so that an axis ends on a figure. */
export function roundTop(value: number, about: number): number {
  const step = roundStep(value, about);
  return Number((Math.ceil(value / step - 1e-9) * step).toPrecision(12));
}

export interface Tick {
  readonly at: number;
  readonly text: string;
}

/** Figures left of hairlines. */
export function yAxis({ left, right }: Pick<FigureBox, 'left' | 'right'>, ticks: readonly Tick[], textSize: number): FigureMark[] {
  return ticks.flatMap(({ at, text }): FigureMark[] => [
    { mark: 'line', points: [[left, to2(at)], [right, to2(at)]], ink: 'hair', widthPt: 0.6 },
    { mark: 'text', x: left - 5, y: to2(at + textSize * 0.35), text, sizePt: textSize, anchor: 'end', ink: 'second' },
  ]);
}

/** Axis line with ticks, and figures under it where they have room. @param unit Words after the last figure. */
export function xAxis({ left, right, bottom }: FigureBox, ticks: readonly Tick[], textSize: number, unit = ''): FigureMark[] {
  const marks: FigureMark[] = [{ mark: 'line', points: [[left, bottom], [right, bottom]], ink: 'ink', widthPt: 1.2 }];
  let free = -Infinity;
  for (const [index, { at, text }] of ticks.entries()) {
    marks.push({ mark: 'line', points: [[to2(at), bottom], [to2(at), bottom + 3]], ink: 'ink', widthPt: 0.8 });
    const words = index === ticks.length - 1 && unit ? `${text} ${unit}` : text;
    const half = textWidth(words, textSize) / 2;
    const x = Math.min(at, right - half);
    if (x - half < free) continue;
    marks.push({ mark: 'text', x: to2(x), y: bottom + 5 + textSize, text: words, sizePt: textSize, anchor: 'middle', ink: 'second' });
    free = x + half + textSize * 0.5;
  }
  return marks;
}

const hourMs = 3_600_000;
const quarterMs = hourMs / 4;

/** Round hours of the wall clock between two instants, as many as have room; days where hours have none. */
export function clockTicks(fromMs: number, toMs: number, zone: string, x: (ms: number) => number, textSize: number): Tick[] {
  const width = Math.abs(x(toMs) - x(fromMs));
  const hours = (toMs - fromMs) / hourMs;
  const step = [0.25, 0.5, 1, 2, 3, 6, 12, 24].find((candidate) => (candidate / hours) * width > textSize * 5) ?? 24;
  const ticks: Tick[] = [];
  let at = Math.ceil(fromMs / quarterMs) * quarterMs;
  while (at <= toMs) {
    const clock = formatClock(new Date(at), zone);
    const minutes = Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3));
    const hit = minutes % (step * 60) === 0;
    if (hit) ticks.push({ at: x(at), text: step === 24 ? formatDay(new Date(at), zone) : clock });
    // The next one comes no sooner than this, a change of the clock included.
    at += hit ? Math.max(quarterMs, (step - 1.5) * hourMs) : quarterMs;
  }
  return ticks;
}
