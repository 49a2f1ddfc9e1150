import type { FactView } from './case-view.ts';
import { lineOnGround } from './ground.ts';
import { facingsOfWall } from './report-optic.ts';
import { reportDimensions, sizeQuestions } from './report-optic-sizes.ts';
import { wallWords } from './report-place.ts';
import type { Scene } from './scene.ts';

/**
 * What the reporter gave that is no measurement: pins and wall lines on the map, what is printed on the optic, and what a
 * photo is said to show. Bearings and lengths here are suggestions for whoever measures.
 */
export function reporterFacts({ onMap, optic }: Scene): FactView[] {
  const facts: FactView[] = [];
  if (onMap?.optic && onMap.mark) {
    const { lengthM, bearingDeg } = lineOnGround(onMap.optic, onMap.mark);
    facts.push({ term: 'Optic to mark, by the pins', value: `${bearingDeg.toFixed(1)}° true, ${lengthM.toFixed(1)} m level`, note: 'suggestion from the report' });
  }
  for (const [index, wall] of (onMap?.walls ?? []).entries()) {
    const [one, other] = facingsOfWall(wall);
    facts.push({ term: `Wall line ${index + 1}`, value: wallWords(wall), note: `drawn by the reporter; such a wall faces ${one}° or ${other}° true` });
  }
  if (optic.printed) facts.push({ term: 'Printed on the optic', value: optic.printed, note: 'a clue, not a measurement' });
  const shown = (optic.shownInPhotos ?? []).flatMap((name) => {
    const dimension = reportDimensions.find((known) => known === name);
    const question = sizeQuestions[optic.kind].find((one) => one.dimension === dimension);
    return question ? [question.question] : [];
  });
  if (shown.length > 0) facts.push({ term: 'To be read off a photo', value: shown.join(' '), note: 'as the reporter says' });
  return facts;
}

/** A new version of the scene keeps what the reporter gave and no form of ours asks for again. */
export function withReporterFacts(scene: Scene, before: Scene | null): Scene {
  if (!before) return scene;
  const { printed, shownInPhotos, kind } = before.optic;
  const onMap = scene.onMap ?? before.onMap;
  const sameOptic = kind === scene.optic.kind;
  return {
    ...scene,
    optic: { ...scene.optic, ...(sameOptic && printed && !scene.optic.printed ? { printed } : {}), ...(sameOptic && shownInPhotos && !scene.optic.shownInPhotos ? { shownInPhotos } : {}) },
    ...(onMap ? { onMap } : {}),
  };
}
