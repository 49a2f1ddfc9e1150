/** Julian day numbers and the step from civil time to the time of the ephemeris. */

const dayMs = 86_400_000;

/** TAI − UTC in whole seconds from each instant on. [s] International Earth Rotation Service, Bulletin C; tz data file leap-seconds.list. */
const leapSeconds: readonly (readonly [fromUtc: string, seconds: number])[] = [
  ['1972-01-01', 10], ['1972-07-01', 11], ['1973-01-01', 12], ['1974-01-01', 13], ['1975-01-01', 14],
  ['1976-01-01', 15], ['1977-01-01', 16], ['1978-01-01', 17], ['1979-01-01', 18], ['1980-01-01', 19],
  ['1981-07-01', 20], ['1982-07-01', 21], ['1983-07-01', 22], ['1985-07-01', 23], ['1988-01-01', 24],
  ['1990-01-01', 25], ['1991-01-01', 26], ['1992-07-01', 27], ['1993-07-01', 28], ['1994-07-01', 29],
  ['1996-01-01', 30], ['1997-07-01', 31], ['1999-01-01', 32], ['2006-01-01', 33], ['2009-01-01', 34],
  ['2012-07-01', 35], ['2015-07-01', 36], ['2017-01-01', 37],
];
const leapSecondSteps = leapSeconds.map(([fromUtc, seconds]) => [Date.parse(`${fromUtc}T00:00:00Z`), seconds] as const);

/** TT − TAI by definition. [s] */
const ttMinusTaiS = 32.184;

/** Julian day of an instant, UTC taken for UT1: they differ by 0.9 s at most, 0.004° of the sun. */
export function julianDay(utcMs: number): number {
  return utcMs / dayMs + 2_440_587.5;
}

/** Year with its fraction, month by month, as the ΔT polynomials want it. */
export function decimalYear(year: number, month: number): number {
  return year + (month - 0.5) / 12;
}

/** One published span of the ΔT polynomials: origin of t and coefficients by rising power. */
interface DeltaTSpan {
  readonly untilYear: number;
  readonly originYear: number;
  readonly coefficients: readonly number[];
}

const deltaTSpans: readonly DeltaTSpan[] = [
  { untilYear: 1920, originYear: 1900, coefficients: [-2.79, 1.494119, -0.0598939, 0.0061966, -0.000197] },
  { untilYear: 1941, originYear: 1920, coefficients: [21.2, 0.84493, -0.0761, 0.0020936] },
  { untilYear: 1961, originYear: 1950, coefficients: [29.07, 0.407, -1 / 233, 1 / 2547] },
  { untilYear: 1986, originYear: 1975, coefficients: [45.45, 1.067, -1 / 260, -1 / 718] },
  { untilYear: 2005, originYear: 2000, coefficients: [63.86, 0.3345, -0.060374, 0.0017275, 0.000651814, 0.00002373599] },
  { untilYear: 2050, originYear: 2000, coefficients: [62.92, 0.32217, 0.005589] },
];

/**
 * TT − UT1 by polynomial. [s] 1900…2150. Runs some five seconds high after 2005, where the earth did not slow as expected.
 *
 * @see F. Espenak and J. Meeus, Five Millennium Canon of Solar Eclipses, NASA/TP-2006-214141, 2006.
 */
export function deltaTPolynomialS(year: number): number {
  const span = deltaTSpans.find((candidate) => year < candidate.untilYear);
  if (span === undefined) return -20 + 32 * ((year - 1820) / 100) ** 2 - 0.5628 * (2150 - year);
  const t = year - span.originYear;
  return span.coefficients.reduceRight((sum, coefficient) => sum * t + coefficient, 0);
}

/**
 * TT − UTC. [s] Leap-second table from 1972 on, held after its last entry; the polynomial before. One second of error
 * moves the sun by 1.1e-5°.
 */
export function terrestrialMinusUtcS(utcMs: number): number {
  for (let index = leapSecondSteps.length - 1; index >= 0; index--) {
    const step = leapSecondSteps[index];
    if (step !== undefined && utcMs >= step[0]) return ttMinusTaiS + step[1];
  }
  return deltaTPolynomialS(1970 + utcMs / (365.25 * dayMs));
}
