import { describe, expect, it } from 'vitest';
import { foldDays } from '#app/components/burn-card/fold-days.ts';
import { layoutBurnCard } from '#app/components/burn-card/layout.ts';
import type { BurnCardModel, BurnRun } from '#app/components/burn-card/model.ts';

const days = Array.from({ length: 9 }, (_, index) => `2026-06-0${index + 1}`);
const run = (from: string, to: string, verdict: BurnRun['verdict']): BurnRun => ({ fromUtc: from, toUtc: to, verdict, reasonWords: '' });
const model: BurnCardModel = {
  zone: 'Europe/London',
  fromUtc: '2026-05-31T23:00:00.000Z',
  toUtc: '2026-06-09T23:00:00.000Z',
  daylight: days.map((day) => ({ riseUtc: `${day}T03:50:00Z`, setUtc: `${day}T20:20:00Z` })),
  window: { startUtc: '2026-06-01T09:00:00Z', endUtc: '2026-06-09T15:00:00Z' },
  // Sun on the mark on the fifth day only.
  runs: [
    run('2026-06-01T09:00:00Z', '2026-06-05T11:00:00Z', 'not-sunlit'),
    run('2026-06-05T11:00:00Z', '2026-06-05T11:40:00Z', 'sunlit'),
    run('2026-06-05T11:40:00Z', '2026-06-09T15:00:00Z', 'not-sunlit'),
  ],
  foundAtUtc: '2026-06-09T15:00:00Z',
};

describe('foldDays', () => {
  it('folds neighbours without change and keeps the first, the changed and the last day apart', () => {
    expect(foldDays(model).map((group) => group.days.map((day) => day.on.slice(-2)))).toEqual([['01'], ['02', '03', '04'], ['05'], ['06', '07', '08'], ['09']]);
  });

  it('puts end bars only where the window truly begins and ends', () => {
    const bars = foldDays(model).map((group) => (group.days[0] ? layoutBurnCard(group.days[0].model, 480, 'S').endBars.length : -1));
    expect(bars).toEqual([1, 0, 0, 0, 1]);
  });
});
