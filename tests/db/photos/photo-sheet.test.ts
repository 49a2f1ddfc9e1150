import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { action, loader } from '#app/routes/cases/photos.tsx';
import { putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { db } from '#db/client.server.ts';
import { logEntries, photos } from '#db/schema/all.ts';
import { contextFor } from '#tests/db/reports/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createCase, createHouse, createPhoto } from '#tests/support/factories.ts';
import { plainJpeg } from './picture-files.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

const exif = { takenAtLocal: '2026-05-09T15:05:12', utcOffset: '+01:00', latitudeDeg: 53.5, longitudeDeg: -1.6, directionDeg: 187, directionReference: 'true', camera: null } as const;

async function caseWithPhoto(values: Partial<typeof photos.$inferInsert> = {}, state: 'investigation' | 'closed' = 'investigation') {
  const row = await createCase(state, { site: house.site, reporterId: house.reporter.userId });
  const photo = await createPhoto({ caseId: row.id, label: 1, reportClientId: row.clientId, exif, ...values });
  return { row, photo };
}

function args(actor: Actor, caseNumber: number, request: Request) {
  return { request, params: { caseNumber: String(caseNumber) }, context: contextFor(actor), url: new URL(request.url), pattern: '/cases/:caseNumber/photos' };
}
async function post(actor: Actor, caseNumber: number, fields: Readonly<Record<string, string>>, files: readonly File[] = []) {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  for (const file of files) form.append('photos', file);
  const answer: unknown = await action(args(actor, caseNumber, new Request(`http://scorchline.test/cases/${caseNumber}/photos`, { method: 'POST', body: form }))).catch((thrown: unknown) => thrown);
  if (answer instanceof Error) throw answer;
  if (answer instanceof Response) return { status: answer.status, body: {} };
  const wrapped = answer as { data: Record<string, unknown>; init?: ResponseInit };
  return { status: wrapped.init?.status ?? 200, body: wrapped.data };
}
const photoOf = async (photoId: string) => (await db.select().from(photos).where(eq(photos.id, photoId)))[0];
const lastLine = async (caseId: string) => (await db.select().from(logEntries).where(eq(logEntries.caseId, caseId)).orderBy(logEntries.sequence)).at(-1);

describe('what the file says', () => {
  test('is offered in words, and the time is used only when taken', async () => {
    const { row, photo } = await caseWithPhoto();
    const view = await loader(args(house.investigator, row.number, new Request(`http://scorchline.test/cases/${row.number}/photos`)));
    expect(view.cards[0]?.offers).toEqual([
      { kind: 'time', says: 'The file says 9 May 2026, 15:05 +01:00.', question: "Use it as the photo's time?", answer: null },
      { kind: 'place', says: 'The file says 53.5° N, 1.6° W; camera pointing 187° from true north.', question: "Use it as the photo's place and direction?", answer: null },
    ]);
    expect(view.cards[0]?.timeWords).toBe('time not stated');
    await post(house.investigator, row.number, { intent: 'answer-offer', photoId: photo.id, offer: 'time', answer: 'accepted' });
    expect(await photoOf(photo.id)).toMatchObject({ takenAt: new Date('2026-05-09T14:05:12Z'), exifAnswer: { time: 'accepted', place: null } });
    expect(await lastLine(row.id)).toMatchObject({ event: 'photo.offer-answered', actorId: house.investigator.userId, before: { takenAt: null } });
  });

  test('goes again when it is declined after all', async () => {
    const { row, photo } = await caseWithPhoto({ takenAt: new Date('2026-05-09T14:05:12Z') });
    await post(house.reporter, row.number, { intent: 'answer-offer', photoId: photo.id, offer: 'time', answer: 'declined' });
    expect(await photoOf(photo.id)).toMatchObject({ takenAt: null, exifAnswer: { time: 'declined' } });
  });

  test('cannot be taken when the file says nothing', async () => {
    const { row, photo } = await caseWithPhoto({ exif: { ...exif, takenAtLocal: null, utcOffset: null } });
    expect((await post(house.investigator, row.number, { intent: 'answer-offer', photoId: photo.id, offer: 'time', answer: 'accepted' })).status).toBe(409);
  });

  test('is pointed out when it lies more than 30 minutes from the stated finding', async () => {
    // The factory's case was found at 14:10 UTC.
    const { row } = await caseWithPhoto({ takenAt: new Date('2026-05-09T17:20:00Z') });
    const view = await loader(args(house.investigator, row.number, new Request(`http://scorchline.test/cases/${row.number}/photos`)));
    expect(view.cards[0]?.differenceWords).toContain('after the stated finding, 9 May 2026, 15:10');
    expect(view.heading).toBe('The time of photo 1 does not go with the stated finding');
  });
});

describe('changes to a photo', () => {
  test('are stored and logged with what stood before', async () => {
    const { row, photo } = await caseWithPhoto({ caption: 'Band' });
    expect((await post(house.investigator, row.number, { intent: 'describe', photoId: photo.id, view: 'square-on', caption: 'Band, square-on', altText: 'A brown band', clockErrorS: '42' })).status).toBe(303);
    expect(await photoOf(photo.id)).toMatchObject({ view: 'square-on', caption: 'Band, square-on', altText: 'A brown band', clockErrorS: 42 });
    expect(await lastLine(row.id)).toMatchObject({ event: 'photo.described', before: { caption: 'Band', clockErrorS: 0 }, after: { caption: 'Band, square-on' } });
  });

  test('that cannot be read come back with what was typed', async () => {
    const { row, photo } = await caseWithPhoto();
    const answer = await post(house.investigator, row.number, { intent: 'describe', photoId: photo.id, view: 'close', caption: 'Band', altText: '', clockErrorS: 'about a minute' });
    expect(answer).toMatchObject({ status: 400, body: { typed: { caption: 'Band', clockErrorS: 'about a minute' }, fieldErrors: { clockErrorS: [expect.any(String)] } } });
  });

  test.each([
    ['describe', { view: '', caption: 'x', altText: '', clockErrorS: '0' }, ['reporter', 'investigator']],
    ['set-releasable', { releasable: 'yes' }, ['investigator', 'manager', 'privacyLead']],
    ['add-mask', { left: '10', top: '10', right: '30', bottom: '40', class: 'personal' }, ['investigator', 'manager', 'privacyLead']],
  ] as const)('%s is open to those who may, and refused to the others', async (intent, fields, allowed) => {
    const may: readonly string[] = allowed;
    for (const role of ['reporter', 'investigator', 'reviewer', 'manager', 'privacyLead'] as const) {
      const { row, photo } = await caseWithPhoto();
      const { status } = await post(house[role], row.number, { intent, photoId: photo.id, ...fields });
      expect([role, status]).toEqual([role, may.includes(role) ? 303 : 403]);
    }
  });

  test('of a photo of another case are refused', async () => {
    const { row } = await caseWithPhoto();
    const other = await caseWithPhoto();
    expect((await post(house.investigator, row.number, { intent: 'set-releasable', photoId: other.photo.id, releasable: 'yes' })).status).toBe(404);
    expect((await photoOf(other.photo.id))?.releasable).toBe('undecided');
  });
});

describe('boxes to be hidden', () => {
  test('are typed as edges in per cent and kept as shares', async () => {
    const { row, photo } = await caseWithPhoto();
    await post(house.privacyLead, row.number, { intent: 'add-mask', photoId: photo.id, left: '25', top: '10', right: '75', bottom: '30', class: 'exact-place' });
    expect((await photoOf(photo.id))?.masks).toEqual([{ leftShare: 0.25, topShare: 0.1, widthShare: 0.5, heightShare: 0.2, class: 'exact-place' }]);
    await post(house.privacyLead, row.number, { intent: 'remove-mask', photoId: photo.id, mask: '0' });
    expect((await photoOf(photo.id))?.masks).toEqual([]);
    expect(await lastLine(row.id)).toMatchObject({ event: 'photo.mask-removed' });
  });

  test.each([
    [{ left: '75', right: '25' }, 'right'],
    [{ top: '60', bottom: '60' }, 'bottom'],
    [{ left: '-1' }, 'left'],
    [{ bottom: '101' }, 'bottom'],
    [{ top: 'a third' }, 'top'],
  ])('are refused with a sentence when typed as %j', async (typed, field) => {
    const { row, photo } = await caseWithPhoto();
    const answer = await post(house.privacyLead, row.number, { intent: 'add-mask', photoId: photo.id, left: '10', top: '10', right: '30', bottom: '40', class: 'personal', ...typed });
    expect(answer).toMatchObject({ status: 400, body: { fieldErrors: { [field]: [expect.any(String)] } } });
  });
});

describe('more photos', () => {
  const file = async (name: string) => new File([new Uint8Array(await plainJpeg())], name);

  test('get the next label, from the investigator and from the reporter', async () => {
    const { row } = await caseWithPhoto();
    await post(house.investigator, row.number, { intent: 'add-photos' }, [await file('a.jpg')]);
    await post(house.reporter, row.number, { intent: 'add-photos' }, [await file('b.jpg')]);
    const rows = await db.select({ label: photos.label, by: photos.uploadedById }).from(photos).where(eq(photos.caseId, row.id)).orderBy(photos.label);
    expect(rows.slice(1)).toEqual([{ label: 2, by: house.investigator.userId }, { label: 3, by: house.reporter.userId }]);
  });

  test('are refused for a closed case, and by somebody without the right', async () => {
    const { row } = await caseWithPhoto({}, 'closed');
    expect((await post(house.investigator, row.number, { intent: 'add-photos' }, [await file('a.jpg')])).status).toBe(403);
    const open = await caseWithPhoto();
    expect((await post(house.manager, open.row.number, { intent: 'add-photos' }, [await file('a.jpg')])).status).toBe(403);
  });

  test('that are bad get a sentence, and the good ones stay', async () => {
    const { row } = await caseWithPhoto();
    const answer = await post(house.investigator, row.number, { intent: 'add-photos' }, [new File(['words'], 'notes.jpg'), await file('good.jpg')]);
    expect(answer).toMatchObject({ status: 400, body: { fieldErrors: { photos: [expect.stringContaining('“notes.jpg”')] } } });
    expect(await db.select().from(photos).where(eq(photos.caseId, row.id))).toHaveLength(2);
  });
});

test('the check of all originals says which are not what came in', async () => {
  const row = await createCase('investigation', { site: house.site });
  const good = await plainJpeg();
  const stored = await createPhoto({ caseId: row.id, label: 1, sha256: sha256Hex(good), originalKey: `originals/test/${row.id}-1.jpg` });
  const changed = await createPhoto({ caseId: row.id, label: 2, sha256: sha256Hex(await plainJpeg()), originalKey: `originals/test/${row.id}-2.jpg` });
  const missing = await createPhoto({ caseId: row.id, label: 3 });
  await putObject(stored.originalKey, good, 'image/jpeg');
  await putObject(changed.originalKey, good, 'image/jpeg');
  await post(house.reviewer, row.number, { intent: 'check-hashes' });
  expect([await photoOf(stored.id), await photoOf(changed.id), await photoOf(missing.id)].map((photo) => photo?.hashCheck)).toEqual(['same', 'differs', 'missing']);
  expect(await lastLine(row.id)).toMatchObject({ event: 'photo.hash-differs', after: { same: 1, differing: [2, 3] } });
  expect((await post(house.manager, row.number, { intent: 'check-hashes' })).status).toBe(403);
});
