import { dot } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';

/** A drawing to one scale: points in metres, [across, up], laid into a frame of pixels. */
export type Flat = readonly [across: number, up: number];

export interface Sight {
  /** Level or upright unit vectors of the drawing plane. */
  readonly right: Vector;
  readonly up: Vector;
}

export const seenFrom = ({ right, up }: Sight) => (point: Vector): Flat => [dot(point, right), dot(point, up)];

const turnOf = (o: Flat, a: Flat, b: Flat): number => (a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);

/** Silhouette of a body: its convex hull (A. M. Andrew, Information Processing Letters 9(5), 1979). */
export function hullOf(points: readonly Flat[]): Flat[] {
  const sorted = points.toSorted((a, b) => a[0] - b[0] || a[1] - b[1]);
  if (sorted.length < 3) return sorted;
  const half = (ordered: readonly Flat[]): Flat[] => {
    const chain: Flat[] = [];
    for (const point of ordered) {
      while (chain.length > 1 && turnOf(chain.at(-2) ?? point, chain.at(-1) ?? point, point) <= 0) chain.pop();
      chain.push(point);
    }
    return chain.slice(0, -1);
  };
  return [...half(sorted), ...half(sorted.toReversed())];
}

export interface ScaleFrame {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly pxPerM: number;
  readonly x: (acrossM: number) => number;
  readonly y: (upM: number) => number;
}

/** Fits points into a width at one scale both ways; the height follows them within its limits. */
export function scaleFrame(points: readonly Flat[], widthPx: number, limits: { readonly leastPx: number; readonly mostPx: number; readonly marginPx: number }): ScaleFrame {
  const xs = points.map(([across]) => across);
  const ys = points.map(([, up]) => up);
  const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const wide = Math.max(right - left, 1e-4);
  const tall = Math.max(high - low, 1e-4);
  const roomPx = widthPx - 2 * limits.marginPx;
  const heightPx = Math.round(Math.min(limits.mostPx, Math.max(limits.leastPx, (roomPx * tall) / wide + 2 * limits.marginPx)));
  const pxPerM = Math.min(roomPx / wide, (heightPx - 2 * limits.marginPx) / tall);
  const middle: Flat = [(left + right) / 2, (low + high) / 2];
  return {
    widthPx,
    heightPx,
    pxPerM,
    x: (acrossM) => widthPx / 2 + (acrossM - middle[0]) * pxPerM,
    y: (upM) => heightPx / 2 - (upM - middle[1]) * pxPerM,
  };
}

export const pathOf = (frame: ScaleFrame, points: readonly Flat[]): string => points.map(([across, up], index) => `${index === 0 ? 'M' : 'L'}${frame.x(across).toFixed(1)} ${frame.y(up).toFixed(1)}`).join('');

/** Greatest of 1, 2 and 5 times a power of ten that is no longer than a length. [m] */
export function roundLengthM(mostM: number): number {
  const power = 10 ** Math.floor(Math.log10(mostM));
  return ([5, 2, 1].find((step) => step * power <= mostM) ?? 1) * power;
}

/** "200 mm", "5 m". */
export function metresWords(lengthM: number): string {
  const [value, unit] = lengthM < 1 ? [lengthM * 1000, 'mm'] : [lengthM, 'm'];
  return `${Number(value.toPrecision(value < 1 ? 1 : 3))} ${unit}`;
}
