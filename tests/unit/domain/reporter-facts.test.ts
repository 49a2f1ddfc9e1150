import { describe, expect, test } from 'vitest';
import { placeAt } from '#app/domain/ground.ts';
import { reporterFacts, withReporterFacts } from '#app/domain/reporter-facts.ts';
import { sceneSchema } from '#app/domain/scene.ts';

const optic = { latitudeDeg: 53.5, longitudeDeg: -1.6 };
const scene = sceneSchema.parse({
  optic: { kind: 'curved-mirror', printed: '5×', shownInPhotos: ['diameterMm'] },
  // A triangle of 3, 4 and 5: three metres east and four south of the optic, so arctan(3 ÷ 4) east of south.
  onMap: { optic, mark: placeAt(optic, { eastM: 3, northM: -4 }), walls: [{ from: optic, to: placeAt(optic, { eastM: 10, northM: 0 }) }] },
});

describe('what the reporter gave besides measurements', () => {
  test('is told as suggestions, with bearing and length', () => {
    expect(reporterFacts(scene)).toEqual([
      { term: 'Optic to mark, by the pins', value: '143.1° true, 5.0 m level', note: 'suggestion from the report' },
      { term: 'Wall line 1', value: '10.0 m, running 90.0° and 270.0° true', note: 'drawn by the reporter; such a wall faces 180° or 0° true' },
      { term: 'Printed on the optic', value: '5×', note: 'a clue, not a measurement' },
      { term: 'To be read off a photo', value: 'How wide across is the glass?', note: 'as the reporter says' },
    ]);
  });

  test('is nothing where nothing was given', () => {
    expect(reporterFacts(sceneSchema.parse({}))).toEqual([]);
  });

  test('stays through a new version of the measurements, which never asks for it', () => {
    const measured = sceneSchema.parse({ optic: { kind: 'curved-mirror', diameterMm: { value: 200, method: 'measured' } } });
    expect(withReporterFacts(measured, scene)).toMatchObject({ optic: { diameterMm: { value: 200 }, printed: '5×', shownInPhotos: ['diameterMm'] }, onMap: scene.onMap });
    expect(withReporterFacts(measured, null)).toBe(measured);
  });

  test('about another kind of optic is dropped when the kind is corrected; pins stay', () => {
    const corrected = withReporterFacts(sceneSchema.parse({ optic: { kind: 'dish' } }), scene);
    expect(corrected.optic.printed).toBeUndefined();
    expect(corrected.onMap).toEqual(scene.onMap);
  });
});
