import { fresnelReflectance } from '#app/physics/optics/refraction.ts';

/**
 * Reflectances of a bare interface for light polarised across (s) and in (p) the plane of incidence.
 *
 * @param n1 Index on the side that the light comes from. ≥ 1
 * @param n2 Index on the other side. ≥ 1
 * @param cosIncidence Cosine of the angle of incidence. 0…1
 * @returns [Rs, Rp], both 1 under total reflection.
 * @see M. Born and E. Wolf, Principles of Optics, §1.5
 */
export function fresnelReflectances(n1: number, n2: number, cosIncidence: number): readonly [number, number] {
  if (!(cosIncidence >= 0 && cosIncidence <= 1)) throw new RangeError(`cosIncidence = ${cosIncidence}; allowed 0 to 1`);
  const eta = n1 / n2;
  const k = 1 - eta * eta * (1 - cosIncidence * cosIncidence);
  if (k <= 0) return [1, 1];
  const ct = Math.sqrt(k);
  const rs = (n1 * cosIncidence - n2 * ct) / (n1 * cosIncidence + n2 * ct);
  const rp = (n2 * cosIncidence - n1 * ct) / (n2 * cosIncidence + n1 * ct);
  return [rs * rs, rp * rp];
}

/** Angle of incidence at which p light is not reflected. [rad] */
export function brewsterAngle(n1: number, n2: number): number {
  return Math.atan2(n2, n1);
}

/** Index of float glass for the rise of reflectance towards grazing; Rubin 1985 at 0.59 µm. */
const paneIndex = 1.523;
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
