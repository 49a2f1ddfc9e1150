import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { azimuthOf, elevationOf } from '#app/physics/vector.ts';
import type { CsvValue } from './csv.ts';
import { testLabels } from './hypothesis.ts';
import { formatClock, localDay } from './local-time.ts';
import { beamView } from './run-beam.ts';
import { clearSkyCurve } from './run-day.ts';
import { inputGroups } from './run-inputs.ts';
import { reasonReader } from './run-reasons.ts';
import { assumptionLabel, checkLabel, minuteReasonWords, minuteVerdictWords, outcomeLabels } from './run-words.ts';

/** Figures of a run whose numbers may be taken away, by the name of their file. */
export const figureIds = [
  'minutes', 'sun-path', 'beam', 'spot-distance', 'flux-discs', 'flux-map', 'time-on-a-point', 'irradiance', 'temperature', 'outcomes', 'returns', 'sensitivity', 'tests', 'checks', 'inputs',
] as const;
export type FigureId = (typeof figureIds)[number];
export const isFigureId = (text: string): text is FigureId => figureIds.some((id) => id === text);

export interface FigureTable {
  readonly head: readonly string[];
  readonly rows: readonly (readonly CsvValue[])[];
}

type Tables = Readonly<Record<FigureId, (input: ReconstructionInput, result: ReconstructionResult) => FigureTable>>;

const clockOf = ({ place }: ReconstructionInput) => (atUtc: string): string => `${localDay(new Date(atUtc), place.zone)} ${formatClock(new Date(atUtc), place.zone)}`;

/** Every minute of the window, night included. */
function minutes(input: ReconstructionInput, result: ReconstructionResult): FigureTable {
  const known = new Map(result.minutes.map((minute) => [minute.atUtc, minute]));
  const why = reasonReader(input);
  const clock = clockOf(input);
  const rows = result.runs.flatMap((run) =>
    Array.from({ length: run.minutes }, (_unused, index): CsvValue[] => {
      const atUtc = new Date(Date.parse(run.fromUtc) + index * 60_000).toISOString();
      const minute = known.get(atUtc);
      return [
        atUtc, clock(atUtc), input.place.zone, minute?.azimuthDeg ?? null, minute?.apparentElevationDeg ?? null,
        minuteVerdictWords[run.verdict], minute ? why(minute) : minuteReasonWords[run.reason],
        minute?.missLateralMm ?? null, minute?.missAxialMm ?? null, minute?.fluxKwm2 ?? null,
      ];
    }),
  );
  return { head: ['at_utc', 'clock', 'zone', 'azimuth_deg', 'apparent_elevation_deg', 'result', 'reason', 'miss_lateral_mm', 'miss_axial_mm', 'flux_kw_m2'], rows };
}

function sunPath(input: ReconstructionInput, result: ReconstructionResult): FigureTable {
  const clock = clockOf(input);
  const sun = result.minutes.map((minute): CsvValue[] => ['sun', minute.atUtc, clock(minute.atUtc), minute.azimuthDeg, minute.apparentElevationDeg, '']);
  const skyline = (input.skyline?.points ?? []).map((point): CsvValue[] => ['skyline', null, null, point.azimuthDeg, point.elevationDeg, point.name ?? '']);
  const needed = result.requiredSun ? [['sun that the mark needs', null, null, result.requiredSun.azimuthDeg, result.requiredSun.apparentElevationDeg, ''] satisfies CsvValue[]] : [];
  return { head: ['what', 'at_utc', 'clock', 'azimuth_deg', 'apparent_elevation_deg', 'name'], rows: [...sun, ...needed, ...skyline] };
}

/** The beam at each minute of the window, from the closed form. */
function beam(input: ReconstructionInput, result: ReconstructionResult): FigureTable {
  const view = beamView(input, result.minutes.map((minute) => minute.atUtc));
  const verdicts = new Map(result.minutes.map((minute) => [minute.atUtc, minuteVerdictWords[minute.verdict]]));
  const clock = clockOf(input);
  const to2 = (value: number) => Number(value.toFixed(2));
  const rows = (view?.minutes ?? []).map((minute): CsvValue[] => [
    minute.atUtc, clock(minute.atUtc), to2(azimuthOf(minute.towardsSun)), to2(elevationOf(minute.towardsSun)), to2(azimuthOf(minute.direction)), to2(elevationOf(minute.direction)),
    view?.profiles[minute.profile]?.focusM ?? null, minute.spotMm?.rightMm ?? null, minute.spotMm?.upMm ?? null, verdicts.get(minute.atUtc) ?? '',
  ]);
  return { head: ['at_utc', 'clock', 'sun_azimuth_deg', 'sun_elevation_deg', 'beam_azimuth_deg', 'beam_elevation_deg', 'focus_m', 'spot_right_mm', 'spot_up_mm', 'result'], rows };
}

function fluxMap(_input: ReconstructionInput, { focus }: ReconstructionResult): FigureTable {
  const map = focus?.traced?.map;
  if (!map) return { head: ['column', 'row', 'suns'], rows: [] };
  const cellMm = map.sizeMm / map.cells;
  const at = (index: number) => Number(((index + 0.5) * cellMm - map.sizeMm / 2).toPrecision(4));
  return { head: ['column_mm', 'row_mm', 'suns'], rows: map.suns.map((suns, index) => [at(index % map.cells), at(Math.floor(index / map.cells)), suns]) };
}

function irradiance(input: ReconstructionInput, result: ReconstructionResult): FigureTable {
  const clock = clockOf(input);
  const { bound, likely } = clearSkyCurve(input, result.window.startUtc, result.window.endUtc);
  const model = (what: string, samples: typeof bound) => samples.map((one): CsvValue[] => [what, one.atUtc, null, clock(one.atUtc), one.wm2]);
  const measured = (input.sky.dniSeries?.values ?? []).map((value): CsvValue[] => [input.sky.dniSeries?.basis ?? 'measured', value.startUtc, value.endUtc, clock(value.startUtc), value.dniWm2]);
  return { head: ['what', 'from_utc', 'to_utc', 'clock', 'direct_normal_w_m2'], rows: [...model('clean-air bound', bound), ...model('likely clear sky', likely), ...measured] };
}

function returns(_input: ReconstructionInput, { recurrence }: ReconstructionResult): FigureTable {
  return {
    head: ['day', 'from_utc', 'to_utc', 'closest_utc', 'minutes', 'separation_deg'],
    rows: recurrence.flatMap((band) => band.days).map((day) => [day.on, day.fromUtc, day.toUtc, day.bestUtc, day.minutes, day.separationDeg]),
  };
}

const tables: Tables = {
  minutes,
  'sun-path': sunPath,
  beam,
  'flux-map': fluxMap,
  irradiance,
  returns,
  'spot-distance': (_input, { focus }) => ({ head: ['distance_m', 'width_mm', 'flux_kw_m2'], rows: (focus?.spotAtDistance ?? []).map((one) => [one.distanceM, one.diameterMm, one.fluxKwm2]) }),
  'flux-discs': (_input, { focus }) => ({
    head: ['disc', 'diameter_mm', 'centre', 'suns_low', 'suns_mid', 'suns_high', 'flux_low_kw_m2', 'flux_mid_kw_m2', 'flux_high_kw_m2'],
    rows: (focus?.discs ?? []).map(({ disc, diameterMm, centre, concentration: suns, fluxKwm2: flux }) => [disc, diameterMm, centre, suns.low, suns.mid, suns.high, flux.low, flux.mid, flux.high]),
  }),
  'time-on-a-point': (_input, { focus }) => ({ head: ['above_kw_m2', 'seconds_low', 'seconds_mid', 'seconds_high'], rows: (focus?.dwellS ?? []).map(({ thresholdKwm2, seconds }) => [thresholdKwm2, seconds.low, seconds.mid, seconds.high]) }),
  temperature: (_input, { heating }) => ({ head: ['seconds', 'celsius_low', 'celsius_mid', 'celsius_high'], rows: (heating?.surfaceTemperatureC ?? []).map(({ timeS, celsius }) => [timeS, celsius.low, celsius.mid, celsius.high]) }),
  outcomes: (_input, { heating }) => ({
    head: ['outcome', 'answer', 'seconds_low', 'seconds_mid', 'seconds_high', 'why', 'basis', 'source', 'source_checked'],
    rows: (heating?.outcomes ?? []).map((one) => [outcomeLabels[one.id], one.answer, one.timeS?.low ?? null, one.timeS?.mid ?? null, one.timeS?.high ?? null, one.sentence, one.basis, one.source.text, one.source.verified ? 'yes' : 'unverified']),
  }),
  sensitivity: (_input, { sampling }) => ({ head: ['input', 'flux_low_kw_m2', 'flux_high_kw_m2'], rows: (sampling?.tornado ?? []).map((bar) => [bar.input, bar.lowKwm2, bar.highKwm2]) }),
  tests: (_input, result) => ({
    head: ['test', 'result', 'why', 'value', 'low', 'high', 'unit', 'would_agree_from', 'would_agree_to'],
    rows: result.tests.map(({ test, result: answer, sentence, margin }) => [testLabels[test], answer, sentence, margin?.value ?? null, margin?.low ?? null, margin?.high ?? null, margin?.unit ?? null, margin?.agreeFrom ?? null, margin?.agreeTo ?? null]),
  }),
  checks: (_input, result) => ({ head: ['check', 'test', 'passed', 'margin', 'unit', 'sentence'], rows: result.checks.map((check) => [checkLabel(check), testLabels[check.test], check.passed === null ? 'could not be made' : check.passed ? 'yes' : 'no', check.margin, check.unit, check.sentence]) }),
  inputs: (input, result) => ({
    head: ['group', 'value', 'as_taken', 'note'],
    rows: [
      ...inputGroups(input).flatMap((group) => group.facts.map((one): CsvValue[] => [group.heading, one.term, one.value, one.note ?? ''])),
      ...result.assumptions.map((one): CsvValue[] => ['Assumed', assumptionLabel(one.field), one.value, `${one.source.text}${one.source.verified ? '' : '; unverified'}`]),
    ],
  }),
};

/** Numbers of one figure of a finished run; a run without that figure gives a head and no row. */
export function figureTable(id: FigureId, input: ReconstructionInput, result: ReconstructionResult): FigureTable {
  return tables[id](input, result);
}
