import { clearSkyAt } from '#app/physics/sky/clear-sky.ts';
import type { ClimateClass } from '#app/physics/model/input.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { settleSite } from '#app/physics/site.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { formatDayClock } from './local-time.ts';
import type { SceneAir } from './scene.ts';
import { chooseWeather } from './weather-choice.ts';
import { distanceCaution, meansWords, shortMeanMin, weatherNatureLabels, weatherQuantities, withinSpan } from './weather.ts';
import type { WeatherSeries, WeatherValue } from './weather.ts';

/** What a stored record holds that its line is made of. */
export interface WeatherRecordFacts extends WeatherSeries {
  readonly stationBearingDeg: number | null;
  readonly licenceNote: string;
  readonly fileSha256: string | null;
  readonly createdAt: Date;
  readonly addedBy: string;
  readonly setAsideAt: Date | null;
  readonly setAsideReason: string | null;
}

export interface WeatherRecordView {
  readonly number: number;
  readonly source: string;
  readonly nature: string;
  readonly where: string;
  readonly what: string;
  readonly added: string;
  readonly licence: string;
  readonly hashShort: string | null;
  readonly cautions: readonly string[];
  readonly setAside: string | null;
  /** A run goes by this one. */
  readonly chosen: boolean;
  /** Heads of the values: start, end, and what the record holds. */
  readonly columns: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

interface Sample {
  readonly atUtc: string;
  readonly wm2: number;
}
export interface WeatherView {
  readonly records: readonly WeatherRecordView[];
  /** Which record a run goes by: the finding of the page, and what follows from it. */
  readonly heading: string;
  readonly choiceWords: string;
  readonly choiceCaution: string;
  readonly trace: {
    readonly fromUtc: string;
    readonly toUtc: string;
    readonly bound: readonly Sample[];
    readonly likely: readonly Sample[];
    readonly measured: readonly { readonly startUtc: string; readonly endUtc: string; readonly wm2: number }[];
    readonly measuredName: string;
  } | null;
}

interface ViewSource {
  readonly records: readonly WeatherRecordFacts[];
  readonly window: { readonly from: Date; readonly to: Date } | null;
  readonly place: { readonly latitudeDeg: number; readonly longitudeDeg: number; readonly elevationM: number; readonly zone: string; readonly climateClass: ClimateClass };
  readonly sceneDni: SceneAir['dni'] | null;
}

const longestTraceMs = 48 * 3_600_000;
const rowsShown = 60;
const plain = (value: number) => String(Number(value.toFixed(1)));

export function weatherView({ records, window, place, sceneDni }: ViewSource): WeatherView {
  const standing = records.filter((record) => record.setAsideAt === null);
  const span = window ? { startUtc: window.from.toISOString(), endUtc: window.to.toISOString() } : null;
  const choice = span ? chooseWeather(standing, span, place) : null;
  return {
    records: records.map((record) => recordView(record, place.zone, window, choice?.number === record.number && record.setAsideAt === null)),
    ...(choice ? { heading: `A run goes by record ${choice.number}`, choiceWords: `${choice.how.charAt(0).toUpperCase()}${choice.how.slice(1)}.` } : noChoice(standing, span !== null, sceneDni)),
    choiceCaution: choice?.caution ?? '',
    trace: window ? trace(window, place, choice?.series ?? (sceneDni ? { source: sceneDni.source, values: sceneDni.values } : null)) : null,
  };
}

function noChoice(standing: readonly WeatherSeries[], hasWindow: boolean, sceneDni: SceneAir['dni'] | null): Pick<WeatherView, 'heading' | 'choiceWords'> {
  const clearSky = 'A run uses the clear sky of the air class, and says so; it can neither show nor refute that the sun shone.';
  if (!hasWindow) return { heading: 'No onset window is known yet', choiceWords: 'So no hour of weather can be compared with it.' };
  if (sceneDni) return { heading: 'A run goes by values kept with the measurements', choiceWords: `There are ${sceneDni.values.length} of them: ${sceneDni.source}.` };
  if (standing.length === 0) return { heading: 'No weather is on record', choiceWords: clearSky };
  return { heading: 'No record reaches into the onset window', choiceWords: `None that stands has direct or global irradiance inside it. ${clearSky}` };
}

function recordView(record: WeatherRecordFacts, zone: string, window: ViewSource['window'], chosen: boolean): WeatherRecordView {
  const inWindow = window ? withinSpan(record.values, window.from.getTime(), window.to.getTime()) : [];
  const used = weatherQuantities.filter(({ key }) => record.values.some((value) => value[key] !== undefined));
  const distance = record.stationDistanceKm === null ? 'distance not stated' : `${plain(record.stationDistanceKm)} km${record.stationBearingDeg === null ? '' : ` at ${Math.round(record.stationBearingDeg)}°`} from here`;
  return {
    number: record.number,
    source: [record.sourceName, record.station].filter(Boolean).join(', '),
    nature: weatherNatureLabels[record.nature],
    where: record.nature === 'station' || record.stationDistanceKm !== null ? distance : '',
    what: `${record.values.length} values, ${meansWords(record.intervalMin)}: ${used.map(({ label }) => label.toLowerCase()).join('; ')}. ${inWindow.length} inside the onset window.`,
    added: `${formatDayClock(record.createdAt, zone)}, ${record.addedBy}, ${{ hand: 'typed by hand', file: 'from a file', archive: 'from the archive' }[record.kind]}`,
    licence: record.licenceNote,
    hashShort: record.fileSha256?.slice(0, 12) ?? null,
    cautions: [
      ...(record.nature === 'typical-year' ? ['Typical years are put together from several: they say nothing about that day, and no run uses them.'] : []),
      ...(record.nature === 'station' ? [distanceCaution(record.stationDistanceKm)].filter(Boolean) : []),
      ...(record.intervalMin > shortMeanMin && record.nature !== 'typical-year' ? [`These are ${meansWords(record.intervalMin)}: a clear gap of two minutes inside a cloudy hour is possible.`] : []),
    ],
    setAside: record.setAsideAt ? `Set aside ${formatDayClock(record.setAsideAt, zone)}: ${record.setAsideReason ?? ''}` : null,
    chosen,
    columns: ['From', 'To', ...used.map(({ label, unit }) => `${label}, ${unit}`)],
    rows: (inWindow.length > 0 ? inWindow : record.values).slice(0, rowsShown).map((value) => rowOf(value, used, zone)),
  };
}

function rowOf(value: WeatherValue, used: typeof weatherQuantities, zone: string): string[] {
  return [formatDayClock(new Date(value.startUtc), zone), formatDayClock(new Date(value.endUtc), zone), ...used.map(({ key }) => { const one = value[key]; return one === undefined ? '' : plain(one); })];
}

/** Irradiance on the axis of the window: clear-sky bound, likely clear sky, and the chosen values as steps. */
function trace(window: { readonly from: Date; readonly to: Date }, place: ViewSource['place'], series: { readonly source: string; readonly values: readonly { readonly startUtc: string; readonly endUtc: string; readonly dniWm2: number }[] } | null): WeatherView['trace'] {
  const toMs = window.to.getTime();
  const fromMs = Math.max(window.from.getTime(), toMs - longestTraceMs);
  const { air, observer } = settleSite({ place: { ...place, heightAboveGroundM: 0 }, sky: { climateClass: place.climateClass } });
  const stepMs = Math.max(300_000, Math.ceil((toMs - fromMs) / 150 / 60_000) * 60_000);
  const bound: Sample[] = [];
  const likely: Sample[] = [];
  for (let atMs = fromMs; atMs <= toMs; atMs += stepMs) {
    const sun = solarPosition(atMs, observer);
    const clear = clearSkyAt(sun.apparentElevationDeg, extraterrestrialWm2(sun.distanceAu, air.solarConstantWm2), place.elevationM, air);
    const atUtc = new Date(atMs).toISOString();
    bound.push({ atUtc, wm2: clear?.boundWm2 ?? 0 });
    if (clear) likely.push({ atUtc, wm2: clear.likelyWm2 });
  }
  const measured = (series ? withinSpan(series.values, fromMs, toMs) : []).map((value) => ({ startUtc: later(value.startUtc, fromMs), endUtc: earlier(value.endUtc, toMs), wm2: value.dniWm2 }));
  return { fromUtc: new Date(fromMs).toISOString(), toUtc: new Date(toMs).toISOString(), bound, likely, measured, measuredName: (series?.source ?? '').split(';')[0]?.slice(0, 48) ?? '' };
}

const later = (utc: string, ms: number) => new Date(Math.max(Date.parse(utc), ms)).toISOString();
const earlier = (utc: string, ms: number) => new Date(Math.min(Date.parse(utc), ms)).toISOString();
