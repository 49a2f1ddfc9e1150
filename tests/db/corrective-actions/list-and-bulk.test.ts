import { and, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { actionStage, existingAction, inDays, readAction } from './stage.ts';
import { createAction, createActor, createHouse, createSite } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { listActionLines } from '#db/queries/action-list.server.ts';
import { getCaseActions } from '#db/queries/action-page.server.ts';
import { listActions } from '#db/queries/corrective-actions.server.ts';
import { logEntries, outbox } from '#db/schema/all.ts';
import { groupOf } from '#app/domain/action-list.ts';
import { actionSubject } from '#app/domain/action-subject.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import { reassignActions } from '#app/services/corrective-actions/reassign-actions.server.ts';
import { reDateActions } from '#app/services/corrective-actions/re-date-actions.server.ts';
import { remindOwners } from '#app/services/corrective-actions/remind-owners.server.ts';

const now = new Date();

describe('who sees which action', () => {
  test('the query and the rule action:read agree for every role, relation and place', async () => {
    const stage = await actionStage();
    const elsewhere = await createSite({ organisationId: stage.house.organisation.id });
    const stranger = await createHouse();
    const action = await existingAction(stage);
    const { house } = stage;
    const people = [
      house.investigator, house.reviewer, house.manager, house.privacyLead, house.reporter, house.administrator, stage.owner, stage.verifier,
      await createActor(house.organisation.id, { role: 'manager', siteId: house.site.id }),
      await createActor(house.organisation.id, { role: 'manager', siteId: elsewhere.id }),
      await createActor(house.organisation.id),
      stranger.investigator,
      stranger.manager,
    ];
    const seen = await Promise.all(people.map(async (actor) => (await listActions(db, { actor, caseNumber: stage.caseNumber })).length === 1));
    const allowed = people.map((actor) => canOnCase(actor, 'action:read', actionSubject({ organisationId: house.organisation.id, siteId: house.site.id, state: 'corrective-action' }, action, actor.userId)));
    expect(seen).toEqual(allowed);
    expect(seen).toEqual([true, true, true, true, false, false, true, true, true, false, false, false, false]);
  });

  test('the owner of one action of a case is shown that one only, on the case and on the list', async () => {
    const stage = await actionStage();
    const own = await existingAction(stage);
    await createAction({ caseId: stage.caseId, ownerId: stage.house.manager.userId, verifierId: stage.house.reviewer.userId, title: 'Not theirs' });
    const page = await getCaseActions(db, { actor: stage.owner, caseNumber: stage.caseNumber, now });
    expect(page).toMatchObject({ allowed: true, onlyOwn: true, mayAdd: false, people: [] });
    expect(page?.allowed ? page.cards.map((card) => card.line.id) : []).toEqual([own.id]);
    expect((await listActionLines(db, { actor: stage.owner, now })).map((line) => line.id)).toEqual([own.id]);
    expect(JSON.stringify(page)).not.toContain('Not theirs');
  });

  test('a reporter of the case without an action is told who can', async () => {
    const stage = await actionStage();
    await existingAction(stage);
    expect(await getCaseActions(db, { actor: stage.house.reporter, caseNumber: stage.caseNumber, now })).toBeNull();
  });
});

test('the list puts what is lit before its fix first, and marks only what the reader may change', async () => {
  const stage = await actionStage([inDays(10)]);
  const late = await existingAction(stage, { dueOn: inDays(-2) });
  const lit = await existingAction(stage, { dueOn: inDays(10) });
  const before = await existingAction(stage, { dueOn: inDays(9) });
  const done = await existingAction(stage, { state: 'done' });
  const lines = await listActionLines(db, { actor: stage.house.manager, now });
  const group = (id: string) => groupOf(lines.find((line) => line.id === id) ?? (() => { throw new Error('not listed'); })());
  expect([late, lit, before, done].map(({ id }) => group(id))).toEqual(['before-fix', 'before-fix', 'after-fix', 'in-place']);
  expect(lines.filter((line) => line.changeable).map((line) => line.id).sort()).toEqual([late.id, lit.id, before.id].sort());
  expect((await listActionLines(db, { actor: stage.house.reviewer, now })).some((line) => line.changeable)).toBe(false);
});

describe('several at once', () => {
  test('re-dating keeps the old day and the reason in the history and tells the owner', async () => {
    const stage = await actionStage();
    const one = await existingAction(stage);
    const two = await existingAction(stage, { dueOn: inDays(40) });
    const actions = [one, two].map(({ id }) => ({ actionId: id, version: 1 }));
    expect(await reDateActions({ actor: stage.house.manager, actions, dueOn: inDays(60), reason: 'Waiting for a dry week.' })).toBe(2);
    const [line] = await db.select().from(logEntries).where(and(eq(logEntries.subjectId, two.id), eq(logEntries.event, 'action.re-dated')));
    expect(line).toMatchObject({ reason: 'Waiting for a dry week.', before: { dueOn: inDays(40) }, after: { dueOn: inDays(60) } });
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, stage.owner.email))).toHaveLength(2);
  });

  test('one that is refused leaves all of them as they were', async () => {
    const stage = await actionStage();
    const open = await existingAction(stage);
    const done = await existingAction(stage, { state: 'done' });
    const actions = [open, done].map(({ id }) => ({ actionId: id, version: 1 }));
    await expect(reDateActions({ actor: stage.house.manager, actions, dueOn: inDays(60), reason: 'Later.' })).rejects.toMatchObject({ code: 'invalid-state' });
    expect((await readAction(open.id)).dueOn).toBe(open.dueOn);
    expect(await db.select().from(outbox).where(eq(outbox.caseId, stage.caseId))).toEqual([]);
  });

  test('nor does a row of another site slip in', async () => {
    const stage = await actionStage();
    const other = await actionStage();
    const mine = await existingAction(stage);
    const theirs = await existingAction(other);
    const actions = [mine, theirs].map(({ id }) => ({ actionId: id, version: 1 }));
    await expect(reDateActions({ actor: stage.house.manager, actions, dueOn: inDays(60), reason: 'Later.' })).rejects.toMatchObject({ code: 'not-found' });
    expect((await readAction(mine.id)).version).toBe(1);
  });

  test('a day that has passed is refused', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    await expect(reDateActions({ actor: stage.house.manager, actions: [{ actionId: id, version: 1 }], dueOn: inDays(-1), reason: 'Earlier.' })).rejects.toMatchObject({ fieldErrors: { dueOn: [expect.any(String)] } });
  });

  test('the owner does not move their own day', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    await expect(reDateActions({ actor: stage.owner, actions: [{ actionId: id, version: 1 }], dueOn: inDays(60), reason: 'Busy.' })).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('giving them away tells the new people, and never makes one person both', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    const heir = await createActor(stage.house.organisation.id);
    const give = (verifierId: string, version: number) => reassignActions({ actor: stage.house.manager, actions: [{ actionId: id, version }], ownerId: heir.userId, verifierId, reason: 'Left the site.' });
    await expect(give(heir.userId, 1)).rejects.toMatchObject({ fieldErrors: { verifierId: [expect.any(String)] } });
    await give(stage.verifier.userId, 1);
    expect(await readAction(id)).toMatchObject({ ownerId: heir.userId, verifierId: stage.verifier.userId, version: 2 });
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, heir.email))).toHaveLength(1);
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, stage.verifier.email))).toEqual([]);
  });

  test('a reminder pressed twice on one day is one mail, and both presses stand in the log', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    const press = () => remindOwners({ actor: stage.house.manager, actions: [{ actionId: id, version: 1 }] });
    await press();
    await press();
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, stage.owner.email))).toHaveLength(1);
    expect(await db.select().from(logEntries).where(and(eq(logEntries.subjectId, id), eq(logEntries.event, 'action.reminded')))).toHaveLength(2);
  });
});
