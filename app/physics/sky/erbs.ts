/** Beam and diffuse parts of a measured global irradiance. [W/m²] */
export interface SplitGlobal {
  readonly dniWm2: number;
  readonly diffuseWm2: number;
  /** Global over extraterrestrial on a level surface. */
  readonly clearness: number;
}

/** Below this elevation the split divides by a vanishing cosine and says nothing. [°] */
export const lowestSplitElevationDeg = 5;

/**
 * Direct normal irradiance from global irradiance on level ground, by the hourly correlation of the diffuse share with
 * the clearness index.
 *
 * Derived from hourly values between 31 and 42° N; a single hour may be off by 20 % and more of the global value.
 *
 * @param globalWm2 Mean over the interval. [W/m²]
 * @param airlessElevationDeg Elevation of the sun at the middle of the interval. [°]
 * @param extraterrestrialWm2 Irradiance outside the atmosphere, square to the sun. [W/m²]
 * @returns null below 5°.
 * @see D. G. Erbs, S. A. Klein, J. A. Duffie, Estimation of the diffuse radiation fraction for hourly, daily and
 *   monthly-average global radiation, Solar Energy 28(4), 293–302, 1982.
 */
export function erbsSplit(globalWm2: number, airlessElevationDeg: number, extraterrestrialWm2: number): SplitGlobal | null {
  if (airlessElevationDeg < lowestSplitElevationDeg) return null;
  const sine = Math.sin((airlessElevationDeg * Math.PI) / 180);
  const clearness = Math.max(0, globalWm2 / (extraterrestrialWm2 * sine));
  const diffuseWm2 = globalWm2 * diffuseShare(clearness);
  return { dniWm2: Math.min(extraterrestrialWm2, Math.max(0, (globalWm2 - diffuseWm2) / sine)), diffuseWm2, clearness };
}

function diffuseShare(kt: number): number {
  if (kt <= 0.22) return 1 - 0.09 * kt;
  if (kt > 0.8) return 0.165;
  return 0.9511 - 0.1604 * kt + 4.388 * kt ** 2 - 16.638 * kt ** 3 + 12.336 * kt ** 4;
}
