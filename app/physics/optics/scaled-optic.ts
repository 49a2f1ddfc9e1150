import type { Optic } from './optic.ts';

/**
 * The optic with the length that its focus goes by made longer or shorter: diameter of a ball or bottle, radius of a bowl,
 * mirror or face, focal length of a lens or sheet. For a pane the bow changes the other way.
 *
 * @param factor Focal length over the nominal one. > 0
 */
export function scaledOptic(optic: Optic, factor: number): Optic {
  switch (optic.kind) {
    case 'sphere':
    case 'cylinder':
      return { ...optic, diameterM: optic.diameterM * factor };
    case 'bowl':
      return { ...optic, radiusM: optic.radiusM * factor, liquidDepthM: Math.min(optic.liquidDepthM, 2 * optic.radiusM * factor) };
    case 'concave-mirror':
    case 'polished-bowl':
    case 'dish':
      return { ...optic, radiusM: Math.max(optic.radiusM * factor, optic.figure === 'spherical' ? optic.diameterM / 2 : 0) };
    case 'facade':
    case 'curved-metal':
    case 'trough':
      return { ...optic, radiusM: Math.max(optic.radiusM * factor, optic.chordM / 2) };
    case 'bowed-pane':
      return { ...optic, centreBowM: optic.centreBowM / factor };
    case 'ponded-dome':
      return { ...optic, radiusM: Math.max(optic.radiusM * factor, optic.pondDiameterM / 2) };
    case 'lens':
    case 'fresnel':
    case 'telescope':
      return { ...optic, focalLengthM: optic.focalLengthM * factor };
  }
}

/** True where the spot's shape depends on where the sun stands to the optic, and not on its distance alone. */
export const hasAxis = (optic: Optic): boolean => optic.kind !== 'sphere';
