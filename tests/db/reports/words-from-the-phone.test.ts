import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { noDetails } from '#app/domain/photo-details.ts';
import type { Actor } from '#app/domain/roles.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { holderHeader } from '#app/routes/resources/report-holder.server.ts';
import { action as photosAction } from '#app/routes/resources/report-photos.ts';
import { action as wordsAction } from '#app/routes/resources/report-words.ts';
import { holderHeader as headerOfThePhone } from '#app/components/report/post-report.ts';
import { db } from '#db/client.server.ts';
import { cases, photos } from '#db/schema/all.ts';
import { plainJpeg } from '#tests/db/photos/picture-files.ts';
import type { House } from '#tests/support/factories.ts';
import { answersForm, caseOf, contextFor, houseWithLink } from './stage.ts';
import type { Sending } from './stage.ts';

let house: House;
let guestCode: string;
beforeAll(async () => {
  ({ house, guestCode } = await houseWithLink());
});
afterAll(stopQueue);

interface Attempt extends Sending {
  /** Whose report the phone says it is; left out: it does not say. */
  readonly writtenBy?: string;
}

type Route = (args: { request: Request; params: { clientId: string }; context: ReturnType<typeof contextFor>; url: URL; pattern: never }) => Promise<Response>;

async function post(action: unknown, what: 'words' | 'photos', form: FormData, { actor = null, at, writtenBy, clientId = randomUUID() }: Attempt) {
  const url = new URL(`http://scorchline.test/report/${clientId}/${what}${at ? `?at=${at}` : ''}`);
  const request = new Request(url, { method: 'POST', body: form, headers: writtenBy ? { [holderHeader]: writtenBy } : {} });
  const route = action as Route;
  const answer = await route({ request, params: { clientId }, context: contextFor(actor), url, pattern: `/report/:clientId/${what}` as never });
  return { status: answer.status, body: z.record(z.string(), z.unknown()).parse(await answer.json()) };
}

const words = (typed: Readonly<Record<string, string>> = {}) => answersForm(house.site.id, typed);
const ofPerson = (actor: Actor) => `person-${actor.userId}`;

test('phone and server mean the same header', () => {
  expect(headerOfThePhone).toBe(holderHeader);
});

describe('the words of a report, as the phone sends them', () => {
  test('get a receipt, and the same one however often they come, also at once', async () => {
    const attempt = { actor: house.reporter, writtenBy: ofPerson(house.reporter), clientId: randomUUID() };
    const answers = await Promise.all([1, 2, 3].map(() => post(wordsAction, 'words', words(), attempt)));
    answers.push(await post(wordsAction, 'words', words({ narrative: 'changed' }), attempt));
    const row = await caseOf(attempt.clientId);
    expect(new Set(answers.map(({ status, body }) => `${status} ${String(body['receipt'])}`))).toEqual(new Set([`200 ${row?.receipt}`]));
    expect(await db.$count(cases, eq(cases.clientId, attempt.clientId))).toBe(1);
  });

  test('come back with what to mend beside its field, and nothing is stored', async () => {
    const attempt = { actor: house.reporter, writtenBy: ofPerson(house.reporter), clientId: randomUUID() };
    const { status, body } = await post(wordsAction, 'words', words({ anyoneHurt: '' }), attempt);
    expect([status, body]).toMatchObject([400, { problem: { fieldErrors: { anyoneHurt: [expect.stringContaining("Don't know")] } } }]);
    expect(await caseOf(attempt.clientId)).toBeUndefined();
  });

  test('of a guest are taken by the code of the site', async () => {
    const attempt = { at: guestCode, writtenBy: `site-${house.site.id}`, clientId: randomUUID() };
    expect((await post(wordsAction, 'words', words(), attempt)).status).toBe(200);
    expect(await caseOf(attempt.clientId)).toMatchObject({ guestReport: true, reporterId: null });
  });
});

describe('whose report it is', () => {
  test('must be said: a page from elsewhere cannot', async () => {
    const attempt = { actor: house.reporter, clientId: randomUUID() };
    expect((await post(wordsAction, 'words', words(), attempt)).status).toBe(400);
    expect(await caseOf(attempt.clientId)).toBeUndefined();
  });

  test.each([
    ['signed out', () => null, () => ofPerson(house.reporter), /sign in/u],
    ['somebody else is signed in', () => house.investigator, () => ofPerson(house.reporter), /another account/u],
    ['a guest wrote it by another link', () => house.reporter, () => 'site-elsewhere', /another account/u],
  ])('%s: nothing is taken, words or photo, and the phone is asked to have its writer sign in', async (_what, actor, writtenBy, sentence) => {
    const attempt = { actor: actor(), writtenBy: writtenBy(), clientId: randomUUID() };
    const photo = new FormData();
    photo.append('photos', new File([new Uint8Array(await plainJpeg())], 'a.jpg'));
    for (const answer of [await post(wordsAction, 'words', words(), attempt), await post(photosAction, 'photos', photo, attempt)]) {
      expect(answer).toMatchObject({ status: 401, body: { code: 'sign-in', message: expect.stringMatching(sentence) } });
    }
    expect(await caseOf(attempt.clientId)).toBeUndefined();
    expect(await db.$count(photos, eq(photos.reportClientId, attempt.clientId))).toBe(0);
  });
});

test('what a guest wrote stays a guest\'s when it is sent after somebody signed in', async () => {
  const attempt = { actor: house.reporter, at: guestCode, writtenBy: `site-${house.site.id}`, clientId: randomUUID() };
  expect((await post(wordsAction, 'words', words(), attempt)).status).toBe(200);
  expect(await caseOf(attempt.clientId)).toMatchObject({ guestReport: true, reporterId: null });
});

test('what is said of a photo travels ahead of it, and what cannot be read counts as not said', async () => {
  const attempt = { actor: house.reporter, writtenBy: ofPerson(house.reporter), clientId: randomUUID() };
  const send = async (details: string) => {
    const form = new FormData();
    form.append('details', new Blob([details]), 'details.json');
    form.append('photos', new File([new Uint8Array(await plainJpeg())], 'a.jpg'));
    return post(photosAction, 'photos', form, attempt);
  };
  await send(JSON.stringify({ ...noDetails, view: 'square-on', caption: 'mark', position: 0 }));
  await send('{"view":"sideways","clockErrorS":1e99,"caption":7');
  await send(JSON.stringify({ view: 'sideways', clockErrorS: 1e99, position: -4, caption: 'kept' }));
  const rows = await db.select({ view: photos.view, caption: photos.caption, position: photos.position, clockErrorS: photos.clockErrorS }).from(photos).where(eq(photos.reportClientId, attempt.clientId)).orderBy(photos.createdAt);
  expect(rows).toEqual([
    { view: 'square-on', caption: 'mark', position: 0, clockErrorS: 0 },
    { view: null, caption: '', position: null, clockErrorS: 0 },
    { view: null, caption: 'kept', position: null, clockErrorS: 0 },
  ]);
});
