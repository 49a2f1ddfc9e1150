import { and, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { actionDraft, actionStage, existingAction, inDays, jpeg, readAction, today } from './stage.ts';
import { createAction, createHouse } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { actionProofs, correctiveActions, logEntries, outbox } from '#db/schema/all.ts';
import { addAction } from '#app/services/corrective-actions/add-action.server.ts';
import { completeAction } from '#app/services/corrective-actions/complete-action.server.ts';
import { startAction } from '#app/services/corrective-actions/start-action.server.ts';
import { sendActionBack, verifyAction } from '#app/services/corrective-actions/verify-action.server.ts';
import { withdrawAction } from '#app/services/corrective-actions/withdraw-action.server.ts';

const logOf = (actionId: string) => db.select().from(logEntries).where(and(eq(logEntries.subject, 'corrective_actions'), eq(logEntries.subjectId, actionId))).orderBy(logEntries.sequence);

describe('giving an action', () => {
  test('numbers it within the case, dates it by its risk, and tells owner and verifier', async () => {
    const stage = await actionStage();
    const first = await addAction({ actor: stage.house.manager, caseNumber: stage.caseNumber, draft: actionDraft(stage) });
    const second = await addAction({ actor: stage.house.manager, caseNumber: stage.caseNumber, draft: actionDraft(stage, { risk: 'high' }) });
    expect([first.number, second.number]).toEqual([1, 2]);
    // The default clocks by risk: medium 30 days, high 7.
    expect((await readAction(first.actionId)).dueOn).toBe(inDays(30));
    expect((await readAction(second.actionId)).dueOn).toBe(inDays(7));
    const mails = await db.select().from(outbox).where(eq(outbox.caseId, stage.caseId));
    expect(mails.map((mail) => mail.toAddress).sort()).toEqual([stage.owner.email, stage.owner.email, stage.verifier.email, stage.verifier.email].sort());
    expect(mails.every((mail) => !mail.subject.includes('parapet'))).toBe(true);
    expect(await logOf(first.actionId)).toMatchObject([{ event: 'action.given', actorId: stage.house.manager.userId }]);
  });

  test('the same person as owner and verifier is refused by the service, beside the field', async () => {
    const stage = await actionStage();
    const giving = addAction({ actor: stage.house.manager, caseNumber: stage.caseNumber, draft: actionDraft(stage, { verifierId: stage.owner.userId }) });
    await expect(giving).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { verifierId: [expect.stringContaining('nobody verifies their own fix')] } });
  });

  test('and by the table', async () => {
    const stage = await actionStage();
    const writing = createAction({ caseId: stage.caseId, ownerId: stage.owner.userId, verifierId: stage.owner.userId });
    await expect(writing).rejects.toMatchObject({ cause: { constraint_name: 'corrective_actions_verifier_not_owner' } });
  });

  test('a day that has passed, and an owner of another organisation, are refused beside their fields', async () => {
    const stage = await actionStage();
    const give = (values: Parameters<typeof actionDraft>[1]) => addAction({ actor: stage.house.manager, caseNumber: stage.caseNumber, draft: actionDraft(stage, values) });
    await expect(give({ dueOn: inDays(-1) })).rejects.toMatchObject({ fieldErrors: { dueOn: [expect.stringContaining('has passed')] } });
    await expect(give({ ownerId: (await createHouse()).reporter.userId })).rejects.toMatchObject({ fieldErrors: { ownerId: [expect.any(String)] } });
  });

  test.each([
    ['reviewer', 'forbidden'],
    ['privacyLead', 'forbidden'],
    ['reporter', 'not-found'],
  ] as const)('the %s may not give one', async (who, code) => {
    const stage = await actionStage();
    await expect(addAction({ actor: stage.house[who], caseNumber: stage.caseNumber, draft: actionDraft(stage) })).rejects.toMatchObject({ code });
  });

  test('nobody gives one on a closed case', async () => {
    const stage = await actionStage([], 'closed');
    await expect(addAction({ actor: stage.house.manager, caseNumber: stage.caseNumber, draft: actionDraft(stage) })).rejects.toMatchObject({ code: 'forbidden' });
  });
});

describe('doing it', () => {
  test('the owner starts it and marks it done with a sentence and a file; the verifier is told', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    await startAction({ actor: stage.owner, actionId: id, version: 1 });
    await completeAction({ actor: stage.owner, actionId: id, version: 2, note: 'Coated on both faces.', files: [jpeg()] });
    expect(await readAction(id)).toMatchObject({ state: 'done', proof: 'Coated on both faces.', doneById: stage.owner.userId, version: 3 });
    expect(await db.select().from(actionProofs).where(eq(actionProofs.correctiveActionId, id))).toMatchObject([{ fileName: 'parapet.jpg', mime: 'image/jpeg' }]);
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, stage.verifier.email))).toHaveLength(1);
    expect((await logOf(id)).map((line) => line.event)).toEqual(['action.started', 'action.done']);
  });

  test('without a file it is not done', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    const done = completeAction({ actor: stage.owner, actionId: id, version: 1, note: 'Coated.', files: [] });
    await expect(done).rejects.toMatchObject({ fieldErrors: { files: [expect.stringContaining('photo or a document')] } });
    expect((await readAction(id)).state).toBe('open');
  });

  test('the owner of another action of the same case does not do this one', async () => {
    const stage = await actionStage();
    const other = await createAction({ caseId: stage.caseId, ownerId: stage.verifier.userId, verifierId: stage.house.reviewer.userId });
    const { id } = await existingAction(stage);
    // The verifier sees the action, and owns another one of the case.
    await expect(startAction({ actor: stage.verifier, actionId: id, version: 1 })).rejects.toMatchObject({ code: 'forbidden' });
    await expect(startAction({ actor: stage.owner, actionId: other.id, version: 1 })).rejects.toMatchObject({ code: 'not-found' });
  });

  test('a step taken on an older copy is a conflict, and a step taken twice is refused', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    await startAction({ actor: stage.owner, actionId: id, version: 1 });
    await expect(startAction({ actor: stage.owner, actionId: id, version: 1 })).rejects.toMatchObject({ code: 'conflict' });
    await expect(startAction({ actor: stage.owner, actionId: id, version: 2 })).rejects.toMatchObject({ code: 'invalid-state' });
  });
});

describe('verifying it', () => {
  test('the owner does not, whatever their role', async () => {
    const stage = await actionStage();
    const action = await createAction({ caseId: stage.caseId, ownerId: stage.house.manager.userId, verifierId: stage.verifier.userId, state: 'done' });
    await expect(verifyAction({ actor: stage.house.manager, actionId: action.id, version: 1, note: 'Seen.', effectCheckOn: null })).rejects.toMatchObject({ code: 'forbidden' });
    const forced = db.update(correctiveActions).set({ verifiedById: stage.house.manager.userId }).where(eq(correctiveActions.id, action.id));
    await expect(forced).rejects.toMatchObject({ cause: { constraint_name: 'corrective_actions_verified_by_other' } });
  });

  test('whoever marked it done for the owner does not verify it either, by the service and by the table', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage);
    await completeAction({ actor: stage.house.manager, actionId: id, version: 1, note: 'Coated.', files: [jpeg()] });
    await expect(verifyAction({ actor: stage.house.manager, actionId: id, version: 2, note: 'Seen.', effectCheckOn: null })).rejects.toMatchObject({ code: 'forbidden', message: expect.stringContaining('yourself') });
    const forced = db.update(correctiveActions).set({ verifiedById: stage.house.manager.userId }).where(eq(correctiveActions.id, id));
    await expect(forced).rejects.toMatchObject({ cause: { constraint_name: 'corrective_actions_verified_by_not_doer' } });
  });

  test('puts the check on the first day of return that is not past', async () => {
    const stage = await actionStage([inDays(-3), inDays(12), inDays(40)]);
    const { id } = await existingAction(stage, { state: 'done' });
    await verifyAction({ actor: stage.verifier, actionId: id, version: 1, note: 'Seen on the roof.', effectCheckOn: null });
    expect(await readAction(id)).toMatchObject({ state: 'verified', verifiedById: stage.verifier.userId, effectCheckOn: inDays(12) });
  });

  test('a check planned before that day is refused, a later one is taken', async () => {
    const stage = await actionStage([inDays(12)]);
    const { id } = await existingAction(stage, { state: 'done' });
    const verify = (effectCheckOn: string) => verifyAction({ actor: stage.verifier, actionId: id, version: 1, note: 'Seen.', effectCheckOn });
    await expect(verify(inDays(5))).rejects.toMatchObject({ fieldErrors: { effectCheckOn: [expect.stringContaining('first back on')] } });
    await verify(inDays(13));
    expect((await readAction(id)).effectCheckOn).toBe(inDays(13));
  });

  test('the verifier may send it back with a sentence, and it is the owner’s again', async () => {
    const stage = await actionStage();
    const { id } = await existingAction(stage, { state: 'done' });
    await sendActionBack({ actor: stage.verifier, actionId: id, version: 1, note: 'The inner face is still bright.' });
    expect(await readAction(id)).toMatchObject({ state: 'in-progress', doneAt: null });
    expect(await logOf(id)).toMatchObject([{ event: 'action.sent-back', reason: 'The inner face is still bright.' }]);
    expect(await db.select().from(outbox).where(eq(outbox.toAddress, stage.owner.email))).toHaveLength(1);
  });
});

test('withdrawing keeps the reason, and the owner alone cannot do it', async () => {
  const stage = await actionStage();
  const { id } = await existingAction(stage, { dueOn: today() });
  await expect(withdrawAction({ actor: stage.owner, actionId: id, version: 1, reason: 'Not needed.' })).rejects.toMatchObject({ code: 'forbidden' });
  await withdrawAction({ actor: stage.house.investigator, actionId: id, version: 1, reason: 'The parapet was taken down.' });
  expect(await readAction(id)).toMatchObject({ state: 'withdrawn', withdrawnReason: 'The parapet was taken down.' });
});
