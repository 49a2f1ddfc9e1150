import type { SourceRef } from '#app/physics/model/stated.ts';
import type { RefractiveMaterialName } from './optic.ts';

/**
 * Class values of refracting materials for the closed forms: one index near the middle of the beam, and the internal
 * transmittance of sunlight by path length, weighted with the direct spectrum of ASTM G173 without surfaces. It is not
 * one exponential: the near infrared goes in the first centimetres.
 */
export interface RefractiveMaterialRow {
  readonly name: string;
  readonly refractiveIndex: number;
  /** Pairs of path [mm] and internal transmittance, by rising path. */
  readonly internalTransmittance: readonly (readonly [pathMm: number, transmittance: number])[];
  readonly rowIds: readonly string[];
  readonly source: SourceRef;
}

export const refractiveMaterials: Readonly<Record<RefractiveMaterialName, RefractiveMaterialRow>> = {
  'crown-glass': {
    name: 'optical crown glass',
    refractiveIndex: 1.5168,
    internalTransmittance: [[4, 0.9956], [10, 0.9893], [50, 0.9575], [100, 0.9306], [280, 0.8684]],
    rowIds: ['n-n-bk7-0.5893', 'ti-n-bk7-4', 'ti-n-bk7-10', 'ti-n-bk7-50', 'ti-n-bk7-100', 'ti-n-bk7-280'],
    source: { text: 'SCHOTT catalogue 2017, N-BK7, weighted with ASTM G173 direct', verified: true },
  },
  'soda-lime-clear': {
    name: 'ordinary clear soda-lime glass',
    refractiveIndex: 1.5234,
    internalTransmittance: [[4, 0.8929], [10, 0.7649], [50, 0.3645], [100, 0.2137], [280, 0.0686]],
    rowIds: ['n-soda-lime-clear-rubin-0.5893', 'ti-soda-lime-clear-rubin-4', 'ti-soda-lime-clear-rubin-100'],
    source: { text: 'M. Rubin, Solar Energy Materials 12, 1985, clear soda-lime, weighted with ASTM G173 direct', verified: true },
  },
  'soda-lime-low-iron': {
    name: 'low-iron soda-lime glass',
    refractiveIndex: 1.5234,
    internalTransmittance: [[4, 0.9732], [10, 0.9357], [50, 0.7373], [100, 0.5721], [280, 0.3054]],
    rowIds: ['n-soda-lime-low-iron-rubin-0.5893', 'ti-soda-lime-low-iron-rubin-4', 'ti-soda-lime-low-iron-rubin-100'],
    source: { text: 'M. Rubin, Solar Energy Materials 12, 1985, low-iron soda-lime, weighted with ASTM G173 direct', verified: true },
  },
  acrylic: {
    name: 'acrylic (PMMA)',
    refractiveIndex: 1.4905,
    internalTransmittance: [[4, 0.919], [10, 0.8679], [50, 0.6951], [100, 0.5641], [280, 0.3075]],
    rowIds: ['n-pmma-sultanova-0.5893', 'ti-pmma-zhang-mitsubishi-4', 'ti-pmma-zhang-mitsubishi-100'],
    source: { text: 'Sultanova et al. 2009 (index); Zhang et al. 2020 (absorption, an upper bound: scatter-limited)', verified: true },
  },
  polycarbonate: {
    name: 'polycarbonate',
    refractiveIndex: 1.5846,
    internalTransmittance: [[4, 0.9141], [10, 0.8595], [50, 0.6637], [100, 0.5163], [280, 0.2737]],
    rowIds: ['n-pc-sultanova-0.5893', 'ti-pc-zhang-4', 'ti-pc-zhang-100'],
    source: { text: 'Sultanova et al. 2009 (index); Zhang et al. 2020 (absorption, an upper bound: scatter-limited)', verified: true },
  },
  water: {
    name: 'clear water',
    refractiveIndex: 1.3334,
    internalTransmittance: [[4, 0.8124], [10, 0.7626], [50, 0.6592], [100, 0.6166], [280, 0.5375]],
    rowIds: ['n-water-daimon-20c-0.5893', 'ti-water-hale-querry-4', 'ti-water-hale-querry-100'],
    source: { text: 'Daimon and Masumura, Applied Optics 46, 2007 (index); Hale and Querry, Applied Optics 12, 1973 (absorption)', verified: true },
  },
};
