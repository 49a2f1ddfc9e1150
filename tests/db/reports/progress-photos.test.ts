import { readFile } from 'node:fs/promises';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { photosPerReport } from '#app/domain/photo.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import type { Actor } from '#app/domain/roles.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { action, loader } from '#app/routes/public/progress.tsx';
import { loader as photoLoader } from '#app/routes/resources/photo.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { db } from '#db/client.server.ts';
import { logEntries, photos } from '#db/schema/all.ts';
import { plainJpeg } from '#tests/db/photos/picture-files.ts';
import type { House } from '#tests/support/factories.ts';
import { createCase, createHouse } from '#tests/support/factories.ts';
import { contextFor } from './stage.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

interface File {
  readonly name: string;
  readonly bytes: Uint8Array<ArrayBuffer>;
}
const jpeg = async (name = 'shelf.jpg'): Promise<File> => ({ name, bytes: new Uint8Array(await plainJpeg()) });
const reportAt = (state: CaseState = 'investigation') => createCase(state, { site: house.site, reporterId: house.reporter.userId });
const photosOf = (caseId: string) => db.select().from(photos).where(eq(photos.caseId, caseId)).orderBy(photos.label);

async function lookUp(code: string) {
  const url = new URL(`http://scorchline.test/progress?code=${encodeURIComponent(code)}`);
  return loader({ request: new Request(url), params: {}, context: contextFor(null), url, pattern: '/progress' });
}

/** As a browser without a script posts the form of the page. */
async function send(code: string, files: readonly File[], { view = '', actor = null }: { view?: string; actor?: Actor | null } = {}) {
  const url = new URL(`http://scorchline.test/progress?code=${encodeURIComponent(code)}&add=photos`);
  const form = new FormData();
  for (const { name, bytes } of files) form.append('photos', new Blob([bytes]), name);
  if (files.length === 0) form.append('photos', new Blob([]), '');
  form.append('view', view);
  const result: unknown = await action({ request: new Request(url, { method: 'POST', body: form }), params: {}, context: contextFor(actor), url, pattern: '/progress' });
  if (result instanceof Response) return { status: result.status, location: result.headers.get('location'), sentences: '' };
  const { data, init } = result as { data: { formErrors: string[]; fieldErrors: Record<string, string[]> }; init?: ResponseInit };
  return { status: init?.status ?? 200, location: null, sentences: [...data.formErrors, ...Object.values(data.fieldErrors).flat()].join(' ') };
}

function openView(photoId: string, actor: Actor | null, search = '') {
  const url = new URL(`http://scorchline.test/photos/${photoId}/view${search}`);
  return photoLoader({ request: new Request(url), params: { photoId, rendition: 'view' }, context: contextFor(actor), url, pattern: '/photos/:photoId/:rendition' });
}

describe('a photo added by whoever holds the receipt', () => {
  test('is stored byte for byte with the case, without a name, and a sentence says so', async () => {
    const row = await reportAt();
    const file = await jpeg();
    const { status, location } = await send(row.receipt, [file]);
    expect([status, location]).toEqual([303, `/progress?code=${row.receipt}&photos=stored#photos`]);
    const [photo] = await photosOf(row.id);
    expect(photo).toMatchObject({ label: 1, view: null, uploadedById: null, fileName: 'shelf.jpg', reportClientId: row.clientId, sha256: sha256Hex(file.bytes), takenAt: null });
    expect(sha256Hex((await getObject(photo?.originalKey ?? '')) ?? new Uint8Array())).toBe(sha256Hex(file.bytes));
    expect((await lookUp(row.receipt)).report?.photos.words).toMatch(/^One photo is with this report\. It came \d/u);
  });

  test('carries the view that was chosen, and none for a word that is no view', async () => {
    const row = await reportAt('returned');
    await send(row.receipt, [await jpeg()], { view: 'close' });
    await send(row.receipt, [await jpeg()], { view: 'from the moon' });
    expect((await photosOf(row.id)).map(({ view }) => view)).toEqual(['close', null]);
  });

  test('is logged: which photo, by whoever holds the receipt', async () => {
    const row = await reportAt();
    await send(row.receipt, [await jpeg()]);
    const [photo] = await photosOf(row.id);
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, row.id));
    expect(lines).toEqual([expect.objectContaining({ event: 'photo.added', actorId: null, actorName: 'Holder of the receipt', subjectId: photo?.id, after: { label: 1, sha256: photo?.sha256 } })]);
  });

  test('is the reporter’s own when they are signed in, and nobody’s when somebody else is', async () => {
    const row = await reportAt();
    await send(row.receipt, [await jpeg()], { actor: house.reporter });
    await send(row.receipt, [await jpeg()], { actor: house.investigator });
    expect((await photosOf(row.id)).map(({ uploadedById }) => uploadedById)).toEqual([house.reporter.userId, null]);
  });

  test('sent again, or twice at once, stays one photo with one line in the log', async () => {
    const row = await reportAt();
    const file = await jpeg();
    const answers = [...(await Promise.all([send(row.receipt, [file]), send(row.receipt, [file])])), await send(row.receipt, [file])];
    expect(answers.map(({ status }) => status)).toEqual([303, 303, 303]);
    expect(await photosOf(row.id)).toHaveLength(1);
    expect(await db.select().from(logEntries).where(eq(logEntries.caseId, row.id))).toHaveLength(1);
  });

  test('cannot be opened with the receipt: only how many there are is shown', async () => {
    const row = await reportAt();
    await send(row.receipt, [await jpeg('secret name.jpg')]);
    const [photo] = await photosOf(row.id);
    expect(JSON.stringify(await lookUp(row.receipt))).not.toMatch(new RegExp(`secret|${photo?.id}|${row.clientId}`, 'u'));
    // Ready to be shown, so that only the reader is what stops it.
    await db.update(photos).set({ state: 'ready', viewKey: photos.originalKey }).where(eq(photos.caseId, row.id));
    const id = photo?.id ?? '';
    expect((await openView(id, house.investigator)).status).toBe(200);
    expect((await openView(id, null)).status).toBe(404);
    expect((await openView(id, null, `?report=${row.clientId}`)).status).toBe(404);
  });
});

describe('the receipt decides which case', () => {
  test('a wrong one stores nothing, before the bytes are read', async () => {
    const before = await db.$count(photos);
    expect((await send('ZZ-ZZZZ-ZZ', [await jpeg()])).status).toBe(404);
    expect((await send('hello', [await jpeg()])).status).toBe(404);
    expect(await db.$count(photos)).toBe(before);
    expect((await lookUp('ZZ-ZZZZ-ZZ')).problem).toContain('No report has this receipt');
  });

  test('that of another case adds to that case alone, the same picture too', async () => {
    const [mine, other] = [await reportAt(), await reportAt()];
    const file = await jpeg();
    await send(mine.receipt, [file]);
    await send(other.receipt, [file, await jpeg()]);
    expect([(await photosOf(mine.id)).length, (await photosOf(other.id)).length]).toEqual([1, 2]);
    expect((await lookUp(mine.receipt)).report?.photos.words).toContain('One photo');
  });
});

describe('what is refused comes back with a sentence that says why', () => {
  test.each<[CaseState, RegExp]>([
    ['closed', /The case is closed.*report it again/u],
    ['duplicate', /goes on under an earlier one.*report it again/u],
  ])('a case that is %s', async (state, sentence) => {
    const row = await reportAt(state);
    expect(await send(row.receipt, [await jpeg()])).toMatchObject({ status: 409, sentences: expect.stringMatching(sentence) as string });
    expect(await photosOf(row.id)).toEqual([]);
    expect((await lookUp(row.receipt)).report?.photos.closedWords).toMatch(sentence);
  });

  test.each(['zero-byte.jpg', 'text-renamed.jpg', 'html-renamed.jpg', 'truncated.jpg', 'huge-dimensions.png'])('the file %s, by its name', async (name) => {
    const row = await reportAt();
    const bytes = new Uint8Array(await readFile(new URL(`../../../fixtures/photos/${name}`, import.meta.url)));
    const { status, sentences } = await send(row.receipt, [{ name, bytes }]);
    expect([status, sentences]).toEqual([400, expect.stringMatching(new RegExp(`“${name}”.*Nothing was stored`, 'u'))]);
    expect(await photosOf(row.id)).toEqual([]);
  });

  test('one bad file does not spoil the others', async () => {
    const row = await reportAt();
    const { status, sentences } = await send(row.receipt, [await jpeg('good.jpg'), { name: 'notes.jpg', bytes: new TextEncoder().encode('no picture') }]);
    expect([status, sentences]).toEqual([400, expect.stringMatching(/“notes\.jpg” is not a JPEG.*The others are stored/u)]);
    expect((await photosOf(row.id)).map(({ fileName }) => fileName)).toEqual(['good.jpg']);
  });

  test('an empty file field', async () => {
    const row = await reportAt();
    expect(await send(row.receipt, [])).toMatchObject({ status: 400, sentences: 'Choose one photo or more first.' });
  });

  test('more at once than can be held: the first ones are stored', async () => {
    const row = await reportAt();
    const { sentences } = await send(row.receipt, await Promise.all(Array.from({ length: 7 }, (_, index) => jpeg(`${index + 1}.jpg`))));
    expect(sentences).toMatch(/“7\.jpg” was not taken: send at most 6 photos at once/u);
    expect(await photosOf(row.id)).toHaveLength(6);
  });

  test('more than a report holds', async () => {
    const row = await reportAt();
    await send(row.receipt, [await jpeg()]);
    const [first] = await photosOf(row.id);
    if (!first) throw new Error('The first photo was not stored.');
    const { id: _id, ...columns } = first;
    const filler = Array.from({ length: photosPerReport - 1 }, (_, index) => ({ ...columns, label: index + 2, sha256: sha256Hex(new TextEncoder().encode(`${row.id} ${index}`)) }));
    await db.insert(photos).values(filler);
    expect(await send(row.receipt, [await jpeg('one more.jpg')])).toMatchObject({ status: 400, sentences: expect.stringMatching(/“one more\.jpg” was not taken: a report holds at most 40/u) as string });
  });
});

test('guests are counted by address, as with the photos of a report', async () => {
  const row = await reportAt();
  const tries = Array.from({ length: 260 }, () => send(row.receipt, []).then(({ status }) => status, (thrown: { init?: ResponseInit }) => thrown.init?.status));
  expect((await Promise.all(tries)).filter((status) => status === 429).length).toBeGreaterThan(0);
});
