import { db } from '#db/client.server.ts';
import { casePlace } from '#db/queries/case-place.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { distanceAndBearing } from '#app/domain/great-circle.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { fileFormatLabels, fileFormatOf, readEpw, readSurfrad } from '#app/domain/weather-file.ts';
import type { FileFormat, FileReading } from '#app/domain/weather-file.ts';
import { readWeatherSource } from '#app/domain/weather-form.ts';
import { guessTable, readTableMapping, readWeatherTable } from '#app/domain/weather-table.ts';
import { weatherWindow } from '#app/domain/weather-window.ts';
import { intervalOf, keptAroundWindowMs, meansWords, withinSpan } from '#app/domain/weather.ts';
import type { WeatherValue } from '#app/domain/weather.ts';
import { authorize } from '#app/services/authorize.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { addWeather } from './add-weather.server.ts';

type Typed = Readonly<Record<string, string>>;
export const mostFileCharacters = 1_500_000;

/** What a dry run of a file found; nothing is stored yet. */
export interface DryRun {
  readonly format: FileFormat;
  readonly formatWords: string;
  readonly read: number;
  readonly kept: number;
  readonly meansWords: string;
  readonly span: string;
  readonly problems: readonly { readonly line: number; readonly sentence: string }[];
  readonly problemCount: number;
  readonly cautions: readonly string[];
  readonly sample: readonly { readonly from: string; readonly to: string; readonly direct: string; readonly global: string; readonly cloud: string }[];
}
export interface FileLook {
  readonly format: FileFormat;
  readonly formatWords: string;
  /** Columns of a table, to be mapped. */
  readonly columns: readonly string[];
  readonly guess: Typed;
  readonly sourceGuess: Typed;
}

const shownProblems = 12;
const shownValues = 6;

function checkText(text: string): string {
  if (text.trim() === '') throw new DomainError('invalid-input', 'Nothing was read.', { fieldErrors: { file: ['Choose a file, or paste its lines.'] } });
  if (text.length > mostFileCharacters) throw new DomainError('invalid-input', 'Nothing was read.', { fieldErrors: { file: [`The file has more than ${Math.floor(mostFileCharacters / 1_000_000)} million characters. Cut it to the days around the onset window.`] } });
  if (text.includes('\0')) throw new DomainError('invalid-input', 'Nothing was read.', { fieldErrors: { file: ['This is no text file. Save the table as CSV first.'] } });
  return text;
}

async function openCase(actor: Actor, caseNumber: number) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'case:edit-facts', found.subject);
  return { row: found.row, place: await casePlace(db, found.row), window: weatherWindow(found.row) };
}

/** A first look at a file: its kind, its columns, and guesses to start from. */
export async function lookAtFile(request: { actor: Actor; caseNumber: number; text: string }): Promise<FileLook> {
  const { place } = await openCase(request.actor, request.caseNumber);
  const text = checkText(request.text);
  const format = fileFormatOf(text);
  const { names, guess } = format === 'table' ? guessTable(text) : { names: [], guess: {} };
  const station = format === 'epw' ? readEpw(text).station : format === 'surfrad' ? readSurfrad(text).station : null;
  const far = station ? distanceAndBearing(place, station) : null;
  return {
    format,
    formatWords: fileFormatLabels[format],
    columns: names,
    guess,
    sourceGuess: {
      sourceName: format === 'surfrad' ? 'NOAA surface radiation network' : format === 'epw' ? 'EPW file' : '',
      station: station?.name ?? '',
      ...(far ? { stationDistanceKm: far.distanceKm.toFixed(1), stationBearingDeg: far.bearingDeg.toFixed(0) } : {}),
      nature: format === 'surfrad' ? 'station' : format === 'epw' ? 'typical-year' : '',
    },
  };
}

interface ReadFile {
  readonly reading: FileReading;
  readonly kept: readonly WeatherValue[];
  readonly format: FileFormat;
  readonly mapping: Typed;
  readonly window: { readonly from: Date; readonly to: Date };
  readonly zone: string;
}

async function readFile(request: { actor: Actor; caseNumber: number; typed: Typed }): Promise<ReadFile> {
  const { actor, caseNumber, typed } = request;
  const { row, window } = await openCase(actor, caseNumber);
  const text = checkText(typed['text'] ?? '');
  if (!window) throw new DomainError('invalid-input', 'Give the time at which the mark was found, or the onset window, first: only the hours around it are kept.');
  const format = fileFormatOf(text);
  let reading: FileReading;
  let mapping: Typed = { format };
  if (format === 'epw') reading = readEpw(text, typed['nature'] === 'typical-year' ? window.to.getUTCFullYear() : undefined);
  else if (format === 'surfrad') reading = readSurfrad(text);
  else {
    const read = readTableMapping(typed);
    if (!read.ok) throw new DomainError('invalid-input', 'The columns are not settled yet.', { fieldErrors: read.fieldErrors });
    reading = readWeatherTable(text, read.mapping, row.zone);
    mapping = Object.fromEntries([['format', format], ...Object.entries(read.mapping).filter(([, value]) => typeof value !== 'object').map(([name, value]) => [name, String(value)]), ...Object.entries(read.mapping.columns).map(([key, column]) => [key, `${column.at} ${column.unit}`.trim()])]);
  }
  const kept = withinSpan(reading.values, window.from.getTime() - keptAroundWindowMs, window.to.getTime() + keptAroundWindowMs);
  return { reading, kept, format, mapping, window, zone: row.zone };
}

/** Reads a file without storing anything, and says what would be kept and which lines would not. */
export async function tryFile(request: { actor: Actor; caseNumber: number; typed: Typed }): Promise<DryRun> {
  const { reading, kept, format, zone } = await readFile(request);
  const [first, last] = [reading.values[0], reading.values.at(-1)];
  const shown = (value: number | undefined, unit: string) => (value === undefined ? '' : `${value} ${unit}`);
  const clock = (utc: string) => formatDayClock(new Date(utc), zone);
  return {
    format,
    formatWords: fileFormatLabels[format],
    read: reading.values.length,
    kept: kept.length,
    meansWords: meansWords(intervalOf(reading.values)),
    span: first && last ? `${clock(first.startUtc)} to ${clock(last.endUtc)}` : 'no time was read',
    problems: reading.problems.slice(0, shownProblems),
    problemCount: reading.problems.length,
    cautions: reading.cautions,
    sample: pickSample(kept).map((value) => ({ from: clock(value.startUtc), to: clock(value.endUtc), direct: shown(value.directWm2, 'W/m²'), global: shown(value.globalWm2, 'W/m²'), cloud: shown(value.cloudOktas, 'oktas') })),
  };
}

/** From the middle of the kept values, where there is most likely daylight. */
function pickSample(values: readonly WeatherValue[]): readonly WeatherValue[] {
  const bright = values.findIndex((value) => (value.directWm2 ?? 0) > 0 || (value.globalWm2 ?? 0) > 0);
  const from = Math.max(0, bright);
  return values.slice(from, from + shownValues);
}

/**
 * Keeps the values of a file that lie within a day of the onset window. Lines that cannot be read are left out, as the
 * dry run said.
 *
 * @returns false when the same values are there already.
 */
export async function importFile(request: { actor: Actor; caseNumber: number; typed: Typed }): Promise<boolean> {
  const { actor, caseNumber, typed } = request;
  const { kept, mapping, reading, window, zone } = await readFile(request);
  const source = readWeatherSource(typed);
  if (!source.ok) throw new DomainError('invalid-input', 'The file is not kept yet.', { fieldErrors: source.fieldErrors });
  if (kept.length === 0) {
    const [first] = reading.values;
    const held = first ? `The file begins on ${formatDayClock(new Date(first.startUtc), zone)}.` : 'No line of it could be read.';
    throw new DomainError('invalid-input', `No value lies within a day of the onset window, ${formatDayClock(window.from, zone)} to ${formatDayClock(window.to, zone)}. ${held}`);
  }
  return addWeather({ actor, caseNumber, kind: 'file', source: source.source, values: kept, fileSha256: sha256Hex(typed['text'] ?? ''), mapping });
}
