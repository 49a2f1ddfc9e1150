/** People read and type metric or US units; everything is stored in metres or millimetres. */
export const unitSystems = ['metric', 'us'] as const;
export type UnitSystem = (typeof unitSystems)[number];

export const lengthUnits = ['mm', 'cm', 'm', 'in', 'ft'] as const;
export type LengthUnit = (typeof lengthUnits)[number];
/** Exact by definition (international yard and pound agreement, 1959). [mm] */
export const unitMm: Record<LengthUnit, number> = { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8 };
const mileM = 1_609.344;

/** A distance over the ground in words, as exact as it is useful: "120 m", "1.4 km", "390 ft", "2.1 mi". */
export function distanceWords(distanceM: number, units: UnitSystem): string {
  if (units === 'us') {
    const feet = distanceM / (unitMm.ft / 1000);
    return feet < 1_000 ? `${rounded(feet)} ft` : `${(distanceM / mileM).toFixed(distanceM < 10 * mileM ? 1 : 0)} mi`;
  }
  return distanceM < 1_000 ? `${rounded(distanceM)} m` : `${(distanceM / 1000).toFixed(distanceM < 10_000 ? 1 : 0)} km`;
}

const rounded = (value: number): string => (value < 10 ? value.toFixed(1) : value < 100 ? value.toFixed(0) : String(Math.round(value / 10) * 10));
