import type { Measured, Scene } from './scene.ts';
import type { SceneField } from './scene-fields.ts';
import { allSceneFields, fieldName } from './scene-fields.ts';
import { dniText, skylineText, wallText } from './scene-lines.ts';

const shown = (value: number | undefined) => (value === undefined ? '' : String(value));

/** The form's starting values from a stored scene; bearings are stored from true north. */
export function sceneToFields(scene: Scene): Record<string, string> {
  const { optic, opening, mark, target, skyline, air } = scene;
  const fields: Record<string, string> = {
    'optic.kind': optic.kind,
    'optic.material': optic.material ?? '',
    'optic.generators': optic.generators ?? '',
    'optic.coatingSurface': shown(optic.coatingSurface),
    'optic.faceToSun': optic.faceToSun ?? '',
    'optic.movedSince': optic.movedSince,
    'optic.condition': optic.condition ?? '',
    'opening.glass': opening?.glass ?? 'unknown',
    'opening.halfWidthDeg': shown(opening?.halfWidthDeg),
    'opening.lowestElevationDeg': shown(opening?.lowestElevationDeg),
    'opening.highestElevationDeg': shown(opening?.highestElevationDeg),
    'opening.blind': opening?.blind ?? '',
    'opening.insectScreen': opening?.insectScreen ?? '',
    'mark.shape': mark.shape ?? '',
    'mark.damage': mark.damage ?? '',
    'target.material': target.material,
    'target.colour': target.colour ?? '',
    'target.layers': shown(target.layers),
    'target.moisture': target.moisture ?? '',
    'target.sampleKept': target.sampleKept,
    'skyline.points': skylineText(skyline),
    'skyline.plusMinusDeg': shown(skyline?.plusMinusDeg),
    'skyline.source': skyline?.source ?? 'clinometer',
    walls: wallText(scene.walls),
    'air.climateClass': air.climateClass,
    'air.temperatureC': shown(air.temperatureC),
    'air.pressureHpa': shown(air.pressureHpa),
    'dni.values': dniText(air),
    'dni.source': air.dni?.source ?? '',
    'dni.basis': air.dni?.basis ?? 'measured',
    'dni.stationDistanceKm': shown(air.dni?.stationDistanceKm),
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

/** The measured number under a field of the form, if there is one. */
export function storedMeasure(scene: Scene, field: SceneField): Measured | undefined {
  const part: Readonly<Record<string, unknown>> = { ...(scene[field.part] ?? {}) };
  const value = part[field.key];
  return isMeasure(value) ? value : undefined;
}

function isMeasure(value: unknown): value is Measured {
  return typeof value === 'object' && value !== null && 'value' in value && typeof value.value === 'number' && 'method' in value;
}

export interface Stamp {
  /** Name or role of who measured. */
  readonly by: string;
  /** Local day of the place, YYYY-MM-DD. */
  readonly on: string;
}

/** Each number that is new or changed is stamped with who and when; one that stayed keeps its own stamp and reading. */
export function stampMeasures(previous: Scene | null, scene: Scene, stamp: Stamp): Scene {
  const stamped: Record<string, unknown> = { ...scene };
  for (const field of allSceneFields) {
    const measure = storedMeasure(scene, field);
    if (!measure) continue;
    const before = previous ? storedMeasure(previous, field) : undefined;
    const same = before?.value === measure.value && before.plusMinus === measure.plusMinus && before.method === measure.method;
    const kept = { ...(before?.by ? { by: before.by } : {}), ...(before?.on ? { on: before.on } : {}), ...(before?.reading ? { reading: before.reading } : {}) };
    stamped[field.part] = { ...Object(stamped[field.part]), [field.key]: { ...measure, ...(same ? kept : { by: stamp.by, on: stamp.on }) } };
  }
  return { ...scene, ...stamped };
}
