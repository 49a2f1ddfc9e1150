import { expect, test } from 'vitest';
import { statedFinding } from '#app/components/report/stated-finding.ts';

// 9 May 2026, 15:10 in England is 14:10 UTC (summer time, Summer Time Act 1972).
test.each([
  ['just now, when it was pressed', { foundWhen: 'just-now', foundNowAt: '2026-05-09T14:12:30.000Z' }, '2026-05-09T14:12:30.000Z'],
  ['at a time of the place', { foundWhen: 'at', foundLocal: '2026-05-09T15:10' }, '2026-05-09T14:10:00.000Z'],
  ['in a range, its end', { foundWhen: 'range', foundFromLocal: '2026-05-05T09:00', foundToLocal: '2026-05-09T15:10' }, '2026-05-09T14:10:00.000Z'],
  ['unknown', { foundWhen: 'dont-know', foundLocal: '2026-05-09T15:10' }, undefined],
  ['half typed', { foundWhen: 'at', foundLocal: '2026-05' }, undefined],
  // On 25 October 2026 the clock shows 01:30 twice.
  ['in an hour that the clock showed twice', { foundWhen: 'at', foundLocal: '2026-10-25T01:30' }, undefined],
])('found %s', (_what, values, instant) => {
  expect(statedFinding(values, 'Europe/London').foundAt?.toISOString()).toBe(instant);
});

test('before a site is chosen the clock of the place is unknown', () => {
  expect(statedFinding({ foundWhen: 'at', foundLocal: '2026-05-09T15:10' }, null)).toEqual({ zone: null, foundAt: null });
});
