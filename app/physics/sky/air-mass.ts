import { standardPressurePa } from '#app/physics/constants.ts';
import { degree } from '#app/physics/units.ts';

/**
 * Relative optical air mass. @param apparentZenithDeg Refracted zenith angle. [°] 0…90
 *
 * @see F. Kasten and A. T. Young, Applied Optics 28, 4735–4738, 1989, eq. 3.
 */
export function kastenYoungAirMass(apparentZenithDeg: number): number {
  return 1 / (Math.cos(apparentZenithDeg * degree) + 0.50572 * (96.07995 - apparentZenithDeg) ** -1.6364);
}

/**
 * Relative optical air mass as used inside the published Bird sheet. @param apparentZenithDeg [°] 0…90
 *
 * @see F. Kasten, A new table and approximation formula for the relative optical air mass, 1966.
 */
export function kasten1966AirMass(apparentZenithDeg: number): number {
  return 1 / (Math.cos(apparentZenithDeg * degree) + 0.15 * (93.885 - apparentZenithDeg) ** -1.253);
}

/** Relative air mass scaled with the station pressure. */
export function absoluteAirMass(relativeAirMass: number, pressurePa: number): number {
  return (relativeAirMass * pressurePa) / standardPressurePa;
}

/** Standard pressure at a height above the sea. [Pa] @param elevationM −500…9000 [m] ICAO standard atmosphere, closed form of PSAS 2004. */
export function standardPressureAtPa(elevationM: number): number {
  return 100 * ((44331.514 - elevationM) / 11880.516) ** (1 / 0.1902632);
}
