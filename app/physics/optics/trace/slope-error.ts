import { slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import type { TraceAssumption } from './trace-model.ts';

/** Slope error of an optic with the assumption that had to be made. */
export function slopeError(optic: Optic): { readonly sigmaRad: number; readonly assumptions: readonly TraceAssumption[] } {
  if (optic.slopeErrorMrad !== undefined) {
    if (!(optic.slopeErrorMrad >= 0 && optic.slopeErrorMrad <= 100)) throw new RangeError(`slopeErrorMrad = ${optic.slopeErrorMrad}; allowed 0 to 100`);
    return { sigmaRad: optic.slopeErrorMrad / 1000, assumptions: [] };
  }
  const { slopeErrorMrad, source } = slopeErrors[optic.kind];
  return {
    sigmaRad: slopeErrorMrad / 1000,
    assumptions: [{ field: 'slopeErrorMrad', value: `${slopeErrorMrad} mrad`, source: `class default: ${source.text}`, verified: source.verified }],
  };
}
