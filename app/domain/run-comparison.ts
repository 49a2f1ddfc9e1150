import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import type { TestName, TestResult } from '#app/physics/model/tests.ts';
import type { CardView } from './case-card.ts';
import { countInWords } from './case-view.ts';
import { testLabels } from './hypothesis.ts';
import { formatDayClock } from './local-time.ts';
import { compareInputs } from './run-difference.ts';
import type { InputDifference } from './run-difference.ts';
import type { RunLineView } from './run-page.ts';
import { reasonReader } from './run-reasons.ts';
import { runCardView } from './run-view.ts';
import { gradeHeading, minuteReasonWords, outcomeLabels, totalsWords } from './run-words.ts';

export interface ComparedRun {
  readonly line: RunLineView;
  readonly input: ReconstructionInput;
  readonly result: ReconstructionResult;
}

/** Consecutive minutes whose answer is another in the later run. */
export interface ChangedStretch {
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly minutes: number;
  readonly before: { readonly verdict: Verdict; readonly reasonWords: string };
  readonly after: { readonly verdict: Verdict; readonly reasonWords: string };
}
/** A minute that only one of the windows holds is "not examined" in the other. */
export type Verdict = 'sunlit' | 'not-sunlit' | 'cannot-tell' | 'not-examined';

export interface ResultDifference {
  readonly term: string;
  readonly unit: string;
  readonly before: string;
  readonly after: string;
  readonly difference: string | null;
  readonly changed: boolean;
}

export interface TestComparison {
  readonly test: TestName;
  readonly label: string;
  readonly before: TestSide;
  readonly after: TestSide;
  readonly changed: boolean;
}
export interface TestSide {
  readonly result: TestResult;
  readonly sentence: string;
  readonly margin: ReconstructionResult['tests'][number]['margin'];
}

export interface RunComparisonView {
  readonly heading: string;
  readonly zone: string;
  readonly a: RunLineView;
  readonly b: RunLineView;
  readonly cardA: CardView;
  readonly cardB: CardView;
  readonly totalsA: string;
  readonly totalsB: string;
  readonly inputs: { readonly changed: readonly InputDifference[]; readonly same: number };
  readonly engineChanged: boolean;
  readonly sameBytes: boolean;
  readonly stretches: readonly ChangedStretch[];
  readonly results: readonly ResultDifference[];
  readonly tests: readonly TestComparison[];
}

const minuteMs = 60_000;
interface Told {
  readonly verdict: Verdict;
  readonly reasonWords: string;
}

function toldMinutes({ input, result }: ComparedRun): Map<number, Told> {
  const why = reasonReader(input);
  const known = new Map(result.minutes.map((minute) => [minute.atUtc, minute]));
  const told = new Map<number, Told>();
  for (const run of result.runs) {
    for (let index = 0; index < run.minutes; index++) {
      const ms = Date.parse(run.fromUtc) + index * minuteMs;
      const minute = known.get(new Date(ms).toISOString());
      // Minutes are matched by the clock, since a window may begin within one.
      told.set(Math.floor(ms / minuteMs), { verdict: run.verdict, reasonWords: minute ? why(minute) : minuteReasonWords[run.reason] });
    }
  }
  return told;
}

const notExamined: Told = { verdict: 'not-examined', reasonWords: 'outside the window' };

/** Stretches of minutes with another result; reasons alone do not count. */
export function changedStretches(a: ComparedRun, b: ComparedRun): ChangedStretch[] {
  const [earlier, later] = [toldMinutes(a), toldMinutes(b)];
  const stretches: { from: number; to: number; before: Told; after: Told }[] = [];
  for (const minute of [...new Set([...earlier.keys(), ...later.keys()])].toSorted((x, y) => x - y)) {
    const [before, after] = [earlier.get(minute) ?? notExamined, later.get(minute) ?? notExamined];
    if (before.verdict === after.verdict) continue;
    const last = stretches.at(-1);
    const alike = last && last.to === minute && last.before.verdict === before.verdict && last.after.verdict === after.verdict && last.before.reasonWords === before.reasonWords && last.after.reasonWords === after.reasonWords;
    if (alike) last.to = minute + 1;
    else stretches.push({ from: minute, to: minute + 1, before, after });
  }
  return stretches.map(({ from, to, before, after }) => ({ fromUtc: new Date(from * minuteMs).toISOString(), toUtc: new Date(to * minuteMs).toISOString(), minutes: to - from, before, after }));
}

type Figure = readonly [term: string, unit: string, value: number | string | null | undefined];

function figuresOf({ input, result }: ComparedRun): readonly Figure[] {
  const { best, focus, requiredSun, sampling } = result;
  const clock = (utc: string | undefined) => (utc ? formatDayClock(new Date(utc), input.place.zone) : null);
  const disc = (centre: 'hot spot' | 'mark') => focus?.discs.find((one) => one.disc === '5 mm' && one.centre === centre)?.fluxKwm2.mid;
  return [
    ['Sunlit', 'min', result.totals.sunlit],
    ['Not sunlit', 'min', result.totals.notSunlit],
    ["Can't tell", 'min', result.totals.cannotTell],
    ['Best minute', '', clock(best?.atUtc)],
    ['Sun at the best minute, azimuth', '°', best?.sun.azimuthDeg],
    ['Sun at the best minute, elevation', '°', best?.sun.apparentElevationDeg],
    ['Focus beside the mark', 'mm', best?.missLateralMm],
    ['Sun that the mark needs, azimuth', '°', requiredSun?.azimuthDeg],
    ['Sun that the mark needs, elevation', '°', requiredSun?.apparentElevationDeg],
    ['Direct irradiance at the optic, likely', 'W/m²', best?.dni.atOpticLikelyWm2],
    ['Focal length', 'm', focus?.focalLengthM],
    ['Spot or line width', 'mm', focus?.spotDiameterMm.mid],
    ['Flux on 5 mm, hot spot', 'kW/m²', disc('hot spot')],
    ['Flux on 5 mm, mark', 'kW/m²', disc('mark')],
    ['Speed of the spot', 'mm/h', focus?.trailSpeedMmPerH],
    ['Minutes that the trail needs', 'min', focus?.trailMinutesAtLeast],
    ['Samples whose focus reaches the mark', '', sampling ? `${Math.round(sampling.alignedShare * sampling.samples)} of ${sampling.samples}` : null],
    ...(result.heating?.outcomes ?? []).map((one): Figure => [outcomeLabels[one.id], '', one.answer === 'cannot tell' ? "can't tell" : one.answer]),
    ['Days of return listed', 'days', result.recurrence.reduce((sum, band) => sum + band.days.length, 0)],
    ['Grade', '', result.grade.word],
  ];
}

const valueWords = (value: Figure[2]): string => (value === null || value === undefined ? 'none' : typeof value === 'number' ? String(Number(value.toPrecision(4))) : value);

function compareResults(a: ComparedRun, b: ComparedRun): ResultDifference[] {
  const later = new Map(figuresOf(b).map((figure) => [figure[0], figure]));
  const earlier = new Map(figuresOf(a).map((figure) => [figure[0], figure]));
  return [...new Set([...earlier.keys(), ...later.keys()])].flatMap((term) => {
    const [from, to] = [earlier.get(term)?.[2], later.get(term)?.[2]];
    const [before, after] = [valueWords(from), valueWords(to)];
    if (before === 'none' && after === 'none') return [];
    const gap = typeof from === 'number' && typeof to === 'number' ? to - from : null;
    const changed = from !== to;
    return [{ term, unit: (later.get(term) ?? earlier.get(term))?.[1] ?? '', before, after, difference: gap === null || !changed ? null : `${gap < 0 ? '−' : '+'}${Number(Math.abs(gap).toPrecision(3))}`, changed }];
  });
}

function compareTests(a: ComparedRun, b: ComparedRun): TestComparison[] {
  return b.result.tests.flatMap((after) => {
    const before = a.result.tests.find((one) => one.test === after.test);
    if (!before) return [];
    const side = ({ result, sentence, margin }: typeof after): TestSide => ({ result, sentence, margin });
    return [{ test: after.test, label: testLabels[after.test], before: side(before), after: side(after), changed: before.result !== after.result || before.sentence !== after.sentence || before.margin?.value !== after.margin?.value }];
  });
}

function headingOf(inputs: number, engineChanged: boolean, minutesChanged: number, examined: number): string {
  const what = inputs === 0 ? (engineChanged ? 'The engine alone changed' : 'Nothing that went in changed') : `${countInWords(inputs)} ${inputs === 1 ? 'input' : 'inputs'}${engineChanged ? ' and the engine' : ''} changed`;
  return minutesChanged === 0 ? `${what}; no minute changed its answer` : `${what}; ${minutesChanged} of ${examined} minutes changed their answer`;
}

/** Two finished runs side by side, the one with the lower number first. */
export function compareRuns(a: ComparedRun, b: ComparedRun, context: { readonly foundAt: Date | null; readonly sameBytes: boolean }): RunComparisonView {
  const inputs = compareInputs(a.input, b.input);
  const stretches = changedStretches(a, b);
  const engineChanged = a.result.engineVersion !== b.result.engineVersion;
  const [cardA, cardB] = [runCardView(a.input, a.result, context.foundAt), runCardView(b.input, b.result, context.foundAt)];
  const minutesChanged = stretches.reduce((sum, one) => sum + one.minutes, 0);
  return {
    heading: headingOf(inputs.changed.length, engineChanged, minutesChanged, Math.max(a.result.window.minutes, b.result.window.minutes)),
    zone: b.input.place.zone,
    a: a.line,
    b: b.line,
    cardA,
    cardB,
    totalsA: `${totalsWords(a.result.totals)}. ${gradeHeading(a.result.grade)}.`,
    totalsB: `${totalsWords(b.result.totals)}. ${gradeHeading(b.result.grade)}.`,
    inputs,
    engineChanged,
    sameBytes: context.sameBytes,
    stretches,
    results: compareResults(a, b),
    tests: compareTests(a, b),
  };
}
