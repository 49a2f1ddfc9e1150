import 'fake-indexeddb/auto';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { device } from '#app/components/report/device-store.ts';
import { forgetReport, keepPhotos, keepWords, listPhotos, listReports, patchReport, readReport, sweep } from '#app/components/report/kept-reports.ts';
import { forgetPersonView, keepView, listGuestPlaces, unfinishedReport, viewFromDevice } from '#app/components/report/kept-views.ts';
import type { ReportView } from '#app/components/report/report-view.ts';
import { noDetails } from '#app/domain/photo-details.ts';
import { noExif } from '#app/domain/photo-exif.ts';

// Node has no such store; a map does what is needed of it here.
const marks = new Map<string, string>();
vi.stubGlobal('localStorage', { setItem: (name: string, value: string) => marks.set(name, value), removeItem: (name: string) => marks.delete(name) });

const dayMs = 86_400_000;
const start = Date.UTC(2026, 4, 9, 14, 10);
const report = (clientId: string, holderKey = 'person-1') => ({ clientId, holderKey, guestCode: null, begun: true, values: { narrative: `words of ${clientId}` } });
const photoOf = (clientId: string) => ({ key: `photo of ${clientId}`, clientId, fileName: 'a.jpg', bytes: 1, blob: new Blob(['a']), state: 'waiting', sentence: '', photoId: null, exif: noExif, details: noDetails, changed: false, removedAt: null }) as const;

beforeEach(async () => {
  vi.useFakeTimers({ toFake: ['Date'], now: start });
  const db = await device();
  for (const store of ['reports', 'photos', 'views'] as const) await db.clear(store);
});
afterEach(() => void vi.useRealTimers());

describe('an unfinished report', () => {
  test('is there with its photos up to 14 days after the last word, and then no more', async () => {
    await keepWords(report('one'));
    await keepPhotos([photoOf('one')]);
    vi.setSystemTime(start + 14 * dayMs);
    await sweep();
    expect((await readReport('one'))?.values).toEqual({ narrative: 'words of one' });
    expect(await (await listPhotos('one'))[0]?.blob?.text()).toBe('a');
    vi.setSystemTime(start + 14 * dayMs + 1);
    expect(await readReport('one')).toBeNull();
    await sweep();
    expect(await listPhotos('one')).toEqual([]);
  });

  test('lives on from each new word', async () => {
    await keepWords(report('one'));
    vi.setSystemTime(start + 10 * dayMs);
    await keepWords({ ...report('one'), values: { narrative: 'more' } });
    vi.setSystemTime(start + 20 * dayMs);
    await sweep();
    expect((await readReport('one'))?.values).toEqual({ narrative: 'more' });
  });

  test('whose Send was pressed waits as long as it takes', async () => {
    await keepWords(report('one'));
    await patchReport('one', { wanted: 'with-photos' });
    vi.setSystemTime(start + 60 * dayMs);
    await sweep();
    expect(await readReport('one')).not.toBeNull();
  });

  test('belongs to its holder alone', async () => {
    await keepWords(report('hers', 'person-1'));
    await keepWords(report('his', 'person-2'));
    expect((await listReports('person-1')).map(({ clientId }) => clientId)).toEqual(['hers']);
    expect(await unfinishedReport('person-3')).toBeNull();
  });

  test('can be taken back after it was thrown away, until the page is opened anew', async () => {
    await keepWords(report('one'));
    await patchReport('one', { thrownAwayAt: Date.now() });
    expect(await unfinishedReport('person-1')).toBeNull();
    await patchReport('one', { thrownAwayAt: null });
    expect(await unfinishedReport('person-1')).toBe('one');
    await patchReport('one', { thrownAwayAt: Date.now() });
    await sweep();
    expect(await readReport('one')).toBeNull();
  });

  test('goes whole, photos and all', async () => {
    await keepWords(report('one'));
    await keepPhotos([photoOf('one')]);
    await forgetReport('one');
    expect([await readReport('one'), await listPhotos('one')]).toEqual([null, []]);
  });
});

test('a store that the phone closed while the page slept is opened again', async () => {
  await keepWords(report('one'));
  (await device()).close();
  expect((await readReport('one'))?.values).toEqual({ narrative: 'words of one' });
});

describe('a start without a connection', () => {
  const site = { id: 's1', name: 'Kestwick Court', code: 'KC', zone: 'Europe/London', nowLocal: '', nowUtc: '', today: null, around: null, units: 'metric', plans: [] } as const;
  const view = (patch: Partial<ReportView>): ReportView => ({ clientId: 'then', holderKey: 'person-1', guestCode: null, guest: false, sites: [site], emergencyNumber: '112', photos: [], photoMaxBytes: 1, closeHref: '/', ...patch });
  const address = (query: string) => new URL(`https://scorchline.example/report${query}`);

  test('knows the place from the last visit, by the clock of now', async () => {
    await keepView(view({}));
    vi.setSystemTime(start + dayMs);
    // 10 May 2026, 14:10 UTC is 15:10 in England (Summer Time Act 1972).
    expect((await viewFromDevice(address('')))?.sites[0]).toMatchObject({ name: 'Kestwick Court', nowLocal: '2026-05-10T15:10' });
  });

  test('never uses the number of a report that was opened before', async () => {
    await keepView(view({ clientId: 'then' }));
    const [one, other] = [await viewFromDevice(address('')), await viewFromDevice(address(''))];
    expect(new Set([one?.clientId, other?.clientId, 'then']).size).toBe(3);
  });

  test('goes on with the report that was left unfinished, and not with one that waits to be sent', async () => {
    await keepView(view({}));
    await keepWords(report('waiting'));
    await patchReport('waiting', { wanted: 'with-photos' });
    await keepWords(report('unfinished'));
    expect((await viewFromDevice(address('')))?.clientId).toBe('unfinished');
    expect((await viewFromDevice(address('?report=waiting')))?.clientId).toBe('waiting');
  });

  test('never opens the words of another person, even by their address', async () => {
    await keepView(view({}));
    await keepWords(report('hers', 'person-2'));
    expect((await viewFromDevice(address('?report=hers')))?.clientId).not.toBe('hers');
  });

  test('tells one link from another, and from the signed-in person', async () => {
    await keepView(view({ guest: true, guestCode: 'roof', holderKey: 'site-s1' }));
    expect((await viewFromDevice(address('?at=roof')))?.holderKey).toBe('site-s1');
    expect(await viewFromDevice(address('?at=yard'))).toBeNull();
    expect(await viewFromDevice(address(''))).toBeNull();
    expect(await listGuestPlaces()).toEqual([{ guestCode: 'roof', name: 'Kestwick Court' }]);
  });

  test('forgets the list of sites with the person, and keeps unsent reports', async () => {
    await keepView(view({}));
    await keepView(view({ guest: true, guestCode: 'roof', holderKey: 'site-s1' }));
    await keepWords(report('one'));
    await forgetPersonView();
    expect(await viewFromDevice(address(''))).toBeNull();
    expect(await viewFromDevice(address('?at=roof'))).not.toBeNull();
    expect(await readReport('one')).not.toBeNull();
  });
});
