import { z } from 'zod';
import type { Place } from './coordinate-text.ts';
import { offsetM, placeAt } from './ground.ts';

/** A drawing of a site, laid over the map by points that are known on both. */
export const knownPointSchema = z.object({
  name: z.string().max(60),
  /** Column and row in the picture, from its upper left corner. */
  xPx: z.number().min(0),
  yPx: z.number().min(0),
  latitudeDeg: z.number().min(-90).max(90),
  longitudeDeg: z.number().min(-180).max(180),
});
export type KnownPoint = z.infer<typeof knownPointSchema>;
/** Two points fix scale, north and place; a third and fourth show how well the drawing fits. */
export const knownPointCount = { least: 2, most: 4 } as const;

/** How the picture lies on the ground. */
export interface PlanPlacement {
  readonly metresPerPx: number;
  /** Direction that the upper edge of the picture points to, from true north clockwise. [°] */
  readonly upBearingDeg: number;
  /** Root mean square of what the points are left apart; null with two points, which always fit. [m] */
  readonly leftOverM: number | null;
  readonly corners: { readonly upperLeft: Place; readonly upperRight: Place; readonly lowerLeft: Place };
}

export interface PlanPicture {
  readonly widthPx: number;
  readonly heightPx: number;
}

/**
 * Lays a picture on the ground by the similarity (shift, turn, one scale, no mirroring) that leaves the least squares
 * between its known points and their places (S. Umeyama, Least-squares estimation of transformation parameters between
 * two point patterns, IEEE Transactions on Pattern Analysis and Machine Intelligence 13, 1991, in the plane).
 *
 * @returns null where the points lie on one another, so that no scale follows.
 */
export function placePlan(picture: PlanPicture, points: readonly KnownPoint[]): PlanPlacement | null {
  const [first] = points;
  if (!first || points.length < knownPointCount.least) return null;
  // Rows grow downwards in the picture; v grows upwards, as north does.
  const pairs = points.map((point) => ({ u: point.xPx, v: -point.yPx, ...offsetM(first, point) }));
  const mean = (pick: (pair: (typeof pairs)[number]) => number) => pairs.reduce((sum, pair) => sum + pick(pair), 0) / pairs.length;
  const [u0, v0, e0, n0] = [mean(({ u }) => u), mean(({ v }) => v), mean(({ eastM }) => eastM), mean(({ northM }) => northM)];
  let spread = 0;
  let along = 0;
  let across = 0;
  for (const { u, v, eastM, northM } of pairs) {
    const [du, dv, de, dn] = [u - u0, v - v0, eastM - e0, northM - n0];
    spread += du * du + dv * dv;
    along += du * de + dv * dn;
    across += du * dn - dv * de;
  }
  const metresPerPx = Math.hypot(along, across) / spread;
  if (!(spread > 1) || !(metresPerPx > 0)) return null;
  const [a, b] = [along / spread, across / spread];
  const onGround = (u: number, v: number) => ({ eastM: e0 + a * (u - u0) - b * (v - v0), northM: n0 + b * (u - u0) + a * (v - v0) });
  const corner = (xPx: number, yPx: number) => placeAt(first, onGround(xPx, -yPx));
  const left = pairs.map((pair) => {
    const at = onGround(pair.u, pair.v);
    return (at.eastM - pair.eastM) ** 2 + (at.northM - pair.northM) ** 2;
  });
  return {
    metresPerPx,
    upBearingDeg: ((Math.atan2(-b, a) * 180) / Math.PI + 360) % 360,
    leftOverM: points.length > knownPointCount.least ? Math.sqrt(left.reduce((sum, one) => sum + one, 0) / left.length) : null,
    corners: { upperLeft: corner(0, 0), upperRight: corner(picture.widthPx, 0), lowerLeft: corner(0, picture.heightPx) },
  };
}

/** "1 px is 0.052 m; the upper edge points to 27.3° true; left over 0.4 m." */
export function placementWords({ metresPerPx, upBearingDeg, leftOverM }: PlanPlacement): string {
  const fit = leftOverM === null ? 'two points always fit; a third shows how well' : leftOverM < 0.05 ? 'left over under 0.1 m' : `left over ${leftOverM.toFixed(leftOverM < 10 ? 1 : 0)} m`;
  return `1 px is ${Number(metresPerPx.toPrecision(3))} m; the upper edge points to ${upBearingDeg.toFixed(1)}° true; ${fit}.`;
}
