import { formatClock, formatDay, formatDayClock, localDay } from '#app/domain/local-time.ts';
import type { FigureMark, ReportFigure } from '#app/domain/report-document.ts';
import type { ReportedResult } from '#app/domain/report-source.ts';
import { minuteReasonWords, minuteVerdictWords } from '#app/domain/run-words.ts';
import { clockTicks } from './plot.ts';
import { textWidth } from './text-size.ts';

const hourMs = 3_600_000;

export interface FigureOptions {
  readonly number: number;
  readonly width: number;
  readonly textSize: number;
  readonly zone: string;
}

/** The burn card of the window for print: examined daylight dark, sunlit minutes a slot, minutes that cannot be told as dots. */
export function windowFigure(result: ReportedResult, options: FigureOptions): ReportFigure {
  const { number, width, textSize, zone } = options;
  const [start, end] = [Date.parse(result.window.startUtc), Date.parse(result.window.endUtc)];
  const margin = Math.max((end - start) * 0.08, 300_000);
  const [from, to] = [start - margin, end + margin];
  const x = (ms: number) => ((Math.min(Math.max(ms, from), to) - from) / (to - from)) * width;
  const top = textSize * 2.2;
  const height = 44;
  const middle = top + height / 2;
  const marks: FigureMark[] = [{ mark: 'line', points: [[0, middle], [width, middle]], ink: 'edge', widthPt: 0.8 }];
  for (const day of daylightOf(result)) {
    if (day.set <= from || day.rise >= to) continue;
    marks.push({ mark: 'rect', x: x(day.rise), y: top, width: x(day.set) - x(day.rise), height, fill: 'pale', edge: 'edge', widthPt: 0.6 });
    const [a, b] = [Math.max(day.rise, start), Math.min(day.set, end)];
    if (b > a) marks.push({ mark: 'rect', x: x(a), y: top, width: x(b) - x(a), height, fill: 'card' });
  }
  marks.push(...hourMarks(from, to, x, { top, textSize, zone, width }));
  for (const run of result.runs) marks.push(...runMarks(run, x, middle));
  for (const edge of [start, end]) marks.push({ mark: 'line', points: [[x(edge), top - 3], [x(edge), top + height + 3]], ink: 'ink', widthPt: 1.5 });
  const { sunlit, notSunlit, cannotTell } = result.totals;
  const days = [...new Set([start, end].map((at) => formatDay(new Date(at), zone)))];
  return {
    kind: 'figure',
    number,
    title: `The onset window, ${days.join(' to ')}, case time ${zone.replaceAll('_', ' ')}`,
    alt: `Examined from ${formatDayClock(new Date(start), zone)} to ${formatDayClock(new Date(end), zone)}: ${sunlit} min sunlit, ${notSunlit} min not sunlit, ${cannotTell} min that cannot be told. ${result.runs.map((run) => runWords(run, zone)).join('; ')}.`,
    widthPt: width,
    heightPt: top + height + 8,
    marks,
  };
}

type Run = ReportedResult['runs'][number];
const runWords = (run: Run, zone: string) => `${formatClock(new Date(run.fromUtc), zone)} to ${formatClock(new Date(run.toUtc), zone)} ${minuteVerdictWords[run.verdict]}, ${minuteReasonWords[run.reason]}`;

function daylightOf(result: ReportedResult): { rise: number; set: number }[] {
  return result.daylight.flatMap((day) => {
    if (day.polar === 'night') return [];
    const noon = Date.parse(`${day.on}T12:00:00Z`);
    return [{ rise: day.sunriseUtc ? Date.parse(day.sunriseUtc) : noon - 12 * hourMs, set: day.sunsetUtc ? Date.parse(day.sunsetUtc) : noon + 12 * hourMs }];
  });
}

function hourMarks(from: number, to: number, x: (ms: number) => number, { top, textSize, zone, width }: { top: number; textSize: number; zone: string; width: number }): FigureMark[] {
  const marks: FigureMark[] = [];
  let free = -Infinity;
  for (const { at, text } of clockTicks(from, to, zone, x, textSize)) {
    const half = textWidth(text, textSize) / 2;
    marks.push({ mark: 'line', points: [[at, top - 5], [at, top]], ink: 'ink', widthPt: 0.8 });
    if (at - half < free || at - half < 0 || at + half > width) continue;
    marks.push({ mark: 'text', x: at, y: top - 8, text, sizePt: textSize, anchor: 'middle' });
    free = at + half + textSize * 0.5;
  }
  return marks;
}

function runMarks(run: Run, x: (ms: number) => number, middle: number): FigureMark[] {
  const [a, b] = [x(Date.parse(run.fromUtc)), x(Date.parse(run.toUtc))];
  if (run.verdict === 'sunlit') {
    const width = Math.max(3, b - a);
    return [{ mark: 'rect', x: a, y: middle - 7, width, height: 14, fill: 'slot', edge: 'burn', widthPt: 1.4, roundPt: Math.min(6, width / 2) }];
  }
  if (run.verdict === 'not-sunlit') return [];
  const count = Math.max(1, Math.floor((b - a) / 7));
  return Array.from({ length: count }, (_unused, index): FigureMark => ({ mark: 'dot', x: a + ((index + 0.5) * (b - a)) / count, y: middle, radiusPt: 2, fill: 'slot', edge: 'ink' }));
}

/** The minutes as rows of a table: the text twin of the figure. */
export function windowRows(result: ReportedResult, zone: string): string[][] {
  const sameDay = localDay(new Date(result.window.startUtc), zone) === localDay(new Date(result.window.endUtc), zone);
  const words = (utc: string) => (sameDay ? formatClock(new Date(utc), zone) : formatDayClock(new Date(utc), zone));
  return result.runs.map((run) => [words(run.fromUtc), words(run.toUtc), String(run.minutes), minuteVerdictWords[run.verdict], minuteReasonWords[run.reason]]);
}
