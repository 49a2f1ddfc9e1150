import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { MarginRuler } from '#app/components/charts/margin-ruler.tsx';
import { nearBearing, sunPathView } from '#app/components/charts/sun-path-view.ts';
import { SunPathFigure } from '#app/components/charts/sun-path.tsx';
import { textWidthPx } from '#app/components/charts/text-width.ts';
import { plainNumber } from '#app/domain/plain-number.ts';
import { litBands } from '#app/domain/year-plate.ts';

const minutes = [350, 355, 0, 5, 10].map((azimuthDeg, index) => ({
  atUtc: `2026-06-21T03:0${index}:00.000Z`, azimuthDeg, apparentElevationDeg: 30 - index, verdict: index < 3 ? ('not-sunlit' as const) : ('sunlit' as const),
}));

describe('sunPathView', () => {
  it('keeps a path across north in one piece, as under a southern sky', () => {
    const view = sunPathView({ zone: 'Australia/Sydney', minutes });
    const steps = view.window.slice(1).map((point, index) => point.az - (view.window[index]?.az ?? 0));
    for (const step of steps) expect(step).toBeCloseTo(5, 9);
    expect(view.toAz - view.fromAz).toBeGreaterThanOrEqual(60);
  });

  it('splits the window into its stretches of one result', () => {
    expect(sunPathView({ zone: 'UTC', minutes }).stretches.map((stretch) => [stretch.verdict, stretch.points.length])).toEqual([['not-sunlit', 3], ['sunlit', 2]]);
  });
});

describe('nearBearing', () => {
  it('turns a bearing to the near side of the middle', () => {
    expect(nearBearing(350, 0)).toBeCloseTo(-10, 9);
    expect(nearBearing(10, 355)).toBeCloseTo(370, 9);
    expect(nearBearing(180, 180)).toBeCloseTo(180, 9);
  });
});

describe('year plate', () => {
  const days = Array.from({ length: 365 }, (_, index) => ({ on: new Date(Date.UTC(2026, 0, 1 + index)).toISOString().slice(0, 10), riseMin: 360, setMin: 1080 }));

  it('joins neighbouring lit days into one band and keeps spring and autumn apart', () => {
    const lit = ['2026-01-30', '2026-01-31', '2026-02-01', '2026-11-07'].map((on) => ({ on, fromMin: 620, toMin: 650 }));
    expect(litBands({ days, lit }).map((band) => [band.firstOn, band.lastOn, band.cells.length])).toEqual([['2026-01-30', '2026-02-01', 3], ['2026-11-07', '2026-11-07', 1]]);
  });
});

describe('MarginRuler', () => {
  it('reads out value, range and what would agree, in the unit of the test', () => {
    const html = renderToStaticMarkup(<MarginRuler value={1} low={0.2} high={3.9} unit="mm" agreeFrom={0} agreeTo={4.8} />);
    expect(html).toContain('aria-label="1, 0.2 to 3.9 mm; would agree from 0 to 4.8"');
  });
});

describe('figures', () => {
  it('hold the numbers beside the picture, with no script', () => {
    const html = renderToStaticMarkup(<SunPathFigure title="Sun path" zone="UTC" minutes={minutes} />);
    expect(html).toContain('<table');
    expect(html).toContain('type="checkbox"');
    expect(html).toContain('350.00');
  });
});

describe('plainNumber', () => {
  it('writes as many digits as the value deserves', () => {
    expect([481.4, 58.27, 4.8, 0.8512, 0, 100].map(plainNumber)).toEqual(['481', '58.3', '4.8', '0.85', '0', '100']);
    expect(plainNumber(Number.NaN)).toBe('not known');
  });
});

describe('textWidthPx', () => {
  it('grows with size and weight and is nought for nothing', () => {
    expect(textWidthPx('', 12)).toBe(0);
    expect(textWidthPx('Sunlit', 24)).toBeCloseTo(2 * textWidthPx('Sunlit', 12), 9);
    expect(textWidthPx('Sunlit', 12, true)).toBeGreaterThan(textWidthPx('Sunlit', 12));
  });
});
