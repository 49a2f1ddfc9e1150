import { describe, expect, test } from 'vitest';
import { likeness } from '#app/domain/similar-cases.ts';
import type { Likeness } from '#app/domain/similar-cases.ts';

const here: Likeness = { siteId: 'a', position: { latitudeDeg: 53.5, longitudeDeg: -1.6 }, opticKind: 'metal-trim', markBearingDeg: 187, day: '2026-05-09', listsDay: false };
const other = (change: Partial<Likeness>): Likeness => ({ siteId: 'b', position: null, opticKind: 'dish', markBearingDeg: null, day: '2026-12-20', listsDay: false, ...change });

describe('why another case is like this one', () => {
  test.each([
    ['nothing shared', {}, []],
    ['the site, its places not recorded', { siteId: 'a' }, ['same site']],
    ['the kind of optic', { opticKind: 'metal-trim' }, ['same kind of optic']],
    ['a bearing across north is near', { markBearingDeg: 190 }, ['bearing to the mark alike, 187° and 190°']],
    ['a bearing 20° off is not', { markBearingDeg: 207 }, []],
    // Equal declination on both sides of the solstice: 9 May and about 3 August.
    ['a day of the same sun after the solstice', { day: '2025-08-03' }, ['sun as high as on 3 Aug 2025']],
    ['its list of sun days', { listsDay: true }, ['its list of sun days holds this day']],
  ] as const)('%s', (_what, change, reasons) => expect(likeness(here, other(change))).toEqual(reasons));

  test('an optic that nobody knows is like no other', () => {
    expect(likeness({ ...here, opticKind: 'dont-know' }, other({ opticKind: 'dont-know' }))).toEqual([]);
  });

  test('tells how far apart two places are, at one site and at two that are near', () => {
    // 111.32 km to a degree of the equator, by the cosine of the latitude: a sphere is near enough for 60 m.
    expect(likeness(here, other({ siteId: 'a', position: { latitudeDeg: 53.5, longitudeDeg: -1.6 + 60 / (111_320 * Math.cos((53.5 * Math.PI) / 180)) } }))[0]).toBe('same site, 60 m off');
    const north = (metres: number) => ({ latitudeDeg: 53.5 + metres / 111_250, longitudeDeg: -1.6 });
    expect(likeness(here, other({ position: north(240) }))).toEqual(['240 m off, another site']);
    expect(likeness(here, other({ position: north(260) }))).toEqual([]);
  });
});
