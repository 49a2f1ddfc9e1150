import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { timelineEvents, witnessAccounts } from '#db/schema/all.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import type { Actor } from '#app/domain/roles.ts';
import { action as timelineAction } from '#app/routes/cases/timeline.tsx';
import { action as witnessesAction } from '#app/routes/cases/witnesses.tsx';
import { createCase, createHouse } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

/** Forms of a page of a case, posted as a browser without a script does. */
let house: House;
beforeAll(async () => {
  house = await createHouse();
});

async function post(page: 'timeline' | 'witnesses', actor: Actor, caseNumber: number, fields: Record<string, string>) {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  const url = new URL(`http://scorchline.test/cases/${caseNumber}/${page}`);
  const args = { request: new Request(url, { method: 'POST', body: new URLSearchParams(fields) }), context, params: { caseNumber: String(caseNumber) }, url };
  const answer = page === 'timeline' ? await timelineAction({ ...args, pattern: '/cases/:caseNumber/timeline' }) : await witnessesAction({ ...args, pattern: '/cases/:caseNumber/witnesses' });
  return answer instanceof Response ? { status: answer.status, location: answer.headers.get('Location'), problem: null } : { status: answer.init?.status, location: null, problem: answer.data };
}

describe('a form of a page of a case', () => {
  const reading = () => ({ intent: 'add-event', clientId: randomUUID(), source: 'alarm-panel', sourceName: 'panel 4', clockErrorMin: '6', clockErrorBasis: 'compared with a phone', what: 'Smoke detector: alarm', readingAt: '2026-05-09T14:08' });

  test('is carried out, its time read by the clock of the place, and leads back to the page', async () => {
    const row = await createCase('investigation', { site: house.site });
    expect(await post('timeline', house.investigator, row.number, reading())).toEqual({ status: 303, location: `/cases/${row.number}/timeline`, problem: null });
    const [event] = await db.select().from(timelineEvents).where(eq(timelineEvents.caseId, row.id));
    // 14:08 on a wall in Europe/London in May is 13:08 UTC.
    expect(event?.readingAt.toISOString()).toBe('2026-05-09T13:08:00.000Z');
    expect(await post('timeline', house.investigator, row.number, { intent: 'withdraw', eventId: event?.id ?? '', reason: 'Read off the wrong line.' })).toMatchObject({ status: 303 });
  });

  test('leads to what it made where the act says so', async () => {
    const row = await createCase('investigation', { site: house.site });
    const fields = { intent: 'take-account', clientId: randomUUID(), personName: 'Perpetua Lindqvist', personRole: 'witness', ageBand: 'adult', language: 'English', words: 'I smelled something burnt.', readBack: 'yes', takenAt: '2026-05-10T16:00' };
    expect(await post('witnesses', house.investigator, row.number, fields)).toEqual({ status: 303, location: `/cases/${row.number}/witnesses#account-1`, problem: null });
    expect(await db.select().from(witnessAccounts).where(eq(witnessAccounts.caseId, row.id))).toHaveLength(1);
  });

  test('comes back with sentences beside all its fields, and what was typed', async () => {
    const row = await createCase('investigation', { site: house.site });
    const answer = await post('timeline', house.investigator, row.number, { ...reading(), what: '', readingAt: 'noon' });
    expect(answer).toMatchObject({ status: 400, problem: { intent: 'add-event', typed: { sourceName: 'panel 4', readingAt: 'noon' } } });
    expect(Object.keys(answer.problem?.fieldErrors ?? {}).sort()).toEqual(['readingAt', 'what']);
    expect(await db.select().from(timelineEvents).where(eq(timelineEvents.caseId, row.id))).toEqual([]);
  });

  test('is refused with a sentence to those whose act it is not, and says nothing of a case that is not theirs to see', async () => {
    const row = await createCase('investigation', { site: house.site });
    expect(await post('timeline', house.manager, row.number, reading())).toMatchObject({ status: 403, problem: { intent: 'add-event', formErrors: [expect.stringContaining('Open to')] } });
    const stranger = (await createHouse()).investigator;
    await expect(post('timeline', stranger, row.number, reading())).rejects.toMatchObject({ init: { status: 404 } });
  });
});
