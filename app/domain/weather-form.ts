import { z } from 'zod';
import { fromLocalInput } from './local-time.ts';
import { weatherQuantities, weatherSourceSchema } from './weather.ts';
import type { WeatherSource, WeatherValue } from './weather.ts';

type Typed = Readonly<Record<string, string>>;
export type SourceReading = { readonly ok: true; readonly source: WeatherSource } | { readonly ok: false; readonly fieldErrors: Record<string, string[]> };

export function readWeatherSource(typed: Typed): SourceReading {
  const parsed = weatherSourceSchema.safeParse({ ...typed, stationDistanceKm: typed['stationDistanceKm'] ?? '', stationBearingDeg: typed['stationBearingDeg'] ?? '' });
  if (parsed.success) return { ok: true, source: parsed.data };
  const fieldErrors: Record<string, string[]> = {};
  for (const issue of parsed.error.issues) (fieldErrors[issue.path.join('.')] ??= []).push(issue.message);
  return { ok: false, fieldErrors };
}

/** Rows of the form for values typed by hand. */
export const handRows = 6;
export const handName = (row: number, what: string): string => `hand.${row}.${what}`;

export type HandReading = { readonly ok: true; readonly values: readonly WeatherValue[] } | { readonly ok: false; readonly fieldErrors: Record<string, string[]> };

/** Values typed by hand: a local day, and rows of start, end and numbers; a row without start and end is left out. */
export function readHandValues(typed: Typed, zone: string): HandReading {
  const fieldErrors: Record<string, string[]> = {};
  const values: WeatherValue[] = [];
  const day = typed['handDay'] ?? '';
  if (!z.iso.date().safeParse(day).success) fieldErrors['handDay'] = ['Give the day of these values.'];
  for (let row = 0; row < handRows; row += 1) {
    const text = (what: string) => (typed[handName(row, what)] ?? '').trim();
    if (text('start') === '' && text('end') === '' && weatherQuantities.every(({ key }) => text(key) === '')) continue;
    const [from, to] = (['start', 'end'] as const).map((what) => {
      const reading = fromLocalInput(`${day}T${text(what)}`, zone);
      if (reading.kind === 'instant') return reading.instant.getTime();
      if (!('handDay' in fieldErrors)) fieldErrors[handName(row, what)] = [reading.kind === 'unreadable' ? 'A clock time, such as 10:30.' : 'The clock was changed in that hour; import a file with UTC times.'];
      return Number.NaN;
    });
    if (from !== undefined && to !== undefined && to <= from) fieldErrors[handName(row, 'end')] = ['The end lies after the start.'];
    const read: Partial<Record<string, number>> = {};
    for (const { key, label, unit, min, max } of weatherQuantities) {
      if (text(key) === '') continue;
      const value = Number(text(key).replace('−', '-').replace(',', '.'));
      if (!(value >= min && value <= max)) fieldErrors[handName(row, key)] = [`${label}: ${min} to ${max} ${unit}.`];
      else read[key] = value;
    }
    if (Object.keys(read).length === 0 && !Object.keys(fieldErrors).some((name) => name.startsWith(`hand.${row}.`))) fieldErrors[handName(row, 'directWm2')] = ['Give one number at least.'];
    if (Object.keys(fieldErrors).length === 0 && from !== undefined && to !== undefined) values.push({ startUtc: new Date(from).toISOString(), endUtc: new Date(to).toISOString(), ...read });
  }
  if (values.length === 0 && Object.keys(fieldErrors).length === 0) fieldErrors[handName(0, 'start')] = ['Fill one row at least.'];
  return Object.keys(fieldErrors).length > 0 ? { ok: false, fieldErrors } : { ok: true, values };
}
