import { astronomicalUnitM, solarRadiusM } from '#app/physics/constants.ts';
import { degree } from '#app/physics/units.ts';

/** Angular diameter of the sun's disc. [°] @param distanceAu Distance from the sun. [au] 0.98…1.02 */
export function angularDiameterDeg(distanceAu: number): number {
  return (2 * Math.asin(solarRadiusM / (distanceAu * astronomicalUnitM))) / degree;
}

/** Half the angular diameter. [rad] */
export function halfAngleRad(distanceAu: number): number {
  return Math.asin(solarRadiusM / (distanceAu * astronomicalUnitM));
}

/** Mean of the disc's radiance over the radiance at its centre, for the law 1 − u(1 − μ). */
export function meanOverCentre(limbU: number): number {
  return 1 - limbU / 3;
}

/**
 * Share of the disc's power inside a fraction of its radius, for the law 1 − u(1 − μ).
 *
 * @param radiusFraction Distance from the centre over the radius. 0…1
 */
export function powerFractionInside(radiusFraction: number, limbU: number): number {
  const mu = Math.sqrt(Math.max(0, 1 - radiusFraction * radiusFraction));
  const inside = (1 - limbU) * radiusFraction * radiusFraction + ((2 * limbU) / 3) * (1 - mu * mu * mu);
  return inside / meanOverCentre(limbU);
}

/** Greatest concentration that passive optics can reach for the mean radiance of the disc. @param indexAtTarget 1 in air. */
export function concentrationLimit(halfAngle: number, indexAtTarget = 1): number {
  return (indexAtTarget / Math.sin(halfAngle)) ** 2;
}
