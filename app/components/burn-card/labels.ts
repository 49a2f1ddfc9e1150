import { textWidthPx } from '#app/components/charts/text-width.ts';
import type { BurnCardModel, BurnRun } from './model.ts';
import { joinRuns, runMinutes } from './model.ts';
import type { TimeAxis } from './time-axis.ts';
import { clockWords } from './wall-clock.ts';

/** A line of words on or under a card. */
export interface CardLabel {
  readonly x: number;
  /** Baseline. [px] */
  readonly y: number;
  readonly text: string;
  readonly sizePx: 12 | 13;
  readonly bold: boolean;
  readonly tone: 'ink' | 'second';
  readonly anchor: 'start' | 'middle' | 'end';
  /** Bracket over the words, or a line down to them. */
  readonly bracket?: { readonly x1: number; readonly x2: number; readonly y: number };
  readonly leader?: { readonly x: number; readonly y1: number; readonly y2: number };
}

interface Frame {
  readonly bodyTopPx: number;
  readonly bodyPx: number;
}
interface Spoken {
  readonly run: BurnRun;
  readonly title: string;
  /** None, one line, or one for each joined reason. */
  readonly reasons: readonly string[];
}
interface Placed {
  readonly words: Spoken;
  readonly x1: number;
  readonly x2: number;
  readonly tier: 0 | 1;
  readonly leaderX: number;
}

const titles: Record<BurnRun['verdict'], string> = { sunlit: 'Sunlit', 'not-sunlit': 'Not sunlit', 'cannot-tell': "Can't tell" };
const rank: Record<BurnRun['verdict'], number> = { sunlit: 2e6, 'cannot-tell': 1e6, 'not-sunlit': 0 };
const linePx = 16;

function spoken(run: BurnRun, reasons: readonly string[]): Spoken {
  return { run, title: `${titles[run.verdict]}, ${runMinutes(run)} min`, reasons };
}

/** The words of a run from most to fewest; each is tried until one finds room. */
function wordings(run: BurnRun): Spoken[] {
  if (run.verdict === 'sunlit' || run.reasonWords === '') return [spoken(run, [])];
  const parts = run.reasonWords.split(', then ');
  const stacked = parts.map((part, index) => (index === 0 ? part : `then ${part}`));
  return [spoken(run, [run.reasonWords]), ...(parts.length === 2 ? [spoken(run, stacked)] : []), spoken(run, [])];
}

function wordsWidth(words: Spoken): number {
  return Math.max(textWidthPx(words.title, 13, true), ...words.reasons.map((reason) => textWidthPx(reason, 12)));
}

/** Whether every run has room for its words side by side; if not, neighbours with one result share them. */
function fitsApart(runs: readonly BurnRun[], axis: TimeAxis): boolean {
  return runs.every((run) => run.verdict !== 'not-sunlit' || axis.x(run.toUtc) - axis.x(run.fromUtc) >= wordsWidth(spoken(run, [run.reasonWords])));
}

/** Where words stand to their run. */
const alignments = ['middle', 'start', 'end'] as const;
type Alignment = (typeof alignments)[number];

function placeRun(words: Spoken, axis: TimeAxis, taken: readonly Placed[], alignment: Alignment): Placed | null {
  const width = wordsWidth(words);
  const from = axis.x(words.run.fromUtc);
  const to = axis.x(words.run.toUtc);
  const wanted = { middle: (from + to - width) / 2, start: from, end: to - width }[alignment];
  const x1 = Math.min(Math.max(0, wanted), Math.max(0, axis.widthPx - width));
  const x2 = x1 + width;
  const clashes = (tier: 0 | 1) => taken.some((other) => other.tier === tier && x1 < other.x2 + 10 && x2 > other.x1 - 10);
  const runsThrough = (leaderX: number) => taken.some((other) => other.tier === 0 && leaderX > other.x1 - 4 && leaderX < other.x2 + 4);
  const cutByLeader = taken.some((other) => other.tier === 1 && other.leaderX > x1 - 4 && other.leaderX < x2 + 4);
  if (!clashes(0) && !cutByLeader) return { words, x1, x2, tier: 0, leaderX: (from + to) / 2 };
  const leaderX = [(from + to) / 2, from + 1, to - 1].find((x) => !runsThrough(x));
  return leaderX === undefined || clashes(1) ? null : { words, x1, x2, tier: 1, leaderX };
}

function placeRuns(runs: readonly BurnRun[], axis: TimeAxis, alignment: Alignment): Placed[] {
  const taken: Placed[] = [];
  for (const run of runs) {
    for (const words of wordings(run)) {
      const place = placeRun(words, axis, taken, alignment);
      if (!place) continue;
      taken.push(place);
      break;
    }
  }
  return taken;
}

function runLabels(place: Placed, axis: TimeAxis, top: number, secondTopPx: number): CardLabel[] {
  const { words } = place;
  const from = axis.x(words.run.fromUtc);
  const to = axis.x(words.run.toUtc);
  const x = (place.x1 + place.x2) / 2;
  const y = top + (place.tier === 0 ? 12 : secondTopPx) + 11;
  const first = place.tier === 0
    ? { bracket: { x1: from + 1, x2: to - 1, y: top + 7 } }
    : { leader: { x: place.leaderX, y1: top + 2, y2: top + secondTopPx - 2 } };
  const title: CardLabel = { x, y, text: words.title, sizePx: 13, bold: words.run.verdict === 'sunlit', tone: 'ink', anchor: 'middle', ...first };
  return [title, ...words.reasons.map((text, index): CardLabel => ({ x, y: y + linePx * (index + 1), text, sizePx: 12, bold: false, tone: 'second', anchor: 'middle' }))];
}

/** Words inside the body at both ends of the window, where there is room; else the text twin has them. */
function endLabels(model: BurnCardModel, axis: TimeAxis, frame: Frame): CardLabel[] {
  if (!model.window) return [];
  const side = (lines: readonly string[], x: number, anchor: 'start' | 'end', room: number): CardLabel[] => {
    if (lines.length === 0 || lines.some((line) => textWidthPx(line, 12) > room - 12)) return [];
    const firstY = frame.bodyTopPx + frame.bodyPx / 2 + 4 - (lines.length - 1) * 8;
    return lines.map((text, index) => ({ x, y: firstY + index * 16, text, sizePx: 12, bold: false, tone: 'ink', anchor }));
  };
  const start = axis.x(model.window.startUtc);
  const end = axis.x(model.window.endUtc);
  // At night there is no body, and words would sit on the thread.
  const lit = (x: number) => model.daylight.some((day) => axis.x(day.riseUtc) <= x && axis.x(day.setUtc) >= x);
  const bodyFrom = Math.max(0, ...model.daylight.filter((day) => axis.x(day.riseUtc) <= start).map((day) => axis.x(day.riseUtc)));
  const bodyTo = Math.min(axis.widthPx, ...model.daylight.filter((day) => axis.x(day.setUtc) >= end).map((day) => axis.x(day.setUtc)));
  return [
    ...(lit(start) ? side(model.startWords ?? [], start - 8, 'end', start - bodyFrom) : []),
    ...(lit(end) ? side(model.endWords ?? [], end + 8, 'start', bodyTo - end) : []),
  ];
}

function sunLabels(model: BurnCardModel, axis: TimeAxis, taken: readonly Placed[], baseline: number): CardLabel[] {
  const from = Date.parse(model.fromUtc);
  const to = Date.parse(model.toUtc);
  return model.daylight.flatMap((day) => [
    { word: 'sunrise', utc: day.riseUtc, anchor: 'start' as const },
    { word: 'sunset', utc: day.setUtc, anchor: 'end' as const },
  ]).flatMap(({ word, utc, anchor }): CardLabel[] => {
    if (Date.parse(utc) <= from || Date.parse(utc) >= to) return [];
    const text = `${word} ${clockWords(utc, model.zone)}`;
    const width = textWidthPx(text, 12);
    const x = axis.x(utc);
    const x1 = anchor === 'start' ? x : x - width;
    const clash = taken.some((other) => other.tier === 0 && x1 < other.x2 + 10 && x1 + width > other.x1 - 10);
    return clash || x1 < 0 || x1 + width > axis.widthPx ? [] : [{ x, y: baseline, text, sizePx: 12, bold: false, tone: 'second', anchor }];
  });
}

/**
 * Places the words of a large card in two rows under it. What finds no room is left to the text twin; type never
 * shrinks.
 */
export function layoutLabels(model: BurnCardModel, axis: TimeAxis, frame: Frame): { labels: CardLabel[]; heightPx: number } {
  const runs = fitsApart(model.runs, axis) ? model.runs : joinRuns(model.runs);
  const top = frame.bodyTopPx + frame.bodyPx;
  const order = (run: BurnRun) => rank[run.verdict] + axis.x(run.toUtc) - axis.x(run.fromUtc);
  const sorted = runs.toSorted((a, b) => order(b) - order(a));
  const tried = alignments.map((alignment) => placeRuns(sorted, axis, alignment));
  // The first alignment that keeps the most words; centred wins a tie.
  const kept = (places: readonly Placed[]) => places.reduce((sum, place) => sum + 10 + place.words.reasons.length, 0);
  const taken = tried.reduce((best, places) => (kept(places) > kept(best) ? places : best));
  const linesIn = (tier: 0 | 1) => Math.max(0, ...taken.filter((place) => place.tier === tier).map((place) => 1 + place.words.reasons.length));
  const secondTopPx = 12 + Math.max(1, linesIn(0)) * linePx + 7;
  const labels = taken.flatMap((place) => runLabels(place, axis, top, secondTopPx));
  return {
    labels: [...labels, ...endLabels(model, axis, frame), ...sunLabels(model, axis, taken, top + 18)],
    heightPx: (linesIn(1) > 0 ? secondTopPx + linesIn(1) * linePx : secondTopPx) + 4,
  };
}
