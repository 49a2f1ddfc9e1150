import type { SceneOpening } from './scene.ts';

/** A value that stands in for a measurement, with where it comes from. `verified` false is shown as "unverified". */
export interface ClassValue {
  readonly value: number;
  readonly source: string;
  readonly verified: boolean;
}

const fromMemory = (value: number, what: string): ClassValue => ({ value, source: `class value for ${what}, from memory`, verified: false });
const glassLibrary = (value: number, row: string): ClassValue => ({
  value,
  source: `Lawrence Berkeley National Laboratory, WINDOW 4 glass library, as shipped with EnergyPlus, row ${row}`,
  verified: true,
});
const metals = (value: number, row: string, author: string): ClassValue => ({ value, source: `${author}, weighted with the ASTM G173 direct spectrum, row ${row}`, verified: true });

/** Solar reflectance by kind, where it was not measured. */
export const classReflectance = {
  'curved-mirror': metals(0.79, 'r-mirror-soda-lime-clear-rubin-4mm-total', 'Rubin 1985 and Yang 2015'),
  'metal-trim': metals(0.65, 'r-stainless-austenitic and r-stainless-ferritic', 'stainless steel data set'),
  dish: fromMemory(0.8, 'a reflecting dish, 0.7 to 0.9'),
  'window-pane': glassLibrary(0.22, 'dgu-r: low-e double unit, 0.20 to 0.23'),
  'curved-building-face': glassLibrary(0.22, 'dgu-r: low-e double unit, 0.20 to 0.23'),
} as const satisfies Record<string, ClassValue>;

export const classCentreBowM = fromMemory(0.003, 'the bow of a double unit in cold weather');
export const classFresnelTransmittance = fromMemory(0.8, 'a grooved acrylic sheet, 0.75 to 0.88');
export const classTelescopeTransmittance = fromMemory(0.85, 'a coated objective');
export const classLensFocalRatio = fromMemory(2.7, 'the focal length over the diameter of a hand lens, 1.5 to 5');
export const classMirrorRadiusM = fromMemory(1, 'the radius of a make-up mirror, 0.6 to 2 m');

/** Solar transmittance of the glass that the light passes on its way, at normal incidence. */
export const openingTransmittance: Record<SceneOpening['glass'], ClassValue> = {
  none: { value: 1, source: 'no glass in the path', verified: true },
  'single-clear-3': glassLibrary(0.837, 'ep-ts-clear-3mm'),
  'single-clear-6': glassLibrary(0.775, 'ep-ts-clear-6mm'),
  'double-clear': glassLibrary(0.655, 'dgu-t-clear-3-clear-3 (0.705) and dgu-t-clear-6-clear-6 (0.604), middle'),
  'double-low-e': glassLibrary(0.504, 'dgu-t-low-e-e0-10-on-surface-2, 3 mm (0.536) and 6 mm (0.472), middle'),
  'vehicle-glass': fromMemory(0.7, 'a side window of a vehicle'),
  unknown: glassLibrary(0.775, 'ep-ts-clear-6mm, taken because the glass is not stated'),
};

/** One-sigma of the focal length or radius, relative: measured, and where a class value stands in. */
export const opticSigma = { measured: 0.02, estimated: 0.15, classValue: 0.3 } as const;

