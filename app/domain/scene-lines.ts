import { leafStates, mostWalls, skylineSources } from './scene.ts';
import type { SceneAir, SceneSkyline, SceneWall, SkylinePoint } from './scene.ts';

/** Skyline and irradiance as people paste them: one value a line. */
export type LinesReading<Value> = { readonly ok: true; readonly values: readonly Value[] } | { readonly ok: false; readonly sentence: string };

const linesOf = (text: string) => text.split(/\r?\n/u).map((line, index) => ({ line: line.trim(), number: index + 1 })).filter(({ line }) => line !== '');

/** A number as typed: comma or point, and the true minus sign. */
export function readNumber(text: string): number {
  const plain = text.trim().replace('−', '-').replace(/(\d),(\d)/u, '$1.$2');
  return /^[+-]?(?:\d+\.?\d*|\.\d+)$/u.test(plain) ? Number(plain) : Number.NaN;
}

/** What may stand in brackets after the two numbers: where a point was taken from, and whether a tree was in leaf. */
const bracketWords = /^\[([a-z ,-]+)\]$/u;

function readPointWords(words: readonly string[]): Pick<SkylinePoint, 'name' | 'plusMinusDeg' | 'source' | 'leaf'> | null {
  const point: { name?: string; plusMinusDeg?: number; source?: SkylinePoint['source']; leaf?: SkylinePoint['leaf'] } = {};
  const rest = [...words];
  for (let word = rest[0]; word !== undefined && (word.startsWith('±') || bracketWords.test(word)); word = rest[0]) {
    rest.shift();
    if (word.startsWith('±')) {
      const plusMinusDeg = readNumber(word.slice(1));
      if (!(plusMinusDeg >= 0.1 && plusMinusDeg <= 20)) return null;
      point.plusMinusDeg = plusMinusDeg;
    } else {
      for (const said of (bracketWords.exec(word)?.[1] ?? '').split(',')) {
        const source = skylineSources.find((known) => known === said);
        const leaf = leafStates.find((known) => known === said);
        if (!source && !leaf) return null;
        if (source) point.source = source;
        if (leaf) point.leaf = leaf;
      }
    }
  }
  if (rest.length > 0) point.name = rest.join(' ').slice(0, 80);
  return point;
}

/** "120 11.5 ±0.5 [panorama,bare] Grain House": true bearing and elevation; ±, source, leaf and name if there are any. */
export function readSkylineLines(text: string): LinesReading<SkylinePoint> {
  const values: SkylinePoint[] = [];
  for (const { line, number } of linesOf(text)) {
    const [azimuth = '', elevation = '', ...words] = line.split(/[\s;]+/u);
    const [azimuthDeg, elevationDeg] = [readNumber(azimuth), readNumber(elevation)];
    if (Number.isNaN(azimuthDeg) || Number.isNaN(elevationDeg)) return { ok: false, sentence: `Line ${number} is not two numbers: write the bearing from true north, a space, and the elevation, such as "120 11.5".` };
    if (azimuthDeg < 0 || azimuthDeg > 360) return { ok: false, sentence: `Line ${number}: a bearing lies between 0 and 360°.` };
    if (elevationDeg < -5 || elevationDeg > 90) return { ok: false, sentence: `Line ${number}: an elevation lies between -5 and 90°.` };
    const more = readPointWords(words);
    if (!more) return { ok: false, sentence: `Line ${number}: a ± lies between 0.1 and 20°; in brackets stand ${[...skylineSources, ...leafStates].join(', ')}.` };
    values.push({ azimuthDeg, elevationDeg, ...more });
  }
  if (values.length === 1) return { ok: false, sentence: 'A skyline needs two points or more.' };
  return values.length > 720 ? { ok: false, sentence: 'At most 720 points; leave out what lies on a straight line.' } : { ok: true, values };
}

/** "140 4.2 186 3.8 2.5 Garden wall": bearing and metres of each end, metres of the top above the optic, and a name. */
export function readWallLines(text: string): LinesReading<SceneWall> {
  const values: SceneWall[] = [];
  for (const { line, number } of linesOf(text)) {
    const parts = line.split(/[\s;]+/u);
    const numbers = parts.slice(0, 5).map(readNumber);
    const [fromDeg = Number.NaN, fromM = Number.NaN, toDeg = Number.NaN, toM = Number.NaN, topM = Number.NaN] = numbers;
    if (numbers.length < 5 || numbers.some(Number.isNaN)) return { ok: false, sentence: `Line ${number} is not five numbers: bearing and metres of one end, bearing and metres of the other, and the top above the optic, such as "140 4.2 186 3.8 2.5".` };
    if ([fromDeg, toDeg].some((deg) => deg < 0 || deg > 360)) return { ok: false, sentence: `Line ${number}: a bearing lies between 0 and 360°.` };
    if ([fromM, toM].some((metres) => metres < 0.001 || metres > 2_000)) return { ok: false, sentence: `Line ${number}: an end lies between 1 mm and 2 km from the optic.` };
    if (topM < -50 || topM > 500) return { ok: false, sentence: `Line ${number}: the top lies between 50 m below and 500 m above the optic.` };
    const name = parts.slice(5).join(' ').slice(0, 80);
    values.push({ fromDeg, fromM, toDeg, toM, topM, ...(name ? { name } : {}) });
  }
  return values.length > mostWalls ? { ok: false, sentence: `At most ${mostWalls} walls.` } : { ok: true, values };
}

type DniValue = NonNullable<SceneAir['dni']>['values'][number];

/** "2026-02-03T09:00Z 2026-02-03T10:00Z 640": start, end, and the mean between them in W/m². */
export function readDniLines(text: string): LinesReading<DniValue> {
  const values: DniValue[] = [];
  for (const { line, number } of linesOf(text)) {
    const [start = '', end = '', value = ''] = line.split(/[\s;]+/u);
    const refuse = (sentence: string): LinesReading<DniValue> => ({ ok: false, sentence: `Line ${number}: ${sentence}` });
    const [from, to] = [readInstant(start), readInstant(end)];
    if (!from || !to) return refuse('write start and end with date, time and offset, such as 2026-02-03T10:00+01:00.');
    if (from >= to) return refuse('the end comes before the start.');
    const dniWm2 = readNumber(value);
    if (Number.isNaN(dniWm2)) return refuse('the third part is the irradiance in W/m², a number.');
    if (dniWm2 < 0 || dniWm2 > 1_400) return refuse('direct irradiance lies between 0 and 1400 W/m².');
    values.push({ startUtc: from.toISOString(), endUtc: to.toISOString(), dniWm2 });
  }
  return values.length > 2_000 ? { ok: false, sentence: 'At most 2000 lines; keep to the days of the onset window.' } : { ok: true, values };
}

/** An instant with its offset; a bare clock time is refused, since nobody could say which it is. */
function readInstant(text: string): Date | null {
  if (!/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(?::\d{2}(?:\.\d+)?)?(?:Z|[+-]\d{2}:?\d{2})$/u.test(text)) return null;
  const at = new Date(text.replace(/([+-]\d{2})(\d{2})$/u, '$1:$2'));
  return Number.isNaN(at.getTime()) ? null : at;
}

function pointText(point: SkylinePoint): string {
  const said = [point.source, point.leaf].filter(Boolean).join(',');
  return [point.azimuthDeg, point.elevationDeg, point.plusMinusDeg === undefined ? '' : `±${point.plusMinusDeg}`, said ? `[${said}]` : '', point.name ?? ''].filter((part) => part !== '').join(' ');
}

export const skylineText = (skyline: SceneSkyline | undefined): string => (skyline?.points ?? []).map(pointText).join('\n');

export const wallText = (walls: readonly SceneWall[] | undefined): string =>
  (walls ?? []).map((wall) => [wall.fromDeg, wall.fromM, wall.toDeg, wall.toM, wall.topM, wall.name ?? ''].join(' ').trim()).join('\n');

export const dniText = (air: SceneAir): string => (air.dni?.values ?? []).map((value) => `${value.startUtc} ${value.endUtc} ${value.dniWm2}`).join('\n');
