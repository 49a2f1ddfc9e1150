import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { loader } from '#app/routes/people/log.tsx';
import { db, inTransaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import type { NewLogEntry } from '#db/queries/log.server.ts';
import { logEntries } from '#db/schema/all.ts';
import { contextFor, settled } from '#tests/db/auth/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createCase, createHouse } from '#tests/support/factories.ts';

let house: House;
let caseNumber: number;

async function write(house: House, entry: Partial<NewLogEntry>): Promise<void> {
  await inTransaction((tx) =>
    insertLogEntry(tx, { actorId: house.manager.userId, actorName: house.manager.displayName, organisationId: house.organisation.id, caseId: null, event: 'site.changed', subject: 'sites', subjectId: house.site.id, summary: 'Site changed', ...entry }),
  );
}

beforeAll(async () => {
  house = await createHouse();
  const row = await createCase('triage', { site: house.site });
  caseNumber = row.number;
  await write(house, { summary: 'Report link opened', event: 'site.guest-link-opened' });
  await write(house, { caseId: row.id, event: 'case.injury-recorded', summary: 'Burn on the right hand', reason: 'The caretaker rang.', actorName: 'Ruta Selwyn' });
  const other = await createHouse();
  await write(other, { summary: 'Their own business' });
});

async function read(actor: Actor | null, query = '') {
  const request = new Request(`http://scorchline.test/log${query}`);
  return settled(Promise.resolve().then(() => loader({ request, params: {}, context: contextFor(actor), url: new URL(request.url), pattern: '/log' })));
}
const linesOf = async (actor: Actor, query = '') => {
  const { body } = await read(actor, query);
  if (!Array.isArray(body.lines)) throw new Error('The page has no lines.');
  return body.lines as readonly { readonly sequence: number; readonly event: string; readonly summary: string; readonly reason: string; readonly caseNumber: number | null; readonly actorName: string }[];
};

describe('the log of the organisation', () => {
  test('gives reviewers and privacy leads what was done and why, newest first', async () => {
    for (const actor of [house.reviewer, house.privacyLead]) {
      expect(await linesOf(actor)).toMatchObject([
        { event: 'case.injury-recorded', summary: 'Burn on the right hand', reason: 'The caretaker rang.', caseNumber },
        { event: 'site.guest-link-opened', summary: 'Report link opened', caseNumber: null },
      ]);
    }
  });

  test('gives an administrator the event and the case number, but nothing of the case, not even in the answer of the server', async () => {
    const answer = await read(house.administrator);
    expect(await linesOf(house.administrator)).toMatchObject([
      { event: 'case.injury-recorded', summary: '', reason: '', caseNumber },
      { event: 'site.guest-link-opened', summary: 'Report link opened' },
    ]);
    expect(JSON.stringify(answer.body)).not.toMatch(/hand|caretaker/u);
  });

  test('keeps to the own organisation', async () => {
    expect((await linesOf(house.reviewer)).map((line) => line.summary)).not.toContain('Their own business');
  });

  test.each(['reporter', 'investigator', 'manager'] as const)('is closed to the %s', async (role) => {
    expect((await read(house[role])).status).toBe(403);
  });

  test('is closed to a reviewer of one site, since it reaches every site', async () => {
    expect((await read(await createActor(house.organisation.id, { role: 'reviewer', siteId: house.site.id }))).status).toBe(403);
  });

  test('sends a guest to sign in and back', async () => {
    expect(await read(null, '?case=118')).toMatchObject({ status: 302, location: '/sign-in?next=%2Flog%3Fcase%3D118' });
  });

  test('is narrowed by event, person and case in the address', async () => {
    const events = async (query: string) => (await linesOf(house.reviewer, query)).map((line) => line.event);
    expect(await events('?event=guest')).toEqual(['site.guest-link-opened']);
    expect(await events('?person=selwyn')).toEqual(['case.injury-recorded']);
    expect(await events(`?case=${caseNumber}`)).toEqual(['case.injury-recorded']);
    expect(await events('?case=999999')).toEqual([]);
  });

  test('takes the signs of a search pattern as the letters they are', async () => {
    expect(await linesOf(house.reviewer, '?event=%25')).toEqual([]);
    expect(await linesOf(house.reviewer, '?person=_')).toEqual([]);
  });

  test('does not tell an administrator by a search what a case holds', async () => {
    // The words of a summary are no field of the search, so a guess gives no hit.
    expect(await linesOf(house.administrator, '?event=hand')).toEqual([]);
  });
});

describe('a long log', () => {
  test('is read in pages of a hundred, each line once, by time', async () => {
    const long = await createHouse();
    for (let n = 0; n < 205; n += 1) await write(long, { event: 'site.changed', summary: `Change ${n}` });
    // A line that was brought in later but tells of an earlier day comes last.
    await db.insert(logEntries).values({ at: new Date('2020-01-01T10:00:00Z'), organisationId: long.organisation.id, actorName: 'Import', event: 'site.imported', subject: 'sites', subjectId: long.site.id, summary: 'Older' });
    const seen: string[] = [];
    const sizes: number[] = [];
    let query = '';
    for (let pages = 0; pages < 5; pages += 1) {
      const { body } = await read(long.reviewer, query);
      const lines = await linesOf(long.reviewer, query);
      sizes.push(lines.length);
      seen.push(...lines.map((line) => line.summary));
      if (body.olderThan === null) break;
      query = `?before=${String(body.olderThan)}`;
    }
    expect(sizes).toEqual([100, 100, 6]);
    expect(seen).toEqual([...Array.from({ length: 205 }, (_, n) => `Change ${204 - n}`), 'Older']);
  });
});

test('lines of the log cannot be changed or removed', async () => {
  const [line] = await db.select().from(logEntries).where(eq(logEntries.organisationId, house.organisation.id));
  await expect(db.update(logEntries).set({ summary: 'Nothing happened' }).where(eq(logEntries.sequence, line?.sequence ?? 0))).rejects.toThrow();
  await expect(db.delete(logEntries).where(eq(logEntries.sequence, line?.sequence ?? 0))).rejects.toThrow();
});
