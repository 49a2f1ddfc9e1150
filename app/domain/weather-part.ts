import { formatClock, formatDay, formatDayClock } from './local-time.ts';
import type { ReliedValue, ReliedWeather } from './relied-weather.ts';
import { distanceCaution, meansWords, shortMeanMin, weatherNatureLabels, weatherQuantities, withinSpan } from './weather.ts';

/** The weather of a run in words and rows, as a report, a released page and a file say it. */
export interface WeatherPart extends Pick<ReliedWeather, 'number' | 'nature' | 'distanceKm' | 'bearingDeg' | 'basis' | 'intervalMin' | 'setAside' | 'values'> {
  /** Source and station as this reader may know them. */
  readonly source: string;
}

const basisWords = {
  measured: 'of measured direct irradiance',
  derived: 'of direct irradiance derived from measured global irradiance (Erbs, Klein and Duffie 1982)',
  'hourly-archive': 'of direct irradiance, too long to refute the sun unless the sky was dark',
} as const;

type Lead = Pick<WeatherPart, 'number' | 'distanceKm' | 'bearingDeg'>;

/** The first sentence, before and after the name of the source. */
export function weatherLead({ number, distanceKm, bearingDeg }: Lead): { readonly before: string; readonly after: string } {
  const distance = distanceKm === null ? 'distance not stated' : `${Number(distanceKm.toFixed(1))} km off${bearingDeg === null ? '' : ` at ${Math.round(bearingDeg)}°`}`;
  return { before: number === null ? 'The run goes by values kept with the measurements: ' : `The run goes by weather record ${number}: `, after: `, ${distance}.` };
}

export function weatherSentences(weather: WeatherPart): string[] {
  const { before, after } = weatherLead(weather);
  return [`${before}${weather.source}${after}`, ...weatherLimits(weather)];
}

/** What the record holds, and what it cannot show; one sentence each. */
export function weatherLimits({ nature, basis, distanceKm, intervalMin, setAside, values }: Omit<WeatherPart, 'source' | 'bearingDeg'>): string[] {
  const used = values.filter((value) => value.usedWm2 !== null);
  const isMean = intervalMin > shortMeanMin;
  return [
    `${nature ? `${weatherNatureLabels[nature]}; ` : ''}${used.length} ${used.length === 1 ? 'value' : 'values'}, ${meansWords(intervalMin)} ${basisWords[basis]}.`,
    ...(setAside ? ['The record has been set aside since the run was made.'] : []),
    ...(nature === 'archive' ? [] : [distanceCaution(distanceKm)].filter(Boolean)),
    ...(isMean ? [`These are ${meansWords(intervalMin)}, and marked so: a clear gap of two minutes inside a cloudy hour is possible.`] : []),
  ];
}

export const noWeatherWords = 'No weather record was used: direct irradiance is that of the clear sky of the air class, which can neither show nor refute that the sun shone.';

/** On the steps of the figure. */
export const stepWords = ({ basis, nature, intervalMin }: Pick<WeatherPart, 'basis' | 'nature' | 'intervalMin'>): string => `${nature === 'archive' ? 'archive' : basis === 'derived' ? 'derived' : 'measured'}, ${meansWords(intervalMin)}`;

/** Under the figure. */
export const traceName = ({ source, distanceKm, intervalMin }: Pick<WeatherPart, 'source' | 'distanceKm' | 'intervalMin'>): string => [source, distanceKm === null ? '' : `${Number(distanceKm.toFixed(1))} km`, meansWords(intervalMin)].filter(Boolean).join(', ');

export interface WeatherTable {
  readonly caption: string;
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Values that are not among the rows. */
  readonly further: number;
}

const mostRows = 36;
const plain = (value: number | null | undefined): string => (value === null || value === undefined ? '' : String(Number(value.toFixed(1))));

/** The values inside a window, or all where none is; columns that are empty are left out. */
export function weatherTable(weather: Pick<WeatherPart, 'values' | 'intervalMin'>, window: { readonly startUtc: string; readonly endUtc: string }, zone: string): WeatherTable {
  const inside = withinSpan(weather.values, Date.parse(window.startUtc), Date.parse(window.endUtc));
  const shown = (inside.length > 0 ? inside : weather.values).slice(0, mostRows);
  const [first] = shown;
  const oneDay = first !== undefined && shown.every((value) => formatDay(new Date(value.startUtc), zone) === formatDay(new Date(first.startUtc), zone));
  const at = (utc: string) => (oneDay ? formatClock(new Date(utc), zone) : formatDayClock(new Date(utc), zone));
  const columns = quantitiesOf(shown);
  return {
    caption: `Weather that the run goes by, ${meansWords(weather.intervalMin)}${oneDay ? `, ${formatDay(new Date(first.startUtc), zone)}` : ''}`,
    head: ['From', 'To', `Direct as used, ${meansWords(weather.intervalMin)}, W/m²`, ...columns.map(({ label, unit }) => `${label}, ${unit}`)],
    rows: shown.map((value) => [at(value.startUtc), at(value.endUtc), plain(value.usedWm2), ...columns.map(({ key }) => plain(value[key]))]),
    further: weather.values.length - shown.length,
  };
}

/** Quantities with a value; direct irradiance only where it is not the number that was used. */
export function quantitiesOf(values: readonly ReliedValue[]): typeof weatherQuantities {
  return weatherQuantities.filter(({ key }) => values.some((value) => value[key] !== undefined && (key !== 'directWm2' || value.directWm2 !== value.usedWm2)));
}
