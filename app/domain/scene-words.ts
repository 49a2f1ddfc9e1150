import type { FactView } from './case-view.ts';
import type { Scene } from './scene.ts';
import { measureMethodLabels, measureMethods, sceneOpticLabels, targetMaterialLabels } from './scene.ts';
import { allSceneFields, fieldName } from './scene-fields.ts';
import { reporterFacts } from './reporter-facts.ts';
import { sceneToFields } from './scene-form-fields.ts';

/** What is recorded of a scene, one line a fact, unknowns left out; bearings from true north. */
export function sceneFacts(scene: Scene): FactView[] {
  const fields = sceneToFields(scene);
  const measured = allSceneFields.flatMap((field): FactView[] => {
    const name = fieldName(field);
    const value = fields[name] ?? '';
    if (value === '') return [];
    const plusMinus = fields[`${name}.plusMinus`];
    const method = measureMethods.find((known) => known === fields[`${name}.method`]);
    const unit = field.bearing ? '° true' : field.unit === '°' ? '°' : field.unit ? ` ${field.unit}` : '';
    return [{ term: field.label, value: `${value}${plusMinus ? ` ± ${plusMinus}` : ''}${unit}`, note: method ? measureMethodLabels[method].toLowerCase() : null }];
  });
  const skyline = scene.skyline ? `${scene.skyline.points.length} points ± ${scene.skyline.plusMinusDeg}°` : 'not measured here';
  const dni = scene.air.dni;
  return [
    { term: 'Optic', value: scene.optic.kind === 'dont-know' ? 'not known' : sceneOpticLabels[scene.optic.kind], note: scene.optic.movedSince === 'yes' ? 'moved since' : null },
    ...measured,
    { term: 'Target', value: scene.target.material === 'dont-know' ? 'not known' : targetMaterialLabels[scene.target.material], note: scene.target.colour ?? null },
    { term: 'Skyline', value: skyline, note: scene.skyline?.source ?? null },
    // Weather has records of its own; a series typed with the measurements is an older way.
    ...(dni ? [{ term: 'Sun strength', value: `${dni.values.length} values`, note: dni.source }] : []),
    ...reporterFacts(scene),
  ];
}
