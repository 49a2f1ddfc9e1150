import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { action, loader } from '#app/routes/public/progress.tsx';
import { loader as receivedLoader } from '#app/routes/public/report-received.tsx';
import { db } from '#db/client.server.ts';
import { cases, logEntries } from '#db/schema/all.ts';
import type { House } from '#tests/support/factories.ts';
import { createCase, createFinding, createHouse, createHypothesis, createInvolvement } from '#tests/support/factories.ts';
import { contextFor } from './stage.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});

function lookUp(code: string, actor: Actor | null = null) {
  const url = new URL(`http://scorchline.test/progress?code=${encodeURIComponent(code)}`);
  return loader({ request: new Request(url), params: {}, context: contextFor(actor), url, pattern: '/progress' });
}

async function answer(code: string, fields: Readonly<Record<string, string>>, actor: Actor | null = null) {
  const url = new URL('http://scorchline.test/progress');
  const form = new FormData();
  for (const [name, value] of Object.entries({ code, ...fields })) form.append(name, value);
  const result: unknown = await action({ request: new Request(url, { method: 'POST', body: form }), params: {}, context: contextFor(actor), url, pattern: '/progress' });
  if (result instanceof Response) return { status: result.status, body: {} };
  const wrapped = result as { data: Record<string, unknown>; init?: ResponseInit };
  return { status: wrapped.init?.status ?? 200, body: wrapped.data };
}

const secret = { title: 'Secret title', narrative: 'Secret words', placeDetail: 'Secret place' };

describe('what a receipt shows', () => {
  test('is nothing personal: no words, no place, no names', async () => {
    const row = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId, ...secret });
    await createInvolvement({ caseId: row.id, name: 'Secret Person', email: 'secret@example.test' });
    const shown = JSON.stringify([await lookUp(row.receipt), await received(row.receipt)]);
    for (const word of ['Secret', 'secret', house.site.name, house.reporter.displayName, house.reporter.email, row.clientId, String(row.latitudeDeg ?? 'no latitude')]) expect(shown).not.toContain(word);
  });

  test('is the signed result in plain words', async () => {
    const row = await createCase('corrective-action', { site: house.site });
    const hypothesis = await createHypothesis({ caseId: row.id });
    await createFinding({ caseId: row.id, authorId: house.investigator.userId, state: 'signed', certainty: 'probable', selectedHypothesisId: hypothesis.id });
    expect((await lookUp(row.receipt)).report?.heading).toBe('Focused sunlight: the probable cause. It is being put right');
  });

  test('is not a draft of the result', async () => {
    const row = await createCase('findings', { site: house.site });
    const hypothesis = await createHypothesis({ caseId: row.id });
    await createFinding({ caseId: row.id, authorId: house.investigator.userId, state: 'sent', certainty: 'probable', selectedHypothesisId: hypothesis.id });
    expect(JSON.stringify(await lookUp(row.receipt))).not.toContain('sunlight');
  });

  test('is found however the receipt is typed', async () => {
    const row = await createCase('triage', { site: house.site });
    const typed = ` ${row.receipt.toLowerCase().replaceAll('-', ' ')} `;
    expect((await lookUp(typed)).report?.receipt).toBe(row.receipt);
  });

  test('is a sentence when no report has it, and another when it cannot be one', async () => {
    expect((await lookUp('ZZ-ZZZZ-ZZ')).problem).toContain('No report has this receipt');
    expect((await lookUp('hello')).problem).toContain('eight letters and digits');
  });
});

async function received(receipt: string) {
  const url = new URL(`http://scorchline.test/received/${receipt}`);
  return receivedLoader({ request: new Request(url), params: { receipt }, context: contextFor(null), url, pattern: '/received/:receipt' });
}

describe('the one question of a returned report', () => {
  const returned = () => createCase('returned', { site: house.site, question: 'Was the drain cover already bent?', answerDueAt: new Date('2026-06-01T12:00:00Z') });

  test('is shown while it is open, and not afterwards', async () => {
    const row = await returned();
    expect((await lookUp(row.receipt)).report?.question).toEqual({ words: 'Was the drain cover already bent?', dueWords: '1 Jun 2026' });
    await answer(row.receipt, { choice: 'No' });
    expect((await lookUp(row.receipt)).report?.question).toBeNull();
  });

  test('is answered by whoever holds the receipt; the report goes back to triage with a log line and no name', async () => {
    const row = await returned();
    expect((await answer(row.receipt, { choice: 'Yes', words: 'It was bent in April.' })).status).toBe(303);
    const [stored] = await db.select().from(cases).where(eq(cases.id, row.id));
    expect(stored).toMatchObject({ state: 'triage', answer: 'Yes. It was bent in April.', version: row.version + 1 });
    const [line] = await db.select().from(logEntries).where(eq(logEntries.caseId, row.id));
    expect(line).toMatchObject({ event: 'case.answered', actorId: null, actorName: 'Holder of the receipt', before: { state: 'returned' }, after: { state: 'triage' } });
  });

  test('answered twice with the same words is answered once', async () => {
    const row = await returned();
    const answers = await Promise.all([answer(row.receipt, { choice: 'No' }), answer(row.receipt, { choice: 'No' })]);
    expect(answers.map(({ status }) => status)).toEqual([303, 303]);
    expect(await db.select().from(logEntries).where(eq(logEntries.caseId, row.id))).toHaveLength(1);
  });

  test('wants an answer: an empty one comes back with a sentence', async () => {
    const row = await returned();
    expect(await answer(row.receipt, {})).toMatchObject({ status: 400, body: { fieldErrors: { answer: [expect.stringContaining("Don't know")] } } });
    expect((await db.select().from(cases).where(eq(cases.id, row.id)))[0]?.state).toBe('returned');
  });

  test('is closed in every other state', async () => {
    const row = await createCase('investigation', { site: house.site });
    expect(await answer(row.receipt, { choice: 'No', words: 'late' })).toMatchObject({ status: 409, body: { typed: { words: 'late' } } });
  });
});

test('look-ups are counted by address, so that receipts cannot be searched for', async () => {
  const tries = Array.from({ length: 70 }, () => lookUp('ZZ-ZZZZ-ZZ').then(() => 200, (thrown: { init?: ResponseInit }) => thrown.init?.status));
  expect((await Promise.all(tries)).filter((status) => status === 429).length).toBeGreaterThan(0);
});
