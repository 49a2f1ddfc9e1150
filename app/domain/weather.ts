import { z } from 'zod';

/**
 * What is on record about the weather of a case. Each record is one series from one source; a value is the mean over
 * [startUtc, endUtc), however the source stamps its hours.
 */
export const weatherKinds = ['hand', 'file', 'archive'] as const;
export type WeatherKind = (typeof weatherKinds)[number];

/** What kind of numbers these are, which decides what they can prove. */
export const weatherNatures = ['station', 'archive', 'typical-year'] as const;
export type WeatherNature = (typeof weatherNatures)[number];
export const weatherNatureLabels: Record<WeatherNature, string> = {
  station: 'Measured by instruments at a station',
  archive: 'Model or satellite archive of that very time',
  'typical-year': 'Typical year: not that day',
};

export interface WeatherQuantity {
  readonly key: 'directWm2' | 'globalWm2' | 'sunshineMin' | 'cloudOktas' | 'temperatureC' | 'pressureHpa' | 'windMs';
  readonly label: string;
  readonly unit: string;
  readonly min: number;
  readonly max: number;
}

/** Ranges that a thermometer or pyrheliometer on the ground can show; beyond them a number is a fault of the file. */
export const weatherQuantities: readonly WeatherQuantity[] = [
  { key: 'directWm2', label: 'Direct, square to the sun', unit: 'W/m²', min: 0, max: 1_400 },
  { key: 'globalWm2', label: 'Global, on level ground', unit: 'W/m²', min: 0, max: 1_800 },
  { key: 'sunshineMin', label: 'Sunshine', unit: 'min', min: 0, max: 60 },
  { key: 'cloudOktas', label: 'Cloud', unit: 'oktas', min: 0, max: 9 },
  { key: 'temperatureC', label: 'Air temperature', unit: '°C', min: -90, max: 60 },
  { key: 'pressureHpa', label: 'Air pressure at the station', unit: 'hPa', min: 300, max: 1_100 },
  { key: 'windMs', label: 'Wind', unit: 'm/s', min: 0, max: 110 },
];
export type WeatherKey = WeatherQuantity['key'];

export interface WeatherValue extends Partial<Record<WeatherKey, number>> {
  readonly startUtc: string;
  readonly endUtc: string;
}

export const mostWeatherValues = 3_000;
/** Values further than this from the onset window stay in the file. */
export const keptAroundWindowMs = 24 * 3_600_000;
/** Longer means hide gaps between clouds: they are called so, and refute only under a dark sky. [min] */
export const shortMeanMin = 15;

const optionalNumber = (min: number, max: number, unit: string) =>
  z
    .string()
    .trim()
    .transform((text) => (text === '' ? null : Number(text.replace('−', '-').replace(',', '.'))))
    .refine((value) => value === null || (Number.isFinite(value) && value >= min && value <= max), `A number from ${min} to ${max}${unit}, or nothing.`);

/** Who the values come from; part of every form that adds a record. */
export const weatherSourceFields = {
  sourceName: z.string().trim().min(1, 'Name the station, service or person that the values come from.').max(160, 'Keep it under 160 characters.'),
  station: z.string().trim().max(160, 'Keep it under 160 characters.').default(''),
  stationDistanceKm: optionalNumber(0, 20_000, ' km'),
  stationBearingDeg: optionalNumber(0, 360, '°'),
  licenceNote: z.string().trim().max(300, 'Keep it under 300 characters.').default(''),
  nature: z.enum(weatherNatures, 'Say what kind of numbers these are.'),
} as const;

export const weatherSourceSchema = z.object(weatherSourceFields);
export type WeatherSource = z.infer<typeof weatherSourceSchema>;

/** One stored series, as decisions need to know it. */
export interface WeatherSeries {
  readonly number: number;
  readonly kind: WeatherKind;
  readonly nature: WeatherNature;
  readonly sourceName: string;
  readonly station: string;
  readonly stationDistanceKm: number | null;
  readonly intervalMin: number;
  readonly values: readonly WeatherValue[];
}

/** Commonest length of the values. [min] */
export function intervalOf(values: readonly Pick<WeatherValue, 'startUtc' | 'endUtc'>[]): number {
  const counts = new Map<number, number>();
  for (const { startUtc, endUtc } of values) {
    const minutes = Math.round((Date.parse(endUtc) - Date.parse(startUtc)) / 60_000);
    counts.set(minutes, (counts.get(minutes) ?? 0) + 1);
  }
  return [...counts.entries()].sort((a, b) => b[1] - a[1] || a[0] - b[0])[0]?.[0] ?? 60;
}

export const withinSpan = <Value extends Pick<WeatherValue, 'startUtc' | 'endUtc'>>(values: readonly Value[], fromMs: number, toMs: number): Value[] =>
  values.filter((value) => Date.parse(value.endUtc) > fromMs && Date.parse(value.startUtc) < toMs);

/** "hour means", "10-minute means", "1-minute values". */
export function meansWords(intervalMin: number): string {
  if (intervalMin === 60) return 'hour means';
  return intervalMin === 1 ? '1-minute means' : `${intervalMin}-minute means`;
}

/** Further than this a station says little about a gap between clouds. Common practice. [km] */
export const farStationKm = 30;

/** What the distance of a station takes from its word; empty for one close by. */
export function distanceCaution(distanceKm: number | null): string {
  if (distanceKm === null) return 'How far the station is away is not stated, so nobody can say what it proves here.';
  if (distanceKm >= farStationKm) return `A station ${Math.round(distanceKm)} km off cannot prove a clear gap, or a closed cloud, at this place.`;
  return distanceKm >= 10 ? `The station is ${Math.round(distanceKm)} km off: single clouds differ.` : '';
}
