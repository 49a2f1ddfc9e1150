import { degree } from '#app/physics/units.ts';

/** What the Bird model needs of the air. Ozone and water in cm of column, aerosol optical depth at 380 and 500 nm. */
export interface BirdAir {
  readonly ozoneCm: number;
  readonly waterCm: number;
  readonly aod380: number;
  readonly aod500: number;
  /** Forward share of aerosol scattering. Left out: 0.85. */
  readonly forwardScatter?: number;
  /** Albedo of the ground. Left out: 0.2. */
  readonly groundAlbedo?: number;
}

export interface BirdResult {
  readonly rayleigh: number;
  readonly ozone: number;
  readonly mixedGases: number;
  readonly water: number;
  readonly aerosol: number;
  readonly dniWm2: number;
  readonly ghiWm2: number;
}

/** Air mass at which the printed Rayleigh term has its minimum; beyond it the formula would rise again. */
const rayleighTurningPoint = 14.09;

/** Broadband optical depth of aerosol from the depths at two wavelengths. */
export function broadbandAerosolDepth(aod380: number, aod500: number): number {
  return 0.2758 * aod380 + 0.35 * aod500;
}

function rayleighTransmittance(absoluteAirMass: number): number {
  const m = absoluteAirMass;
  return Math.exp(-0.0903 * m ** 0.84 * (1 + m - m ** 1.01));
}

/** Irradiances from the relative and absolute air mass, exactly as printed. */
function birdFrom(
  zenithDeg: number, relativeAirMass: number, absoluteAirMass: number, rayleigh: number,
  extraterrestrialWm2: number, air: BirdAir,
): BirdResult {
  const m = relativeAirMass;
  const ozonePath = air.ozoneCm * m;
  const waterPath = air.waterCm * m;
  const depth = broadbandAerosolDepth(air.aod380, air.aod500);
  const ozone =
    1 - 0.1611 * ozonePath * (1 + 139.48 * ozonePath) ** -0.3034 -
    (0.002715 * ozonePath) / (1 + 0.044 * ozonePath + 0.0003 * ozonePath * ozonePath);
  const mixedGases = Math.exp(-0.0127 * absoluteAirMass ** 0.26);
  const water = 1 - (2.4959 * waterPath) / ((1 + 79.034 * waterPath) ** 0.6828 + 6.385 * waterPath);
  const aerosol = Math.exp(-(depth ** 0.873) * (1 + depth - depth ** 0.7088) * m ** 0.9108);
  const dniWm2 = 0.9662 * extraterrestrialWm2 * rayleigh * ozone * mixedGases * water * aerosol;
  const forward = air.forwardScatter ?? 0.85;
  const albedo = air.groundAlbedo ?? 0.2;
  const absorbed = 1 - 0.1 * (1 - m + m ** 1.06) * (1 - aerosol);
  const skyAlbedo = 0.0685 + (1 - forward) * (1 - aerosol / absorbed);
  const cosZenith = Math.cos(zenithDeg * degree);
  const scattered =
    (extraterrestrialWm2 * cosZenith * 0.79 * ozone * water * mixedGases * absorbed *
      (0.5 * (1 - rayleigh) + forward * (1 - aerosol / absorbed))) / (1 - m + m ** 1.02);
  const ghiWm2 = (dniWm2 * cosZenith + scattered) / (1 - albedo * skyAlbedo);
  return { rayleigh, ozone, mixedGases, water, aerosol, dniWm2, ghiWm2 };
}

/**
 * Clear-sky model of Bird and Hulstrom as printed. Its Rayleigh term rises again beyond an absolute air mass of 14.09,
 * so it overstates the beam of a very low sun; for findings use `birdClearSky`.
 *
 * @see R. E. Bird and R. L. Hulstrom, SERI/TR-642-761, 1981; coefficients as in the published sheet of D. R. Myers.
 */
export function birdAsPrinted(
  zenithDeg: number, relativeAirMass: number, absoluteAirMass: number, extraterrestrialWm2: number, air: BirdAir,
): BirdResult {
  return birdFrom(zenithDeg, relativeAirMass, absoluteAirMass, rayleighTransmittance(absoluteAirMass), extraterrestrialWm2, air);
}

/** Bird and Hulstrom with the Rayleigh term held at its minimum, so that a setting sun never brightens. */
export function birdClearSky(
  zenithDeg: number, relativeAirMass: number, absoluteAirMass: number, extraterrestrialWm2: number, air: BirdAir,
): BirdResult {
  const rayleigh = rayleighTransmittance(Math.min(absoluteAirMass, rayleighTurningPoint));
  return birdFrom(zenithDeg, relativeAirMass, absoluteAirMass, rayleigh, extraterrestrialWm2, air);
}
