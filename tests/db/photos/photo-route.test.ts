import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { preparePhoto } from '#app/jobs/handlers/prepare-photo.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { loader } from '#app/routes/resources/photo.ts';
import { action as photosAction, loader as photosLoader } from '#app/routes/resources/report-photos.ts';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { db } from '#db/client.server.ts';
import { logEntries, photos } from '#db/schema/all.ts';
import { caseOf, contextFor, openGuestLink, person, reportAt } from '#tests/db/reports/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createHouse, createOrganisation, createSite } from '#tests/support/factories.ts';
import { cameraJpeg, plainJpeg } from './picture-files.ts';

let house: House;
let guestCode: string;
beforeAll(async () => {
  house = await createHouse();
  guestCode = await openGuestLink(house.site.id);
});
afterAll(stopQueue);

function get(actor: Actor | null, photoId: string, rendition: string, draftOf?: string): Promise<Response> {
  const url = new URL(`http://scorchline.test/photos/${photoId}/${rendition}${draftOf ? `?report=${draftOf}` : ''}`);
  return loader({ request: new Request(url), params: { photoId, rendition }, context: contextFor(actor), url, pattern: '/photos/:photoId/:rendition' });
}

interface Upload {
  readonly actor?: Actor | null;
  readonly at?: string;
  readonly clientId: string;
  readonly files?: readonly [name: string, bytes: Uint8Array][];
  readonly fields?: Readonly<Record<string, string>>;
}

async function upload({ actor = null, at, clientId, files = [], fields = {} }: Upload): Promise<{ status: number; photos: { ok: boolean; photoId?: string; sentence?: string }[] }> {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  for (const [name, bytes] of files) form.append('photos', new File([new Uint8Array(bytes)], name));
  const url = new URL(`http://scorchline.test/report/${clientId}/photos${at ? `?at=${at}` : ''}`);
  const answer = await photosAction({ request: new Request(url, { method: 'POST', body: form }), params: { clientId }, context: contextFor(actor), url, pattern: '/report/:clientId/photos' });
  const body: { photos?: { ok: boolean; photoId?: string }[] } = await answer.json();
  return { status: answer.status, photos: body.photos ?? [] };
}

async function draftPhoto(by: { actor?: Actor; at?: string }, bytes?: Uint8Array) {
  const clientId = randomUUID();
  const { photos: outcomes } = await upload({ ...by, clientId, files: [['roof.jpg', bytes ?? (await cameraJpeg())]] });
  const photoId = outcomes[0]?.photoId ?? '';
  await preparePhoto({ photoId });
  return { clientId, photoId };
}

async function casePhoto(bytes?: Uint8Array) {
  const draft = await draftPhoto({ actor: house.reporter }, bytes);
  const { caseNumber } = await submitReport({ holder: person(house.reporter), clientId: draft.clientId, report: reportAt(house.site) });
  return { ...draft, caseNumber };
}

describe('photos of a case', () => {
  const readers = ['reporter', 'investigator', 'reviewer', 'manager', 'privacyLead'] as const;
  const ofOriginal = ['investigator', 'reviewer', 'privacyLead'];

  test('copies are for everybody who may see the case, originals for those who work on evidence', async () => {
    const { photoId } = await casePhoto();
    for (const reader of readers) {
      expect([reader, (await get(house[reader], photoId, 'view')).status, (await get(house[reader], photoId, 'thumbnail')).status]).toEqual([reader, 200, 200]);
      expect([reader, (await get(house[reader], photoId, 'original')).status]).toEqual([reader, ofOriginal.includes(reader) ? 200 : 403]);
    }
  });

  test('nothing is found by a guest, an administrator, another reporter, another house, or an investigator of another site', async () => {
    const { photoId, clientId } = await casePhoto();
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const strangers: (Actor | null)[] = [
      null,
      house.administrator,
      await createActor(house.organisation.id, 'reporter'),
      (await createHouse()).investigator,
      await createActor((await createOrganisation({ kind: 'insurer' })).id, 'insurer'),
      await createActor(house.organisation.id, { role: 'investigator', siteId: elsewhere.id }),
    ];
    for (const stranger of strangers) {
      for (const rendition of ['view', 'thumbnail', 'original']) expect((await get(stranger, photoId, rendition)).status).toBe(404);
      // The id of the report stops opening photos once the report is a case.
      expect((await get(stranger, photoId, 'view', clientId)).status).toBe(404);
    }
  });

  test('come with a name made here, no sniffing, and private caching', async () => {
    const { photoId, caseNumber } = await casePhoto();
    const view = await get(house.investigator, photoId, 'view');
    expect(Object.fromEntries(view.headers)).toMatchObject({
      'content-type': 'image/jpeg',
      'content-disposition': `inline; filename="case-${caseNumber}-photo-1-view.jpg"`,
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, max-age=3600',
    });
    const original = await get(house.investigator, photoId, 'original');
    expect(Object.fromEntries(original.headers)).toMatchObject({ 'content-disposition': `attachment; filename="case-${caseNumber}-photo-1-original.jpg"`, 'cache-control': 'private, no-store' });
  });

  test('the original is what came in, byte for byte', async () => {
    const bytes = await cameraJpeg();
    const { photoId } = await casePhoto(bytes);
    const answer = await get(house.investigator, photoId, 'original');
    expect(Buffer.from(await answer.arrayBuffer()).equals(bytes)).toBe(true);
  });

  test('an original that was changed in the store is refused, and the log says so', async () => {
    const { photoId, clientId } = await casePhoto();
    const [row] = await db.select().from(photos).where(eq(photos.id, photoId));
    await putObject(row?.originalKey ?? '', await plainJpeg(), 'image/jpeg');
    const answer = await get(house.reviewer, photoId, 'original');
    expect(answer.status).toBe(409);
    expect(await answer.text()).toContain('differs from that at intake');
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, (await caseOf(clientId))?.id ?? ''));
    expect(lines.at(-1)).toMatchObject({ event: 'photo.hash-differs', actorId: house.reviewer.userId });
    expect((await db.select().from(photos).where(eq(photos.id, photoId)))[0]).toMatchObject({ hashCheck: 'differs' });
  });

  test.each(['..%2Foriginal', 'VIEW', 'full'])('no rendition is called %s', async (rendition) => {
    const { photoId } = await casePhoto();
    expect((await get(house.investigator, photoId, rendition)).status).toBe(404);
  });

  test('a copy that is still being prepared says so', async () => {
    const clientId = randomUUID();
    const { photos: outcomes } = await upload({ actor: house.reporter, clientId, files: [['a.jpg', await plainJpeg()]] });
    const answer = await get(house.reporter, outcomes[0]?.photoId ?? '', 'thumbnail', clientId);
    expect([answer.status, answer.headers.get('Retry-After')]).toEqual([503, '5']);
  });
});

describe('photos of a report under way', () => {
  test('are seen by the person who brought them, with the id of the report, and by nobody else', async () => {
    const { photoId, clientId } = await draftPhoto({ actor: house.reporter });
    expect((await get(house.reporter, photoId, 'thumbnail', clientId)).status).toBe(200);
    expect((await get(house.reporter, photoId, 'thumbnail')).status).toBe(404);
    expect((await get(house.reporter, photoId, 'thumbnail', randomUUID())).status).toBe(404);
    expect((await get(house.investigator, photoId, 'thumbnail', clientId)).status).toBe(404);
    expect((await get(null, photoId, 'thumbnail', clientId)).status).toBe(404);
    expect((await get(house.reporter, photoId, 'original', clientId)).status).toBe(404);
  });

  test('of a guest are seen with the id of the report', async () => {
    const { photoId, clientId } = await draftPhoto({ at: guestCode });
    expect((await get(null, photoId, 'thumbnail', clientId)).status).toBe(200);
    expect((await get(null, photoId, 'thumbnail', randomUUID())).status).toBe(404);
  });

  test('are listed for their holder only', async () => {
    const { clientId, photoId } = await draftPhoto({ actor: house.reporter });
    const list = async (actor: Actor) => {
      const url = new URL(`http://scorchline.test/report/${clientId}/photos`);
      const answer = await photosLoader({ request: new Request(url), params: { clientId }, context: contextFor(actor), url, pattern: '/report/:clientId/photos' });
      const body: { photos: { id: string }[] } = await answer.json();
      return body.photos.map(({ id }) => id);
    };
    expect(await list(house.reporter)).toEqual([photoId]);
    expect(await list(house.manager)).toEqual([]);
  });

  test('are answered for one by one: a bad file does not spoil the good one', async () => {
    const { status, photos: outcomes } = await upload({ at: guestCode, clientId: randomUUID(), files: [['notes.jpg', Buffer.from('words')], ['roof.jpg', await plainJpeg()]] });
    expect(status).toBe(200);
    expect(outcomes).toMatchObject([{ ok: false, sentence: expect.stringContaining('notes.jpg') }, { ok: true }]);
  });

  test('are taken by nobody without account or link', async () => {
    expect((await upload({ clientId: randomUUID(), files: [['roof.jpg', await plainJpeg()]] })).status).toBe(401);
    expect((await upload({ at: 'no-such-link', clientId: randomUUID(), files: [['roof.jpg', await plainJpeg()]] })).status).toBe(404);
  });

  test('are taken off by their holder, and by nobody else', async () => {
    const { clientId, photoId } = await draftPhoto({ actor: house.reporter });
    await upload({ actor: house.manager, clientId, fields: { intent: 'remove', photoId } });
    expect(await db.select().from(photos).where(eq(photos.id, photoId))).toHaveLength(1);
    await upload({ actor: house.reporter, clientId, fields: { intent: 'remove', photoId } });
    expect(await db.select().from(photos).where(eq(photos.id, photoId))).toHaveLength(0);
  });

  test('stay once the report was sent', async () => {
    const { clientId, photoId } = await casePhoto();
    await upload({ actor: house.reporter, clientId, fields: { intent: 'remove', photoId } });
    expect(await db.select().from(photos).where(eq(photos.id, photoId))).toHaveLength(1);
  });
});
