import 'fake-indexeddb/auto';
import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { beforeEach, describe, expect, test } from 'vitest';
import { device } from '#app/components/report/device-store.ts';
import type { KeptPhoto } from '#app/components/report/device-store.ts';
import { keepPhotos, keepWords, listPhotos, patchPhoto, patchReport, readReport } from '#app/components/report/kept-reports.ts';
import { deliver } from '#app/components/report/report-sender.ts';
import type { Answer, Post } from '#app/components/report/report-sender.ts';
import { noDetails, readPhotoDetails } from '#app/domain/photo-details.ts';
import { noExif } from '#app/domain/photo-exif.ts';

const clientId = '3f0c4f53-4f0c-4f0e-9d51-0a3c5a1f7b11';
const holderKey = 'site-1';
const words = { clientId, holderKey, guestCode: 'kestwick', begun: true, values: { siteId: '1', narrative: 'Brown band' } };

const photo = (key: string, position: number, patch: Partial<KeptPhoto> = {}): KeptPhoto => ({
  key, clientId, fileName: `${key}.jpg`, bytes: 3, blob: new Blob([key]), state: 'waiting', sentence: '', photoId: null, exif: noExif,
  details: { ...noDetails, position, caption: `caption of ${key}` }, changed: false, removedAt: null, ...patch,
});

/** The team's side as the routes promise it: a report and a photo are known again, whatever got lost on the way. */
function team() {
  const cases: { receipt: string; values: Record<string, string>; photosThen: number }[] = [];
  const photos = new Map<string, { id: string; caption: string }>();
  const asked: string[] = [];
  const answer = (status: number, body: unknown): Answer => ({ status, text: JSON.stringify(body) });
  const receive = async ({ address, form }: Post): Promise<Answer> => {
    const [path = ''] = address.split('?');
    asked.push(`${path.split('/').at(-1)}${form.get('intent') ? ` ${String(form.get('intent'))}` : ''}`);
    if (path.endsWith('/words')) {
      if (form.get('narrative') === 'unreadable') return answer(400, { problem: { fieldErrors: { sighting: ['Say what you see.'] } } });
      if (!cases[0]) cases.push({ receipt: 'KC-7Q4M-R2', values: Object.fromEntries([...form].map(([name, value]) => [name, String(value)])), photosThen: photos.size });
      return answer(200, { receipt: cases[0]?.receipt });
    }
    const part = form.get('details');
    const caption = part instanceof Blob ? readPhotoDetails(await part.text()).caption : '';
    const file = form.get('photos');
    if (file instanceof Blob) {
      const bytes = await file.text();
      if (bytes.startsWith('bad')) return answer(200, { photos: [{ ok: false, sentence: 'It is damaged.' }] });
      const id = createHash('sha256').update(bytes).digest('hex');
      if (!photos.has(id)) photos.set(id, { id, caption });
      return answer(200, { photos: [{ ok: true, photoId: id }] });
    }
    const known = photos.get(String(form.get('photoId')));
    if (form.get('intent') === 'remove') photos.delete(String(form.get('photoId')));
    if (form.get('intent') === 'describe' && known) known.caption = caption;
    return answer(200, { photos: [] });
  };
  return { cases, photos, asked, receive };
}

beforeEach(async () => {
  const db = await device();
  await db.clear('reports');
  await db.clear('photos');
});

describe('what is on the device reaches the team', () => {
  test('photos one by one in their order, then the words', async () => {
    const { cases, photos, asked, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('second', 1), photo('first', 0)]);
    await patchReport(clientId, { wanted: 'with-photos' });
    expect(await deliver(clientId, { post: receive })).toBe('done');
    expect(asked).toEqual(['photos', 'photos', 'words']);
    expect([...photos.values()].map(({ caption }) => caption)).toEqual(['caption of first', 'caption of second']);
    expect(cases).toEqual([{ receipt: 'KC-7Q4M-R2', values: words.values, photosThen: 2 }]);
    expect((await readReport(clientId))?.receipt).toBe('KC-7Q4M-R2');
  });

  test('not the words, before Send was pressed', async () => {
    const { cases, photos, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('a', 0)]);
    await deliver(clientId, { post: receive });
    expect([photos.size, cases.length]).toEqual([1, 0]);
  });

  test('the words first, when the person does not wait for photos', async () => {
    const { asked, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('a', 0)]);
    await patchReport(clientId, { wanted: 'now' });
    await deliver(clientId, { post: receive });
    expect(asked).toEqual(['words', 'photos']);
  });

  test('a photo that was taken off is off before the words go', async () => {
    const { cases, photos, asked, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('a', 0), photo('b', 1)]);
    await deliver(clientId, { post: receive });
    await patchPhoto('a', { removedAt: Date.now() });
    await patchReport(clientId, { wanted: 'now' });
    await deliver(clientId, { post: receive });
    expect(asked.slice(2)).toEqual(['photos remove', 'words']);
    expect([photos.size, cases[0]?.photosThen]).toEqual([1, 1]);
  });

  test('what is said of a photo later follows it', async () => {
    const { photos, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('a', 0)]);
    await deliver(clientId, { post: receive });
    await patchPhoto('a', ({ details }) => ({ details: { ...details, caption: 'ruler 300 mm' }, changed: true }));
    await deliver(clientId, { post: receive });
    expect([...photos.values()][0]?.caption).toBe('ruler 300 mm');
    expect((await listPhotos(clientId))[0]?.changed).toBe(false);
  });

  test('a bad file is named and loses nothing of the rest', async () => {
    const { cases, photos, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('bad', 0), photo('good', 1)]);
    await patchReport(clientId, { wanted: 'with-photos' });
    await deliver(clientId, { post: receive });
    expect([photos.size, cases.length]).toEqual([1, 1]);
    expect((await listPhotos(clientId)).map(({ state, sentence }) => [state, sentence])).toEqual([['refused', 'It is damaged.'], ['stored', '']]);
  });

  test('the same picture chosen twice is said to be there already', async () => {
    const { photos, receive } = team();
    await keepWords(words);
    await keepPhotos([photo('a', 0, { blob: new Blob(['same']) }), photo('b', 1, { blob: new Blob(['same']) })]);
    await deliver(clientId, { post: receive });
    expect(photos.size).toBe(1);
    expect((await listPhotos(clientId))[1]?.sentence).toContain('already among the photos');
  });
});

test('a photo that the device had no room for goes while its page is open, and is named when it was lost with it', async () => {
  const { photos, receive } = team();
  await keepWords(words);
  await keepPhotos([photo('kept in the page', 0, { blob: null }), photo('lost', 1, { blob: null })]);
  await deliver(clientId, { post: receive, fileOf: (key) => (key === 'lost' ? undefined : new Blob([key])) });
  expect(photos.size).toBe(1);
  expect((await listPhotos(clientId)).map(({ state }) => state)).toEqual(['stored', 'refused']);
  expect((await listPhotos(clientId))[1]?.sentence).toContain('Add it again');
});

describe('what stops it', () => {
  test('something to mend comes back with its sentence, and is not sent again by itself', async () => {
    const { asked, receive } = team();
    await keepWords({ ...words, values: { narrative: 'unreadable' } });
    await patchReport(clientId, { wanted: 'with-photos' });
    await deliver(clientId, { post: receive });
    await deliver(clientId, { post: receive });
    expect(asked).toEqual(['words']);
    expect(await readReport(clientId)).toMatchObject({ wanted: 'no', problem: { fieldErrors: { sighting: ['Say what you see.'] } }, values: { narrative: 'unreadable' } });
  });

  test('a session that has ended keeps the report and asks to sign in', async () => {
    await keepWords(words);
    await patchReport(clientId, { wanted: 'with-photos' });
    const post = (): Promise<Answer> => Promise.resolve({ status: 401, text: JSON.stringify({ code: 'sign-in', message: 'You are signed out.' }) });
    expect(await deliver(clientId, { post })).toBe('stopped');
    expect(await readReport(clientId)).toMatchObject({ wanted: 'with-photos', held: { why: 'sign-in', sentence: 'You are signed out.' }, receipt: null });
    const { cases, receive } = team();
    await deliver(clientId, { post: receive });
    expect(cases).toHaveLength(1);
    expect((await readReport(clientId))?.held).toBeNull();
  });

  test.each([0, 429, 500, 502, 503])('an answer %i is no answer: it waits', async (status) => {
    await keepWords(words);
    await patchReport(clientId, { wanted: 'with-photos' });
    expect(await deliver(clientId, { post: () => Promise.resolve({ status, text: 'Bad gateway' }) })).toBe('stopped');
    expect(await readReport(clientId)).toMatchObject({ wanted: 'with-photos', held: { why: 'no-signal' } });
  });
});

test('requests and answers lost at any point make one case with its photos, never two', async () => {
  await fc.assert(
    fc.asyncProperty(fc.array(fc.constantFrom('through', 'request lost', 'answer lost'), { maxLength: 14 }), async (fates) => {
      const { cases, photos, receive } = team();
      const db = await device();
      await db.clear('reports');
      await db.clear('photos');
      await keepWords(words);
      await keepPhotos([photo('a', 0), photo('b', 1), photo('c', 2)]);
      await patchReport(clientId, { wanted: 'with-photos' });
      const left = [...fates];
      const post = async (request: Post): Promise<Answer> => {
        const fate = left.shift() ?? 'through';
        if (fate === 'request lost') return { status: 0, text: '' };
        const answer = await receive(request);
        return fate === 'answer lost' ? { status: 0, text: '' } : answer;
      };
      for (let tries = 0; tries < fates.length + 1 && (await deliver(clientId, { post })) === 'stopped'; tries += 1);
      expect(cases).toHaveLength(1);
      expect(cases[0]?.photosThen).toBe(3);
      expect([...photos.values()].map(({ caption }) => caption)).toEqual(['caption of a', 'caption of b', 'caption of c']);
    }),
    { numRuns: 60 },
  );
});
