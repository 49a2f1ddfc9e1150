import { z } from 'zod';
import { goRound, homographyFrom, mapped } from './homography.ts';
import type { FourPoints, Homography, PlanePoint } from './homography.ts';

/**
 * Measures taken on a photo of a flat mark. The plane is known by the four corners of a rectangle of known size that
 * lies in it, or, in a photo taken square-on, by a scale of known length beside the mark.
 */
export type PhotoScale =
  | { readonly kind: 'rectangle'; /** From the upper left, clockwise as seen. [px] */ readonly corners: FourPoints; readonly widthMm: number; readonly heightMm: number; readonly sizePlusMinusMm: number }
  | { readonly kind: 'scale'; readonly from: PlanePoint; readonly to: PlanePoint; readonly lengthMm: number; readonly sizePlusMinusMm: number };

export interface PhotoClicks {
  readonly scale: PhotoScale;
  /** Ends of the mark, and of its width where that was clicked. [px] */
  readonly lengthEnds: readonly [PlanePoint, PlanePoint];
  readonly widthEnds: readonly [PlanePoint, PlanePoint] | null;
  /** One sigma of each click in x and in y. [px] */
  readonly clickPx: number;
  /** True bearing of the line from the first corner to the second, or of the scale; null where it is not known. */
  readonly edgeBearingDeg: number | null;
  readonly edgePlusMinusDeg: number;
}

export interface WithError {
  readonly value: number;
  readonly plusMinus: number;
}
export interface PhotoMeasures {
  readonly lengthMm: WithError;
  readonly widthMm: WithError | null;
  /** Direction of the mark from A to B against the edge 1 to 2, clockwise as seen. [°] −180…180 */
  readonly slopeDeg: WithError;
  /** From true north; null where the bearing of the edge is not known. [°] 0…360 */
  readonly headingDeg: WithError | null;
  /** Millimetres of one pixel at the middle of the mark. */
  readonly mmPerPx: number;
}

/** The map from the photo to millimetres in the plane of the mark; null where the points cannot give one. */
export function planeOf(scale: PhotoScale): Homography | null {
  if (scale.kind === 'rectangle') {
    if (!goRound(scale.corners)) return null;
    const { widthMm: w, heightMm: h } = scale;
    return homographyFrom(scale.corners, [{ x: 0, y: 0 }, { x: w, y: 0 }, { x: w, y: h }, { x: 0, y: h }]);
  }
  const [dx, dy] = [scale.to.x - scale.from.x, scale.to.y - scale.from.y];
  const square = dx * dx + dy * dy;
  if (square < 4) return null;
  // A turn and a stretch: the scale becomes the x axis.
  const [cos, sin] = [(scale.lengthMm * dx) / square, (scale.lengthMm * dy) / square];
  return [cos, sin, -(cos * scale.from.x + sin * scale.from.y), -sin, cos, sin * scale.from.x - cos * scale.from.y, 0, 0, 1];
}

type Raw = readonly [lengthMm: number, widthMm: number, slopeDeg: number];

function rawMeasures(clicks: PhotoClicks): Raw | null {
  const plane = planeOf(clicks.scale);
  if (!plane) return null;
  const span = ([from, to]: readonly [PlanePoint, PlanePoint]) => {
    const [a, b] = [mapped(plane, from), mapped(plane, to)];
    return a && b ? { x: b.x - a.x, y: b.y - a.y } : null;
  };
  const length = span(clicks.lengthEnds);
  const width = clicks.widthEnds ? span(clicks.widthEnds) : { x: 0, y: 0 };
  if (!length || !width) return null;
  return [Math.hypot(length.x, length.y), Math.hypot(width.x, width.y), (Math.atan2(length.y, length.x) * 180) / Math.PI];
}

const wrap180 = (deg: number) => ((((deg + 180) % 360) + 360) % 360) - 180;

/** Each coordinate that was clicked, and each size that was typed, moved by one of its sigmas. */
function movedClicks(clicks: PhotoClicks): PhotoClicks[] {
  const { scale, clickPx } = clicks;
  const nudged = (point: PlanePoint) => [{ ...point, x: point.x + clickPx }, { ...point, y: point.y + clickPx }];
  const withPair = (pair: readonly [PlanePoint, PlanePoint], put: (pair: readonly [PlanePoint, PlanePoint]) => PhotoClicks) => [...nudged(pair[0]).map((one) => put([one, pair[1]])), ...nudged(pair[1]).map((one) => put([pair[0], one]))];
  const scales: PhotoScale[] =
    scale.kind === 'rectangle'
      ? [
          ...scale.corners.flatMap((corner, at) => nudged(corner).map((one) => ({ ...scale, corners: replaced(scale.corners, at, one) }))),
          { ...scale, widthMm: scale.widthMm + scale.sizePlusMinusMm },
          { ...scale, heightMm: scale.heightMm + scale.sizePlusMinusMm },
        ]
      : [...nudged(scale.from).map((from) => ({ ...scale, from })), ...nudged(scale.to).map((to) => ({ ...scale, to })), { ...scale, lengthMm: scale.lengthMm + scale.sizePlusMinusMm }];
  return [
    ...scales.map((moved) => ({ ...clicks, scale: moved })),
    ...withPair(clicks.lengthEnds, (lengthEnds) => ({ ...clicks, lengthEnds })),
    ...(clicks.widthEnds ? withPair(clicks.widthEnds, (widthEnds) => ({ ...clicks, widthEnds })) : []),
  ];
}

function replaced([a, b, c, d]: FourPoints, at: number, point: PlanePoint): FourPoints {
  return [at === 0 ? point : a, at === 1 ? point : b, at === 2 ? point : c, at === 3 ? point : d];
}

/**
 * Length, width and direction of a mark on a photo, each with one sigma. The ± follows from the ± of the clicks and of
 * the known size, to first order, all taken as independent; the bending of the lens is not in it.
 *
 * @returns null where the clicks cannot give a plane: corners that cross, or three on a line.
 */
export function measurePhoto(clicks: PhotoClicks): PhotoMeasures | null {
  const raw = rawMeasures(clicks);
  if (!raw || !raw.every(Number.isFinite)) return null;
  const sums: [number, number, number] = [0, 0, 0];
  for (const moved of movedClicks(clicks)) {
    const there = rawMeasures(moved);
    if (!there) return null;
    sums[0] += (there[0] - raw[0]) ** 2;
    sums[1] += (there[1] - raw[1]) ** 2;
    sums[2] += wrap180(there[2] - raw[2]) ** 2;
  }
  const [length, width, slope] = sums.map(Math.sqrt);
  const [a, b] = clicks.lengthEnds;
  const { edgeBearingDeg, edgePlusMinusDeg } = clicks;
  return {
    lengthMm: { value: raw[0], plusMinus: length ?? 0 },
    widthMm: clicks.widthEnds ? { value: raw[1], plusMinus: width ?? 0 } : null,
    slopeDeg: { value: raw[2], plusMinus: slope ?? 0 },
    headingDeg: edgeBearingDeg === null ? null : { value: (((edgeBearingDeg + raw[2]) % 360) + 360) % 360, plusMinus: Math.hypot(slope ?? 0, edgePlusMinusDeg) },
    mmPerPx: raw[0] / Math.max(1e-9, Math.hypot(b.x - a.x, b.y - a.y)),
  };
}

const coordinate = z.coerce.number('Click the photo, or type a number.').min(-50_000, 'That lies far outside the photo.').max(50_000, 'That lies far outside the photo.');
const size = z.coerce.number('Write a number, in mm.').gt(0, 'More than 0 mm.').max(100_000, 'At most 100 m.');
const pointNames = ['a', 'b', 'c', 'd', 'p', 'q', 'r', 's'] as const;
export type PointName = (typeof pointNames)[number];
/** What each point of the form is: corners or scale ends, then the ends of the mark and of its width. */
export const pointLabels: Record<PointName, string> = { a: 'Corner 1, or one end of the scale', b: 'Corner 2, or the other end of the scale', c: 'Corner 3', d: 'Corner 4', p: 'Mark, end A', q: 'Mark, end B', r: 'Width, one edge', s: 'Width, other edge' };

const optional = (schema: z.ZodType<number>) => z.union([z.literal('').transform(() => null), schema]).default(null);
const measureFormSchema = z.object({
  kind: z.enum(['rectangle', 'scale'], 'Say what is known in the photo.'),
  widthMm: size,
  heightMm: optional(size),
  sizePlusMinusMm: z.coerce.number('Write a number, in mm.').min(0, '0 or more.').max(1_000, 'At most 1000 mm.').default(0.5),
  clickPx: z.coerce.number('Write a number of pixels.').min(0.5, 'At least half a pixel.').max(100, 'At most 100 px.').default(2),
  edgeBearingDeg: optional(z.coerce.number('Write a bearing.').min(0, 'From 0 to 360°.').max(360, 'From 0 to 360°.')),
  edgePlusMinusDeg: z.coerce.number('Write a number of degrees.').min(0, '0 or more.').max(90, 'At most 90°.').default(2),
  ...Object.fromEntries(pointNames.flatMap((name) => [[`${name}x`, optional(coordinate)], [`${name}y`, optional(coordinate)]])),
});

export type ClicksReading = { readonly ok: true; readonly clicks: PhotoClicks } | { readonly ok: false; readonly fieldErrors: Record<string, string[]> };

/** Reads the form of the photo measure; the same on the page and on the server. */
export function readClicks(typed: Readonly<Record<string, string>>): ClicksReading {
  const parsed = measureFormSchema.safeParse(typed);
  if (!parsed.success) {
    const fieldErrors: Record<string, string[]> = {};
    for (const issue of parsed.error.issues) (fieldErrors[issue.path.join('.')] ??= []).push(issue.message);
    return { ok: false, fieldErrors };
  }
  const form = parsed.data;
  const values: Readonly<Record<string, unknown>> = form;
  const point = (name: PointName): PlanePoint | null => {
    const [x, y] = [values[`${name}x`], values[`${name}y`]];
    return typeof x === 'number' && typeof y === 'number' ? { x, y } : null;
  };
  const missing: Record<string, string[]> = {};
  const need = (name: PointName): PlanePoint => {
    const found = point(name);
    if (!found) missing[`${name}x`] = [`${pointLabels[name]} is missing: click it in the photo, or type where it is.`];
    return found ?? { x: 0, y: 0 };
  };
  if (form.kind === 'rectangle' && form.heightMm === null) missing['heightMm'] = ['Give the height of the rectangle too.'];
  const known = { sizePlusMinusMm: form.sizePlusMinusMm };
  const scale: PhotoScale =
    form.kind === 'rectangle'
      ? { kind: 'rectangle', corners: [need('a'), need('b'), need('c'), need('d')], widthMm: form.widthMm, heightMm: form.heightMm ?? 1, ...known }
      : { kind: 'scale', from: need('a'), to: need('b'), lengthMm: form.widthMm, ...known };
  const lengthEnds = [need('p'), need('q')] as const;
  const [r, s] = [point('r'), point('s')];
  if (Object.keys(missing).length > 0) return { ok: false, fieldErrors: missing };
  return { ok: true, clicks: { scale, lengthEnds, widthEnds: r && s ? [r, s] : null, clickPx: form.clickPx, edgeBearingDeg: form.edgeBearingDeg, edgePlusMinusDeg: form.edgePlusMinusDeg } };
}
