import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gridLabel, gridStepDeg, gridValues, nightEdge, scaleBar } from '#app/components/scene/graticule.ts';
import { placeLabels } from '#app/components/scene/label-places.ts';

describe('the grid of a map', () => {
  it('is every 10 degrees on a world map, and finer when there is room', () => {
    expect(gridStepDeg(9.3, 92)).toBe(10);
    expect(gridStepDeg(2.6, 92)).toBe(60);
    expect(gridStepDeg(920_000, 92)).toBe(0.0001);
  });

  it('labels neighbouring lines differently at every zoom', () => {
    for (const step of [30, 10, 0.5, 0.02, 0.0001, 0.000005]) {
      const labels = gridValues(53 - 4 * step, 53 + 4 * step, step).map((v) => gridLabel(v, 'latitude', step));
      expect(new Set(labels).size).toBe(labels.length);
    }
  });

  it('keeps the scale bar within its width and round', () => {
    fc.assert(fc.property(fc.double({ min: 0.01, max: 50_000, noNaN: true }), (metresPerPixel) => {
      const { metres, widthPx } = scaleBar(metresPerPixel, 110);
      expect(widthPx).toBeLessThanOrEqual(110.001);
      expect(widthPx).toBeGreaterThan(40);
      expect(['1', '2', '5']).toContain(metres.toExponential()[0]);
    }));
  });
});

describe('the line between day and night', () => {
  // Polar circles stand at 90 degrees less the obliquity: 66.56 degrees for 23.44 (IAU 2006 value 23.4393 for J2000).
  it('reaches to the polar circle and no farther at a solstice', () => {
    const latitudes = nightEdge({ latitudeDeg: 23.4393, longitudeDeg: 0 }).map(([lat]) => lat);
    expect(Math.max(...latitudes)).toBeCloseTo(66.5607, 3);
    expect(Math.min(...latitudes)).toBeCloseTo(-66.5607, 3);
  });

  it('stands a quarter turn from the place where the sun is overhead, everywhere', () => {
    const rad = Math.PI / 180;
    const sun = { latitudeDeg: -11.3, longitudeDeg: 41 };
    for (const [lat, lon] of nightEdge(sun)) {
      const cosine = Math.sin(lat * rad) * Math.sin(sun.latitudeDeg * rad)
        + Math.cos(lat * rad) * Math.cos(sun.latitudeDeg * rad) * Math.cos((lon - sun.longitudeDeg) * rad);
      expect(cosine).toBeCloseTo(0, 9);
    }
  });
});

describe('labels on a map', () => {
  const frame = { x: 0, y: 0, w: 900, h: 600 };
  const pin = fc.record({ x: fc.integer({ min: 0, max: 900 }), y: fc.integer({ min: 0, max: 600 }), w: fc.integer({ min: 30, max: 130 }), h: fc.constant(24) });

  it('never lie over each other, over a pin, or outside the frame', () => {
    fc.assert(fc.property(fc.array(pin, { maxLength: 20 }), (pins) => {
      const boxes = placeLabels(pins, frame, 6).flatMap((box) => (box ? [box] : []));
      boxes.forEach((a, i) => {
        expect(a.x >= 0 && a.y >= 0 && a.x + a.w <= 900 && a.y + a.h <= 600).toBe(true);
        for (const b of boxes.slice(i + 1)) expect(a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h).toBe(false);
        for (const p of pins) expect(p.x > a.x && p.x < a.x + a.w && p.y > a.y && p.y < a.y + a.h).toBe(false);
      });
    }));
  });

  it('gives a lone pin a label, and keeps off places in use', () => {
    const lone = [{ x: 450, y: 300, w: 80, h: 24 }];
    expect(placeLabels(lone, frame, 6)[0]).not.toBeNull();
    expect(placeLabels(lone, frame, 6, [frame])[0]).toBeNull();
  });
});
