import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { cases, findings, logEntries, outbox } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';
import { actorOf, createAction, createUser } from '#tests/support/factories.ts';
import { caseInReview, caseVersion } from './stage.ts';

type InReview = Awaited<ReturnType<typeof caseInReview>>;

const move = async (stage: InReview, moveId: string, actor: Actor, reason = 'The lamp was taken down on the day.') => moveCase({ actor, caseNumber: stage.caseNumber, moveId, version: await caseVersion(stage.caseId), reason });
const stored = async (stage: InReview) => (await db.select().from(cases).where(eq(cases.id, stage.caseId)))[0];

async function signedWithoutAction(): Promise<InReview> {
  const stage = await caseInReview();
  await showOpinion({ actor: stage.house.reviewer, caseNumber: stage.caseNumber });
  await move(stage, 'sign-no-action', stage.house.reviewer);
  return stage;
}

describe('a finding without an action', () => {
  test('is signed and frozen by the reviewer, stays where it is, and tells the managers, who are two people with the reviewer', async () => {
    const stage = await signedWithoutAction();
    expect(await stored(stage)).toMatchObject({ state: 'findings', noActionReason: 'The lamp was taken down on the day.' });
    const [finding] = await db.select().from(findings).where(eq(findings.id, stage.findingId));
    expect(finding).toMatchObject({ state: 'signed', reviewerId: stage.house.reviewer.userId });
    expect(finding?.frozenHash).toMatch(/^[0-9a-f]{64}$/u);
    const mails = await db.select().from(outbox).where(eq(outbox.caseId, stage.caseId));
    expect(mails).toMatchObject([{ toAddress: stage.house.manager.email, subject: `Case ${stage.caseNumber}: signed, no action needed` }]);
  });

  test('needs a reason, and that the reviewer has read the opinion', async () => {
    const stage = await caseInReview();
    await expect(move(stage, 'sign-no-action', stage.house.reviewer, ' ')).rejects.toMatchObject({ fieldErrors: { reason: [expect.stringContaining('Say why')] } });
    await expect(move(stage, 'sign-no-action', stage.house.reviewer)).rejects.toMatchObject({ needs: [expect.stringContaining('show the opinion')] });
    expect((await stored(stage))?.noActionReason).toBeNull();
  });

  test('is closed by the site manager with a reason, which both stand in the log', async () => {
    const stage = await signedWithoutAction();
    await expect(move(stage, 'close-no-action', stage.house.manager, '')).rejects.toMatchObject({ fieldErrors: { reason: [expect.any(String)] } });
    expect(await move(stage, 'close-no-action', stage.house.manager, 'Agreed on site.')).toMatchObject({ state: 'closed' });
    expect((await stored(stage))?.closedAt).toBeInstanceOf(Date);
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId)).orderBy(logEntries.sequence);
    expect(lines.at(-1)).toMatchObject({ event: 'case.closed-no-action', reason: 'Agreed on site.', summary: expect.stringContaining('The lamp was taken down'), before: { state: 'findings' }, after: { state: 'closed' } });
  });

  test('is not closed before the reviewer has signed that nothing is to be done, nor while an action is open or the hazard is there', async () => {
    const stage = await caseInReview();
    await expect(move(stage, 'close-no-action', stage.house.manager)).rejects.toMatchObject({ code: 'invalid-state', needs: [expect.stringContaining('signs the finding first'), expect.stringContaining('no action is needed, and why')] });
    const ready = await signedWithoutAction();
    await createAction({ caseId: ready.caseId, ownerId: ready.house.manager.userId, verifierId: ready.house.reviewer.userId });
    await db.update(cases).set({ hazardStillPresent: 'yes' }).where(eq(cases.id, ready.caseId));
    await expect(move(ready, 'close-no-action', ready.house.manager)).rejects.toMatchObject({ needs: [expect.stringContaining('1 still open'), expect.stringContaining('hazard is still there')] });
  });

  test('is closed by somebody else than the one who signed, and by no investigator', async () => {
    const stage = await caseInReview();
    const both = await actorOf(await createUser({ organisationId: stage.house.organisation.id, grants: ['reviewer', 'manager'] }));
    await showOpinion({ actor: both, caseNumber: stage.caseNumber });
    await move(stage, 'sign-no-action', both);
    await expect(move(stage, 'close-no-action', both)).rejects.toMatchObject({ code: 'forbidden', message: expect.stringContaining('You signed') });
    await expect(move(stage, 'close-no-action', stage.house.investigator)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(move(stage, 'close-no-action', stage.house.reviewer)).rejects.toMatchObject({ code: 'forbidden' });
    expect(await move(stage, 'close-no-action', stage.house.manager)).toMatchObject({ state: 'closed' });
  });

  test('of high risk is closed only by a manager of every site', async () => {
    const stage = await signedWithoutAction();
    await db.update(cases).set({ risk: 'high' }).where(eq(cases.id, stage.caseId));
    const local = await actorOf(await createUser({ organisationId: stage.house.organisation.id, grants: [{ role: 'manager', siteId: stage.house.site.id }] }));
    await expect(move(stage, 'close-no-action', local)).rejects.toMatchObject({ code: 'forbidden', message: expect.stringContaining('every site') });
  });

  test('can be passed to action after all, once it is signed, and is not signed twice', async () => {
    const waiting = await caseInReview();
    await expect(move(waiting, 'pass-to-action', waiting.house.manager)).rejects.toMatchObject({ needs: [expect.stringContaining('signs the finding first')] });
    const stage = await signedWithoutAction();
    await expect(move(stage, 'sign', stage.house.reviewer)).rejects.toMatchObject({ needs: [expect.stringContaining('signed already')] });
    expect(await move(stage, 'pass-to-action', stage.house.manager, 'A shade is wanted as well.')).toMatchObject({ state: 'corrective-action' });
  });

  test('forgets the word on action when the case is reopened', async () => {
    const stage = await signedWithoutAction();
    await move(stage, 'close-no-action', stage.house.manager);
    await move(stage, 'reopen-investigation', stage.house.reviewer, 'The mark is back.');
    expect(await stored(stage)).toMatchObject({ state: 'investigation', noActionReason: null, reopenCount: 1, closedAt: null });
  });
});
