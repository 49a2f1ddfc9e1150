import type { RefractiveMaterial } from './optic.ts';
import { refractiveMaterials } from './refractive-materials.data.ts';

/** Index and internal transmittance of a material, whether a class or explicit. */
export interface Medium {
  readonly refractiveIndex: number;
  /** Share of sunlight that survives a path inside, surfaces not counted. @param pathM [m] */
  readonly internalTransmittance: (pathM: number) => number;
}

/** −ln T grows almost as a power of the path, so the table is read in log-log; below its first entry as Beer–Lambert. */
function tableTransmittance(table: readonly (readonly [number, number])[], pathM: number): number {
  const pathMm = pathM * 1000;
  const first = table[0];
  if (first === undefined || pathMm <= 0) return 1;
  if (pathMm <= first[0]) return first[1] ** (pathMm / first[0]);
  let low = first;
  let high = first;
  for (const entry of table) {
    low = high;
    high = entry;
    if (entry[0] >= pathMm) break;
  }
  const share = Math.log(pathMm / low[0]) / Math.log(high[0] / low[0]);
  const depth = Math.exp((1 - share) * Math.log(-Math.log(low[1])) + share * Math.log(-Math.log(high[1])));
  return Math.exp(-depth);
}

export function mediumOf(material: RefractiveMaterial): Medium {
  if (material.name === 'explicit') {
    const { refractiveIndex, absorptionPerM } = material;
    return { refractiveIndex, internalTransmittance: (pathM) => Math.exp(-absorptionPerM * pathM) };
  }
  const row = refractiveMaterials[material.name];
  return {
    refractiveIndex: row.refractiveIndex,
    internalTransmittance: (pathM) => tableTransmittance(row.internalTransmittance, pathM),
  };
}

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

/**
 * Unpolarised reflectance of one smooth surface.
 *
 * @param cosIncidence Cosine on the incoming side. 0…1
 * @param indexRatio Index of the far side over that of the near side.
 */
export function fresnelReflectance(cosIncidence: number, indexRatio: number): number {
  const [s, p] = fresnelReflectances(1, indexRatio, Math.min(1, cosIncidence));
  return (s + p) / 2;
}

/** Angle of incidence at which p light is not reflected. [rad] */
export function brewsterAngle(n1: number, n2: number): number {
  return Math.atan2(n2, n1);
}

/** Focal length of a full sphere or cylinder from its centre. [m] */
export function ballFocalLengthM(radiusM: number, refractiveIndex: number): number {
  return (refractiveIndex * radiusM) / (2 * (refractiveIndex - 1));
}

/**
 * Index that a cylinder presents in its normal section when the light comes obliquely along its axis.
 *
 * @param sinAxial Sine of the angle between the light and the normal section.
 * @see A. Bravais; used for skew rays through prisms and cylinders.
 */
export function bravaisIndex(refractiveIndex: number, sinAxial: number): number {
  const sinSquared = sinAxial * sinAxial;
  return Math.sqrt((refractiveIndex * refractiveIndex - sinSquared) / (1 - sinSquared));
}

/** Focal length of a lens in air from its two radii. [m] Second radius negative for a biconvex lens, Infinity for a flat. */
export function lensmakerFocalLengthM(refractiveIndex: number, firstRadiusM: number, secondRadiusM: number, thicknessM: number): number {
  const n = refractiveIndex;
  const power = (n - 1) * (1 / firstRadiusM - 1 / secondRadiusM + ((n - 1) * thicknessM) / (n * firstRadiusM * secondRadiusM));
  return 1 / power;
}

/** Tangential and sagittal focal lengths of a spherical mirror at an angle of incidence (Coddington). [m] @param incidence [rad] */
export function obliqueMirrorFociM(radiusM: number, incidence: number): { readonly tangentialM: number; readonly sagittalM: number } {
  return { tangentialM: (radiusM / 2) * Math.cos(incidence), sagittalM: radiusM / (2 * Math.cos(incidence)) };
}
