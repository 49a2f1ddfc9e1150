import { fresnelReflectance } from '#app/physics/optics/refraction.ts';

/** Index of float glass for the rise of reflectance towards grazing; Rubin 1985 at 0.59 µm. */
export const paneIndex = 1.523;
const paneNormal = fresnelReflectance(1, paneIndex);

/**
 * Reflectance of a pane of which only the value at normal incidence is known: it rises to 1 as bare glass does.
 *
 * @param normalReflectance Solar reflectance at normal incidence. 0…1
 */
export function paneReflectance(normalReflectance: number, cosIncidence: number): number {
  const rise = (fresnelReflectance(cosIncidence, paneIndex) - paneNormal) / (1 - paneNormal);
  return normalReflectance + (1 - normalReflectance) * Math.max(0, rise);
}
