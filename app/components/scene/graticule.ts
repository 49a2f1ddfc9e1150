import { degreesWithLetter } from '#app/domain/coordinate-text.ts';

/** What part of the world a map shows, in degrees. */
export interface Extent {
  readonly south: number;
  readonly north: number;
  readonly west: number;
  readonly east: number;
}

const FRACTIONS = [10, 5, 2, 1];
const STEPS_DEG: readonly number[] = [
  90, 60, 30, ...FRACTIONS, ...[1, 2, 3, 4, 5].flatMap((p) => FRACTIONS.slice(1).map((f) => f / 10 ** p)), 0.000005,
];

/** The finest grid step whose lines stand at least `apart` pixels from each other. */
export function gridStepDeg(pixelsPerDegree: number, apart: number): number {
  return STEPS_DEG.findLast((step) => step * pixelsPerDegree >= apart) ?? 90;
}

/** Whole multiples of `stepDeg` between two values, ends included. */
export function gridValues(from: number, to: number, stepDeg: number): number[] {
  const first = Math.ceil(from / stepDeg - 1e-9);
  const last = Math.floor(to / stepDeg + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => (first + i) * stepDeg);
}

/** Decimals that tell neighbouring grid lines apart. */
export function gridDecimals(stepDeg: number): number {
  return Math.max(0, Math.ceil(-Math.log10(stepDeg) - 1e-9));
}

export function gridLabel(valueDeg: number, axis: 'latitude' | 'longitude', stepDeg: number): string {
  const wrapped = axis === 'longitude' ? ((((valueDeg + 180) % 360) + 360) % 360) - 180 : valueDeg;
  return degreesWithLetter(wrapped, axis, gridDecimals(stepDeg));
}

/**
 * The line between day and night, as latitudes from west to east, for a sun overhead at the given place: the points
 * 90 degrees from it on a sphere. Refraction and the size of the sun's disc are left out, as a map this small cannot
 * show them.
 */
export function nightEdge(overhead: { readonly latitudeDeg: number; readonly longitudeDeg: number }): readonly (readonly [number, number])[] {
  const rad = Math.PI / 180;
  const declination = overhead.latitudeDeg * rad;
  return Array.from({ length: 181 }, (_, i) => {
    const longitudeDeg = -180 + i * 2;
    const hourAngle = (longitudeDeg - overhead.longitudeDeg) * rad;
    // At the equinox the edge runs along meridians; the sign of a tiny declination keeps the formula whole.
    const tangent = -Math.cos(hourAngle) / Math.tan(Math.abs(declination) < 1e-6 ? 1e-6 : declination);
    return [Math.atan(tangent) / rad, longitudeDeg] as const;
  });
}

/** A round length and its width on screen, not wider than `most` pixels. */
export function scaleBar(metresPerPixel: number, most: number): { readonly metres: number; readonly widthPx: number } {
  const limit = metresPerPixel * most;
  const power = 10 ** Math.floor(Math.log10(limit));
  const metres = [5, 2, 1].map((k) => k * power).find((k) => k <= limit) ?? power;
  return { metres, widthPx: metres / metresPerPixel };
}

/** A length in metres or kilometres, in words for a scale bar. */
export function lengthText(metres: number): string {
  if (metres >= 1000) return `${Number((metres / 1000).toPrecision(3)).toLocaleString('en')} km`;
  return metres >= 1 ? `${metres} m` : `${Math.round(metres * 100)} cm`;
}
