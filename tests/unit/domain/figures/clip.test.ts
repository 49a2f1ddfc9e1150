import { describe, expect, it } from 'vitest';
import { clipArea, clipLine, clipPath, hatchLines } from '#app/domain/figures/clip.ts';
import type { FigurePoint } from '#app/domain/report-document.ts';

const box = { left: 0, top: 0, right: 10, bottom: 10 };

describe('a line', () => {
  it('is cut where it crosses the edges of the box', () => {
    // Through (0, 5) and (10, 5) by hand; the diagonal enters at the corner it leaves from.
    expect(clipLine([-5, 5], [20, 5], box)).toEqual([[0, 5], [10, 5]]);
    expect(clipLine([5, 5], [25, 25], box)).toEqual([[5, 5], [10, 10]]);
    expect(clipLine([2, 3], [4, 5], box)).toEqual([[2, 3], [4, 5]]);
  });

  it('that misses the box is none, also when it runs along outside an edge', () => {
    expect(clipLine([-5, -5], [20, -5], box)).toBeNull();
    expect(clipLine([-8, 0], [0, -8], box)).toBeNull();
  });

  it('of many points comes in as many pieces as it enters the box', () => {
    const path: FigurePoint[] = [[1, 1], [1, 5], [20, 5], [20, 9], [9, 9]];
    expect(clipPath(path, box)).toEqual([[[1, 1], [1, 5], [10, 5]], [[10, 9], [9, 9]]]);
  });
});

describe('an area', () => {
  const areaOf = (points: readonly FigurePoint[]) => Math.abs(points.reduce((sum, [x, y], index) => {
    const [px, py] = points.at(index - 1) ?? [0, 0];
    return sum + px * y - x * py;
  }, 0)) / 2;

  it('that hangs over a corner keeps the square that is inside', () => {
    expect(areaOf(clipArea([[5, 5], [15, 5], [15, 15], [5, 15]], box))).toBeCloseTo(25, 9);
  });

  it('that holds the box is cut to the box, and one outside is empty', () => {
    expect(areaOf(clipArea([[-50, -50], [50, -50], [50, 50], [-50, 50]], box))).toBeCloseTo(100, 9);
    expect(clipArea([[20, 20], [30, 20], [30, 30]], box)).toEqual([]);
  });

  it('is hatched at 45°, from edge to edge, as far apart as asked', () => {
    const lines = hatchLines([[0, 0], [10, 0], [10, 10], [0, 10]], Math.SQRT2);
    // x + y is constant along each and steps by √2 · √2 = 2 from one to the next.
    const sums = lines.map(([[x1, y1], [x2, y2]]) => [x1 + y1, x2 + y2]);
    expect(sums.map(([sum]) => Math.round(sum ?? 0))).toEqual([2, 4, 6, 8, 10, 12, 14, 16, 18]);
    for (const [first = 0, second = 1] of sums) expect(first).toBeCloseTo(second, 9);
  });
});
