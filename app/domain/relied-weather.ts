import type { SkyInput } from '#app/physics/model/input.ts';
import { intervalOf, withinSpan } from './weather.ts';
import type { WeatherNature, WeatherSeries, WeatherValue } from './weather.ts';

type DniSeries = NonNullable<SkyInput['dniSeries']>;

/** A value of the record, with the direct irradiance that the run went by in that time. */
export interface ReliedValue extends WeatherValue {
  /** Null where the run did not go by this value. [W/m²] */
  readonly usedWm2: number | null;
}

/** The weather that a run went by: the series frozen with its input, and the record of the case that it came from. */
export interface ReliedWeather {
  /** Of the record in its case; null for values kept with the measurements. */
  readonly number: number | null;
  readonly nature: WeatherNature | null;
  readonly sourceName: string;
  readonly station: string;
  readonly distanceKm: number | null;
  /** From the case to the station, true. It stays in the house: with the distance it gives the place. */
  readonly bearingDeg: number | null;
  readonly basis: DniSeries['basis'];
  readonly intervalMin: number;
  /** Set aside since the run was made. */
  readonly setAside: boolean;
  readonly values: readonly ReliedValue[];
}

export interface StoredWeather extends WeatherSeries {
  readonly stationBearingDeg: number | null;
  readonly setAsideAt: Date | null;
}

const startMs = ({ startUtc }: { readonly startUtc: string }): number => Date.parse(startUtc);

/** Whether a record gave a series: it has each of its times, and the same direct irradiance wherever it has any. */
function gave(record: StoredWeather, series: DniSeries): boolean {
  const known = new Map(record.values.map((value) => [startMs(value), value]));
  return series.values.every((value) => {
    const direct = known.get(startMs(value))?.directWm2;
    return known.has(startMs(value)) && (series.basis === 'derived' || direct === value.dniWm2);
  });
}

/** Rather the record whose name the series bears, then one that stands, then the later one. */
function preferred(series: DniSeries) {
  const named = (record: StoredWeather) => Number(series.source.startsWith(reliedSource(record)));
  return (a: StoredWeather, b: StoredWeather): number => named(b) - named(a) || Number(a.setAsideAt !== null) - Number(b.setAsideAt !== null) || b.number - a.number;
}

/** @param records All of the case, those set aside among them. */
export function reliedWeather(series: DniSeries | undefined, records: readonly StoredWeather[]): ReliedWeather | null {
  if (!series || series.values.length === 0) return null;
  const used = new Map(series.values.map((value) => [startMs(value), value.dniWm2]));
  const [found] = records.filter((record) => gave(record, series)).toSorted(preferred(series));
  if (!found) {
    const values = series.values.map(({ startUtc, endUtc, dniWm2 }): ReliedValue => ({ startUtc, endUtc, usedWm2: dniWm2 }));
    return { number: null, nature: null, sourceName: series.source, station: '', distanceKm: series.stationDistanceKm ?? null, bearingDeg: null, basis: series.basis, intervalMin: intervalOf(values), setAside: false, values };
  }
  const ends = series.values.map((value) => Date.parse(value.endUtc));
  const rows = withinSpan(found.values, Math.min(...used.keys()), Math.max(...ends));
  return {
    number: found.number,
    nature: found.nature,
    sourceName: found.sourceName,
    station: found.station,
    distanceKm: found.stationDistanceKm,
    bearingDeg: found.stationBearingDeg,
    basis: series.basis,
    intervalMin: found.intervalMin,
    setAside: found.setAsideAt !== null,
    values: rows.map((value) => ({ ...value, usedWm2: used.get(startMs(value)) ?? null })),
  };
}

export const reliedSource = ({ sourceName, station }: Pick<ReliedWeather, 'sourceName' | 'station'>): string => [sourceName, station].filter(Boolean).join(', ');
