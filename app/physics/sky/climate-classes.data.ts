import type { ClimateClass } from '#app/physics/model/input.ts';

/** Median air of a climate class. The figures are stated values from memory, so the screen says "unverified". */
export interface ClimateAir {
  readonly aod500: number;
  readonly waterCm: number;
  /** Air temperature by day. [°C] */
  readonly temperatureC: number;
  readonly name: string;
}

/** Exponent that carries the aerosol depth from 500 to 380 nm. Stated value, unverified. */
export const angstromExponent = 1.3;

/** Ozone column where none is given. [cm] Stated value, unverified. */
export const defaultOzoneCm = 0.3;

/** One-sigma spread of the logarithm of aerosol depth and water inside a class. Stated value, unverified. */
export const classSigmaLn = 0.4;

export const climateAir: Readonly<Record<ClimateClass, ClimateAir>> = {
  'clean-dry-mountain': { aod500: 0.04, waterCm: 0.6, temperatureC: 5, name: 'clean dry mountain' },
  'temperate-rural': { aod500: 0.12, waterCm: 1.5, temperatureC: 12, name: 'temperate rural' },
  'urban-maritime': { aod500: 0.22, waterCm: 2.5, temperatureC: 15, name: 'urban or maritime summer' },
  'humid-tropics': { aod500: 0.3, waterCm: 4.5, temperatureC: 28, name: 'humid tropics' },
  'dusty-desert': { aod500: 0.4, waterCm: 1.5, temperatureC: 28, name: 'dusty desert' },
};
