import { describe, expect, it } from 'vitest';
import { layoutBurnCard } from '#app/components/burn-card/layout.ts';
import { headerSpan } from '#app/components/burn-card/model.ts';
import type { BurnCardModel, BurnRun } from '#app/components/burn-card/model.ts';
import { separateStretches, slotHalfHeightPx } from '#app/components/burn-card/slots.ts';
import { daySpan } from '#app/components/burn-card/wall-clock.ts';
import { textWidthPx } from '#app/components/charts/text-width.ts';
import { burnCardSentence } from '#app/components/burn-card/words.ts';

const at = (clock: string, day = '2026-02-03') => `${day}T${clock}:00.000Z`;
const run = (from: string, to: string, verdict: BurnRun['verdict'], reasonWords = ''): BurnRun => ({ fromUtc: at(from), toUtc: at(to), verdict, reasonWords });

const model: BurnCardModel = {
  zone: 'Europe/Copenhagen',
  ...daySpan('2026-02-03', 'Europe/Copenhagen'),
  daylight: [{ riseUtc: at('07:00'), setUtc: at('15:50') }],
  window: { startUtc: at('07:40'), endUtc: at('09:56') },
  runs: [
    run('07:40', '08:41', 'not-sunlit', 'behind Grain House skyline'),
    run('08:41', '09:14', 'not-sunlit', 'beam misses the mark'),
    run('09:14', '09:26', 'cannot-tell', 'bearing straddles'),
    run('09:26', '09:56', 'sunlit'),
  ],
  foundAtUtc: at('09:56'),
};
const hourPx = 360 / 18;

describe('layoutBurnCard', () => {
  it('puts local clock hours at even places of a 04 to 22 row', () => {
    const layout = layoutBurnCard(model, 360, 'M');
    expect(layout.figures.map((figure) => figure.text)).toEqual(['04', '06', '08', '10', '12', '14', '16', '18', '20', '22']);
    expect(layout.figures[2]?.x).toBeCloseTo(4 * hourPx, 6);
  });

  it('draws the body from sunrise to sunset and the dark card where window and daylight overlap', () => {
    const layout = layoutBurnCard(model, 360, 'S');
    expect(layout.bodies).toEqual([{ x1: expect.closeTo(4 * hourPx, 6), x2: expect.closeTo((12 + 50 / 60) * hourPx, 6) }]);
    expect(layout.cards[0]?.x1).toBeCloseTo((4 + 40 / 60) * hourPx, 6);
    expect(layout.cards[0]?.x2).toBeCloseTo((6 + 56 / 60) * hourPx, 6);
    expect(layout.foundX).toBeCloseTo(layout.endBars[1] ?? -1, 6);
  });

  it('examined night keeps the thread: no card outside daylight, but end bars', () => {
    const night = { ...model, window: { startUtc: at('04:00'), endUtc: at('06:30') }, runs: [run('04:00', '06:30', 'not-sunlit', 'night')] };
    const layout = layoutBurnCard(night, 360, 'S');
    expect(layout.cards).toEqual([]);
    expect(layout.endBars).toHaveLength(2);
  });

  it('an unexamined day has a body and neither card, bars, slots nor dots', () => {
    const layout = layoutBurnCard({ ...model, window: null, runs: [], foundAtUtc: null }, 360, 'S');
    expect(layout).toMatchObject({ cards: [], endBars: [], slots: [], dots: [], foundX: null });
    expect(layout.bodies).toHaveLength(1);
  });

  it('what cannot be told is dots and never a slot', () => {
    const layout = layoutBurnCard({ ...model, runs: [run('07:40', '09:56', 'cannot-tell', 'no bearing')] }, 360, 'S');
    expect(layout.slots).toEqual([]);
    expect(layout.dots).toHaveLength(1);
  });

  it('a minute of sun is drawn at least 3 px long', () => {
    const layout = layoutBurnCard({ ...model, runs: [run('08:00', '08:01', 'sunlit')] }, 360, 'S');
    const slot = layout.slots[0];
    expect((slot?.x2 ?? 0) - (slot?.x1 ?? 0)).toBeCloseTo(3, 6);
  });

  it('a one-minute gap between two burns stays at least 2 px wide', () => {
    const layout = layoutBurnCard({ ...model, runs: [run('08:00', '08:30', 'sunlit'), run('08:30', '08:31', 'not-sunlit'), run('08:31', '09:00', 'sunlit')] }, 360, 'S');
    expect(layout.slots).toHaveLength(2);
    expect((layout.slots[1]?.x1 ?? 0) - (layout.slots[0]?.x2 ?? 0)).toBeGreaterThanOrEqual(2);
  });

  it('more than a day gives one body a day and dates in place of hours', () => {
    const days = ['2026-05-06', '2026-05-07', '2026-05-08'];
    const layout = layoutBurnCard({
      zone: 'Europe/London', fromUtc: '2026-05-05T23:00:00Z', toUtc: '2026-05-08T23:00:00Z', runs: [],
      daylight: days.map((day) => ({ riseUtc: at('04:20', day), setUtc: at('19:45', day) })),
      window: { startUtc: at('09:00', '2026-05-06'), endUtc: at('14:00', '2026-05-08') },
    }, 640, 'L');
    expect(layout.bodies).toHaveLength(3);
    expect(layout.cards).toHaveLength(3);
    expect(layout.figures.map((figure) => figure.text)).toEqual(['Wed 6', 'Thu 7', 'Fri 8 May']);
  });

  it('leaves room for the hour that the clock skips', () => {
    // Europe/London: 29 March 2026, 01:00 becomes 02:00 (EU summer-time rule, last Sunday of March at 01:00 UTC).
    const layout = layoutBurnCard({ zone: 'Europe/London', fromUtc: '2026-03-28T22:00:00Z', toUtc: '2026-03-29T09:00:00Z', daylight: [], window: null, runs: [] }, 1200, 'L');
    expect(layout.breaks).toEqual([{ kind: 'skipped', x: expect.closeTo(300, 6), widthPx: expect.closeTo(100, 6) }]);
    expect(layout.figures.map((figure) => figure.text)).not.toContain('01');
    expect(layout.figures.find((figure) => figure.text === '02')?.x).toBeCloseTo(400, 6);
  });

  it('rules a repeated hour twice', () => {
    const layout = layoutBurnCard({ zone: 'Europe/London', fromUtc: '2026-10-24T22:00:00Z', toUtc: '2026-10-25T06:00:00Z', daylight: [], window: null, runs: [] }, 800, 'L');
    expect(layout.figures.filter((figure) => figure.text === '01')).toHaveLength(2);
    expect(layout.breaks[0]?.kind).toBe('repeated');
  });

  it('labels never overlap within a row, at any width', () => {
    for (const width of [300, 328, 420, 640, 1000]) {
      const layout = layoutBurnCard({ ...model, ...headerSpan({ startUtc: at('07:40'), endUtc: at('09:56') }) }, width, 'L');
      const titles = layout.labels.filter((label) => label.sizePx === 13);
      expect(titles.some((label) => label.text === 'Sunlit, 30 min')).toBe(true);
      expect(titles.some((label) => label.text === "Can't tell, 12 min")).toBe(true);
      const extents = layout.labels.map((label) => {
        const length = textWidthPx(label.text, label.sizePx, label.bold);
        const x1 = label.x - { start: 0, middle: length / 2, end: length }[label.anchor];
        return { y: label.y, x1, x2: x1 + length };
      });
      for (const [index, one] of extents.entries()) {
        expect(one.x1).toBeGreaterThanOrEqual(-1);
        expect(one.x2).toBeLessThanOrEqual(width + 1);
        for (const other of extents.slice(index + 1).filter((two) => two.y === one.y)) expect(Math.min(one.x2, other.x2) - Math.max(one.x1, other.x1)).toBeLessThan(0);
      }
    }
  });

  it('refuses a span without length', () => {
    expect(() => layoutBurnCard({ ...model, toUtc: model.fromUtc }, 360, 'S')).toThrow(RangeError);
  });
});

describe('headerSpan', () => {
  it('adds a fifth on each side, at least half an hour, out to half hours', () => {
    expect(headerSpan({ startUtc: at('07:40'), endUtc: at('09:56') })).toEqual({ fromUtc: at('07:00'), toUtc: at('10:30') });
    expect(headerSpan({ startUtc: at('08:00'), endUtc: at('18:00') })).toEqual({ fromUtc: at('06:00'), toUtc: at('20:00') });
  });
});

describe('separateStretches', () => {
  it('keeps every burn apart and inside the axis when slivers crowd at the end', () => {
    const placed = separateStretches([{ x1: 96, x2: 96.2 }, { x1: 97, x2: 97.1 }, { x1: 99.8, x2: 100 }], 100);
    for (const [index, one] of placed.entries()) {
      expect(one.x2 - one.x1).toBeGreaterThanOrEqual(3 - 1e-9);
      expect(one.x2).toBeLessThanOrEqual(100);
      const next = placed[index + 1];
      if (next) expect(next.x1 - one.x2).toBeGreaterThanOrEqual(2 - 1e-9);
    }
  });
});

describe('slotHalfHeightPx', () => {
  it('runs from 5 px at 1 kW/m² to 12 px at 1 MW/m² on a log scale and stays at 5 without energy', () => {
    expect(slotHalfHeightPx(null)).toBe(5);
    expect(slotHalfHeightPx(1)).toBe(5);
    expect(slotHalfHeightPx(10 ** 1.5)).toBeCloseTo(8.5, 9);
    expect(slotHalfHeightPx(1000)).toBeCloseTo(12, 9);
    expect(slotHalfHeightPx(5000)).toBe(12);
  });
});

describe('burnCardSentence', () => {
  it('says case, date, zone, window, each burn and dot run with its minutes', () => {
    expect(burnCardSentence(model, 'Case 118')).toBe(
      "Case 118, Tue 3 Feb 2026, Europe/Copenhagen, examined 08:40 to 10:56. Can't tell 10:14 to 10:26, 12 minutes. Sunlit 10:26 to 10:56, 30 minutes. Found 10:56.",
    );
  });

  it('says that no minute was sunlit, that the sun does not rise, or that nothing was examined', () => {
    expect(burnCardSentence({ ...model, runs: [run('07:40', '09:56', 'not-sunlit')] })).toContain('No minute sunlit.');
    expect(burnCardSentence({ ...model, daylight: [], polar: 'night' })).toContain('The sun does not rise.');
    expect(burnCardSentence({ ...model, window: null, runs: [] })).toContain('not examined');
  });
});
