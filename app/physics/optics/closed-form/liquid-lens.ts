import { safeAcos } from '#app/physics/units.ts';
import { unit, type Vector } from '#app/physics/vector.ts';
import type { BowlOptic, DomeOptic } from '#app/physics/optics/optic.ts';
import { slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import { fresnelReflectance, mediumOf, type Medium } from '#app/physics/optics/refraction.ts';
import { sharpestDistanceM, surveyOrigin, type Beam, type FocusModel } from './beam.ts';
import { radiusHolding, roundShare } from './meridional.ts';
import { roundBottomFan } from './shapes.ts';

/** Size of the liquid, checked. */
interface Pool {
  readonly radiusM: number;
  readonly depthM: number;
  readonly halfWidthM: number;
}

function poolOf(optic: BowlOptic | DomeOptic): Pool {
  const { radiusM } = optic;
  if (optic.kind === 'ponded-dome') {
    const halfWidthM = optic.pondDiameterM / 2;
    if (halfWidthM > radiusM) {
      throw new RangeError(`optic.pondDiameterM ${optic.pondDiameterM} and optic.radiusM ${radiusM} disagree: the pond is wider than the dome.`);
    }
    return { radiusM, depthM: radiusM - Math.sqrt(radiusM * radiusM - halfWidthM * halfWidthM), halfWidthM };
  }
  const depthM = optic.liquidDepthM;
  if (depthM > 2 * radiusM) {
    throw new RangeError(`optic.liquidDepthM ${depthM} and optic.radiusM ${radiusM} disagree: a round bowl is two radii deep at most.`);
  }
  return { radiusM, depthM, halfWidthM: Math.sqrt(Math.max(0, depthM * (2 * radiusM - depthM))) };
}

/** Down-going direction inside the liquid, pointing back up to the light. */
function insideDirection(towardsSun: Vector, refractiveIndex: number): Vector {
  const east = towardsSun[0] / refractiveIndex;
  const north = towardsSun[1] / refractiveIndex;
  return [east, north, Math.sqrt(Math.max(0, 1 - east * east - north * north))];
}

/** A pool made ready for any sun. */
interface ReadyPool extends Pool {
  readonly medium: Medium;
  readonly focalLengthM: number;
  readonly slopeBlurRad: number;
}

function readyPool(optic: BowlOptic | DomeOptic): ReadyPool {
  const pool = poolOf(optic);
  const medium = mediumOf(optic.kind === 'bowl' ? optic.material : { name: 'water' });
  const n = medium.refractiveIndex;
  return {
    ...pool, medium,
    focalLengthM: (n * pool.radiusM) / (n - 1),
    slopeBlurRad: (2 * (n - 1) * (optic.slopeErrorMrad ?? slopeErrors[optic.kind].slopeErrorMrad)) / 1000,
  };
}

function poolBeam(pool: ReadyPool, towardsSun: Vector, halfAngle: number): Beam | null {
  const up = towardsSun[2];
  if (up <= 0.02) return null;
  const { radiusM, medium } = pool;
  const n = medium.refractiveIndex;
  const inside = insideDirection(towardsSun, n);
  const lightM2 = Math.PI * pool.halfWidthM ** 2 * up * (1 - fresnelReflectance(up, n));
  const fan = roundBottomFan(radiusM, Math.min(pool.halfWidthM * Math.sqrt(inside[2]), 0.999 * radiusM), medium, pool.depthM / inside[2]);
  // Half-angle inside the liquid is smaller, but the round bottom widens it again on the way out.
  const blur = (z: number): number => Math.max(z - radiusM, 0.05 * radiusM) * Math.hypot(Math.tan(halfAngle), pool.slopeBlurRad);
  const concentration = (z: number, offset: number, disc: number): number =>
    z <= radiusM ? 0 : (lightM2 * roundShare(fan, z, Math.abs(offset), disc / 2, blur(z))) / ((Math.PI * disc * disc) / 4);
  let sharpest: number | null = null;
  return {
    direction: [-inside[0], -inside[1], -inside[2]], tilt: safeAcos(up), across: null, concentration,
    get focusM() {
      sharpest ??= sharpestDistanceM((z) => concentration(z, 0, 2 * blur(z)), pool.focalLengthM, 0.35, 1.02);
      return sharpest;
    },
    spotDiameterM: (z) => 2 * radiusHolding(fan, z, 0.5, blur(z)),
  };
}

/** Sun whose light leaves through the middle of the bottom towards a mark; null above the level or beyond grazing. */
function sunForMark(towardsMark: Vector, refractiveIndex: number): Vector | null {
  const east = -towardsMark[0] * refractiveIndex;
  const north = -towardsMark[1] * refractiveIndex;
  const level = Math.hypot(east, north);
  if (towardsMark[2] >= 0 || level >= 1) return null;
  return unit([east, north, Math.sqrt(1 - level * level)]);
}

/**
 * Level liquid over a round bottom; the chief ray starts from the centre of the sphere that the bottom belongs to.
 *
 * The flat top bends parallel light as a whole; after that the round bottom has no axis of its own, so the spot stays
 * round at any height of the sun and lies on the line through the centre.
 */
export function liquidLensModel(optic: BowlOptic | DomeOptic): FocusModel {
  const pool = readyPool(optic);
  return {
    focusKind: 'point',
    focalLengthM: pool.focalLengthM,
    generator: null,
    // A bowl is surveyed from the centre of its sphere, a dome from its lowest point.
    startsAt: optic.kind === 'ponded-dome' ? [0, 0, pool.radiusM] : surveyOrigin,
    lineHalfLengthM: 0,
    halfWidthM: Math.max(pool.halfWidthM, optic.kind === 'bowl' && pool.depthM > pool.radiusM ? pool.radiusM : 0),
    moves: false,
    reflects: false,
    throughput: pool.medium.internalTransmittance(pool.depthM),
    beamFor: (towardsSun, halfAngle) => poolBeam(pool, towardsSun, halfAngle),
    requiredSun: (towardsMark) => sunForMark(towardsMark, pool.medium.refractiveIndex),
  };
}
