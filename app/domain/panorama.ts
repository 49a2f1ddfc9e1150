/**
 * Bearings and elevations from places on a photo taken level from the optic.
 *
 * `swept`: a panorama put together by turning the camera: bearing grows evenly across the picture, height is the
 * tangent of the elevation. `single`: one picture of an ordinary lens, in which straight lines stay straight: the
 * tangent of the angle off the middle grows evenly.
 */
export const photoProjections = ['swept', 'single'] as const;
export type PhotoProjection = (typeof photoProjections)[number];

/** A place in the photo whose bearing is known, and its elevation where that was measured too. x right, y down. [px] */
export interface KnownPoint {
  readonly x: number;
  readonly y: number;
  readonly azimuthDeg: number;
  readonly elevationDeg: number | null;
}

export interface PanoramaFit {
  readonly projection: PhotoProjection;
  /** Bearing at the middle of the photo. [° true] */
  readonly middleDeg: number;
  /** Pixels a radian of bearing at the middle. */
  readonly pxPerRad: number;
  readonly middleX: number;
  /** Height of the level line at the middle. [px] */
  readonly levelY: number;
  /** True where no elevation was known and the level line was taken at half the height. */
  readonly levelAssumed: boolean;
  /** Root mean square of what the fit leaves over in bearing. [°] 0 for two points. */
  readonly leftOverDeg: number;
}

const degree = Math.PI / 180;
const wrap180 = (deg: number) => ((((deg + 180) % 360) + 360) % 360) - 180;

/** Angle off the middle of the photo for a place across it. [rad] */
const angleOff = (projection: PhotoProjection, x: number, pxPerRad: number): number => (projection === 'swept' ? x / pxPerRad : Math.atan(x / pxPerRad));

/**
 * Direction and scale of a photo from two known bearings or more, by least squares (Gauss and Newton).
 *
 * @returns null where the bearings do not tell a scale: fewer than two, at one place, or running backwards.
 */
export function fitPanorama(projection: PhotoProjection, size: { readonly width: number; readonly height: number }, known: readonly KnownPoint[]): PanoramaFit | null {
  const sorted = known.toSorted((a, b) => a.x - b.x);
  const [first, last] = [sorted[0], sorted.at(-1)];
  if (!first || !last || last.x - first.x < 2) return null;
  // Bearings in one piece, counted on from the leftmost point.
  const turned = sorted.reduce<number[]>((list, point, index) => [...list, index === 0 ? point.azimuthDeg : (list[index - 1] ?? 0) + wrap180(point.azimuthDeg - (sorted[index - 1]?.azimuthDeg ?? 0))], []);
  const spanDeg = (turned.at(-1) ?? 0) - (turned[0] ?? 0);
  const widest = projection === 'single' ? 150 : 360;
  if (spanDeg <= 0.1 || spanDeg > widest) return null;
  const middleX = size.width / 2;
  let pxPerRad = (last.x - first.x) / (projection === 'swept' ? spanDeg * degree : 2 * Math.tan((spanDeg * degree) / 2));
  let middleDeg = (turned[0] ?? 0) - angleOff(projection, first.x - middleX, pxPerRad) / degree;
  for (let round = 0; round < 40; round += 1) {
    const rows = sorted.map((point, index) => {
      const x = point.x - middleX;
      const slope = (angleOff(projection, x, pxPerRad * 1.0001) - angleOff(projection, x, pxPerRad)) / degree / (pxPerRad * 0.0001);
      return { left: (turned[index] ?? 0) - middleDeg - angleOff(projection, x, pxPerRad) / degree, slope };
    });
    const [n, s, ss] = [rows.length, sum(rows.map((row) => row.slope)), sum(rows.map((row) => row.slope ** 2))];
    const [r, sr] = [sum(rows.map((row) => row.left)), sum(rows.map((row) => row.left * row.slope))];
    const determinant = n * ss - s * s;
    if (Math.abs(determinant) < 1e-18) return null;
    const stepMiddle = (ss * r - s * sr) / determinant;
    const stepScale = (n * sr - s * r) / determinant;
    middleDeg += stepMiddle;
    pxPerRad += Math.max(-pxPerRad / 2, stepScale);
    if (Math.abs(stepMiddle) < 1e-9 && Math.abs(stepScale) < 1e-9 * pxPerRad) break;
  }
  if (!Number.isFinite(pxPerRad) || pxPerRad <= 1) return null;
  const left = sorted.map((point, index) => (turned[index] ?? 0) - middleDeg - angleOff(projection, point.x - middleX, pxPerRad) / degree);
  const levels = sorted.flatMap((point) => (point.elevationDeg === null ? [] : [point.y + Math.tan(point.elevationDeg * degree) * reachPx(projection, point.x - middleX, pxPerRad)]));
  return {
    projection,
    middleDeg: (middleDeg + 720) % 360,
    pxPerRad,
    middleX,
    levelY: levels.length > 0 ? sum(levels) / levels.length : size.height / 2,
    levelAssumed: levels.length === 0,
    leftOverDeg: sorted.length > 2 ? Math.sqrt(sum(left.map((one) => one ** 2)) / (sorted.length - 2)) : 0,
  };
}

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
/** Distance from the eye to the picture along the level, at a place across it. [px] */
const reachPx = (projection: PhotoProjection, x: number, pxPerRad: number): number => (projection === 'swept' ? pxPerRad : Math.hypot(pxPerRad, x));

/** Bearing and elevation of a place on the photo. [°] */
export function directionOn(fit: PanoramaFit, point: { readonly x: number; readonly y: number }): { readonly azimuthDeg: number; readonly elevationDeg: number } {
  const x = point.x - fit.middleX;
  return {
    azimuthDeg: (fit.middleDeg + angleOff(fit.projection, x, fit.pxPerRad) / degree + 720) % 360,
    elevationDeg: Math.atan2(fit.levelY - point.y, reachPx(fit.projection, x, fit.pxPerRad)) / degree,
  };
}
