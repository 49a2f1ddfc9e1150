import { stefanBoltzmann } from '#app/physics/constants.ts';

/** Surroundings of a heated spot. */
export interface SpotSurroundings {
  readonly airK: number;
  /** Convective loss. [W m⁻² K⁻¹] 5–10 in still air, 10–25 in a breeze. */
  readonly convectionWm2k: number;
  /** Thermal emittance of the surface. 0…1 */
  readonly emittance: number;
}

/** Sideways conduction of an evenly lit disc on a solid, mean over the disc: 3π/8. H. S. Carslaw and J. C. Jaeger, 1959, §8.2. */
export const spreadingFactor = 1.18;

/** Linearised radiative loss between a surface and its surroundings. [W m⁻² K⁻¹] */
export function radiationLossWm2k(surfaceK: number, airK: number, emittance: number): number {
  return emittance * stefanBoltzmann * (surfaceK * surfaceK + airK * airK) * (surfaceK + airK);
}

/**
 * Steady temperature of a surface that loses heat to one side by convection and radiation, and by sideways conduction
 * where a spot is small. [K]
 *
 * @param absorbedWm2 Flux times absorptance. @param spreadingWm2k Conductive loss per kelvin, 0 for a wide beam.
 */
export function steadySurfaceK(absorbedWm2: number, around: SpotSurroundings, spreadingWm2k = 0): number {
  let low = around.airK;
  let high = around.airK + 20_000;
  for (let step = 0; step < 80; step++) {
    const middle = (low + high) / 2;
    const loss =
      (around.convectionWm2k + spreadingWm2k) * (middle - around.airK) +
      around.emittance * stefanBoltzmann * (middle ** 4 - around.airK ** 4);
    if (loss < absorbedWm2) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** exp(x²) erfc(x) for x ≥ 0, without overflow: continued fraction beyond 5 (Abramowitz and Stegun 7.1.14), integral below. */
export function scaledErfc(x: number): number {
  if (x > 5) {
    let fraction = 0;
    for (let k = 30; k >= 1; k--) fraction = k / 2 / (x + fraction);
    return 1 / (Math.sqrt(Math.PI) * (x + fraction));
  }
  // Trapezoidal rule on 2/√π ∫ exp(−s² − 2xs) ds over s > 0.
  const step = 0.02;
  let sum = 0.5;
  for (let k = 1; k <= 320; k++) {
    const s = k * step;
    sum += Math.exp(-s * s - 2 * x * s);
  }
  // Euler–Maclaurin end correction: the integrand's slope at s = 0 is −2x.
  return (2 / Math.sqrt(Math.PI)) * (sum * step - (step * step * 2 * x) / 12);
}

/** Surface rise of a thick solid without loss. [K] Carslaw and Jaeger 1959, §2.9. */
export function thickRiseK(absorbedWm2: number, conductivity: number, density: number, heatCapacity: number, seconds: number): number {
  const diffusivity = conductivity / (density * heatCapacity);
  return ((2 * absorbedWm2) / conductivity) * Math.sqrt((diffusivity * seconds) / Math.PI);
}

/** Steady rise of an evenly lit disc on an insulated thick solid: centre and mean over the disc. [K] */
export function discRiseK(absorbedWm2: number, conductivity: number, radiusM: number): { readonly centreK: number; readonly meanK: number } {
  const centreK = (absorbedWm2 * radiusM) / conductivity;
  return { centreK, meanK: (8 / (3 * Math.PI)) * centreK };
}

/** Solid or sheet under a spot. */
export interface HeatedBody {
  readonly conductivityWmk: number;
  readonly densityKgm3: number;
  readonly heatCapacityJkgk: number;
  /** Thickness of a thin sheet; null for a thick solid. [m] */
  readonly sheetM: number | null;
}

/**
 * Surface temperature after a time of steady light on one spot. [K]
 *
 * A thick solid follows the half-space with a loss (Carslaw and Jaeger 1959, §2.7) in which sideways conduction is an
 * extra loss of 1.18 k/r; a sheet heats through as one. Radiation is linearised at the temperature reached.
 *
 * @param spotRadiusM Radius of the spot. [m]
 */
export function surfaceTemperatureK(
  absorbedWm2: number, body: HeatedBody, spotRadiusM: number, seconds: number, around: SpotSurroundings,
): number {
  const { conductivityWmk: k, densityKgm3: rho, heatCapacityJkgk: c, sheetM } = body;
  // A sheet spreads heat sideways only through its own thickness.
  const spreading = sheetM === null ? (spreadingFactor * k) / spotRadiusM : (2 * k * sheetM) / (spotRadiusM * spotRadiusM);
  const ceiling = steadySurfaceK(absorbedWm2, around, spreading);
  const sides = sheetM === null ? 1 : 2;
  let surface = around.airK;
  for (let pass = 0; pass < 12; pass++) {
    const radiation = radiationLossWm2k((surface + around.airK) / 2, around.airK, around.emittance);
    const loss = sides * (around.convectionWm2k + radiation) + spreading;
    let rise: number;
    if (sheetM === null) {
      const x = (loss / k) * Math.sqrt((k / (rho * c)) * seconds);
      rise = (absorbedWm2 / loss) * (1 - scaledErfc(x));
    } else {
      rise = (absorbedWm2 / loss) * (1 - Math.exp((-loss * seconds) / (rho * c * sheetM)));
    }
    const next = Math.min(around.airK + rise, ceiling);
    if (Math.abs(next - surface) < 0.05) return next;
    surface = pass === 0 ? next : (surface + next) / 2;
  }
  return surface;
}
