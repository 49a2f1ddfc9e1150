import type { SourceRef } from '#app/physics/model/stated.ts';
import type { OpticKind } from './optic.ts';

/** Class value of the surface slope error. [mrad] One sigma on each axis. */
export interface SlopeErrorRow {
  readonly slopeErrorMrad: number;
  readonly rangeMrad: readonly [low: number, high: number];
  readonly source: SourceRef;
}

function row(slopeErrorMrad: number, low: number, high: number, text: string): SlopeErrorRow {
  return { slopeErrorMrad, rangeMrad: [low, high], source: { text, verified: false } };
}

const polished = row(0.3, 0.1, 0.5, 'polished optic, 0.1–0.5 mrad (row mem-polished-optic)');
const sheetMetal = row(3, 2, 5, 'polished sheet metal, 2–5 mrad (row mem-polished-sheet-metal)');
const floatGlass = row(0.6, 0.3, 1, 'float glass with roller wave, 0.3–1 mrad (row mem-float-glass)');

export const slopeErrors: Readonly<Record<OpticKind, SlopeErrorRow>> = {
  lens: polished,
  sphere: polished,
  cylinder: row(3, 3, 10, 'blown bottle or vase, 3–10 mrad, smooth end (row mem-blown-bottle)'),
  bowl: row(5, 3, 10, 'blown bottle or vase, 3–10 mrad (row mem-blown-bottle)'),
  'concave-mirror': polished,
  'polished-bowl': sheetMetal,
  dish: sheetMetal,
  facade: floatGlass,
  'curved-metal': sheetMetal,
  trough: sheetMetal,
  'bowed-pane': floatGlass,
  fresnel: row(1, 0.5, 2, 'moulded sheet, taken as 1 mrad'),
  'ponded-dome': row(5, 3, 10, 'moulded shell, taken as 5 mrad'),
  telescope: row(0, 0, 0.1, 'thin ideal objective'),
};

/** Setting-out tolerance of the panes of a curved façade, one sigma. [mrad] 2–5, stated value, unverified. */
export const paneTiltMrad = 3;

/** Share by which the focal length of a grooved acrylic sheet changes either way over 0.4–1.1 µm. Stated value, unverified. */
export const fresnelColourSpread = 0.025;

/** One-sigma of focal length or radius, relative. */
export const measuredOpticSigmaRel = 0.02;
export const classOpticSigmaRel = 0.3;
