import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { checkRanges, inputRanges, materialRanges, opticRanges, sealedUnitRanges } from '#app/physics/input-ranges.ts';

function checkOptic({ optic }: ReconstructionInput): void {
  if (optic === undefined) return;
  checkRanges('optic', optic, opticRanges[optic.kind]);
  if ('material' in optic && optic.material.name === 'explicit') checkRanges('optic.material', optic.material, materialRanges);
  if ('sealedUnit' in optic) checkRanges('optic.sealedUnit', optic.sealedUnit, sealedUnitRanges);
  if ('paneWidthM' in optic && optic.paneWidthM !== undefined && optic.paneWidthM > optic.chordM) {
    throw new RangeError(`optic.paneWidthM ${optic.paneWidthM} and optic.chordM ${optic.chordM} disagree: one pane is wider than the whole face.`);
  }
}

function checkOpening({ opening }: ReconstructionInput): void {
  checkRanges('opening', opening, inputRanges.opening);
  const { lowestElevationDeg: lowest, highestElevationDeg: highest } = opening ?? {};
  if (lowest !== undefined && highest !== undefined && lowest > highest) {
    throw new RangeError(`opening.lowestElevationDeg ${lowest} and opening.highestElevationDeg ${highest} disagree: the lowest lies above the highest.`);
  }
}

function checkSky({ sky }: ReconstructionInput): void {
  checkRanges('sky', sky, inputRanges.sky);
  checkRanges('sky.dniSeries', sky.dniSeries, inputRanges.dniSeries);
  sky.dniSeries?.values.forEach((value, index) => checkRanges(`sky.dniSeries.values[${index}]`, value, inputRanges.dniValue));
}

function checkOccluders({ occluders }: ReconstructionInput): void {
  occluders?.forEach((occluder, index) => {
    checkRanges(`occluders[${index}]`, occluder, inputRanges.occluder);
    occluder.corners.forEach((corner, k) => checkRanges(`occluders[${index}].corners[${k}]`, corner, inputRanges.corner));
  });
}

/**
 * Checks every number of an input, and the pairs that must agree, before anything is computed.
 *
 * @throws RangeError naming the field, its value and the allowed interval, or the two fields that disagree.
 */
export function checkInput(input: ReconstructionInput): void {
  checkRanges('place', input.place, inputRanges.place);
  checkRanges('window', input.window, inputRanges.window);
  checkSky(input);
  checkOpening(input);
  checkOccluders(input);
  checkRanges('skyline', input.skyline, inputRanges.skyline);
  input.skyline?.points.forEach((point, index) => checkRanges(`skyline.points[${index}]`, point, inputRanges.skylinePoint));
  checkOptic(input);
  checkRanges('mark', input.mark, inputRanges.mark);
  checkRanges('markCoordinates', input.markCoordinates, inputRanges.markCoordinates);
  checkRanges('target', input.target, inputRanges.target);
  checkRanges('', input, inputRanges.root);
}
