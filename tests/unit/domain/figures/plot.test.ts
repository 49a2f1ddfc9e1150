import { describe, expect, it } from 'vitest';
import { clockTicks, linear, roundTicks, roundTop } from '#app/domain/figures/plot.ts';

describe('figures of an axis', () => {
  it.each([
    [0, 1000, 5, [0, 200, 400, 600, 800, 1000]],
    [-250, 250, 4, [-200, 0, 200]],
    [0, 0.35, 7, [0, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35]],
    [0, 7, 7, [0, 1, 2, 3, 4, 5, 6, 7]],
  ])('from %s to %s, about %s of them, are round', (from, to, about, ticks) => expect(roundTicks(from, to, about)).toEqual(ticks));

  it.each([[1_161, 6, 1_200], [100, 5, 100], [0.011, 4, 0.015], [641, 5, 800]])('%s has a top that ends on a figure', (value, about, top) => expect(roundTop(value, about)).toBeCloseTo(top, 12));
});

describe('hours of an axis', () => {
  const x = (fromUtc: string, toUtc: string) => linear([Date.parse(fromUtc), Date.parse(toUtc)], [0, 400]);

  it('are those of the wall clock, in a zone of half hours too', () => {
    const [from, to] = ['2026-01-05T01:00:00Z', '2026-01-05T05:00:00Z'];
    const ticks = clockTicks(Date.parse(from), Date.parse(to), 'Asia/Kolkata', x(from, to), 8);
    // 06:30 to 10:30 in Kolkata, UTC+5:30; a tick each half hour is 50 pt from the next.
    expect(ticks.map((tick) => tick.text)).toEqual(['06:30', '07:00', '07:30', '08:00', '08:30', '09:00', '09:30', '10:00', '10:30']);
    expect(ticks.map((tick) => Math.round(tick.at))).toEqual([0, 50, 100, 150, 200, 250, 300, 350, 400]);
  });

  it('leave out the hour that a change of the clock leaves out', () => {
    const [from, to] = ['2026-03-29T00:00:00Z', '2026-03-29T03:00:00Z'];
    const ticks = clockTicks(Date.parse(from), Date.parse(to), 'Europe/London', linear([Date.parse(from), Date.parse(to)], [0, 150]), 8);
    expect(ticks.map((tick) => tick.text)).toEqual(['00:00', '02:00', '03:00', '04:00']);
  });

  it('are days where a window is long', () => {
    const [from, to] = ['2026-05-05T15:00:00Z', '2026-05-15T14:00:00Z'];
    expect(clockTicks(Date.parse(from), Date.parse(to), 'UTC', x(from, to), 8).map((tick) => tick.text)).toEqual(Array.from({ length: 10 }, (_, index) => `${index + 6} May 2026`));
  });
});
