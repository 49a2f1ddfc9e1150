import type { SceneAir, SceneSkyline } from './scene.ts';

/** Skyline and irradiance as people paste them: one value a line. */
export type LinesReading<Value> = { readonly ok: true; readonly values: readonly Value[] } | { readonly ok: false; readonly sentence: string };

const linesOf = (text: string) => text.split(/\r?\n/u).map((line, index) => ({ line: line.trim(), number: index + 1 })).filter(({ line }) => line !== '');

/** A number as typed: comma or point, and the true minus sign. */
export function readNumber(text: string): number {
  const plain = text.trim().replace('−', '-').replace(/(\d),(\d)/u, '$1.$2');
  return /^[+-]?(?:\d+\.?\d*|\.\d+)$/u.test(plain) ? Number(plain) : Number.NaN;
}

/** "120 11.5 Grain House": true bearing, elevation, and a name if there is one. */
export function readSkylineLines(text: string): LinesReading<SceneSkyline['points'][number]> {
  const values: SceneSkyline['points'][number][] = [];
  for (const { line, number } of linesOf(text)) {
    const [azimuth = '', elevation = '', ...name] = line.split(/[\s;]+/u);
    const [azimuthDeg, elevationDeg] = [readNumber(azimuth), readNumber(elevation)];
    if (Number.isNaN(azimuthDeg) || Number.isNaN(elevationDeg)) return { ok: false, sentence: `Line ${number} is not two numbers: write the bearing from true north, a space, and the elevation, such as "120 11.5".` };
    if (azimuthDeg < 0 || azimuthDeg > 360) return { ok: false, sentence: `Line ${number}: a bearing lies between 0 and 360°.` };
    if (elevationDeg < -5 || elevationDeg > 90) return { ok: false, sentence: `Line ${number}: an elevation lies between -5 and 90°.` };
    values.push({ azimuthDeg, elevationDeg, ...(name.length > 0 ? { name: name.join(' ').slice(0, 80) } : {}) });
  }
  if (values.length === 1) return { ok: false, sentence: 'A skyline needs two points or more.' };
  return values.length > 720 ? { ok: false, sentence: 'At most 720 points; leave out what lies on a straight line.' } : { ok: true, values };
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

export const skylineText = (skyline: SceneSkyline | undefined): string =>
  (skyline?.points ?? []).map((point) => [point.azimuthDeg, point.elevationDeg, point.name ?? ''].join(' ').trim()).join('\n');

export const dniText = (air: SceneAir): string => (air.dni?.values ?? []).map((value) => `${value.startUtc} ${value.endUtc} ${value.dniWm2}`).join('\n');
