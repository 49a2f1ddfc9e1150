import { degree } from '#app/physics/units.ts';

/** Airless elevation below which the whole disc is under a level horizon and no refraction is applied. [°] */
export const lowestRefractedDeg = -(0.26667 + 0.5667);

/**
 * Lift of the sun by the atmosphere. [°] Uncertain by 0.1° or more below 5°, where the temperature profile decides.
 *
 * @param airlessElevationDeg Topocentric elevation without atmosphere. [°]
 * @param pressureHpa Station pressure. [hPa]
 * @param temperatureC Air temperature. [°C]
 * @see I. Reda and A. Andreas, NREL/TP-560-34302, section 3.14.2.
 */
export function refractionDeg(airlessElevationDeg: number, pressureHpa: number, temperatureC: number): number {
  if (airlessElevationDeg < lowestRefractedDeg) return 0;
  const e = airlessElevationDeg;
  const weather = (pressureHpa / 1010) * (283 / (273 + temperatureC));
  return (weather * 1.02) / (60 * Math.tan((e + 10.3 / (e + 5.11)) * degree));
}

/** Airless elevation of a direction that is seen at an apparent elevation. [°] */
export function airlessElevationDeg(apparentElevationDeg: number, pressureHpa: number, temperatureC: number): number {
  let airless = apparentElevationDeg;
  for (let step = 0; step < 30; step++) {
    const next = apparentElevationDeg - refractionDeg(airless, pressureHpa, temperatureC);
    if (Math.abs(next - airless) < 1e-10) return next;
    airless = next;
  }
  return airless;
}

/**
 * Dip of the horizon for an eye or an optic above the surrounding ground. [°]
 *
 * @param heightM Height above the surrounding ground, 0 or more. [m]
 */
export function horizonDipDeg(heightM: number): number {
  return 0.029 * Math.sqrt(Math.max(0, heightM));
}
