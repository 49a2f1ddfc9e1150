import type { SkyInput } from '#app/physics/model/input.ts';
import { erbsSplit } from '#app/physics/sky/erbs.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { distanceCaution, keptAroundWindowMs, meansWords, shortMeanMin, withinSpan } from './weather.ts';
import type { WeatherSeries } from './weather.ts';

/** Which record a run goes by, and why. */
export interface WeatherChoice {
  readonly number: number;
  readonly series: NonNullable<SkyInput['dniSeries']>;
  /** "measured direct irradiance, 10-minute means" */
  readonly how: string;
  readonly caution: string;
}

export interface WeatherPlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
}
export interface WeatherWindow {
  readonly startUtc: string;
  readonly endUtc: string;
}

/** Standard atmosphere at sea level, ISO 2533:1975; the split uses the airless elevation, so it hardly matters. */
const standardAir = { pressureHpa: 1_013.25, temperatureC: 15 } as const;
/** Zenith angles beyond which the direct irradiance of an archive is unreliable. [°] elevation */
const lowestArchiveElevationDeg = 3;

type Rank = 1 | 2 | 3;
interface Candidate {
  readonly rank: Rank;
  readonly record: WeatherSeries;
  readonly basis: NonNullable<SkyInput['dniSeries']>['basis'];
  readonly values: NonNullable<SkyInput['dniSeries']>['values'];
  readonly how: string;
}

const sunAtMiddle = (value: { readonly startUtc: string; readonly endUtc: string }, place: WeatherPlace) => solarPosition((Date.parse(value.startUtc) + Date.parse(value.endUtc)) / 2, { ...place, ...standardAir });

function directOf(record: WeatherSeries, span: readonly [number, number], place: WeatherPlace): Candidate['values'] {
  return withinSpan(record.values, ...span).flatMap((value) => {
    if (value.directWm2 === undefined) return [];
    if (record.nature === 'archive' && value.directWm2 > 0 && sunAtMiddle(value, place).airlessElevationDeg < lowestArchiveElevationDeg) return [];
    return [{ startUtc: value.startUtc, endUtc: value.endUtc, dniWm2: value.directWm2 }];
  });
}

function derivedOf(record: WeatherSeries, span: readonly [number, number], place: WeatherPlace): Candidate['values'] {
  return withinSpan(record.values, ...span).flatMap((value) => {
    if (value.globalWm2 === undefined) return [];
    const sun = sunAtMiddle(value, place);
    const split = erbsSplit(value.globalWm2, sun.airlessElevationDeg, extraterrestrialWm2(sun.distanceAu));
    return split ? [{ startUtc: value.startUtc, endUtc: value.endUtc, dniWm2: Math.round(split.dniWm2 * 10) / 10 }] : [];
  });
}

function candidatesOf(record: WeatherSeries, span: readonly [number, number], place: WeatherPlace): Candidate[] {
  if (record.nature === 'typical-year') return [];
  const means = meansWords(record.intervalMin);
  const direct = directOf(record, span, place);
  if (record.nature === 'archive') return direct.length === 0 ? [] : [{ rank: 3, record, basis: 'hourly-archive', values: direct, how: `archive, ${means}` }];
  const derived = derivedOf(record, span, place);
  // A long mean hides gaps between clouds, whoever took it; the engine then refutes by it only under a dark sky.
  const basis = record.intervalMin <= shortMeanMin ? 'measured' : 'hourly-archive';
  return [
    ...(direct.length === 0 ? [] : [{ rank: 1 as const, record, basis, values: direct, how: `measured direct irradiance, ${means}` } as const]),
    ...(derived.length === 0 ? [] : [{ rank: 2 as const, record, basis: 'derived', values: derived, how: `derived from global irradiance, ${means} (Erbs, Klein and Duffie 1982)` } as const]),
  ];
}

const minutesIn = (candidate: Candidate, fromMs: number, toMs: number) =>
  candidate.values.reduce((sum, value) => sum + Math.max(0, Math.min(toMs, Date.parse(value.endUtc)) - Math.max(fromMs, Date.parse(value.startUtc))), 0);

/**
 * The series that a run goes by: measured direct irradiance before direct derived from measured global before an
 * archive; among equals the one that covers more of the window, then the nearer, then the finer, then the later one.
 * A record without a value in the window, and a typical year, is never chosen.
 */
export function chooseWeather(records: readonly WeatherSeries[], window: WeatherWindow, place: WeatherPlace): WeatherChoice | null {
  const [fromMs, toMs] = [Date.parse(window.startUtc), Date.parse(window.endUtc)];
  const span = [fromMs - keptAroundWindowMs, toMs + keptAroundWindowMs] as const;
  const known = records.flatMap((record) => candidatesOf(record, span, place)).map((candidate) => ({ candidate, covers: minutesIn(candidate, fromMs, toMs) }));
  const distance = (record: WeatherSeries) => record.stationDistanceKm ?? Number.POSITIVE_INFINITY;
  const [best] = known
    .filter(({ covers }) => covers > 0)
    .sort((a, b) => a.candidate.rank - b.candidate.rank || b.covers - a.covers || compare(distance(a.candidate.record), distance(b.candidate.record)) || a.candidate.record.intervalMin - b.candidate.record.intervalMin || b.candidate.record.number - a.candidate.record.number);
  if (!best) return null;
  const { record, basis, values, how } = best.candidate;
  const { stationDistanceKm } = record;
  return {
    number: record.number,
    how,
    caution: [distanceCaution(stationDistanceKm), record.intervalMin > shortMeanMin ? `These are ${meansWords(record.intervalMin)}: a clear gap of two minutes inside a cloudy hour is possible.` : ''].filter(Boolean).join(' '),
    series: { basis, source: `${[record.sourceName, record.station].filter(Boolean).join(', ')}; ${how}`.slice(0, 400), values, ...(stationDistanceKm === null ? {} : { stationDistanceKm }) },
  };
}

/** Infinite distances are equal, not a NaN. */
const compare = (a: number, b: number) => (a === b ? 0 : a < b ? -1 : 1);
