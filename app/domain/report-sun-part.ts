import { beamColumns, beamRows, distanceWords, planColumns, planRows, surfaceWords } from './beam-words.ts';
import { beamFigure, drawnMinute } from './figures/beam-figure.ts';
import { fluxMapFigure } from './figures/flux-map-figure.ts';
import { irradianceFigure } from './figures/irradiance-figure.ts';
import { spotDistanceFigure } from './figures/spot-distance-figure.ts';
import { sunPathFigure } from './figures/sun-path-figure.ts';
import { temperatureFigure } from './figures/temperature-figure.ts';
import { yearFigure } from './figures/year-figure.ts';
import { ringsOf, trackOver } from './flux-discs.ts';
import { testLabels } from './hypothesis.ts';
import { irradianceColumns, irradianceRows } from './irradiance-day.ts';
import type { IrradianceDayData } from './irradiance-day.ts';
import { formatClock, formatDay, formatDayClock, formatIsoDay, localDay } from './local-time.ts';
import { plainNumber } from './plain-number.ts';
import { heading, plain, small, sub, tableIf } from './report-blocks.ts';
import type { FigureCount } from './report-blocks.ts';
import type { ReportBlock } from './report-document.ts';
import { focusRows, heatRows, spotRows } from './report-numbers.ts';
import type { ReportedRun, ReportSource } from './report-source.ts';
import { irradianceSpan } from './run-day.ts';
import { litSpans, plateNote } from './run-returns.ts';
import { assumptionLabel, checkAnswer, checkLabel, gradeHeading, outcomeLabels } from './run-words.ts';
import { materialWords, temperatureNote, temperatureRows } from './temperature-curve.ts';
import { noWeatherWords, stepWords, traceName, weatherSentences, weatherTable } from './weather-part.ts';
import { withinSpan } from './weather.ts';

interface Drawn {
  readonly run: ReportedRun;
  readonly zone: string;
  readonly figures: FigureCount;
}

/** What the engine worked out, each part with its figure and numbers. A figure that the run has no data for is left out. */
export function sunPart({ run, zone, returns }: Pick<ReportSource, 'run' | 'zone' | 'returns'>, figures: FigureCount): ReportBlock[] {
  if (!run) return [heading('Sun and weather in the window'), plain('No reconstruction is attached.')];
  const drawn: Drawn = { run, zone, figures };
  const { result } = run;
  return [
    heading('Sun and weather in the window'),
    plain(`${gradeHeading(result.grade)}. The engine states what the values allow and what they contradict; it states no cause.`),
    ...figures.place((size) => sunPathFigure(run, { ...size, zone })),
    ...weatherBlocks(drawn),
    ...beamBlocks(drawn),
    ...fluxBlocks(drawn),
    ...heatBlocks(drawn),
    ...(result.checks.length > 0 ? [sub('Checks that could contradict')] : []),
    ...tableIf('Checks', ['Check', 'Answer', 'Sentence'], [1.6, 1, 3.4], result.checks.map((check) => [checkLabel(check), checkAnswer(check.passed), check.sentence])),
    ...tableIf('The four tests as the engine answers them', ['Test', 'Answer', 'Sentence'], [0.9, 1, 4], result.tests.map((test) => [testLabels[test.test], test.result, test.sentence])),
    ...(result.assumptions.length > 0 ? [sub('Assumed, not measured'), ...tableIf('Assumptions', ['Quantity', 'Value', 'Source'], [1.4, 1.2, 3], result.assumptions.map((one) => [assumptionLabel(one.field), one.value, `${one.source.text}${one.source.verified ? '' : ' (unverified)'}`]))] : []),
    ...(result.warnings.length > 0 ? [{ kind: 'list' as const, items: result.warnings }] : []),
    ...returnBlocks(drawn, returns),
  ];
}

const mostSkyRows = 12;

/** Which record the run went by, in words; the trace on the axis of the window; and its rows. */
function weatherBlocks({ run, zone, figures }: Drawn): ReportBlock[] {
  const { weather, result } = run;
  const data = irradianceData(run, zone);
  const oneDay = formatDay(new Date(data.fromUtc), zone) === formatDay(new Date(data.toUtc), zone);
  const clock = (utc: string) => (oneDay ? formatClock(new Date(utc), zone) : formatDayClock(new Date(utc), zone));
  const table = weather && weatherTable(weather, result.window, zone);
  // Without a record there is nothing to set beside the clear sky.
  const columns = weather ? 4 : 3;
  return [
    sub('Weather and irradiance'),
    plain(weather ? weatherSentences(weather).join(' ') : noWeatherWords),
    ...figures.place((size) => irradianceFigure(data, { ...size, zone })),
    ...(data.bound.length > 0 ? [small(`Dashed: clear-sky upper bound, clean air. Thin: likely clear sky of the air class.${weather ? ` Steps: ${traceName(weather)}.` : ''}`)] : []),
    ...tableIf('Direct irradiance through the window', irradianceColumns.slice(0, columns), [1, 1, 1, 1].slice(0, columns), irradianceRows(data, clock, mostSkyRows).map((row) => row.slice(0, columns))),
    ...(table ? [small(`${table.caption}.`), ...tableIf(table.caption, table.head, table.head.map((_, index) => (index === 2 ? 2 : 1)), table.rows)] : []),
    ...(table && table.further > 0 ? [small(`${table.further} further ${table.further === 1 ? 'value of the record lies' : 'values of the record lie'} outside these rows.`)] : []),
  ];
}

function irradianceData({ result, drawing: { sky }, weather }: ReportedRun, zone: string): IrradianceDayData {
  const day = localDay(new Date(result.best?.atUtc ?? result.window.startUtc), zone);
  const span = sky ?? irradianceSpan(result.window, day, zone, null);
  const [fromMs, toMs] = [Date.parse(span.fromUtc), Date.parse(span.toUtc)];
  const within = (fromUtc: string, toUtc: string) => ({ from: new Date(Math.max(Date.parse(fromUtc), fromMs)).toISOString(), to: new Date(Math.min(Date.parse(toUtc), toMs)).toISOString() });
  const measured = withinSpan(weather?.values ?? [], fromMs, toMs).flatMap((value) => {
    const { from, to } = within(value.startUtc, value.endUtc);
    return value.usedWm2 === null ? [] : [{ startUtc: from, endUtc: to, wm2: value.usedWm2 }];
  });
  const sunlit = result.runs.filter((one) => one.verdict === 'sunlit' && Date.parse(one.toUtc) > fromMs && Date.parse(one.fromUtc) < toMs).map((one) => within(one.fromUtc, one.toUtc));
  return {
    zone,
    fromUtc: span.fromUtc,
    toUtc: span.toUtc,
    bound: sky?.bound ?? [],
    likely: sky?.likely ?? [],
    measured,
    ...(weather ? { measuredName: stepWords(weather) } : {}),
    sunlit: sunlit.map(({ from, to }) => ({ fromUtc: from, toUtc: to })),
  };
}

function beamBlocks({ run: { result, drawing }, zone, figures }: Drawn): ReportBlock[] {
  const { beam } = drawing;
  const figure = figures.place((size) => beamFigure({ beam, bestUtc: result.best?.atUtc ?? null, minutes: result.minutes }, { ...size, zone }));
  const minute = beam && drawnMinute(beam, result.best?.atUtc ?? null);
  if (!beam || !minute || figure.length === 0) return [];
  const clock = (utc: string) => formatClock(new Date(utc), zone);
  return [
    sub('The beam'),
    ...figure,
    small(`Chief ray, dashed, and width by the closed form of the engine; blue outline: four fifths of the light. ${surfaceWords(beam)} ${distanceWords(beam)}`.trim()),
    ...tableIf(`Directions and lengths at ${clock(minute.atUtc)}`, planColumns, [1.4, 1, 1, 1.2], planRows(beam, minute)),
    small(`The beam on ${formatDay(new Date(minute.atUtc), zone)}.`),
    ...tableIf(`The beam on ${formatDay(new Date(minute.atUtc), zone)}`, beamColumns, [0.7, 1.1, 1.1, 0.8, 1.2, 1.2, 1], beamRows(beam, result.minutes, clock, 6)),
  ];
}

function fluxBlocks({ run: { result, drawing }, zone, figures }: Drawn): ReportBlock[] {
  const { focus, best } = result;
  const rows = tableIf('The best minute and the focus', ['Quantity', 'Value', 'Note'], [1.6, 1.4, 3], focusRows(result, zone));
  if (!focus) return rows;
  const isLine = focus.focusKind === 'line';
  const rings = ringsOf(result);
  const noRingWords = focus.traced?.map ? 'The traced map holds no whole ring at 1 kW/m² or above.' : 'No map was traced, so no ring is drawn.';
  const title = best ? `Flux at ${formatClock(new Date(best.atUtc), zone)}, ${isLine ? 'bands' : 'rings'} in kW/m², round the hot spot` : 'Flux round the hot spot, kW/m²';
  const map = { discs: focus.discs.filter((disc) => disc.centre === 'hot spot'), rings, focusKind: focus.focusKind, ...trackOver(drawing.beam, best?.atUtc ?? null) };
  return [
    sub('Flux and size of the spot'),
    ...figures.place((size) => fluxMapFigure(map, title, size)),
    small(`Plane: ${focus.plane}. ${rings.length > 0 ? `${isLine ? 'Bands: as wide as the mean' : 'Rings: circles as large as the area'} over 1, 3, 10, 30, 100 and 300 kW/m², as far as the traced map holds them.` : noRingWords} A flux is a mean over the disc that is named with it.`),
    ...rows,
    ...tableIf(isLine ? 'Bands of the flux map' : 'Rings of the flux map', ['At or above, kW/m²', isLine ? 'Half width, mm' : 'Radius, mm'], [1, 1], rings.map((ring) => [`${ring.fluxKwm2}`, plainNumber(ring.radiusMm)])),
    ...figures.place((size) => spotDistanceFigure({ points: focus.spotAtDistance, dangerZone: focus.dangerZone, markDistanceM: drawing.markDistanceM, focusKind: focus.focusKind }, size)),
    ...tableIf('Spot against distance', ['Distance [m]', 'Width of the spot [mm]', 'Likely flux on a 5 mm disc [kW/m²]'], [1, 1, 1], spotRows(result)),
  ];
}

function heatBlocks({ run: { result }, figures }: Drawn): ReportBlock[] {
  const { heating } = result;
  if (!heating) return [];
  const curve = { points: heating.surfaceTemperatureC, outcomes: heating.outcomes.map((outcome) => ({ label: outcomeLabels[outcome.id], answer: outcome.answer, timeS: outcome.timeS })) };
  const figure = figures.place((size) => temperatureFigure(curve, `Surface of ${materialWords(heating.materialId)} under steady sun, °C`, size));
  return [
    sub('What the heat could do to the target'),
    ...figure,
    ...(figure.length > 0 ? [small(temperatureNote), ...tableIf('Temperature against time', ['After', 'Middle, °C', '5 to 95, °C'], [1, 1, 1], temperatureRows(curve))] : []),
    ...tableIf('What the heat could do to the target', ['Outcome', 'Answer', 'Time [s], low to high', 'Sentence and source'], [0.9, 0.9, 1.1, 3.4], heatRows(result)),
    small('Small hot spots lose heat fast, so limits found on large samples do not carry over: read them as bands, never as a pass line.'),
  ];
}

const mostReturns = 24;

function returnBlocks({ run: { result, drawing }, zone, figures }: Drawn, returns: ReportSource['returns']): ReportBlock[] {
  const { year } = drawing;
  const lit = litSpans(result.recurrence, zone);
  const figure = year && lit.length > 0 ? figures.place((size) => yearFigure({ days: year.days, reach: year.reach, lit }, size)) : [];
  if (returns.length === 0 && figure.length === 0) return [];
  return [
    sub('When the sun returns to the mark'),
    ...figure,
    ...(figure.length > 0 && year ? [small(plateNote(zone, year.reachKnown))] : []),
    ...tableIf('Returns', ['Day', 'Best moment', 'Minutes'], [1, 1.4, 0.8], returns.slice(0, mostReturns).map((day) => [formatIsoDay(day.on), formatDayClock(new Date(day.bestAt), zone), String(day.minutes)])),
    ...(returns.length > mostReturns ? [small(`${returns.length - mostReturns} further days are in the data of the run.`)] : []),
  ];
}
