import { describe, expect, it } from 'vitest';
import { faultsOf } from './figures/figure-faults.ts';
import { exampleInput } from '#app/cli/example-input.ts';
import { FigureCount } from '#app/domain/report-blocks.ts';
import type { ReportBlock, ReportFigure } from '#app/domain/report-document.ts';
import type { ReportedRun } from '#app/domain/report-source.ts';
import { sunPart } from '#app/domain/report-sun-part.ts';
import { reliedWeather } from '#app/domain/relied-weather.ts';
import { releasedDrawing, releasedDrawingSchema } from '#app/domain/released-drawing.ts';
import { noDrawing, runDrawing } from '#app/domain/run-drawing.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';

const place = { ...exampleInput.place, latitudeDeg: 51.512345, longitudeDeg: -0.109876 };
const input = { ...exampleInput, place, window: { ...exampleInput.window, startUtc: '2025-03-12T13:00:00Z', endUtc: '2025-03-12T15:00:00Z' }, samples: 64, rays: 20_000 };
const result = reconstruct(input);
const drawing = runDrawing(input, result);
const relied = reliedWeather(input.sky.dniSeries, []);
const run: ReportedRun = { number: 1, engineVersion: 'test', zoneRules: '', inputHash: null, resultHash: 'f'.repeat(64), result, drawing, weather: relied && { ...relied, source: relied.sourceName } };
const blocksOf = (values: Partial<ReportedRun>) => sunPart({ run: { ...run, ...values }, zone: 'Europe/London', returns: [] }, new FigureCount());
const figuresOf = (blocks: readonly ReportBlock[]) => blocks.filter((block): block is ReportFigure => block.kind === 'figure');
const wordsOf = (blocks: readonly ReportBlock[]) => blocks.map((block) => JSON.stringify(block)).join('\n');

describe('the figures of a run', () => {
  const figures = figuresOf(blocksOf({}));

  it('stand in the order of sun, weather, beam, flux, spot, heat and returns, numbered from one', () => {
    expect(figures.map((figure) => figure.number)).toEqual(figures.map((_, index) => index + 1));
    expect(figures.map((figure) => figure.title.split(/[ ;,]/u).slice(0, 2).join(' '))).toEqual(['Path of', 'Direct irradiance', 'Section and', 'Flux at', 'Width of', 'Surface of', 'When this']);
  });

  it('each stay in their box, in letters of 8 pt at least, and say what they show', () => {
    for (const figure of figures) {
      expect(faultsOf(figure), figure.title).toEqual([]);
      expect(figure.alt.length, figure.title).toBeGreaterThan(40);
      expect(JSON.stringify(figure.marks)).not.toContain('null');
    }
  });

  it('each have a table that follows before the next figure', () => {
    const kinds = blocksOf({}).flatMap((block) => (block.kind === 'figure' || block.kind === 'table' ? [block.kind] : []));
    const after = kinds.flatMap((kind, index) => (kind === 'figure' ? [kinds[index + 1]] : []));
    // The path of the sun and the irradiance of the same minutes share theirs; the year has its rows in the list of returns.
    expect(after.slice(1, -1)).toEqual(after.slice(1, -1).map(() => 'table'));
  });

  it('are left out, with no gap in the numbers, where a reader may not have their data', () => {
    const left = figuresOf(blocksOf({ drawing: noDrawing, result: { ...result, minutes: [], best: null } }));
    expect(left.map((figure) => figure.title.split(' ')[0])).toEqual(['Direct', 'Flux', 'Width', 'Surface']);
    expect(left.map((figure) => figure.number)).toEqual([1, 2, 3, 4]);
    expect(figuresOf(blocksOf({ drawing: noDrawing, weather: null, result: { ...result, minutes: [], best: null, focus: null, heating: null } }))).toEqual([]);
  });
});

describe('its words', () => {
  it('never give a flux of the focus without its disc', () => {
    for (const block of blocksOf({})) {
      if (block.kind !== 'table') continue;
      for (const row of block.rows.filter((cells) => cells.some((cell) => /\d kW\/m²/u.test(cell)))) if (/^Flux on/u.test(row[0] ?? '')) expect(row[0]).toMatch(/disc/u);
    }
    for (const figure of figuresOf(blocksOf({})).filter((one) => one.title.startsWith('Flux'))) for (const mark of figure.marks) if (mark.mark === 'text' && mark.text.includes('kW/m²')) expect(mark.text).toMatch(/disc|sun's image/u);
  });

  it('say which weather the run went by, or that it went by none', () => {
    expect(wordsOf(blocksOf({}))).toContain('invented station, 6 km west, 6 km off');
    expect(wordsOf(blocksOf({ weather: null }))).toContain('No weather record was used');
  });

  it('say so where no reconstruction is attached', () => expect(wordsOf(sunPart({ run: null, zone: 'UTC', returns: [] }, new FigureCount()))).toContain('No reconstruction is attached.'));
});

describe('the drawing of a run', () => {
  it('leaves for those who may know the place with every key that it has', () => expect(releasedDrawingSchema.parse(releasedDrawing(drawing, 'shown'))).toEqual(drawing));

  it('gives others the distance on the measurement sheet and nothing from which the place follows', () => {
    expect(releasedDrawing(drawing, 'reduced')).toEqual({ skyline: [], beam: null, markDistanceM: drawing.markDistanceM, sky: null, year: null });
    expect(drawing.markDistanceM).toBeGreaterThan(0);
  });

  it('holds no coordinate and no name', () => {
    expect(/latitude|longitude|"name"/iu.test(JSON.stringify(drawing))).toBe(false);
    const digits = JSON.stringify(drawing);
    for (const secret of ['51.512', '0.1098', '51.5123']) expect(digits.includes(secret), secret).toBe(false);
  });

  it('is the same whenever it is asked for', () => expect(runDrawing(input, result)).toEqual(drawing));
});
