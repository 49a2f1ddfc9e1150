import { guessDelimiter, readDelimited } from './delimited-text.ts';
import type { SceneSkyline, SkylinePoint } from './scene.ts';
import { leafStates, skylineSources } from './scene.ts';
import { readNumber } from './scene-lines.ts';

/** The skyline as rows of a table: `row.0.azimuthDeg` and so on, and a text of rows to be added. */
export const skylineColumns = ['azimuthDeg', 'elevationDeg', 'plusMinusDeg', 'source', 'leaf', 'name'] as const;
export type SkylineColumn = (typeof skylineColumns)[number];
export type SkylineRow = Readonly<Record<SkylineColumn, string>>;
export const rowName = (index: number, column: SkylineColumn): string => `row.${index}.${column}`;
const mostRows = 720;

export const leafLabels: Record<(typeof leafStates)[number], string> = { bare: 'bare', 'in-leaf': 'in leaf' };

/** Rows of a stored skyline, by bearing. What holds for all is written into each row. */
export function skylineRows(skyline: SceneSkyline | null | undefined): SkylineRow[] {
  return (skyline?.points ?? [])
    .map((point) => ({
      azimuthDeg: String(point.azimuthDeg),
      elevationDeg: String(point.elevationDeg),
      plusMinusDeg: String(point.plusMinusDeg ?? skyline?.plusMinusDeg ?? ''),
      source: point.source ?? skyline?.source ?? 'clinometer',
      leaf: point.leaf ?? '',
      name: point.name ?? '',
    }))
    .sort((a, b) => Number(a.azimuthDeg) - Number(b.azimuthDeg));
}

export type SkylineReading = { readonly ok: true; readonly skyline: SceneSkyline | null } | { readonly ok: false; readonly fieldErrors: Record<string, string[]> };

function readRow(row: Partial<Record<SkylineColumn, string>>): SkylinePoint | { readonly column: SkylineColumn; readonly sentence: string } {
  const azimuthDeg = readNumber(row.azimuthDeg ?? '');
  if (!(azimuthDeg >= 0 && azimuthDeg <= 360)) return { column: 'azimuthDeg', sentence: 'A bearing from true north, 0 to 360°.' };
  const elevationDeg = readNumber(row.elevationDeg ?? '');
  if (!(elevationDeg >= -5 && elevationDeg <= 90)) return { column: 'elevationDeg', sentence: 'An elevation from −5 to 90°.' };
  const typed = (row.plusMinusDeg ?? '').trim();
  const plusMinusDeg = typed === '' ? 1 : readNumber(typed);
  if (!(plusMinusDeg >= 0.1 && plusMinusDeg <= 20)) return { column: 'plusMinusDeg', sentence: 'A ± from 0.1 to 20°.' };
  const source = skylineSources.find((known) => known === (row.source ?? '').trim().toLowerCase());
  if (!source && (row.source ?? '').trim() !== '') return { column: 'source', sentence: `One of ${skylineSources.join(', ')}.` };
  const leafText = (row.leaf ?? '').trim().toLowerCase().replace(' ', '-');
  const leaf = leafStates.find((known) => known === leafText);
  if (!leaf && !['', 'n/a', 'none'].includes(leafText)) return { column: 'leaf', sentence: 'bare, in leaf, or nothing.' };
  const name = (row.name ?? '').trim().slice(0, 80);
  return { azimuthDeg: azimuthDeg % 360, elevationDeg, plusMinusDeg, source: source ?? 'clinometer', ...(leaf ? { leaf } : {}), ...(name ? { name } : {}) };
}

const isPoint = (read: ReturnType<typeof readRow>): read is SkylinePoint => 'azimuthDeg' in read;

/** Rows as pasted from a table: bearing, elevation, ±, source, leaf, name; a head line is passed over. */
function readPasted(text: string): { readonly points: SkylinePoint[]; readonly errors: string[] } {
  const points: SkylinePoint[] = [];
  const errors: string[] = [];
  const delimiter = /[,;\t]/u.test(text) ? guessDelimiter(text) : ' ';
  for (const [index, cells] of readDelimited(text.replace(delimiter === ' ' ? / +/gu : /$^/u, ' '), delimiter).entries()) {
    if (cells.every((cell) => cell === '') || (index === 0 && Number.isNaN(readNumber(cells[0] ?? '')))) continue;
    const read = readRow(Object.fromEntries(skylineColumns.map((column, at) => [column, cells[at] ?? ''])));
    if (isPoint(read)) points.push(read);
    else errors.push(`Line ${index + 1}: ${read.sentence}`);
  }
  return { points, errors };
}

/** Reads the form of a skyline; a row whose bearing and elevation are empty is left out, and so taken away. */
export function readSkylineForm(typed: Readonly<Record<string, string>>): SkylineReading {
  const fieldErrors: Record<string, string[]> = {};
  const points: SkylinePoint[] = [];
  const indexes = new Set(Object.keys(typed).flatMap((name) => /^row\.(\d{1,4})\.azimuthDeg$/u.exec(name)?.[1] ?? []));
  for (const index of [...indexes].map(Number).sort((a, b) => a - b)) {
    const row = Object.fromEntries(skylineColumns.map((column) => [column, typed[rowName(index, column)] ?? '']));
    if ((row['azimuthDeg'] ?? '').trim() === '' && (row['elevationDeg'] ?? '').trim() === '') continue;
    const read = readRow(row);
    if (isPoint(read)) points.push(read);
    else fieldErrors[rowName(index, read.column)] = [read.sentence];
  }
  const pasted = readPasted(typed['paste'] ?? '');
  if (pasted.errors.length > 0) fieldErrors['paste'] = [pasted.errors.slice(0, 6).join(' ')];
  points.push(...pasted.points);
  if (points.length === 1 && Object.keys(fieldErrors).length === 0) fieldErrors['paste'] = ['A skyline needs two points or more.'];
  if (points.length > mostRows) fieldErrors['paste'] = [`At most ${mostRows} points; leave out what lies on a straight line.`];
  if (Object.keys(fieldErrors).length > 0) return { ok: false, fieldErrors };
  if (points.length === 0) return { ok: true, skyline: null };
  points.sort((a, b) => a.azimuthDeg - b.azimuthDeg);
  return { ok: true, skyline: { points, plusMinusDeg: Math.max(...points.map((point) => point.plusMinusDeg ?? 1)), source: commonest(points) } };
}

function commonest(points: readonly SkylinePoint[]): SceneSkyline['source'] {
  const count = (source: SceneSkyline['source']) => points.filter((point) => point.source === source).length;
  return [...skylineSources].sort((a, b) => count(b) - count(a))[0] ?? 'clinometer';
}
