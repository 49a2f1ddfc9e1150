import type { Optic } from '#app/physics/optics/optic.ts';
import type { FocusModel } from './beam.ts';
import { bowedPaneModel } from './bowed-pane.ts';
import { curvedReflectorModel, cylinderModel } from './line-optics.ts';
import { liquidLensModel } from './liquid-lens.ts';
import { roundOpticModel } from './round-optics.ts';

/**
 * Closed-form model of an optic: where its focus goes and how bright it is there.
 *
 * @throws RangeError if two dimensions of the optic contradict each other; the message names both.
 */
export function focusModelOf(optic: Optic): FocusModel {
  switch (optic.kind) {
    case 'cylinder':
      return cylinderModel(optic);
    case 'facade':
    case 'curved-metal':
    case 'trough':
      return curvedReflectorModel(optic);
    case 'bowed-pane':
      return bowedPaneModel(optic);
    case 'bowl':
    case 'ponded-dome':
      return liquidLensModel(optic);
    default:
      return roundOpticModel(optic);
  }
}
