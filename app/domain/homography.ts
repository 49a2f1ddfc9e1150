/** A point in a picture [px], or in a plane [mm]; x to the right, y down. */
export interface PlanePoint {
  readonly x: number;
  readonly y: number;
}

/** Nine coefficients by rows, the last one 1, of the map (x, y) → ((a x + b y + c) ÷ w, (d x + e y + f) ÷ w), w = g x + h y + 1. */
export type Homography = readonly [number, number, number, number, number, number, number, number, 1];

export type FourPoints = readonly [PlanePoint, PlanePoint, PlanePoint, PlanePoint];

/**
 * The projective map that takes four points of one plane to four of another: the picture of a flat surface, made
 * square-on. Eight linear equations in eight unknowns, solved by elimination with pivots.
 *
 * @returns null where three of the points lie on a line.
 * @see R. Hartley and A. Zisserman, Multiple View Geometry in Computer Vision, 2nd ed. 2004, §2.3 and §4.1.
 */
export function homographyFrom(from: FourPoints, to: FourPoints): Homography | null {
  const rows: number[][] = from.flatMap((point, index) => {
    const { x: u, y: v } = to[index] ?? point;
    return [
      [point.x, point.y, 1, 0, 0, 0, -u * point.x, -u * point.y, u],
      [0, 0, 0, point.x, point.y, 1, -v * point.x, -v * point.y, v],
    ];
  });
  const solved = solve(rows);
  if (!solved) return null;
  const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0] = solved;
  return [a, b, c, d, e, f, g, h, 1];
}

/** Gauss elimination of an n × (n + 1) system; null when it has no single solution. */
function solve(rows: number[][]): number[] | null {
  const size = rows.length;
  const scale = Math.max(1, ...rows.flat().map(Math.abs));
  for (let column = 0; column < size; column += 1) {
    const pivot = rows.slice(column).reduce((best, row, index) => (Math.abs(row[column] ?? 0) > Math.abs(rows[best]?.[column] ?? 0) ? column + index : best), column);
    const top = rows[pivot];
    if (!top || Math.abs(top[column] ?? 0) < 1e-12 * scale) return null;
    [rows[column], rows[pivot]] = [top, rows[column] ?? top];
    for (const [index, row] of rows.entries()) {
      if (index === column) continue;
      const factor = (row[column] ?? 0) / (top[column] ?? 1);
      for (let at = column; at <= size; at += 1) row[at] = (row[at] ?? 0) - factor * (top[at] ?? 0);
    }
  }
  return rows.map((row, index) => (row[size] ?? 0) / (row[index] ?? 1));
}

/** Where a point comes to lie; null for one that the map sends to infinity. */
export function mapped([a, b, c, d, e, f, g, h]: Homography, { x, y }: PlanePoint): PlanePoint | null {
  const w = g * x + h * y + 1;
  return Math.abs(w) < 1e-12 ? null : { x: (a * x + b * y + c) / w, y: (d * x + e * y + f) / w };
}

/** Whether four points go round in one sense, as the corners of a rectangle seen from its front do. */
export function goRound(points: FourPoints): boolean {
  const turns = points.map((point, index) => {
    const next = points[(index + 1) % 4] ?? point;
    const after = points[(index + 2) % 4] ?? point;
    return (next.x - point.x) * (after.y - next.y) - (next.y - point.y) * (after.x - next.x);
  });
  return turns.every((turn) => turn > 0) || turns.every((turn) => turn < 0);
}
