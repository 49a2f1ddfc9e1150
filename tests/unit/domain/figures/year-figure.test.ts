import { describe, expect, it } from 'vitest';
import { yearFigure } from '#app/domain/figures/year-figure.ts';
import type { FigureMark } from '#app/domain/report-document.ts';
import { platePieces, spanPieces } from '#app/domain/year-plate.ts';
import { drawn, faultsOf, size, textsOf } from './figure-faults.ts';

const dayOn = (index: number) => new Date(Date.UTC(2026, 0, 1 + index)).toISOString().slice(0, 10);
const days = Array.from({ length: 365 }, (_, index) => ({ on: dayOn(index), riseMin: 360, setMin: 1080 }));
const lit = [30, 31, 32, 33].map((index) => ({ on: dayOn(index), fromMin: 720, toMin: 740 }));

describe('the plate of a year', () => {
  const figure = drawn(yearFigure({ days, lit, reach: days.map(({ on }) => ({ on, fromMin: 540, toMin: 900 })) }, size));

  it('stays inside, and names days and clock times', () => {
    expect(faultsOf(figure)).toEqual([]);
    expect(figure.alt).toBe('The mark can be lit 31 Jan 2026 to 3 Feb 2026, 12:00 to 12:20.');
    expect(textsOf(figure)).toEqual(expect.arrayContaining(['31 Jan to 3 Feb', '12:00 to 12:20', 'Jan', 'Dec', '06', '18']));
    expect(figure.title).toContain('from Jan 2026');
  });

  it('puts a slot on its day and its clock: noon is half way from six to eighteen', () => {
    const slot = drawn(figure.marks.find((mark): mark is Extract<FigureMark, { mark: 'rect' }> => mark.mark === 'rect' && mark.fill === 'slot'));
    const body = drawn(figure.marks.find((mark): mark is Extract<FigureMark, { mark: 'area' }> => mark.mark === 'area' && mark.fill === 'card'));
    const [xs, ys] = [body.points.map(([x]) => x), body.points.map(([, y]) => y)];
    const [left, right, top, bottom] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
    expect((slot.x - left) / (right - left)).toBeCloseTo(30 / 365, 3);
    expect((slot.y - top) / (bottom - top)).toBeCloseTo(0.5, 2);
  });

  it('keeps its words on the dark daylight: bands at both ends of the day and the year', () => {
    const edges = drawn(yearFigure({ days, lit: [...lit, { on: dayOn(363), fromMin: 361, toMin: 365 }, { on: dayOn(180), fromMin: 1070, toMin: 1079 }] }, size));
    expect(faultsOf(edges)).toEqual([]);
    const body = drawn(edges.marks.find((mark): mark is Extract<FigureMark, { mark: 'area' }> => mark.mark === 'area'));
    const bottom = Math.max(...body.points.map(([, y]) => y));
    for (const mark of edges.marks) if (mark.mark === 'text' && mark.ink === 'card-text') expect(mark.y).toBeLessThan(bottom);
  });

  it('is left out where the sun never rises', () => expect(yearFigure({ days: days.map(({ on }) => ({ on, riseMin: null, setMin: null })), lit: [] }, size)).toBeNull());
});

describe('outlines', () => {
  it('of the daylight part where the sun stays down, and step where the clock is changed', () => {
    const three = [{ on: '2026-01-01', riseMin: 400, setMin: 900 }, { on: '2026-01-02', riseMin: null, setMin: null }, { on: '2026-01-03', riseMin: 460, setMin: 960 }];
    expect(platePieces(three)).toEqual([[[0, 400], [1, 400], [1, 900], [0, 900]], [[2, 460], [3, 460], [3, 960], [2, 960]]]);
  });

  it('of spans go on from day to day and split where two no longer overlap', () => {
    const spans = [{ on: '2026-01-01', fromMin: 600, toMin: 700 }, { on: '2026-01-02', fromMin: 610, toMin: 690 }, { on: '2026-01-02', fromMin: 800, toMin: 850 }, { on: '2026-01-04', fromMin: 610, toMin: 690 }];
    expect(spanPieces(spans, Date.parse('2026-01-01T00:00:00Z'))).toEqual([
      [[0, 600], [1, 600], [1, 610], [2, 610], [2, 690], [1, 690], [1, 700], [0, 700]],
      [[1, 800], [2, 800], [2, 850], [1, 850]],
      [[3, 610], [4, 610], [4, 690], [3, 690]],
    ]);
  });
});
