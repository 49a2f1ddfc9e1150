import type { FocusResult } from '#app/physics/model/focus.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { MinuteResult } from '#app/physics/model/minutes.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { settleSite } from '#app/physics/site.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { localDay } from '#app/physics/sun/zone-days.ts';
import { wholeCard } from './case-card.ts';
import type { CardView } from './case-card.ts';
import { ringsOf } from './flux-discs.ts';
import type { FluxRing } from './flux-discs.ts';
import { formatIsoDay } from './local-time.ts';
import { beamView } from './run-beam.ts';
import type { BeamView } from './run-beam.ts';
import { bestDay, clearSkyCurve, irradianceSpan, pathOfDay, referencePaths } from './run-day.ts';
import type { IrradianceSample, SkyDirection } from './run-day.ts';
import { markDistanceM } from './run-drawing.ts';
import { inputGroups } from './run-inputs.ts';
import type { InputGroup } from './run-inputs.ts';
import { reasonReader } from './run-reasons.ts';
import type { ReasonedMinute } from './run-reasons.ts';
import { returnBands, yearPlate } from './run-returns.ts';
import type { ReturnBandView, YearPlateView } from './run-returns.ts';
import { assumptionLabel, minuteReasonWords } from './run-words.ts';

/** One run of the engine as its page shows it. Result parts keep the engine's own numbers. */
export interface RunMinuteView {
  readonly atUtc: string;
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
  readonly verdict: MinuteResult['verdict'];
  readonly reasonWords: string;
}
export interface RunView {
  readonly card: CardView;
  /** Minutes of the whole window, where it is no longer than a day; else of the day of the best minute. */
  readonly minutes: readonly RunMinuteView[];
  readonly scrubs: boolean;
  readonly dayLabel: string;
  readonly dayPath: readonly SkyDirection[];
  readonly references: readonly { readonly label: string; readonly points: readonly SkyDirection[] }[];
  readonly skyline: readonly { readonly azimuthDeg: number; readonly elevationDeg: number; readonly name?: string }[];
  readonly required: { readonly azimuthDeg: number; readonly elevationDeg: number; readonly azimuthSigmaDeg: number; readonly elevationSigmaDeg: number } | null;
  readonly opening: { readonly fromAzimuthDeg: number; readonly toAzimuthDeg: number } | null;
  readonly irradiance: {
    readonly fromUtc: string;
    readonly toUtc: string;
    readonly bound: readonly IrradianceSample[];
    readonly likely: readonly IrradianceSample[];
    readonly measured: readonly { readonly startUtc: string; readonly endUtc: string; readonly wm2: number }[];
    readonly measuredName: string | null;
    readonly sunlit: readonly { readonly fromUtc: string; readonly toUtc: string }[];
  };
  /** Plan, section and trail; null without an optic. */
  readonly beam: BeamView | null;
  readonly rings: readonly FluxRing[];
  readonly inputs: readonly InputGroup[];
  readonly assumptions: readonly { readonly label: string; readonly value: string; readonly source: string; readonly verified: boolean }[];
  readonly returns: readonly ReturnBandView[];
  readonly plate: YearPlateView;
  readonly markDistanceM: number | null;
  readonly result: Omit<ReconstructionResult, 'minutes' | 'recurrence' | 'runs' | 'focus'> & { readonly focus: Omit<FocusResult, 'traced'> & { readonly traced: TracedView | null } | null };
}
/** The trace's figures without the map, which only the rings of the picture need. */
export type TracedView = Omit<NonNullable<FocusResult['traced']>, 'map'>;

const dayMs = 86_400_000;

/** Minutes of night are kept as runs only; for moving along the window they are put back, with their sun. */
function everyMinute(input: ReconstructionInput, result: ReconstructionResult, why: (minute: ReasonedMinute) => string): RunMinuteView[] {
  const { observer } = settleSite(input);
  const known = new Map(result.minutes.map((minute) => [minute.atUtc, minute]));
  return result.runs.flatMap((run) =>
    Array.from({ length: run.minutes }, (_unused, index) => {
      const utcMs = Date.parse(run.fromUtc) + index * 60_000;
      const atUtc = new Date(utcMs).toISOString();
      const minute = known.get(atUtc);
      const sun = minute ?? solarPosition(utcMs, observer);
      return { atUtc, azimuthDeg: to2(sun.azimuthDeg), apparentElevationDeg: to2(sun.apparentElevationDeg), verdict: run.verdict, reasonWords: minute ? why(minute) : minuteReasonWords[run.reason] };
    }),
  );
}

const to2 = (value: number): number => Math.round(value * 100) / 100;

function shownMinutes(input: ReconstructionInput, result: ReconstructionResult, day: string): { minutes: RunMinuteView[]; scrubs: boolean } {
  const why = reasonReader(input);
  if (Date.parse(result.window.endUtc) - Date.parse(result.window.startUtc) <= dayMs) return { minutes: everyMinute(input, result, why), scrubs: true };
  const { zone } = input.place;
  const minutes = result.minutes
    .filter((minute) => localDay(Date.parse(minute.atUtc), zone) === day)
    .map((minute) => ({ atUtc: minute.atUtc, azimuthDeg: minute.azimuthDeg, apparentElevationDeg: minute.apparentElevationDeg, verdict: minute.verdict, reasonWords: why(minute) }));
  return { minutes, scrubs: false };
}

/** The survey's ± carried to the sun: a mirror or a lens node turns the beam by the angle by which the sun turns. */
function requiredSun(input: ReconstructionInput, result: ReconstructionResult): RunView['required'] {
  const { requiredSun: needed } = result;
  const { mark } = input;
  if (!needed || !mark) return null;
  const across = Math.cos((mark.elevationDeg * Math.PI) / 180) / Math.max(0.05, Math.cos((needed.apparentElevationDeg * Math.PI) / 180));
  return { azimuthDeg: needed.azimuthDeg, elevationDeg: needed.apparentElevationDeg, azimuthSigmaDeg: Number((mark.bearingSigmaDeg * across).toPrecision(2)), elevationSigmaDeg: mark.elevationSigmaDeg };
}

function irradianceOf(input: ReconstructionInput, result: ReconstructionResult, card: CardView, day: string): RunView['irradiance'] {
  const { zone } = input.place;
  const light = card.daylight.find((one) => localDay(Date.parse(one.riseUtc) + 1, zone) === day) ?? null;
  const { fromUtc, toUtc } = irradianceSpan(result.window, day, zone, light);
  const within = <Span extends { readonly fromUtc: string; readonly toUtc: string }>(span: Span): Span[] =>
    span.toUtc > fromUtc && span.fromUtc < toUtc ? [{ ...span, fromUtc: span.fromUtc > fromUtc ? span.fromUtc : fromUtc, toUtc: span.toUtc < toUtc ? span.toUtc : toUtc }] : [];
  const series = input.sky.dniSeries;
  return {
    fromUtc,
    toUtc,
    ...clearSkyCurve(input, fromUtc, toUtc),
    measured: (series?.values ?? []).map((value) => ({ fromUtc: instant(value.startUtc), toUtc: instant(value.endUtc), wm2: value.dniWm2 })).flatMap(within).map((span) => ({ startUtc: span.fromUtc, endUtc: span.toUtc, wm2: span.wm2 })),
    measuredName: series ? [series.source, series.stationDistanceKm === undefined ? null : `${series.stationDistanceKm} km`, series.basis.replaceAll('-', ' ')].filter(Boolean).join(', ') : null,
    sunlit: result.runs.filter((run) => run.verdict === 'sunlit').map(({ fromUtc: start, toUtc: end }) => ({ fromUtc: start, toUtc: end })).flatMap(within),
  };
}

const instant = (text: string): string => new Date(text).toISOString();

/** The card of a run. */
export function runCardView(input: ReconstructionInput, result: ReconstructionResult, foundAt: Date | null): CardView {
  const flux = result.minutes.flatMap((minute) => (minute.verdict === 'sunlit' && minute.fluxKwm2 !== null ? [{ atUtc: minute.atUtc, kwm2: minute.fluxKwm2 }] : []));
  const { place } = input;
  const card = wholeCard(
    { ...place, onsetEarliestAt: null, onsetLatestAt: null, foundAt, reportedAt: new Date(result.window.endUtc) },
    { window: result.window, runs: result.runs, flux: flux.length > 400 ? flux.filter((_one, index) => index % Math.ceil(flux.length / 400) === 0) : flux },
    { start: [], end: [] },
  );
  const why = reasonReader(input);
  const known = new Map(result.minutes.map((minute) => [minute.atUtc, minute]));
  const middle = (run: (typeof result.runs)[number]) => new Date(Date.parse(run.fromUtc) + Math.floor(run.minutes / 2) * 60_000).toISOString();
  const words = (run: (typeof result.runs)[number]) => {
    const minute = known.get(middle(run));
    return minute ? why(minute) : minuteReasonWords[run.reason];
  };
  return { ...card, runs: result.runs.map((run) => ({ fromUtc: run.fromUtc, toUtc: run.toUtc, verdict: run.verdict, reasonWords: words(run) })) };
}

/** Everything that the page of a finished run shows. @param foundAt True time at which the mark was found. */
export function runView(input: ReconstructionInput, result: ReconstructionResult, context: { readonly foundAt: Date | null; readonly now: Date }): RunView {
  const day = bestDay(result, input.place.zone);
  const card = runCardView(input, result, context.foundAt);
  const { minutes: _minutes, recurrence: _recurrence, runs: _runs, focus, ...rest } = result;
  const traced = focus?.traced;
  const shown = shownMinutes(input, result, day);
  return {
    card,
    ...shown,
    beam: beamView(input, shown.minutes.map((minute) => minute.atUtc)),
    dayLabel: formatIsoDay(day).replace(/ \d{4}$/u, ''),
    dayPath: pathOfDay(input, day),
    references: referencePaths(input),
    skyline: namedOnce(input.skyline?.points ?? []),
    required: requiredSun(input, result),
    opening: input.opening ? { fromAzimuthDeg: input.opening.azimuthDeg - input.opening.halfWidthDeg, toAzimuthDeg: input.opening.azimuthDeg + input.opening.halfWidthDeg } : null,
    irradiance: irradianceOf(input, result, card, day),
    rings: ringsOf(result),
    inputs: inputGroups(input),
    assumptions: result.assumptions.map((one) => ({ label: assumptionLabel(one.field), value: one.value, source: one.source.text, verified: one.source.verified })),
    returns: returnBands(input, result, context.now),
    plate: yearPlate(input, result, context.now),
    markDistanceM: markDistanceM(input),
    result: { ...rest, focus: focus ? { ...focus, traced: traced ? withoutMap(traced) : null } : null },
  };
}

/** A building surveyed at several corners is named at the first of them. */
function namedOnce(points: RunView['skyline']): RunView['skyline'] {
  const said = new Set<string>();
  return points.map(({ azimuthDeg, elevationDeg, name }) => {
    if (!name || said.has(name)) return { azimuthDeg, elevationDeg };
    said.add(name);
    return { azimuthDeg, elevationDeg, name };
  });
}

function withoutMap({ map: _map, ...figures }: NonNullable<FocusResult['traced']>): TracedView {
  return figures;
}
