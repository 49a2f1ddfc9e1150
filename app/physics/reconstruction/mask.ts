import type { FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import { defaultOccluderSigmaM, movedOccluders } from '#app/physics/occluders.ts';
import { occlusionTest } from '#app/physics/optics/trace/occlusion.ts';
import { indexForFocus } from '#app/physics/optics/trace/spectral.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import type { Occluder } from '#app/physics/optics/trace/trace-model.ts';
import { cross, scale, unit, type Vector } from '#app/physics/vector.ts';
import type { SettledInput } from './setting.ts';

/** Share of the light towards the optic that passes openings and bars: as surveyed, and at the ends of the survey error. */
export interface RayShare {
  readonly nominal: number;
  readonly least: number;
  readonly most: number;
}

export type Mask = (towardsSun: Vector, sunHalfAngleRad: number) => RayShare;

/** Rays by which a minute is judged; a bar of 1 % of the aperture is seen. */
const rays = 256;

/** A surveyed corner counts as excluded beyond this many sigmas. */
const sigmas = 2;

/** The optic with the same aperture and the least to compute: what happens beyond its first surface does not matter here. */
function sameAperture(optic: Optic): Optic {
  if (optic.kind === 'bowed-pane') {
    const { widthM, heightM, axisAzimuthDeg, axisElevationDeg } = optic;
    return { kind: 'fresnel', widthM, heightM, axisAzimuthDeg, axisElevationDeg, focalLengthM: 1, transmittance: 1, slopeErrorMrad: 0 };
  }
  if ('material' in optic) return { ...optic, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: indexForFocus(optic.material), absorptionPerM: 0 } };
  if ('paneWidthM' in optic) {
    const { paneWidthM: _width, paneTiltMrad: _tilt, paneBowM: _bow, ...smooth } = optic;
    return { ...smooth, slopeErrorMrad: 0 };
  }
  return { ...optic, slopeErrorMrad: 0 };
}

function passingShare(optic: Optic | undefined, occluders: readonly Occluder[], towardsSun: Vector, sunHalfAngleRad: number): number {
  if (optic === undefined) {
    const blocked = occlusionTest(occluders, { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] });
    return blocked?.(0, 0, 0, towardsSun[0], towardsSun[1], towardsSun[2]) === true ? 0 : 1;
  }
  const { ledger } = traceBundle({ optic, occluders, sunDirection: towardsSun, sunHalfAngleRad, receiver: { kind: 'best plane' }, rays, seed: 0 }).bundle;
  const met = ledger.incident + ledger.blocked;
  return met > 0 ? ledger.incident / met : 1;
}

/**
 * Mask of the scene; null without occluders. Without an optic its origin stands for it.
 *
 * The survey error moves all occluders together across the light: which of them is off is not known.
 */
export function maskOf(input: SettledInput, occluders: readonly Occluder[], model: FocusModel | null): Mask | null {
  if (occluders.length === 0) return null;
  const optic = input.optic === undefined || model === null ? undefined : sameAperture(input.optic);
  const reachM = sigmas * (input.occluderSigmaM ?? defaultOccluderSigmaM);
  return (towardsSun, sunHalfAngleRad) => {
    const nominal = passingShare(optic, occluders, towardsSun, sunHalfAngleRad);
    // Whatever was wholly clear of an optic cannot cover it by moving less than half its width.
    if (reachM === 0 || (nominal === 1 && model !== null && reachM < model.halfWidthM)) return { nominal, least: nominal, most: nominal };
    const side = unit(Math.abs(towardsSun[2]) < 0.99 ? cross([0, 0, 1], towardsSun) : cross([1, 0, 0], towardsSun));
    const across = cross(towardsSun, side);
    const shares = [side, scale(side, -1), across, scale(across, -1)].map((direction) =>
      passingShare(optic, movedOccluders(occluders, scale(direction, reachM)), towardsSun, sunHalfAngleRad));
    return { nominal, least: Math.min(nominal, ...shares), most: Math.max(nominal, ...shares) };
  };
}
