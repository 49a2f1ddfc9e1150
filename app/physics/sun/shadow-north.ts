import { wrap180, wrap360 } from '#app/physics/units.ts';
import { solarPosition, type Observer } from './solar-position.ts';

/** True bearing of a shadow, and what a reading of it says about the instrument. */
export interface ShadowNorth {
  /** True bearing in which an upright edge throws its shadow. [°] 0…360 */
  readonly shadowAzimuthDeg: number;
  /** To be added to readings of the instrument. [°] −180…180 */
  readonly correctionDeg: number;
  /** Error of the bearing for one second of error in the time. [° per s] */
  readonly degPerSecond: number;
}

/**
 * True north from the timed shadow of an upright edge.
 *
 * @param readDeg Bearing of the shadow as the instrument gives it. [°] 0…360
 * @throws RangeError if the sun is below 2° or above 75°, where no upright edge throws a shadow that can be read.
 */
export function northFromShadow(utcMs: number, observer: Observer, readDeg: number): ShadowNorth {
  const sun = solarPosition(utcMs, observer);
  if (sun.apparentElevationDeg < 2 || sun.apparentElevationDeg > 75) {
    throw new RangeError(`The sun stands at ${sun.apparentElevationDeg.toFixed(1)}°; a shadow can be read between 2 and 75°.`);
  }
  const shadowAzimuthDeg = wrap360(sun.azimuthDeg + 180);
  const later = solarPosition(utcMs + 60_000, observer);
  return {
    shadowAzimuthDeg,
    correctionDeg: wrap180(shadowAzimuthDeg - readDeg),
    degPerSecond: wrap180(later.azimuthDeg - sun.azimuthDeg) / 60,
  };
}
