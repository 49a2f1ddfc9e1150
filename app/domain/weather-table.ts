import { z } from 'zod';
import { delimiters, guessDelimiter, readDelimited } from './delimited-text.ts';
import { fromLocalInput } from './local-time.ts';
import { fileNumber } from './weather-file.ts';
import type { FileProblem, FileReading } from './weather-file.ts';
import { intervalOf, weatherQuantities } from './weather.ts';
import type { WeatherKey, WeatherValue } from './weather.ts';

/** How the columns of a station's table are to be read: said by the person, guessed from the head at first. */
export const clockKinds = ['utc', 'place', 'fixed', 'written'] as const;
export const clockKindLabels: Record<(typeof clockKinds)[number], string> = {
  utc: 'UTC',
  place: 'Clock of the place, with summer time',
  fixed: 'A fixed offset from UTC, such as local standard time',
  written: 'The offset is written with each time',
};
export const dateOrders = ['ymd', 'dmy', 'mdy', 'unix'] as const;
export const dateOrderLabels: Record<(typeof dateOrders)[number], string> = { ymd: 'Year, month, day', dmy: 'Day, month, year', mdy: 'Month, day, year', unix: 'Seconds since 1970' };

interface Unit {
  readonly value: string;
  readonly label: string;
  readonly factor: number;
}
/** Units that station files come in, and what one of them is in ours; knots and miles by the international definitions. */
export const unitsOf: Readonly<Record<WeatherKey, readonly Unit[]>> = {
  directWm2: [{ value: 'w', label: 'W/m²', factor: 1 }, { value: 'kw', label: 'kW/m²', factor: 1_000 }],
  globalWm2: [{ value: 'w', label: 'W/m²', factor: 1 }, { value: 'kw', label: 'kW/m²', factor: 1_000 }],
  sunshineMin: [{ value: 'min', label: 'minutes', factor: 1 }, { value: 'h', label: 'hours', factor: 60 }, { value: 's', label: 'seconds', factor: 1 / 60 }],
  cloudOktas: [{ value: 'oktas', label: 'oktas', factor: 1 }, { value: 'tenths', label: 'tenths', factor: 0.8 }, { value: 'percent', label: '%', factor: 0.08 }],
  temperatureC: [{ value: 'c', label: '°C', factor: 1 }],
  pressureHpa: [{ value: 'hpa', label: 'hPa', factor: 1 }, { value: 'kpa', label: 'kPa', factor: 10 }, { value: 'pa', label: 'Pa', factor: 0.01 }],
  windMs: [{ value: 'ms', label: 'm/s', factor: 1 }, { value: 'kmh', label: 'km/h', factor: 1 / 3.6 }, { value: 'kn', label: 'knots', factor: 1_852 / 3_600 }],
};

const column = z.string().regex(/^\d{0,3}$/u, 'Choose a column.').default('');
export const tableMappingSchema = z.object({
  delimiter: z.enum(delimiters).default(','),
  headLine: z.coerce.number('Write the number of a line.').int('Write the number of a line.').min(0).max(500).default(1),
  dateColumn: z.string('Choose the column of the date.').regex(/^\d{1,3}$/u, 'Choose the column that holds the date, or date and time.'),
  clockColumn: column,
  dateOrder: z.enum(dateOrders).default('ymd'),
  clock: z.enum(clockKinds, 'Say which clock the times are in.'),
  offsetHours: z.coerce.number('Write hours, such as -7 or 5.5.').min(-14, 'From -14 to 14.').max(14, 'From -14 to 14.').default(0),
  stamp: z.enum(['start', 'end'], 'Say whether a time is the start or the end of its interval.'),
  intervalMin: z.union([z.literal('').transform(() => null), z.coerce.number('Write minutes.').int('Write whole minutes.').min(1, 'At least one minute.').max(1_440, 'At most a day.')]).default(null),
  missing: z.string().max(120).default('-999 -9999 -9999.9 NaN NA M'),
});
export type TableMapping = z.infer<typeof tableMappingSchema> & { readonly columns: Readonly<Partial<Record<WeatherKey, { readonly at: number; readonly unit: string }>>> };

/** Reads the mapping of a form; the quantities stand in fields named after them. */
export function readTableMapping(typed: Readonly<Record<string, string>>): { readonly ok: true; readonly mapping: TableMapping } | { readonly ok: false; readonly fieldErrors: Record<string, string[]> } {
  const parsed = tableMappingSchema.safeParse({ ...typed, delimiter: typed['delimiter'] === 'tab' ? '\t' : typed['delimiter'] });
  if (!parsed.success) {
    const fieldErrors: Record<string, string[]> = {};
    for (const issue of parsed.error.issues) (fieldErrors[issue.path.join('.')] ??= []).push(issue.message);
    return { ok: false, fieldErrors };
  }
  const columns: Partial<Record<WeatherKey, { at: number; unit: string }>> = {};
  for (const { key } of weatherQuantities) if (/^\d{1,3}$/u.test(typed[key] ?? '')) columns[key] = { at: Number(typed[key]), unit: typed[`${key}.unit`] ?? '' };
  if (Object.keys(columns).length === 0) return { ok: false, fieldErrors: { directWm2: ['Choose the column of one quantity at least.'] } };
  return { ok: true, mapping: { ...parsed.data, columns } };
}

const nameHints: Readonly<Record<WeatherKey, RegExp>> = {
  directWm2: /^(dni|beam|direct)|direct.?normal|irradiance_?direct/iu,
  globalWm2: /^(ghi|global|shortwave)|global.?hor/iu,
  sunshineMin: /sunshine/iu,
  cloudOktas: /cloud.?(cover|amount|okta)|oktas?/iu,
  temperatureC: /^(temp|t_?air|air.?temp)/iu,
  pressureHpa: /press/iu,
  windMs: /wind.?(speed|sp)|^ws$/iu,
};

/** Names of the columns of a table, and a first guess at what they hold. */
export function guessTable(text: string): { readonly names: readonly string[]; readonly guess: Readonly<Record<string, string>> } {
  const delimiter = guessDelimiter(text);
  const rows = readDelimited(text, delimiter);
  const headAt = Math.max(0, rows.slice(0, 60).findIndex((row, index) => row.length > 1 && row.some((cell) => /[a-z]/iu.test(cell)) && looksLikeValues(rows[index + 1])));
  const names = rows[headAt] ?? [];
  const columnNamed = (hint: RegExp) => names.findIndex((name) => hint.test(name));
  const guess: Record<string, string> = { delimiter: delimiter === '\t' ? 'tab' : delimiter, headLine: String(headAt + 1), dateColumn: String(Math.max(0, columnNamed(/date|time|stamp/iu))) };
  const first = rows[headAt + 1]?.[Number(guess['dateColumn'])] ?? '';
  if (/[+-]\d{2}:?\d{2}$|Z$/u.test(first)) guess['clock'] = 'written';
  for (const { key } of weatherQuantities) {
    const at = columnNamed(nameHints[key]);
    if (at >= 0) guess[key] = String(at);
  }
  return { names: names.map((name, index) => name || `column ${index + 1}`), guess };
}

const looksLikeValues = (row: readonly string[] | undefined): boolean => row !== undefined && row.length > 1 && row.filter((cell) => /^[-+]?\d/u.test(cell)).length >= row.length / 2;

/** Date and time of a row in UTC, or what is wrong with it. */
function instantOf(dateText: string, clockText: string, mapping: TableMapping, zone: string): number | string {
  if (mapping.dateOrder === 'unix') return /^\d{9,11}$/u.test(dateText) ? Number(dateText) * 1_000 : 'the time is no number of seconds.';
  const whole = `${dateText} ${clockText}`.trim();
  const found = /^(\d{1,4})[-./](\d{1,2})[-./](\d{1,4})[T ,]+(\d{1,2}):?(\d{2})(?::(\d{2}))?(?:\.\d+)?\s*(Z|[+-]\d{2}:?\d{2})?$/u.exec(whole);
  if (!found) return `“${whole.slice(0, 40)}” is no date and time in the order ${dateOrderLabels[mapping.dateOrder].toLowerCase()}.`;
  const [, a = '', b = '', c = '', hour = '', minute = '', second = '0', offset = ''] = found;
  const [year, month, day] = (mapping.dateOrder === 'ymd' ? [a, b, c] : mapping.dateOrder === 'dmy' ? [c, b, a] : [c, a, b]).map(Number);
  const wallMs = Date.UTC(year ?? 0, (month ?? 0) - 1, day, Number(hour), Number(minute), Number(second));
  const wall = new Date(wallMs);
  if (wall.getUTCMonth() + 1 !== month || (wall.getUTCDate() !== day && hour !== '24') || (year ?? 0) < 1900) return `“${whole.slice(0, 40)}” is no day of the calendar.`;
  if (mapping.clock === 'utc') return wallMs;
  if (mapping.clock === 'fixed') return wallMs - mapping.offsetHours * 3_600_000;
  if (mapping.clock === 'written') {
    if (offset === '') return 'no offset from UTC is written with the time.';
    const sign = offset.startsWith('-') ? -1 : 1;
    return offset === 'Z' ? wallMs : wallMs - sign * (Number(offset.slice(1, 3)) * 60 + Number(offset.slice(-2))) * 60_000;
  }
  const reading = fromLocalInput(wall.toISOString().slice(0, 19), zone);
  if (reading.kind === 'instant') return reading.instant.getTime();
  return reading.kind === 'fold' ? 'the clock showed this time twice that night: use UTC or a fixed offset.' : 'the clock skipped this time: use UTC or a fixed offset.';
}

/** Reads a table by its mapping; rows that cannot be read are named by their line and left out. */
export function readWeatherTable(text: string, mapping: TableMapping, zone: string): FileReading {
  const rows = readDelimited(text, mapping.delimiter);
  const problems: FileProblem[] = [];
  const stamps: { line: number; atMs: number; read: Partial<Record<WeatherKey, number>> }[] = [];
  for (const [index, row] of rows.entries()) {
    if (index < mapping.headLine || row.every((cell) => cell === '')) continue;
    const atMs = instantOf(row[Number(mapping.dateColumn)] ?? '', mapping.clockColumn === '' ? '' : (row[Number(mapping.clockColumn)] ?? ''), mapping, zone);
    const read = typeof atMs === 'string' ? atMs : readRow(row, mapping);
    if (typeof read === 'string' || typeof atMs === 'string') problems.push({ line: index + 1, sentence: String(read) });
    else stamps.push({ line: index + 1, atMs, read });
  }
  const lengthMs = (mapping.intervalMin ?? gapMin(stamps.map((one) => one.atMs))) * 60_000;
  const values = stamps.map(({ atMs, read }): WeatherValue => {
    const startMs = mapping.stamp === 'start' ? atMs : atMs - lengthMs;
    return { startUtc: new Date(startMs).toISOString(), endUtc: new Date(startMs + lengthMs).toISOString(), ...read };
  });
  return { values, problems, station: null, cautions: [] };
}

function readRow(row: readonly string[], mapping: TableMapping): Partial<Record<WeatherKey, number>> | string {
  const missing = mapping.missing.split(/\s+/u).filter(Boolean);
  const read: Partial<Record<WeatherKey, number>> = {};
  for (const { key, label } of weatherQuantities) {
    const chosen = mapping.columns[key];
    const cell = chosen ? (row[chosen.at] ?? '').replace(/^'/u, '') : '';
    if (!chosen || cell === '' || missing.includes(cell)) continue;
    const raw = Number(cell.replace('−', '-').replace(/^(-?\d+),(\d+)$/u, '$1.$2'));
    if (Number.isNaN(raw)) return `${label.toLowerCase()} is “${cell.slice(0, 30)}”, no number.`;
    const factor = unitsOf[key].find((unit) => unit.value === chosen.unit)?.factor ?? 1;
    const value = fileNumber(key, Math.round(raw * factor * 1000) / 1000, () => false);
    if (typeof value === 'string') return value;
    if (value !== null) read[key] = value;
  }
  return Object.keys(read).length === 0 ? 'none of the chosen columns holds a value.' : read;
}

/** Commonest gap between rows. [min] */
function gapMin(stampsMs: readonly number[]): number {
  const gaps = stampsMs.slice(1).flatMap((at, index) => (at > (stampsMs[index] ?? at) ? [{ startUtc: new Date(stampsMs[index] ?? 0).toISOString(), endUtc: new Date(at).toISOString() }] : []));
  return intervalOf(gaps) || 60;
}
