import { readDelimited } from './delimited-text.ts';
import { weatherQuantities } from './weather.ts';
import type { WeatherKey, WeatherValue } from './weather.ts';

/** A line of a file that could not be taken, with what is wrong with it. */
export interface FileProblem {
  readonly line: number;
  readonly sentence: string;
}

/** Where a file says that it was measured. Longitude is east positive here, whatever the file prints. */
export interface FileStation {
  readonly name: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

export interface FileReading {
  readonly values: readonly WeatherValue[];
  readonly problems: readonly FileProblem[];
  readonly station: FileStation | null;
  /** What has to be known about this very file. */
  readonly cautions: readonly string[];
}

export const fileFormats = ['epw', 'surfrad', 'table'] as const;
export type FileFormat = (typeof fileFormats)[number];
export const fileFormatLabels: Record<FileFormat, string> = {
  epw: 'EnergyPlus weather file (EPW)',
  surfrad: 'Daily file of the NOAA surface radiation network',
  table: 'Table with columns (CSV)',
};

/** What kind of file a text is, by its first lines. */
export function fileFormatOf(text: string): FileFormat {
  const [first = '', second = '', third = ''] = text.split(/\r?\n/u, 3);
  if (/^LOCATION,/iu.test(first)) return 'epw';
  if (/^\s*-?\d+\.\d+\s+-?\d+\.\d+\s+\d+\s*m\b/u.test(second) && /^\s*\d{4}\s+\d{1,3}\s/u.test(third)) return 'surfrad';
  return 'table';
}

/** A number of a file within what an instrument can show; a missing mark is null, anything else a sentence. */
export function fileNumber(key: WeatherKey, value: number, missing: (value: number) => boolean): number | null | string {
  const quantity = weatherQuantities.find((one) => one.key === key);
  if (!quantity || missing(value)) return null;
  // Instruments drift a little below zero at night; that is no light, not a fault.
  if ((key === 'directWm2' || key === 'globalWm2') && value < 0 && value > -20) return 0;
  if (value < quantity.min || value > quantity.max) return `${quantity.label} is ${value} ${quantity.unit}; it lies between ${quantity.min} and ${quantity.max}.`;
  return value;
}

interface Column {
  readonly key: WeatherKey;
  readonly at: number;
  readonly factor?: number;
  readonly missing: (value: number) => boolean;
}

function readColumns(cells: readonly string[], columns: readonly Column[]): Partial<Record<WeatherKey, number>> | string {
  const read: Partial<Record<WeatherKey, number>> = {};
  for (const { key, at, factor = 1, missing } of columns) {
    const raw = Number(cells[at]);
    if (cells[at] === undefined || cells[at]?.trim() === '' || Number.isNaN(raw)) return `column ${at + 1} is no number.`;
    const value = fileNumber(key, missing(raw) ? Number.NaN : Math.round(raw * factor * 1000) / 1000, Number.isNaN);
    if (typeof value === 'string') return value;
    if (value !== null) read[key] = value;
  }
  return read;
}

const atLeast = (limit: number) => (value: number) => value >= limit;

/** Fields of the EnergyPlus weather format, with its marks for missing values: EnergyPlus Auxiliary Programs, "EPW data dictionary". */
const epwColumns: readonly Column[] = [
  { key: 'temperatureC', at: 6, missing: atLeast(99.9) },
  { key: 'pressureHpa', at: 9, factor: 0.01, missing: atLeast(999_999) },
  { key: 'globalWm2', at: 13, missing: atLeast(9_999) },
  { key: 'directWm2', at: 14, missing: atLeast(9_999) },
  { key: 'windMs', at: 21, missing: atLeast(999) },
  { key: 'cloudOktas', at: 22, factor: 0.8, missing: atLeast(99) },
];
const epwHeadLines = 8;
const hourMs = 3_600_000;

/**
 * An EnergyPlus weather file. Hours are 1 to 24 in local standard time, and the radiation of an hour is that of the 60
 * minutes before its stamp.
 *
 * @param year Put in place of the file's own year, for a typical year shown beside a real day.
 */
export function readEpw(text: string, year?: number): FileReading {
  const lines = text.split(/\r?\n/u);
  const head = readDelimited(lines[0] ?? '', ',')[0] ?? [];
  const [latitudeDeg, longitudeDeg, zoneHours] = [Number(head[6]), Number(head[7]), Number(head[8])];
  const values: WeatherValue[] = [];
  const problems: FileProblem[] = [];
  if (![latitudeDeg, longitudeDeg, zoneHours].every(Number.isFinite)) return { values, problems: [{ line: 1, sentence: 'The first line names no position and time zone, so nobody can say when these hours were.' }], station: null, cautions: [] };
  for (const [index, line] of lines.entries()) {
    if (index < epwHeadLines || line.trim() === '') continue;
    const cells = line.split(',');
    const [fileYear = Number.NaN, month = Number.NaN, day = Number.NaN, hour = Number.NaN] = cells.slice(0, 4).map(Number);
    const endMs = Date.UTC(year ?? fileYear, month - 1, day, hour) - zoneHours * hourMs;
    if (!Number.isFinite(endMs) || hour < 1 || hour > 24) {
      problems.push({ line: index + 1, sentence: 'year, month, day or hour cannot be read.' });
      continue;
    }
    const read = readColumns(cells, epwColumns);
    if (typeof read === 'string') problems.push({ line: index + 1, sentence: read });
    else values.push({ startUtc: new Date(endMs - hourMs).toISOString(), endUtc: new Date(endMs).toISOString(), ...read });
  }
  return { values, problems, station: { name: [head[1], head[3]].filter((part) => part && part !== '-' && part !== 'unknown').join(', ') || 'position in the file', latitudeDeg, longitudeDeg }, cautions: epwCautions(lines.slice(0, epwHeadLines).join('\n'), values) };
}

function epwCautions(head: string, values: readonly WeatherValue[]): string[] {
  const offset = /Irradiance Time Offset \(h\):\s*(-?[\d.]+)/u.exec(head)?.[1];
  const years = new Set(values.map((value) => value.endUtc.slice(0, 4)));
  return [
    ...(offset ? [`The file says that its irradiance is that of one instant, ${Math.abs(Math.round(Number(offset) * 60))} minutes ${Number(offset) < 0 ? 'before' : 'after'} the stamp, not the mean of the hour: read it with that error.`] : []),
    ...(years.size > 1 ? ['The months come from different years: this is a typical year, not the weather of any day.'] : []),
  ];
}

/** Fields of the daily files of the surface radiation network, counted from 0; -9999.9 is missing. */
const surfradColumns: readonly (Column & { readonly flag: number })[] = [
  { key: 'globalWm2', at: 8, flag: 9, missing: (value) => value <= -9_999 },
  { key: 'directWm2', at: 12, flag: 13, missing: (value) => value <= -9_999 },
  { key: 'temperatureC', at: 38, flag: 39, missing: (value) => value <= -9_999 },
  { key: 'windMs', at: 42, flag: 43, missing: (value) => value <= -9_999 },
  { key: 'pressureHpa', at: 46, flag: 47, missing: (value) => value <= -9_999 },
];

/** A daily file of the NOAA surface radiation network: one line a minute, UTC; a value whose flag is not 0 is left out. */
export function readSurfrad(text: string): FileReading {
  const lines = text.split(/\r?\n/u);
  const place = (lines[1] ?? '').trim().split(/\s+/u).map(Number);
  const values: WeatherValue[] = [];
  const problems: FileProblem[] = [];
  let before: number | null = null;
  for (const [index, line] of lines.entries()) {
    if (index < 2 || line.trim() === '') continue;
    const cells = line.trim().split(/\s+/u);
    const [year = Number.NaN, , month = Number.NaN, day = Number.NaN, hour = Number.NaN, minute = Number.NaN] = cells.map(Number);
    const startMs = Date.UTC(year, month - 1, day, hour, minute);
    if (!Number.isFinite(startMs)) {
      problems.push({ line: index + 1, sentence: 'the time cannot be read.' });
      continue;
    }
    const lengthMs: number = before !== null && startMs - before === 180_000 ? 180_000 : 60_000;
    before = startMs;
    const read = readColumns(cells, surfradColumns.filter((column) => cells[column.flag] === '0'));
    if (typeof read === 'string') problems.push({ line: index + 1, sentence: read });
    else values.push({ startUtc: new Date(startMs).toISOString(), endUtc: new Date(startMs + lengthMs).toISOString(), ...read });
  }
  // The file prints longitudes west positive.
  const station = Number.isFinite(place[0]) && Number.isFinite(place[1]) ? { name: (lines[0] ?? '').trim(), latitudeDeg: place[0] ?? 0, longitudeDeg: -(place[1] ?? 0) } : null;
  return { values, problems, station, cautions: [] };
}
