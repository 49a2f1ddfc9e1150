/** Constants of nature and of convention, each once, with its source. */

/** Nominal solar radius. [m] IAU 2015 Resolution B3. */
export const solarRadiusM = 6.957e8;

/** Astronomical unit. [m] IAU 2012 Resolution B2. */
export const astronomicalUnitM = 149_597_870_700;

/** Total solar irradiance at one astronomical unit. [W/m²] ±0.5. C. A. Gueymard, Solar Energy 168, 2018 (row tsi-gueymard). */
export const solarConstantWm2 = 1361.1;

/** Effective temperature of the sun. [K] IAU 2015 Resolution B3. */
export const solarTemperatureK = 5772;

/** Stefan–Boltzmann constant. [W m⁻² K⁻⁴] CODATA 2018. */
export const stefanBoltzmann = 5.670374419e-8;

/** Standard pressure at sea level. [Pa] ICAO standard atmosphere. */
export const standardPressurePa = 101_325;

/** Celsius zero. [K] */
export const zeroCelsiusK = 273.15;

/** Rate of the hour angle of the mean sun. [rad/s] 15° per hour. */
export const hourAngleRateRadPerS = Math.PI / 43_200;

/**
 * Linear limb-darkening coefficient weighted with the direct beam, 0.40–0.50. Extrapolated from coefficients at 468,
 * 552 and 611 nm (H. Neckel and D. Labs, Solar Physics 153, 1994) to the mean wavelength of the beam: unverified.
 */
export const beamLimbDarkening = 0.45;

/** Direct irradiance above which the sun counts as shining. [W/m²] World Meteorological Organization (row wmo-sunshine). */
export const sunshineThresholdWm2 = 120;
