import type { Optic, OpticKind } from '#app/physics/optics/optic.ts';
import type { TraceAssumption } from './trace-model.ts';

/** One-sigma slope error by kind where none is given. [mrad] From memory within the stated classes: unverified. */
const defaultMrad: Record<OpticKind, { readonly value: number; readonly text: string }> = {
  lens: { value: 0.3, text: 'polished optic 0.1–0.5 mrad' },
  sphere: { value: 0.3, text: 'polished optic 0.1–0.5 mrad' },
  cylinder: { value: 3, text: 'blown bottle or vase 3–10 mrad, smooth end' },
  bowl: { value: 5, text: 'blown bottle or vase 3–10 mrad' },
  'concave-mirror': { value: 0.3, text: 'polished optic 0.1–0.5 mrad' },
  'polished-bowl': { value: 3, text: 'polished sheet metal 2–5 mrad' },
  dish: { value: 3, text: 'polished sheet metal 2–5 mrad' },
  facade: { value: 0.6, text: 'float glass 0.3–1 mrad' },
  'curved-metal': { value: 3, text: 'polished sheet metal 2–5 mrad' },
  trough: { value: 3, text: 'polished sheet metal 2–5 mrad' },
  'bowed-pane': { value: 0.6, text: 'float glass 0.3–1 mrad' },
  fresnel: { value: 1, text: 'moulded sheet, taken as 1 mrad' },
  'ponded-dome': { value: 5, text: 'moulded shell, taken as 5 mrad' },
  telescope: { value: 0, text: 'thin ideal objective' },
};

/** Slope error of an optic with the assumption that had to be made. */
export function slopeError(optic: Optic): { readonly sigmaRad: number; readonly assumptions: readonly TraceAssumption[] } {
  if (optic.slopeErrorMrad !== undefined) {
    if (!(optic.slopeErrorMrad >= 0 && optic.slopeErrorMrad <= 100)) throw new RangeError(`slopeErrorMrad = ${optic.slopeErrorMrad}; allowed 0 to 100`);
    return { sigmaRad: optic.slopeErrorMrad / 1000, assumptions: [] };
  }
  const { value, text } = defaultMrad[optic.kind];
  return {
    sigmaRad: value / 1000,
    assumptions: [{ field: 'slopeErrorMrad', value: `${value} mrad`, source: `class default: ${text}`, verified: false }],
  };
}
