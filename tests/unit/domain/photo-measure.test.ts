import { describe, expect, test } from 'vitest';
import { goRound, homographyFrom, mapped } from '#app/domain/homography.ts';
import type { FourPoints, PlanePoint } from '#app/domain/homography.ts';
import { measurePhoto, readClicks } from '#app/domain/photo-measure.ts';
import type { PhotoClicks } from '#app/domain/photo-measure.ts';

/** A pinhole camera 400 mm before a wall, turned 25° about the upright and 10° about the level axis: plane [mm] to picture [px]. */
function photographed({ x, y }: PlanePoint): PlanePoint {
  const [yaw, pitch] = [(25 * Math.PI) / 180, (10 * Math.PI) / 180];
  const turned = [x * Math.cos(yaw), y, 400 - x * Math.sin(yaw)] as const;
  const tilted = [turned[0], turned[1] * Math.cos(pitch) - turned[2] * Math.sin(pitch), turned[1] * Math.sin(pitch) + turned[2] * Math.cos(pitch)] as const;
  return { x: 1500 + (3000 * tilted[0]) / tilted[2], y: 1000 + (3000 * tilted[1]) / tilted[2] };
}
const rectangle: FourPoints = [{ x: -60, y: -30 }, { x: 60, y: -30 }, { x: 60, y: 30 }, { x: -60, y: 30 }];
const corners = rectangle.map(photographed) as unknown as FourPoints;
const clicks = (more: Partial<PhotoClicks> = {}): PhotoClicks => ({
  scale: { kind: 'rectangle', corners, widthMm: 120, heightMm: 60, sizePlusMinusMm: 0 },
  lengthEnds: [photographed({ x: -20, y: 5 }), photographed({ x: 20, y: -25 })],
  widthEnds: [photographed({ x: -3, y: -4 }), photographed({ x: 3, y: 4 })],
  clickPx: 2,
  edgeBearingDeg: null,
  edgePlusMinusDeg: 2,
  ...more,
});

describe('a plane made square-on', () => {
  test('gives back lengths on the plane that a pinhole camera saw at a slant', () => {
    const measures = measurePhoto(clicks());
    // 3-4-5 triangles: 40 by 30 mm and 6 by 8 mm in the plane.
    expect(measures?.lengthMm.value).toBeCloseTo(50, 8);
    expect(measures?.widthMm?.value).toBeCloseTo(10, 8);
    expect(measures?.slopeDeg.value).toBeCloseTo((Math.atan2(-30, 40) * 180) / Math.PI, 8);
  });

  test('keeps the cross-ratio of four points on a line, the invariant of projective geometry', () => {
    const map = homographyFrom(corners, rectangle);
    const line = [0, 130, 410, 700].map((t) => ({ x: 1200 + t, y: 900 + 0.3 * t }));
    const there = line.map((point) => (map ? mapped(map, point) : null)?.x ?? Number.NaN);
    const ratio = ([a = 0, b = 0, c = 0, d = 0]: number[]) => ((c - a) * (d - b)) / ((c - b) * (d - a));
    expect(ratio(there)).toBeCloseTo(ratio(line.map(({ x }) => x)), 8);
  });

  test('cannot be made from corners that cross, or of which three lie on a line', () => {
    const [a, b, c, d] = corners;
    expect(measurePhoto(clicks({ scale: { kind: 'rectangle', corners: [a, c, b, d], widthMm: 120, heightMm: 60, sizePlusMinusMm: 0 } }))).toBeNull();
    expect(goRound([{ x: 0, y: 0 }, { x: 1, y: 0 }, { x: 2, y: 0 }, { x: 0, y: 2 }])).toBe(false);
    expect(homographyFrom([{ x: 0, y: 0 }, { x: 1, y: 1 }, { x: 2, y: 2 }, { x: 0, y: 2 }], rectangle)).toBeNull();
  });
});

describe('the ± of a photo', () => {
  const square = (lengthPx: number): PhotoClicks => clicks({
    scale: { kind: 'scale', from: { x: 0, y: 0 }, to: { x: 200, y: 0 }, lengthMm: 100, sizePlusMinusMm: 1 },
    lengthEnds: [{ x: 50, y: 80 }, { x: 50 + lengthPx, y: 80 }],
    widthEnds: null,
  });

  test('beside a scale is that of its two clicks, of the two clicks on the mark, and of the scale itself', () => {
    // L = l · p ÷ q: with 2 px a click, each span is uncertain by 2√2 px; the scale by 1 in 100.
    const [p, q, l] = [80, 200, 100];
    const expected = ((l * p) / q) * Math.hypot((2 * Math.SQRT2) / p, (2 * Math.SQRT2) / q, 1 / l);
    const measures = measurePhoto(square(80));
    expect(measures?.lengthMm.value).toBeCloseTo(40, 10);
    expect(measures?.lengthMm.plusMinus).toBeCloseTo(expected, 2);
  });

  test('grows with the ± of the clicks, and a slanted photo is no better than its worst corner', () => {
    const [fine, rough] = [measurePhoto(clicks({ clickPx: 1 })), measurePhoto(clicks({ clickPx: 4 }))];
    expect((rough?.lengthMm.plusMinus ?? 0) / (fine?.lengthMm.plusMinus ?? 1)).toBeCloseTo(4, 1);
  });

  test('of a heading is that of the slope and of the edge together', () => {
    const measures = measurePhoto(clicks({ edgeBearingDeg: 350, edgePlusMinusDeg: 3 }));
    // From the edge, -36.87° is to the left: 350 - 36.87.
    expect(measures?.headingDeg?.value).toBeCloseTo(313.13, 2);
    expect(measures?.headingDeg?.plusMinus).toBeCloseTo(Math.hypot(measures?.slopeDeg.plusMinus ?? 0, 3), 10);
  });
});

describe('the form of the photo measure', () => {
  const typed = { kind: 'scale', widthMm: '100', ax: '0', ay: '0', bx: '200', by: '0', px: '50', py: '80', qx: '130', qy: '80' };
  test('reads points as they were clicked, the width may be left out', () => {
    const reading = readClicks(typed);
    expect(reading.ok && reading.clicks.widthEnds).toBeNull();
    expect(reading.ok && reading.clicks.scale).toMatchObject({ kind: 'scale', to: { x: 200, y: 0 } });
  });
  test('names each point that is missing, and the height of a rectangle', () => {
    const reading = readClicks({ ...typed, kind: 'rectangle', qx: '' });
    expect(!reading.ok && Object.keys(reading.fieldErrors).sort()).toEqual(['cx', 'dx', 'heightMm', 'qx']);
  });
  test.each([['widthMm', '0'], ['clickPx', '0.1'], ['edgeBearingDeg', '400'], ['ax', 'left']])('refuses %s %s', (name, value) => {
    const reading = readClicks({ ...typed, [name]: value });
    expect(!reading.ok && Object.keys(reading.fieldErrors)).toEqual([name]);
  });
});
