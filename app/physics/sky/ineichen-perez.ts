import { degree } from '#app/physics/units.ts';

/**
 * Clear-sky model of Ineichen and Perez, without the later enhancement at low turbidity.
 *
 * @param apparentZenithDeg [°] 0…90
 * @param absoluteAirMass Pressure-scaled air mass.
 * @param linkeTurbidity Linke turbidity at air mass 2, 1…10.
 * @param elevationM Height above the sea. [m]
 * @see P. Ineichen and R. Perez, Solar Energy 73(3), 151–157, 2002.
 */
export function ineichenPerezClearSky(
  apparentZenithDeg: number, absoluteAirMass: number, linkeTurbidity: number, elevationM: number, extraterrestrialWm2: number,
): { readonly dniWm2: number; readonly ghiWm2: number } {
  const fh1 = Math.exp(-elevationM / 8000);
  const fh2 = Math.exp(-elevationM / 1250);
  const cg1 = 5.09e-5 * elevationM + 0.868;
  const cg2 = 3.92e-5 * elevationM + 0.0387;
  const cosZenith = Math.max(Math.cos(apparentZenithDeg * degree), 1e-6);
  const ghiWm2 =
    cg1 * extraterrestrialWm2 * cosZenith * Math.exp(-cg2 * absoluteAirMass * (fh1 + fh2 * (linkeTurbidity - 1)));
  const b = 0.664 + 0.163 / fh1;
  const beam = b * extraterrestrialWm2 * Math.exp(-0.09 * absoluteAirMass * (linkeTurbidity - 1));
  const ceiling = (ghiWm2 * (1 - (0.1 - 0.2 * Math.exp(-linkeTurbidity)) / (0.1 + 0.882 / fh1))) / cosZenith;
  return { dniWm2: Math.max(0, Math.min(beam, ceiling)), ghiWm2: Math.max(0, ghiWm2) };
}

/**
 * Linke turbidity from broadband aerosol depth and water.
 *
 * @param absoluteAirMass 1…5; held at 5 beyond.
 * @param waterCm Precipitable water, held at 5 cm.
 * @see F. Kasten, Solar Energy 56, 1996; P. Ineichen, Solar Energy 82, 1095, 2008.
 */
export function kastenLinkeTurbidity(absoluteAirMass: number, waterCm: number, broadbandDepth: number): number {
  const m = Math.min(absoluteAirMass, 5);
  const clean = -0.101 + 0.235 * m ** -0.16;
  const water = 0.112 * m ** -0.55 * Math.min(waterCm, 5) ** 0.34;
  return (9.4 + 0.9 * m) * (clean + water + broadbandDepth);
}
