import { degree, safeAsin, wrap180, wrap360 } from '#app/physics/units.ts';
import { earthSunDistanceSeries, heliocentricLatitudeSeries, heliocentricLongitudeSeries } from './earth-orbit.data.ts';
import { nutationTerms } from './nutation.data.ts';
import { julianDay, terrestrialMinusUtcS } from './time-scales.ts';

/** The earth as seen from the sun. */
export interface HeliocentricEarth {
  readonly longitudeDeg: number;
  readonly latitudeDeg: number;
  readonly distanceAu: number;
}

/** The sun as seen from the centre of the earth, true equator and equinox of date. */
export interface GeocentricSun {
  readonly rightAscensionDeg: number;
  readonly declinationDeg: number;
  readonly distanceAu: number;
  /** Greenwich apparent sidereal time. [°] 0…360 */
  readonly siderealTimeDeg: number;
  /** Apparent minus mean sidereal time. [°] */
  readonly equationOfEquinoxesDeg: number;
  /** Apparent minus mean solar time. [min] */
  readonly equationOfTimeMin: number;
}

/** Sum of the series, one for each power of t. */
function sumSeries(series: readonly (readonly number[])[], t: number): number {
  let power = 1;
  let sum = 0;
  for (const terms of series) {
    let inner = 0;
    for (let i = 0; i < terms.length; i += 3) {
      inner += (terms[i] ?? 0) * Math.cos((terms[i + 1] ?? 0) + (terms[i + 2] ?? 0) * t);
    }
    sum += inner * power;
    power *= t;
  }
  return sum * 1e-8;
}

/** Polynomial by rising powers. */
function polynomial(t: number, ...coefficients: number[]): number {
  return coefficients.reduceRight((sum, coefficient) => sum * t + coefficient, 0);
}

/** @param millennia Julian ephemeris millennia since J2000. */
export function heliocentricEarth(millennia: number): HeliocentricEarth {
  return {
    longitudeDeg: wrap360(sumSeries(heliocentricLongitudeSeries, millennia) / degree),
    latitudeDeg: sumSeries(heliocentricLatitudeSeries, millennia) / degree,
    distanceAu: sumSeries(earthSunDistanceSeries, millennia),
  };
}

/** Nutation in longitude and obliquity. [°] */
function nutation(centuries: number): { readonly longitudeDeg: number; readonly obliquityDeg: number } {
  const moonElongation = polynomial(centuries, 297.85036, 445267.11148, -0.0019142, 1 / 189474) * degree;
  const sunAnomaly = polynomial(centuries, 357.52772, 35999.05034, -0.0001603, -1 / 300000) * degree;
  const moonAnomaly = polynomial(centuries, 134.96298, 477198.867398, 0.0086972, 1 / 56250) * degree;
  const moonLatitude = polynomial(centuries, 93.27191, 483202.017538, -0.0036825, 1 / 327270) * degree;
  const moonNode = polynomial(centuries, 125.04452, -1934.136261, 0.0020708, 1 / 450000) * degree;
  const n = nutationTerms;
  let longitude = 0;
  let obliquity = 0;
  for (let i = 0; i < n.length; i += 9) {
    const argument =
      (n[i] ?? 0) * moonElongation +
      (n[i + 1] ?? 0) * sunAnomaly +
      (n[i + 2] ?? 0) * moonAnomaly +
      (n[i + 3] ?? 0) * moonLatitude +
      (n[i + 4] ?? 0) * moonNode;
    longitude += ((n[i + 5] ?? 0) + (n[i + 6] ?? 0) * centuries) * Math.sin(argument);
    obliquity += ((n[i + 7] ?? 0) + (n[i + 8] ?? 0) * centuries) * Math.cos(argument);
  }
  return { longitudeDeg: longitude / 3.6e7, obliquityDeg: obliquity / 3.6e7 };
}

/** Mean obliquity of the ecliptic. [°] */
function meanObliquityDeg(millennia: number): number {
  const arcsec = polynomial(
    millennia / 10, 84381.448, -4680.93, -1.55, 1999.25, -51.38, -249.67, -39.05, 7.12, 27.87, 5.79, 2.45,
  );
  return arcsec / 3600;
}

/**
 * Geocentric place of the sun.
 *
 * @param utcMs Milliseconds since 1970, UTC.
 * @param deltaTS TT − UT1; left out: leap-second table. [s]
 * @see I. Reda and A. Andreas, NREL/TP-560-34302, 2003, revised 2008, sections 3.2–3.9 and appendix A.1.
 */
export function geocentricSun(utcMs: number, deltaTS = terrestrialMinusUtcS(utcMs)): GeocentricSun {
  const day = julianDay(utcMs);
  const centuries = (day - 2_451_545) / 36_525;
  const ephemerisCenturies = (day + deltaTS / 86_400 - 2_451_545) / 36_525;
  const millennia = ephemerisCenturies / 10;
  const earth = heliocentricEarth(millennia);
  const shift = nutation(ephemerisCenturies);
  const obliquity = (meanObliquityDeg(millennia) + shift.obliquityDeg) * degree;
  const aberrationDeg = -20.4898 / (3600 * earth.distanceAu);
  const longitude = (earth.longitudeDeg + 180 + shift.longitudeDeg + aberrationDeg) * degree;
  const latitude = -earth.latitudeDeg * degree;
  const rightAscension = Math.atan2(
    Math.sin(longitude) * Math.cos(obliquity) - Math.tan(latitude) * Math.sin(obliquity),
    Math.cos(longitude),
  );
  const declination = safeAsin(
    Math.sin(latitude) * Math.cos(obliquity) + Math.cos(latitude) * Math.sin(obliquity) * Math.sin(longitude),
  );
  const equationOfEquinoxesDeg = shift.longitudeDeg * Math.cos(obliquity);
  const meanSiderealDeg =
    280.46061837 + 360.98564736629 * (day - 2_451_545) + centuries * centuries * (0.000387933 - centuries / 38_710_000);
  const meanLongitudeDeg = polynomial(
    millennia, 280.4664567, 360007.6982779, 0.03032028, 1 / 49931, -1 / 15300, -1 / 2000000,
  );
  const rightAscensionDeg = wrap360(rightAscension / degree);
  return {
    rightAscensionDeg,
    declinationDeg: declination / degree,
    distanceAu: earth.distanceAu,
    siderealTimeDeg: wrap360(meanSiderealDeg + equationOfEquinoxesDeg),
    equationOfEquinoxesDeg,
    equationOfTimeMin: 4 * wrap180(meanLongitudeDeg - 0.0057183 - rightAscensionDeg + equationOfEquinoxesDeg),
  };
}
