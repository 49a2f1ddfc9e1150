import type { Scene } from './scene.ts';
import { measureMethods, sceneSchema } from './scene.ts';
import { turnToTrue } from './scene-bearings.ts';
import type { BearingFrames } from './scene-bearings.ts';
import type { SceneField } from './scene-fields.ts';
import { allSceneFields, fieldName } from './scene-fields.ts';
import { readDniLines, readNumber, readSkylineLines, readWallLines } from './scene-lines.ts';

export type Typed = Readonly<Record<string, string>>;
export type FieldErrors = Record<string, string[]>;

export type SceneReading =
  | { readonly ok: true; readonly scene: Scene; readonly bearingNotes: readonly string[] }
  | { readonly ok: false; readonly fieldErrors: FieldErrors };

const text = (typed: Typed, name: string) => (typed[name] ?? '').trim();

/** Millimetres in each unit that may be typed after a length; inch and foot by the international agreement of 1959. */
const lengthMm: Readonly<Record<string, number>> = { mm: 1, cm: 10, m: 1_000, in: 25.4, ft: 304.8 };

/** "150", "2.4 in": the number in the field's own unit. */
function readQuantity(typed: string, unit: SceneField['unit']): number {
  const match = /^(.+?)\s*(mm|cm|m|in|ft)$/u.exec(typed);
  if (!match || (unit !== 'mm' && unit !== 'm')) return readNumber(typed.replace(/°$/u, ''));
  const factor = (lengthMm[match[2] ?? ''] ?? Number.NaN) / (unit === 'm' ? 1_000 : 1);
  return Number((readNumber(match[1] ?? '') * factor).toPrecision(9));
}

/**
 * The scene that a measurements form describes. Magnetic and grid bearings are turned to true north here, and a note
 * says how, so that the stored number is always from true north.
 */
export function readSceneForm(typed: Typed, frames: BearingFrames): SceneReading {
  const fieldErrors: FieldErrors = {};
  const bearingNotes: string[] = [];
  const refuse = (name: string, sentence: string) => {
    (fieldErrors[name] ??= []).push(sentence);
  };
  const raw: Record<string, Record<string, unknown>> = { optic: optional(typed, 'optic', ['kind', 'material', 'generators', 'faceToSun', 'movedSince', 'condition']), opening: optional(typed, 'opening', ['blind', 'insectScreen']), mark: optional(typed, 'mark', ['shape', 'damage']), target: optional(typed, 'target', ['material', 'colour', 'moisture', 'sampleKept']) };
  const surface = readNumber(text(typed, 'optic.coatingSurface'));
  if (!Number.isNaN(surface)) Object.assign(raw['optic'] ?? {}, { coatingSurface: surface });
  for (const field of allSceneFields) {
    const measure = readMeasure(typed, field, frames, refuse, bearingNotes);
    if (measure) Object.assign(raw[field.part] ?? {}, { [field.key]: measure });
  }
  const number = (name: string) => readOptionalNumber(typed, name, refuse);
  const layers = number('target.layers');
  if (layers !== undefined) Object.assign(raw['target'] ?? {}, { layers });
  for (const field of openingSizes) {
    if (field.key in (raw['opening'] ?? {}) && !('azimuthDeg' in (raw['opening'] ?? {}))) refuse(fieldName(field), 'Say first which way the opening looks outward; its sizes belong to that direction.');
  }
  const opening = 'azimuthDeg' in (raw['opening'] ?? {}) ? { ...raw['opening'], glass: text(typed, 'opening.glass') || 'unknown', ...defined({ halfWidthDeg: number('opening.halfWidthDeg'), lowestElevationDeg: number('opening.lowestElevationDeg'), highestElevationDeg: number('opening.highestElevationDeg') }) } : undefined;
  const scene = { optic: raw['optic'], opening, mark: raw['mark'], target: raw['target'], skyline: readSkyline(typed, number, refuse), walls: readWalls(typed, refuse), air: readAir(typed, number, refuse) };
  const parsed = sceneSchema.safeParse(scene);
  if (!parsed.success) {
    // A field that was already refused above says more than the schema could.
    for (const issue of parsed.error.issues.filter((one) => !(issueField(one.path) in fieldErrors))) refuse(issueField(issue.path), issueSentence(issue));
  }
  if (Object.keys(fieldErrors).length > 0 || !parsed.success) return { ok: false, fieldErrors };
  return { ok: true, scene: parsed.data, bearingNotes };
}

type Refuse = (name: string, sentence: string) => void;

function optional(typed: Typed, part: string, keys: readonly string[]): Record<string, unknown> {
  return Object.fromEntries(keys.map((key) => [key, text(typed, `${part}.${key}`)]).filter(([, value]) => value !== ''));
}

const defined = (values: Record<string, number | undefined>) => Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined));

function readOptionalNumber(typed: Typed, name: string, refuse: Refuse): number | undefined {
  const value = text(typed, name);
  if (value === '') return undefined;
  const number = readNumber(value);
  if (!Number.isNaN(number)) return number;
  refuse(name, 'Write a number, such as 12.5.');
  return undefined;
}

function readMeasure(typed: Typed, field: SceneField, frames: BearingFrames, refuse: Refuse, notes: string[]): object | undefined {
  const name = fieldName(field);
  const typedValue = text(typed, name);
  if (typedValue === '') return undefined;
  const value = readQuantity(typedValue, field.unit);
  const range = `${field.label} lies between ${field.min} and ${field.max}${field.unit === '' ? '' : field.unit.startsWith('°') ? field.unit : ` ${field.unit}`}.`;
  if (Number.isNaN(value)) refuse(name, `Write a number${field.unit === 'mm' || field.unit === 'm' ? `, in ${field.unit} or with its unit, such as "2.4 in"` : ''}.`);
  else if (value < field.min || value > field.max) refuse(name, range);
  const typedRange = text(typed, `${name}.plusMinus`);
  const plusMinus = typedRange === '' ? undefined : readQuantity(typedRange, field.unit);
  if (plusMinus !== undefined && (Number.isNaN(plusMinus) || plusMinus < 0)) refuse(name, 'The ± is a number of 0 or more.');
  const method = measureMethods.find((known) => known === text(typed, `${name}.method`));
  if (!method) refuse(name, 'Say how it was got.');
  const more = { method: method ?? 'reported', ...(plusMinus === undefined ? {} : { plusMinus }) };
  if (!field.bearing) return { value, ...more };
  const turn = turnToTrue(field, text(typed, `${name}.north`), value, typed, frames);
  if (!turn.ok) {
    refuse(name, turn.sentence);
    return { value, ...more };
  }
  if (turn.note) notes.push(turn.note);
  return { value: turn.valueDeg, ...more, ...(turn.reading ? { reading: turn.reading } : {}) };
}

const openingSizes = allSceneFields.filter((field) => field.part === 'opening' && field.key !== 'azimuthDeg');

function readSkyline(typed: Typed, number: (name: string) => number | undefined, refuse: Refuse): object | undefined {
  const reading = readSkylineLines(typed['skyline.points'] ?? '');
  if (!reading.ok) {
    refuse('skyline.points', reading.sentence);
    return undefined;
  }
  if (reading.values.length === 0) return undefined;
  const own = reading.values.flatMap((point) => point.plusMinusDeg ?? []);
  const all = number('skyline.plusMinusDeg');
  const plusMinusDeg = own.length === 0 ? all : Math.max(all ?? 0, ...own);
  return { points: reading.values, source: text(typed, 'skyline.source') || 'clinometer', ...defined({ plusMinusDeg }) };
}

function readWalls(typed: Typed, refuse: Refuse): object | undefined {
  const reading = readWallLines(typed['walls'] ?? '');
  if (!reading.ok) refuse('walls', reading.sentence);
  return reading.ok && reading.values.length > 0 ? reading.values : undefined;
}

function readAir(typed: Typed, number: (name: string) => number | undefined, refuse: Refuse): object {
  const air = { climateClass: text(typed, 'air.climateClass') || 'temperate-rural', ...defined({ temperatureC: number('air.temperatureC'), pressureHpa: number('air.pressureHpa') }) };
  const reading = readDniLines(typed['dni.values'] ?? '');
  if (!reading.ok) {
    refuse('dni.values', reading.sentence);
    return air;
  }
  if (reading.values.length === 0) return air;
  const source = text(typed, 'dni.source');
  if (source === '') refuse('dni.source', 'Name the station or archive that these values come from.');
  return { ...air, dni: { values: reading.values, source, basis: text(typed, 'dni.basis') || 'measured', ...defined({ stationDistanceKm: number('dni.stationDistanceKm') }) } };
}

function issueField(path: readonly PropertyKey[]): string {
  const [part = 'optic', key = 'kind', below] = path.map(String);
  if (part === 'walls') return 'walls';
  if (part === 'air' && key === 'dni') return below === 'values' || below === undefined ? 'dni.values' : `dni.${below}`;
  return `${part}.${key}`;
}

function issueSentence(issue: { readonly code: string; readonly message: string; readonly minimum?: unknown; readonly maximum?: unknown }): string {
  if (issue.code === 'too_small') return `At least ${String(issue.minimum)}.`;
  if (issue.code === 'too_big') return `At most ${String(issue.maximum)}.`;
  return issue.code === 'invalid_value' ? 'Choose one of the list.' : 'This cannot be read.';
}
