import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { actionStage, existingAction, inDays, readAction } from './stage.ts';
import type { ActionStage } from './stage.ts';
import { createAction } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { outbox } from '#db/schema/all.ts';
import { checkEffect } from '#app/services/corrective-actions/check-effect.server.ts';
import { verifyAction } from '#app/services/corrective-actions/verify-action.server.ts';

/** Verified now, so that only days from today on can show anything. */
async function verified(stage: ActionStage): Promise<string> {
  const { id } = await existingAction(stage, { state: 'done' });
  await verifyAction({ actor: stage.verifier, actionId: id, version: 1, note: 'In place.', effectCheckOn: null });
  return id;
}

const record = (stage: ActionStage, actionId: string, values: { effective: boolean; reason?: string; version?: number }) =>
  checkEffect({ actor: stage.house.reviewer, actionId, version: values.version ?? 2, effective: values.effective, note: 'No bright band on the roof at noon.', reason: values.reason ?? '', files: [] });

describe('the effectiveness check', () => {
  test('cannot say "effective" before the sun has been back, unless it says why', async () => {
    const stage = await actionStage([inDays(10)]);
    const id = await verified(stage);
    await expect(record(stage, id, { effective: true })).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { reason: [expect.stringContaining('first return is on')] } });
    expect((await readAction(id)).state).toBe('verified');
    await record(stage, id, { effective: true, reason: 'The parapet was removed altogether.' });
    expect(await readAction(id)).toMatchObject({ state: 'effective', effectById: stage.house.reviewer.userId });
  });

  test('may say it on the day of return itself, and where no return is known', async () => {
    for (const days of [[inDays(0), inDays(90)], []]) {
      const stage = await actionStage(days);
      const id = await verified(stage);
      await record(stage, id, { effective: true });
      expect((await readAction(id)).state).toBe('effective');
    }
  });

  test('may say "not effective" at any time, which tells owner, investigator and managers', async () => {
    const stage = await actionStage([inDays(10)]);
    const id = await verified(stage);
    await record(stage, id, { effective: false });
    expect((await readAction(id)).state).toBe('not-effective');
    const mails = (await db.select().from(outbox).where(eq(outbox.caseId, stage.caseId))).filter((mail) => mail.subject.includes('did not work'));
    expect(mails.map((mail) => mail.toAddress).sort()).toEqual([stage.owner.email, stage.house.investigator.email, stage.house.manager.email].sort());
  });

  test('a fix once shown effective can still be found not to work', async () => {
    const stage = await actionStage([inDays(0)]);
    const id = await verified(stage);
    await record(stage, id, { effective: true });
    await record(stage, id, { effective: false, version: 3 });
    expect((await readAction(id)).state).toBe('not-effective');
  });

  test('is not open to the owner, nor to a person whose only part is to verify', async () => {
    const stage = await actionStage([inDays(0)]);
    const owned = await createAction({ caseId: stage.caseId, ownerId: stage.house.manager.userId, verifierId: stage.verifier.userId, state: 'verified' });
    for (const actor of [stage.house.manager, stage.verifier]) {
      const checking = checkEffect({ actor, actionId: owned.id, version: 1, effective: true, note: 'Fine.', reason: '', files: [] });
      await expect(checking).rejects.toMatchObject({ code: 'forbidden' });
    }
  });
});
