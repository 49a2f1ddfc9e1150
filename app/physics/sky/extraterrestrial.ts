import { solarConstantWm2 } from '#app/physics/constants.ts';

/** Irradiance outside the atmosphere, normal to the sun. [W/m²] @param distanceAu [au] */
export function extraterrestrialWm2(distanceAu: number, solarConstant = solarConstantWm2): number {
  return solarConstant / (distanceAu * distanceAu);
}

/**
 * Square of the mean over the actual distance, by day of the year.
 *
 * @param dayOfYear 1…366
 * @see J. W. Spencer, Fourier series representation of the position of the sun, Search 2(5), 1971.
 */
export function eccentricityFactor(dayOfYear: number): number {
  const b = (2 * Math.PI * (dayOfYear - 1)) / 365;
  return 1.00011 + 0.034221 * Math.cos(b) + 0.00128 * Math.sin(b) + 0.000719 * Math.cos(2 * b) + 0.000077 * Math.sin(2 * b);
}
