import { describe, expect, it } from 'vitest';
import { hullOf, metresWords, roundLengthM, scaleFrame } from '#app/domain/scale-drawing.ts';

describe('drawings to scale', () => {
  it('take the outline of a square with points inside it', () => {
    const hull = hullOf([[0, 0], [2, 0], [1, 1], [2, 2], [0.5, 1.5], [0, 2]]);
    expect(hull.toSorted((a, b) => a[0] - b[0] || a[1] - b[1])).toEqual([[0, 0], [0, 2], [2, 0], [2, 2]]);
  });

  it('have one scale both ways and keep every point inside the margin', () => {
    const points = [[-1, -0.2], [3, 0.5]] as const;
    const frame = scaleFrame(points, 400, { leastPx: 100, mostPx: 300, marginPx: 20 });
    expect(frame.x(1) - frame.x(0)).toBeCloseTo(frame.y(0) - frame.y(1), 9);
    for (const [across, up] of points) {
      expect(frame.x(across)).toBeGreaterThanOrEqual(20 - 1e-9);
      expect(frame.x(across)).toBeLessThanOrEqual(380 + 1e-9);
      expect(frame.y(up)).toBeGreaterThanOrEqual(20 - 1e-9);
      expect(frame.y(up)).toBeLessThanOrEqual(frame.heightPx - 20 + 1e-9);
    }
  });

  it.each([[0.37, 0.2], [0.5, 0.5], [9, 5], [0.0011, 0.001]])('have a scale bar of a round length: at most %s is %s', (most, round) => expect(roundLengthM(most)).toBeCloseTo(round, 12));
  it.each([[0.0352 / 1000, '0.04 mm'], [0.0912, '91.2 mm'], [12.345, '12.3 m']])('say %s m as "%s"', (length, words) => expect(metresWords(length)).toBe(words));
});
