import type { Vector } from '#app/physics/vector.ts';

export const surveyOrigin: Vector = [0, 0, 0];

/** Light beyond the optic for one direction of the sun. */
export interface Beam {
  /** Unit direction of the chief ray beyond the optic, from its origin. */
  readonly direction: Vector;
  /** Distance of the sharpest spot from the origin along the chief ray. [m] */
  readonly focusM: number;
  /** Unit vector across the line of a line focus, at right angles to the chief ray; null for a point focus. */
  readonly across: Vector | null;
  /** Angle between the light and the optic's axis. [rad] 0 where there is no axis. */
  readonly tilt: number;
  /**
   * Mean concentration on a disc across the chief ray: flux over the direct irradiance that reaches the optic.
   *
   * @param distanceM From the origin along the chief ray. @param offsetM Of the disc's centre from the chief ray; for a
   *   line its signed distance across. @param discDiameterM [m]
   */
  readonly concentration: (distanceM: number, offsetM: number, discDiameterM: number) => number;
  /** Diameter of the spot, or width of the line, that holds half to nine tenths of the light. [m] */
  readonly spotDiameterM: (distanceM: number) => number;
}

/** What the alignment needs of an optic, whatever its kind. */
export interface FocusModel {
  readonly focusKind: 'point' | 'line';
  /** Paraxial focal length from the origin. [m] */
  readonly focalLengthM: number;
  /** Unit direction of the straight generators of a line optic. */
  readonly generator: Vector | null;
  /** Point from which the chief ray starts, seen from the origin of the survey. [m] Zero except for a ponded dome. */
  readonly startsAt: Vector;
  /** Half the optic's extent along its generators. [m] */
  readonly lineHalfLengthM: number;
  /** Half the optic's greatest extent across the light; for a line optic, across the line. [m] */
  readonly halfWidthM: number;
  /** True for optics that are turned by hand or by a drive. */
  readonly moves: boolean;
  /** True where the light comes back from the face that it meets; the target may then stand in direct sun as well. */
  readonly reflects: boolean;
  /** Transmitted or reflected share of sunlight at the middle of the aperture. 0…1 */
  readonly throughput: number;
  /** Null where the sun stands behind the working face. */
  readonly beamFor: (towardsSun: Vector, sunHalfAngle: number) => Beam | null;
  /** Apparent direction of the sun that sends the chief ray to a mark; null where no sun can. */
  readonly requiredSun: (towardsMark: Vector) => Vector | null;
}

/** Distance at which a beam concentrates most on a disc of its own image size, found by a coarse scan and refinement. */
export function sharpestDistanceM(
  concentration: (distanceM: number) => number, focalLengthM: number, fromShare: number, toShare: number,
): number {
  let best = focalLengthM;
  let highest = -1;
  let low = fromShare * focalLengthM;
  let high = toShare * focalLengthM;
  for (let round = 0; round < 3; round++) {
    const step = (high - low) / 24;
    for (let z = low; z <= high + step / 2; z += step) {
      const value = concentration(z);
      if (value > highest) {
        highest = value;
        best = z;
      }
    }
    low = Math.max(best - 1.5 * step, 0.01 * focalLengthM);
    high = best + 1.5 * step;
  }
  return best;
}
