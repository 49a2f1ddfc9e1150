import type { SourceRef } from '#app/physics/model.ts';
import type { OpticKind } from './optic.ts';

/** Class value of the surface slope error. [mrad] One sigma on each axis. */
export interface SlopeErrorRow {
  readonly slopeErrorMrad: number;
  readonly rangeMrad: readonly [low: number, high: number];
  readonly source: SourceRef;
}

const polished: SlopeErrorRow = {
  slopeErrorMrad: 0.3, rangeMrad: [0.1, 0.5], source: { text: 'polished optic, 0.1–0.5 mrad (row mem-polished-optic)', verified: false },
};
const blown: SlopeErrorRow = {
  slopeErrorMrad: 5, rangeMrad: [3, 10], source: { text: 'blown bottle or vase, 3–10 mrad (row mem-blown-bottle)', verified: false },
};
const sheetMetal: SlopeErrorRow = {
  slopeErrorMrad: 3, rangeMrad: [2, 5], source: { text: 'polished sheet metal, 2–5 mrad (row mem-polished-sheet-metal)', verified: false },
};
const floatGlass: SlopeErrorRow = {
  slopeErrorMrad: 0.6, rangeMrad: [0.3, 1], source: { text: 'float glass with roller wave, 0.3–1 mrad (row mem-float-glass)', verified: false },
};

export const slopeErrors: Readonly<Record<OpticKind, SlopeErrorRow>> = {
  lens: polished,
  sphere: polished,
  cylinder: blown,
  bowl: blown,
  'concave-mirror': floatGlass,
  'polished-bowl': sheetMetal,
  dish: sheetMetal,
  facade: sheetMetal,
  'curved-metal': sheetMetal,
  trough: sheetMetal,
  'bowed-pane': floatGlass,
  fresnel: polished,
  'ponded-dome': blown,
  telescope: polished,
};

/** Share by which the focal length of a grooved acrylic sheet changes either way over 0.4–1.1 µm. Stated value, unverified. */
export const fresnelColourSpread = 0.025;

/** One-sigma of focal length or radius, relative. */
export const measuredOpticSigmaRel = 0.02;
export const classOpticSigmaRel = 0.3;
