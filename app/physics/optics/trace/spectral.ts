import type { RefractiveMaterial, RefractiveMaterialName } from '#app/physics/optics/optic.ts';
import type { BandAbsorption, Dispersion, Pairs } from './spectral.data.ts';
import {
  acrylicBands,
  aluminium,
  crownExtinction,
  directBeam,
  dispersions,
  polycarbonateBands,
  sodaLimeClearExtinction,
  sodaLimeLowIronExtinction,
  waterExtinction,
  waterInfraredIndex,
} from './spectral.data.ts';

/** Edges of the four bands in which absorption is carried. [µm] */
export const bandEdgesUm = [0.3, 0.7, 1.1, 1.8, 2.5] as const;

/** One colour of the traced beam: a share of its power, with index and internal transmittance. */
export interface Channel {
  /** Share of the beam's power; the channels of a material sum to 1. */
  readonly weight: number;
  readonly refractiveIndex: number;
  /** Internal transmittance, no surfaces, over a path. [m] */
  transmittance(pathM: number): number;
}

/** Linear interpolation in a table of pairs; the end values hold outside it. */
export function interpolatePairs(pairs: Pairs, x: number): number {
  const last = pairs.length - 2;
  if (x <= (pairs[0] ?? 0)) return pairs[1] ?? 0;
  for (let i = 2; i <= last; i += 2) {
    const x1 = pairs[i] ?? 0;
    if (x <= x1) {
      const x0 = pairs[i - 2] ?? 0;
      const y0 = pairs[i - 1] ?? 0;
      return y0 + (((pairs[i + 1] ?? 0) - y0) * (x - x0)) / (x1 - x0);
    }
  }
  return pairs[last + 1] ?? 0;
}

function fittedIndex(fit: Dispersion, wavelengthUm: number): number {
  const l2 = wavelengthUm * wavelengthUm;
  const c = fit.coefficients;
  if (fit.form === 'cauchy') return (c[0] ?? 0) + (c[1] ?? 0) * l2 + (c[2] ?? 0) / l2;
  let square = 1;
  for (let i = 0; i < c.length; i += 2) square += ((c[i] ?? 0) * l2) / (l2 - (c[i + 1] ?? 0));
  return Math.sqrt(square);
}

const dispersionOf: Record<RefractiveMaterialName, Dispersion> = {
  'crown-glass': dispersions['crown-glass'],
  'soda-lime-clear': dispersions['soda-lime'],
  'soda-lime-low-iron': dispersions['soda-lime'],
  acrylic: dispersions.acrylic,
  polycarbonate: dispersions.polycarbonate,
  water: dispersions.water,
};

/**
 * Refractive index of a named material at room temperature.
 *
 * Beyond the measured range of acrylic and polycarbonate (1.05 µm) the fit is extended, which is unverified.
 *
 * @param wavelengthUm Vacuum wavelength. [µm] 0.3…4
 */
export function refractiveIndex(material: RefractiveMaterialName, wavelengthUm: number): number {
  if (!(wavelengthUm >= 0.28 && wavelengthUm <= 4)) throw new RangeError(`wavelengthUm = ${wavelengthUm}; allowed 0.28 to 4`);
  const fit = dispersionOf[material];
  if (material === 'water' && wavelengthUm > fit.longestUm) return interpolatePairs(waterInfraredIndex, wavelengthUm);
  return fittedIndex(fit, wavelengthUm);
}

/** Index at the yellow helium line (0.5876 µm), the one that a measured focal length refers to. */
export function indexForFocus(material: RefractiveMaterial): number {
  return material.name === 'explicit' ? material.refractiveIndex : refractiveIndex(material.name, 0.5875618);
}

const extinctionOf: Partial<Record<RefractiveMaterialName, Pairs>> = {
  'crown-glass': crownExtinction.pairs,
  'soda-lime-clear': sodaLimeClearExtinction.pairs,
  'soda-lime-low-iron': sodaLimeLowIronExtinction.pairs,
  water: waterExtinction.pairs,
};
const bandsOf: Partial<Record<RefractiveMaterialName, BandAbsorption>> = { acrylic: acrylicBands, polycarbonate: polycarbonateBands };

/** Absorption coefficient 4πk/λ, with k linear in wavelength between table points. [1/m] */
export function absorptionPerM(material: RefractiveMaterialName, wavelengthUm: number): number {
  const table = extinctionOf[material];
  if (table) return (4 * Math.PI * interpolatePairs(table, wavelengthUm)) / (wavelengthUm * 1e-6);
  const bands = bandsOf[material];
  if (!bands) throw new RangeError(`no absorption data for ${material}`);
  const band = bandEdgesUm.findIndex((edge, i) => i > 0 && wavelengthUm <= edge);
  return bands.perM[band < 0 ? 3 : band - 1] ?? bands.perM[3];
}

/** Points and trapezoid weights of the direct beam between two wavelengths. [µm, W/m²] */
export function beamQuadrature(fromUm: number, toUm: number): { readonly wavelengthUm: number[]; readonly powerWm2: number[] } {
  const wavelengthUm = [fromUm];
  for (let i = 0; i < directBeam.pairs.length; i += 2) {
    const x = directBeam.pairs[i] ?? 0;
    if (x > fromUm && x < toUm) wavelengthUm.push(x);
  }
  wavelengthUm.push(toUm);
  const powerWm2 = wavelengthUm.map((x, i) => {
    const before = wavelengthUm[i - 1] ?? x;
    const after = wavelengthUm[i + 1] ?? x;
    return interpolatePairs(directBeam.pairs, x) * 500 * (after - before);
  });
  return { wavelengthUm, powerWm2 };
}

/** Mean of a spectral quantity over the direct beam. */
export function beamMean(fromUm: number, toUm: number, quantity: (wavelengthUm: number) => number): number {
  const { wavelengthUm, powerWm2 } = beamQuadrature(fromUm, toUm);
  let sum = 0;
  let norm = 0;
  wavelengthUm.forEach((x, i) => {
    const power = powerWm2[i] ?? 0;
    sum += power * quantity(x);
    norm += power;
  });
  return sum / norm;
}

/**
 * Internal transmittance for the direct beam, surfaces left out.
 *
 * @param pathM Path in the material. [m] ≥ 0
 * @see ASTM G173-03, direct normal spectrum, for the weights
 */
export function solarInternalTransmittance(material: RefractiveMaterialName, pathM: number, fromUm = 0.28, toUm = 4): number {
  return beamMean(fromUm, toUm, (x) => Math.exp(-absorptionPerM(material, x) * pathM));
}

/** Solar reflectance of bare smooth aluminium at normal incidence, from its complex index. */
export function aluminiumSolarReflectance(fromUm = 0.28, toUm = 4): number {
  const n: number[] = [];
  const k: number[] = [];
  for (let i = 0; i < aluminium.triples.length; i += 3) {
    const x = aluminium.triples[i] ?? 0;
    n.push(x, aluminium.triples[i + 1] ?? 0);
    k.push(x, aluminium.triples[i + 2] ?? 0);
  }
  return beamMean(fromUm, toUm, (x) => {
    const nx = interpolatePairs(n, x);
    const kx = interpolatePairs(k, x);
    return ((nx - 1) ** 2 + kx * kx) / ((nx + 1) ** 2 + kx * kx);
  });
}

const tableSteps = 512;

/** Transmittance tabulated over the root of the path, where it is smooth even for water. */
function tabulate(alpha: readonly number[], power: readonly number[], longestM: number): (pathM: number) => number {
  const table = new Float64Array(tableSteps + 2);
  const norm = power.reduce((a, b) => a + b, 0);
  for (let i = 0; i <= tableSteps + 1; i++) {
    const path = longestM * (i / tableSteps) ** 2;
    let sum = 0;
    for (let j = 0; j < alpha.length; j++) sum += (power[j] ?? 0) * Math.exp(-(alpha[j] ?? 0) * path);
    table[i] = sum / norm;
  }
  return (pathM) => {
    const x = Math.min(tableSteps, tableSteps * Math.sqrt(pathM / longestM));
    const i = Math.trunc(x);
    const a = table[i] ?? 0;
    return a + ((table[i + 1] ?? a) - a) * (x - i);
  };
}

/** Cuts each band where half of its power lies below, so that colour is resolved within the wide bands too. */
function halves(fromUm: number, toUm: number): [number, number, number] {
  const { wavelengthUm, powerWm2 } = beamQuadrature(fromUm, toUm);
  const half = powerWm2.reduce((a, b) => a + b, 0) / 2;
  let sum = 0;
  const at = wavelengthUm.findIndex((_, i) => (sum += powerWm2[i] ?? 0) >= half);
  return [fromUm, wavelengthUm[at] ?? (fromUm + toUm) / 2, toUm];
}

/**
 * Colours in which a material is traced: one for an explicit index, else each of the four bands in two halves.
 *
 * @param longestM Longest path that the optic allows; transmittance is tabulated up to it. [m] > 0
 */
export function channelsOf(material: RefractiveMaterial, longestM: number): readonly Channel[] {
  if (material.name === 'explicit') {
    const { absorptionPerM: alpha, refractiveIndex: n } = material;
    return [{ weight: 1, refractiveIndex: n, transmittance: (pathM) => Math.exp(-alpha * pathM) }];
  }
  const name = material.name;
  const channels = [0, 1, 2, 3].flatMap((band) => {
    const [a, m, b] = halves(bandEdgesUm[band] ?? 0, bandEdgesUm[band + 1] ?? 0);
    return [
      [a, m],
      [m, b],
    ].map(([from = 0, to = 0]) => {
      const { wavelengthUm, powerWm2 } = beamQuadrature(from, to);
      const alpha = wavelengthUm.map((x) => absorptionPerM(name, x));
      return {
        weight: powerWm2.reduce((p, q) => p + q, 0),
        refractiveIndex: beamMean(from, to, (x) => refractiveIndex(name, x)),
        transmittance: tabulate(alpha, powerWm2, longestM),
      };
    });
  });
  const norm = channels.reduce((sum, c) => sum + c.weight, 0);
  return channels.map((c) => ({ ...c, weight: c.weight / norm }));
}
