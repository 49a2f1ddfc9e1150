import { randomUUID } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { env } from '#app/env.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { action, loader } from '#app/routes/public/report.tsx';
import { db } from '#db/client.server.ts';
import { photos, sites } from '#db/schema/all.ts';
import { plainJpeg } from '#tests/db/photos/picture-files.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createHouse, createSite } from '#tests/support/factories.ts';
import { answersForm, caseOf, contextFor, houseWithLink, openGuestLink } from './stage.ts';
import type { Sending } from './stage.ts';

let house: House;
let guestCode: string;

beforeAll(async () => {
  ({ house, guestCode } = await houseWithLink());
});
afterAll(stopQueue);

interface Attempt extends Sending {
  readonly typed?: Readonly<Record<string, string>>;
  readonly files?: readonly File[];
}

const addressOf = ({ at, clientId }: Attempt) => `http://scorchline.test/report?${new URLSearchParams({ ...(at ? { at } : {}), ...(clientId ? { report: clientId } : {}) }).toString()}`;
const routeArgs = (request: Request, actor: Actor | null) => ({ request, params: {}, context: contextFor(actor), url: new URL(request.url), pattern: '/report' });

/** Posts the form as a browser without a script does. */
async function post(attempt: Attempt) {
  const form = answersForm(house.site.id, { intent: 'send', ...attempt.typed });
  for (const file of attempt.files ?? [new File([], '')]) form.append('photos', file);
  return settled(action(routeArgs(new Request(addressOf(attempt), { method: 'POST', body: form }), attempt.actor ?? null)));
}

const look = (attempt: Attempt) => settled(Promise.resolve(loader(routeArgs(new Request(addressOf(attempt)), attempt.actor ?? null))));

/** A redirect, a refusal or a page, in one shape. */
async function settled(work: Promise<unknown>): Promise<{ status: number; location: string; body: Record<string, unknown> }> {
  const answer = await work.catch((thrown: unknown) => thrown);
  if (answer instanceof Error) throw answer;
  if (answer instanceof Response) return { status: answer.status, location: answer.headers.get('Location') ?? '', body: {} };
  const wrapped = answer as { data?: Record<string, unknown>; init?: ResponseInit } & Record<string, unknown>;
  return { status: wrapped.init?.status ?? 200, location: '', body: wrapped.data ?? wrapped };
}

const jpegFile = async (name: string) => new File([new Uint8Array(await plainJpeg())], name, { type: 'image/jpeg' });

describe('the form as it stands, without a script', () => {
  test('stores words and photos in one post and leads to the receipt', async () => {
    const clientId = randomUUID();
    const answer = await post({ actor: house.reporter, clientId, typed: { narrative: 'Brown band' }, files: [await jpegFile('roof.jpg'), await jpegFile('close.jpg')] });
    const row = await caseOf(clientId);
    expect(answer).toMatchObject({ status: 303, location: `/received/${row?.receipt}?report=${clientId}` });
    expect(row).toMatchObject({ narrative: 'Brown band', state: 'reported' });
    const kept = await db.select({ fileName: photos.fileName, label: photos.label }).from(photos).where(eq(photos.caseId, row?.id ?? '')).orderBy(photos.label);
    expect(kept).toEqual([{ fileName: 'roof.jpg', label: 1 }, { fileName: 'close.jpg', label: 2 }]);
  });

  test('posted twice leads to the same receipt', async () => {
    const attempt = { actor: house.reporter, clientId: randomUUID() };
    expect((await post(attempt)).location).toBe((await post(attempt)).location);
  });

  test('comes back with everything typed, and the photos taken, when an answer is missing', async () => {
    const clientId = randomUUID();
    const answer = await post({ actor: house.reporter, clientId, typed: { anyoneHurt: '', narrative: 'Brown band <b>', placeDetail: 'roof' }, files: [await jpegFile('roof.jpg')] });
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({
      state: { typed: { narrative: 'Brown band <b>', placeDetail: 'roof' }, fieldErrors: { anyoneHurt: [expect.stringContaining("Don't know")] } },
      view: { clientId, photos: [{ fileName: 'roof.jpg' }] },
    });
    expect(await caseOf(clientId)).toBeUndefined();
  });

  test('names a bad file, keeps the good one, and is sent at the next press', async () => {
    const clientId = randomUUID();
    const files = [new File(['not a picture'], 'notes.jpg', { type: 'image/jpeg' }), await jpegFile('roof.jpg')];
    const answer = await post({ actor: house.reporter, clientId, files });
    expect(answer.body).toMatchObject({ state: { fieldErrors: { photos: [expect.stringContaining('“notes.jpg”'), expect.stringContaining('Send again')] } }, view: { photos: [{ fileName: 'roof.jpg' }] } });
    expect((await post({ actor: house.reporter, clientId })).status).toBe(303);
    expect(await db.select({ label: photos.label }).from(photos).where(eq(photos.reportClientId, clientId))).toEqual([{ label: 1 }]);
  });

  test('bad files of every kind are each named, and neither the good photo nor a word is lost', async () => {
    const clientId = randomUUID();
    const fixture = async (name: string, as = name) => new File([new Uint8Array(await readFile(new URL(`../../../fixtures/photos/${name}`, import.meta.url)))], as);
    const tooBig = new Uint8Array(env.PHOTO_MAX_BYTES + 1);
    tooBig.set([0xff, 0xd8, 0xff]);
    const bad = [
      await fixture('zero-byte.jpg'), await fixture('text-renamed.jpg'), await fixture('html-renamed.jpg', '<img src=x onerror=alert(1)>.jpg'), await fixture('truncated.jpg', '../../etc/passwd.jpg'),
      await fixture('huge-dimensions.png', 'bomb\u202Egnp.png'), new File([tooBig], 'big.jpg'),
    ];
    const typed = { narrative: 'Brown band', placeDetail: 'roof' };
    const answer = await post({ actor: house.reporter, clientId, typed, files: [...bad, await fixture('no-exif.png', 'picture.txt')] });
    expect(answer).toMatchObject({ status: 400, body: { state: { typed }, view: { photos: [{ fileName: 'picture.txt', mime: 'image/png' }] } } });
    const sentences = String((answer.body as { state: { fieldErrors: { photos: string[] } } }).state.fieldErrors.photos.join(' '));
    for (const name of ['zero-byte.jpg', 'text-renamed.jpg', '<img src=x onerror=alert(1)>.jpg', 'passwd.jpg', 'bombgnp.png', 'big.jpg']) expect(sentences).toContain(`“${name}”`);
    expect((await post({ actor: house.reporter, clientId, typed })).status).toBe(303);
    const row = await caseOf(clientId);
    expect(row?.narrative).toBe('Brown band');
    expect(await db.$count(photos, eq(photos.caseId, row?.id ?? ''))).toBe(1);
  });

  test('what is said of each photo is kept with it', async () => {
    const clientId = randomUUID();
    await post({ actor: house.reporter, clientId, typed: { intent: 'add-photos' }, files: [await jpegFile('roof.jpg')] });
    const [photo] = await db.select({ id: photos.id }).from(photos).where(eq(photos.reportClientId, clientId));
    await post({ actor: house.reporter, clientId, typed: { [`photoView.${photo?.id}`]: 'close', [`photoCaption.${photo?.id}`]: 'ruler 300 mm' } });
    expect(await db.select({ view: photos.view, caption: photos.caption, label: photos.label }).from(photos).where(eq(photos.reportClientId, clientId))).toEqual([{ view: 'close', caption: 'ruler 300 mm', label: 1 }]);
  });

  test('adds photos, and takes one off, without sending', async () => {
    const clientId = randomUUID();
    const added = await post({ actor: house.reporter, clientId, typed: { intent: 'add-photos', anyoneHurt: '' }, files: [await jpegFile('roof.jpg')] });
    expect(added).toMatchObject({ status: 200, body: { state: { fieldErrors: {} }, view: { photos: [{ fileName: 'roof.jpg' }] } } });
    const [photo] = await db.select({ id: photos.id }).from(photos).where(eq(photos.reportClientId, clientId));
    const removed = await post({ actor: house.reporter, clientId, typed: { intent: `remove-photo:${photo?.id}` } });
    expect(removed.body).toMatchObject({ view: { photos: [] } });
    expect(await caseOf(clientId)).toBeUndefined();
  });

  test('asks which of the two when the clock showed the time twice, and takes the answer', async () => {
    // Europe/London was put back from 02:00 to 01:00 on Sunday 26 October 2025 (Summer Time Act 1972, as amended by SI 2002/262).
    const attempt = { actor: house.reporter, clientId: randomUUID(), typed: { foundWhen: 'at', foundLocal: '2025-10-26T01:30' } };
    expect((await post(attempt)).body).toMatchObject({ state: { fieldErrors: { foundLocal: [expect.stringContaining('twice')] }, repeated: { foundLocal: { first: expect.stringContaining('UTC+1'), second: expect.stringContaining('UTC') } } } });
    await post({ ...attempt, typed: { ...attempt.typed, foundLocalPass: 'second' } });
    expect((await caseOf(attempt.clientId))?.foundAt?.toISOString()).toBe('2025-10-26T01:30:00.000Z');
  });
});

describe('who may report', () => {
  test('a guest by the link of a site, for that site only', async () => {
    const clientId = randomUUID();
    expect((await post({ at: guestCode, clientId })).status).toBe(303);
    expect(await caseOf(clientId)).toMatchObject({ guestReport: true, reporterId: null, siteId: house.site.id });
    const other = await createSite({ organisationId: house.organisation.id });
    expect((await post({ at: guestCode, clientId: randomUUID(), typed: { siteId: other.id } })).body).toMatchObject({ state: { fieldErrors: { siteId: [expect.any(String)] } } });
  });

  test('a guest learns no other site and no position', async () => {
    await createSite({ organisationId: house.organisation.id });
    const { body } = await look({ at: guestCode, clientId: randomUUID() });
    expect(body).toMatchObject({ guest: true, sites: [{ id: house.site.id, around: null }] });
    expect(JSON.stringify(body)).not.toContain('latitude');
  });

  test('nobody by a closed link', async () => {
    const closed = await createSite({ organisationId: house.organisation.id });
    const code = await openGuestLink(closed.id);
    await db.update(sites).set({ guestCode: null }).where(eq(sites.id, closed.id));
    expect((await look({ at: code })).status).toBe(404);
    expect((await post({ at: code, clientId: randomUUID() })).status).toBe(404);
  });

  test('nobody without account and link: they are asked to sign in', async () => {
    expect(await look({})).toMatchObject({ status: 302, location: '/sign-in?next=%2Freport' });
  });

  test('not an insurer reader', async () => {
    const insurer = await createActor(house.organisation.id, 'insurer');
    expect((await look({ actor: insurer })).status).toBe(403);
    expect((await post({ actor: insurer, clientId: randomUUID() })).status).toBe(403);
  });

  test('not for a site of another organisation', async () => {
    const other = await createHouse();
    expect((await post({ actor: house.reporter, clientId: randomUUID(), typed: { siteId: other.site.id } })).body).toMatchObject({ state: { fieldErrors: { siteId: [expect.any(String)] } } });
  });
});

describe('the address of a report', () => {
  test('gets an id with the first look, and keeps it', async () => {
    const first = await look({ actor: house.reporter });
    expect(first.location).toMatch(/^\/report\?report=[0-9a-f-]{36}$/u);
    const clientId = new URL(first.location, 'http://scorchline.test').searchParams.get('report') ?? '';
    expect((await look({ actor: house.reporter, clientId })).body).toMatchObject({ clientId });
  });

  test('leads to the receipt once the report was sent, and others to a new report', async () => {
    const clientId = randomUUID();
    await post({ actor: house.reporter, clientId });
    expect((await look({ actor: house.reporter, clientId })).location).toMatch(/^\/received\//u);
    const other = await look({ actor: house.investigator, clientId });
    expect(other.location).toMatch(/^\/report\?report=/u);
    expect(other.location).not.toContain(clientId);
  });
});
