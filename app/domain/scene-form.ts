import type { Scene } from './scene.ts';
import { measureMethods, sceneSchema } from './scene.ts';
import type { SceneField } from './scene-fields.ts';
import { allSceneFields, fieldName } from './scene-fields.ts';
import { dniText, readDniLines, readNumber, readSkylineLines, skylineText } from './scene-lines.ts';

export type Typed = Readonly<Record<string, string>>;
export type FieldErrors = Record<string, string[]>;

export type SceneReading =
  | { readonly ok: true; readonly scene: Scene; readonly bearingNotes: readonly string[] }
  | { readonly ok: false; readonly fieldErrors: FieldErrors };

export interface BearingFrames {
  /** Degrees to add to a magnetic bearing, east positive; null where no model covers the day. */
  readonly declinationDeg: number | null;
  /** "WMM-2025, 3 Feb 2026". */
  readonly declinationSource: string;
}

const text = (typed: Typed, name: string) => (typed[name] ?? '').trim();

/** The form's starting values from a stored scene; bearings are stored from true north. */
export function sceneToFields(scene: Scene): Record<string, string> {
  const fields: Record<string, string> = {
    'optic.kind': scene.optic.kind,
    'optic.material': scene.optic.material ?? '',
    'optic.generators': scene.optic.generators ?? '',
    'optic.coatingSurface': scene.optic.coatingSurface === undefined ? '' : String(scene.optic.coatingSurface),
    'optic.faceToSun': scene.optic.faceToSun ?? '',
    'optic.movedSince': scene.optic.movedSince,
    'opening.glass': scene.opening?.glass ?? 'unknown',
    'opening.halfWidthDeg': shown(scene.opening?.halfWidthDeg),
    'opening.lowestElevationDeg': shown(scene.opening?.lowestElevationDeg),
    'opening.highestElevationDeg': shown(scene.opening?.highestElevationDeg),
    'mark.shape': scene.mark.shape ?? '',
    'mark.damage': scene.mark.damage ?? '',
    'target.material': scene.target.material,
    'target.colour': scene.target.colour ?? '',
    'target.sampleKept': scene.target.sampleKept,
    'skyline.points': skylineText(scene.skyline),
    'skyline.plusMinusDeg': shown(scene.skyline?.plusMinusDeg),
    'skyline.source': scene.skyline?.source ?? 'clinometer',
    'air.climateClass': scene.air.climateClass,
    'air.temperatureC': shown(scene.air.temperatureC),
    'air.pressureHpa': shown(scene.air.pressureHpa),
    'dni.values': dniText(scene.air),
    'dni.source': scene.air.dni?.source ?? '',
    'dni.basis': scene.air.dni?.basis ?? 'measured',
    'dni.stationDistanceKm': shown(scene.air.dni?.stationDistanceKm),
  };
  for (const field of allSceneFields) {
    const stored = storedMeasure(scene, field);
    const name = fieldName(field);
    fields[name] = shown(stored?.value);
    fields[`${name}.plusMinus`] = shown(stored?.plusMinus);
    fields[`${name}.method`] = stored?.method ?? '';
    if (field.bearing) fields[`${name}.north`] = stored ? 'true' : '';
  }
  return fields;
}

const shown = (value: number | undefined) => (value === undefined ? '' : String(value));

function storedMeasure(scene: Scene, field: SceneField): { value: number; plusMinus?: number | undefined; method: string } | undefined {
  const part: Readonly<Record<string, unknown>> = { ...(scene[field.part] ?? {}) };
  const value = part[field.key];
  return isMeasure(value) ? value : undefined;
}

function isMeasure(value: unknown): value is { value: number; plusMinus?: number; method: string } {
  return typeof value === 'object' && value !== null && 'value' in value && typeof value.value === 'number' && 'method' in value;
}

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
  const raw: Record<string, Record<string, unknown>> = { optic: optional(typed, 'optic', ['kind', 'material', 'generators', 'faceToSun', 'movedSince']), opening: {}, mark: optional(typed, 'mark', ['shape', 'damage']), target: optional(typed, 'target', ['material', 'colour', 'sampleKept']) };
  const surface = readNumber(text(typed, 'optic.coatingSurface'));
  if (!Number.isNaN(surface)) Object.assign(raw['optic'] ?? {}, { coatingSurface: surface });
  for (const field of allSceneFields) {
    const measure = readMeasure(typed, field, frames, refuse, bearingNotes);
    if (measure) Object.assign(raw[field.part] ?? {}, { [field.key]: measure });
  }
  const number = (name: string) => readOptionalNumber(typed, name, refuse);
  const opening = 'azimuthDeg' in (raw['opening'] ?? {}) ? { ...raw['opening'], glass: text(typed, 'opening.glass') || 'unknown', ...defined({ halfWidthDeg: number('opening.halfWidthDeg'), lowestElevationDeg: number('opening.lowestElevationDeg'), highestElevationDeg: number('opening.highestElevationDeg') }) } : undefined;
  const scene = { optic: raw['optic'], opening, mark: raw['mark'], target: raw['target'], skyline: readSkyline(typed, number, refuse), air: readAir(typed, number, refuse) };
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
  const range = `${field.label} lies between ${field.min} and ${field.max}${field.unit === '' ? '' : field.unit === '°' ? '°' : ` ${field.unit}`}.`;
  if (Number.isNaN(value)) refuse(name, `Write a number${field.unit === 'mm' || field.unit === 'm' ? `, in ${field.unit} or with its unit, such as "2.4 in"` : ''}.`);
  else if (value < field.min || value > field.max) refuse(name, range);
  const typedRange = text(typed, `${name}.plusMinus`);
  const plusMinus = typedRange === '' ? undefined : readQuantity(typedRange, field.unit);
  if (plusMinus !== undefined && (Number.isNaN(plusMinus) || plusMinus < 0)) refuse(name, 'The ± is a number of 0 or more.');
  const method = measureMethods.find((known) => known === text(typed, `${name}.method`));
  if (!method) refuse(name, 'Say how it was got.');
  const trueValue = field.bearing ? trueBearing(typed, field, value, frames, refuse, notes) : value;
  return { value: trueValue, method: method ?? 'reported', ...(plusMinus === undefined ? {} : { plusMinus }) };
}

/** East is added: true = magnetic + declination, and true = grid + convergence. */
function trueBearing(typed: Typed, field: SceneField, value: number, frames: BearingFrames, refuse: Refuse, notes: string[]): number {
  const name = fieldName(field);
  const north = text(typed, `${name}.north`);
  if (north === 'true') return value;
  if (north !== 'magnetic' && north !== 'grid') {
    refuse(name, 'Say which north this bearing was taken from.');
    return value;
  }
  const turn = north === 'magnetic' ? frames.declinationDeg : readNumber(text(typed, 'gridConvergenceDeg'));
  if (turn === null || Number.isNaN(turn)) {
    const sentence = north === 'magnetic' ? `No magnetic model covers that day (${frames.declinationSource}). Turn the bearing to true north yourself.` : 'Give the grid convergence from the margin of the map, or turn the bearing to true north yourself.';
    refuse(name, sentence);
    return value;
  }
  const turned = Math.round(((((value + turn) % 360) + 360) % 360) * 100) / 100;
  const how = north === 'magnetic' ? `declination ${signed(turn)}°, ${frames.declinationSource}` : `grid convergence ${signed(turn)}°`;
  notes.push(`${field.label}: ${value}° ${north}, ${how}, is ${turned}° true.`);
  return turned;
}

const signed = (degrees: number) => `${degrees >= 0 ? '+' : '-'}${Math.abs(degrees).toFixed(1)}`;

function readSkyline(typed: Typed, number: (name: string) => number | undefined, refuse: Refuse): object | undefined {
  const reading = readSkylineLines(typed['skyline.points'] ?? '');
  if (!reading.ok) {
    refuse('skyline.points', reading.sentence);
    return undefined;
  }
  if (reading.values.length === 0) return undefined;
  return { points: reading.values, source: text(typed, 'skyline.source') || 'clinometer', ...defined({ plusMinusDeg: number('skyline.plusMinusDeg') }) };
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
  if (part === 'air' && key === 'dni') return below === 'values' || below === undefined ? 'dni.values' : `dni.${below}`;
  return `${part}.${key}`;
}

function issueSentence(issue: { readonly code: string; readonly message: string; readonly minimum?: unknown; readonly maximum?: unknown }): string {
  if (issue.code === 'too_small') return `At least ${String(issue.minimum)}.`;
  if (issue.code === 'too_big') return `At most ${String(issue.maximum)}.`;
  return issue.code === 'invalid_value' ? 'Choose one of the list.' : 'This cannot be read.';
}
