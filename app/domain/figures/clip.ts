import type { FigurePoint } from '#app/domain/report-document.ts';

/** Part of a figure, by its edges, y pointing down. [pt] */
export interface FigureBox {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

export const isInside = ([x, y]: FigurePoint, { left, top, right, bottom }: FigureBox): boolean => x >= left && x <= right && y >= top && y <= bottom;

/** The part of a straight line inside a box; null where there is none. Y.-D. Liang and B. A. Barsky, ACM Transactions on Graphics 3(1), 1984. */
export function clipLine([x1, y1]: FigurePoint, [x2, y2]: FigurePoint, { left, top, right, bottom }: FigureBox): [FigurePoint, FigurePoint] | null {
  const [dx, dy] = [x2 - x1, y2 - y1];
  let [from, to] = [0, 1];
  for (const [run, room] of [[-dx, x1 - left], [dx, right - x1], [-dy, y1 - top], [dy, bottom - y1]] as const) {
    if (run === 0 && room < 0) return null;
    if (run < 0) from = Math.max(from, room / run);
    if (run > 0) to = Math.min(to, room / run);
  }
  return from > to ? null : [[x1 + from * dx, y1 + from * dy], [x1 + to * dx, y1 + to * dy]];
}

/** The pieces of a line through many points that lie inside a box. */
export function clipPath(points: readonly FigurePoint[], box: FigureBox): FigurePoint[][] {
  const pieces: FigurePoint[][] = [];
  for (const [index, to] of points.entries()) {
    const from = points[index - 1];
    const inside = from ? clipLine(from, to, box) : null;
    if (!inside) continue;
    const last = pieces.at(-1);
    const end = last?.at(-1);
    if (last && end && Math.hypot(end[0] - inside[0][0], end[1] - inside[0][1]) < 1e-6) last.push(inside[1]);
    else pieces.push(inside);
  }
  return pieces;
}

type Cut = (point: FigurePoint) => number;

/** The part of an area inside a box, empty where there is none. I. E. Sutherland and G. W. Hodgman, Communications of the ACM 17(1), 1974. */
export function clipArea(points: readonly FigurePoint[], { left, top, right, bottom }: FigureBox): FigurePoint[] {
  const cuts: readonly Cut[] = [([x]) => x - left, ([x]) => right - x, ([, y]) => y - top, ([, y]) => bottom - y];
  let kept = [...points];
  for (const within of cuts) {
    kept = kept.flatMap((here, index): FigurePoint[] => {
      const before = kept.at(index - 1) ?? here;
      const [a, b] = [within(before), within(here)];
      const share = a / (a - b);
      const crossing: FigurePoint = [before[0] + share * (here[0] - before[0]), before[1] + share * (here[1] - before[1])];
      if (b >= 0) return a < 0 ? [crossing, here] : [here];
      return a >= 0 ? [crossing] : [];
    });
  }
  return kept;
}

/** Lines at 45°, rising to the right, across an area without dents. @param apart Distance between two of them. [pt] */
export function hatchLines(area: readonly FigurePoint[], apart: number): [FigurePoint, FigurePoint][] {
  const sums = area.map(([x, y]) => x + y);
  const step = apart * Math.SQRT2;
  const lines: [FigurePoint, FigurePoint][] = [];
  for (let sum = Math.ceil(Math.min(...sums) / step) * step; sum < Math.max(...sums); sum += step) {
    const crossings = area.flatMap((to, index): FigurePoint[] => {
      const from = area.at(index - 1) ?? to;
      const [a, b] = [from[0] + from[1] - sum, to[0] + to[1] - sum];
      if (a >= 0 === b >= 0) return [];
      const share = a / (a - b);
      return [[from[0] + share * (to[0] - from[0]), from[1] + share * (to[1] - from[1])]];
    });
    const [first, second] = crossings;
    if (first && second) lines.push([first, second]);
  }
  return lines;
}
