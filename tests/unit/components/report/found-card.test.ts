import { describe, expect, test } from 'vitest';
import { foundCardModel } from '#app/components/report/found-card.tsx';
import type { FoundAnswerTyped } from '#app/components/report/found-card.tsx';

// 9 May 2026, 15:12 in England is 14:12 UTC (summer time, Summer Time Act 1972).
const site = {
  id: 'site',
  name: 'Kestwick Court',
  code: 'KC',
  zone: 'Europe/London',
  nowLocal: '2026-05-09T15:12',
  nowUtc: '2026-05-09T14:12:00.000Z',
  around: null,
  units: 'metric' as const,
  plans: [],
  today: { fromUtc: '2026-05-09T03:00:00.000Z', toUtc: '2026-05-09T21:00:00.000Z', riseUtc: '2026-05-09T04:16:00.000Z', setUtc: '2026-05-09T19:52:00.000Z', polar: null, words: '' },
};
const typed = (values: Partial<FoundAnswerTyped>): FoundAnswerTyped => ({ foundWhen: '', foundNowAt: '', foundLocal: '', foundFromLocal: '', foundToLocal: '', lastSoundLocal: '', ...values });

describe('the card under "When was it found?"', () => {
  test('shows daylight only, until there is an answer', () => {
    expect(foundCardModel(site, typed({}))).toMatchObject({ foundAtUtc: null, window: null, runs: [] });
  });

  test('marks the time typed, on the clock of the place', () => {
    expect(foundCardModel(site, typed({ foundWhen: 'at', foundLocal: '2026-05-09T15:10' }))?.foundAtUtc).toBe('2026-05-09T14:10:00.000Z');
  });

  test('draws the stretch since last seen sound as "can\'t tell", never as sunlit or not', () => {
    const model = foundCardModel(site, typed({ foundWhen: 'range', foundFromLocal: '2026-05-09T09:00', foundToLocal: '2026-05-09T15:10' }));
    expect(model?.window).toEqual({ startUtc: '2026-05-09T08:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z' });
    expect(model?.runs.map(({ verdict }) => verdict)).toEqual(['cannot-tell']);
  });

  test('is left out when the answer is about another day', () => {
    expect(foundCardModel(site, typed({ foundWhen: 'at', foundLocal: '2026-05-08T15:10' }))).toBeNull();
  });

  test('is left out where there is no daylight to show', () => {
    expect(foundCardModel({ ...site, today: null }, typed({ foundWhen: 'just-now' }))).toBeNull();
  });
});
