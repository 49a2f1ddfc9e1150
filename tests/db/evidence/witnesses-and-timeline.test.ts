import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { at, collected, document, evidenceStage, now } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { createPhoto } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getTimelinePage } from '#db/queries/timeline-page.server.ts';
import { getWitnessPage } from '#db/queries/witness-page.server.ts';
import { involvements, logEntries, witnessAccounts } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { TakeAccount } from '#app/domain/witness.ts';
import { addTimelineEvent, withdrawTimelineEvent } from '#app/services/timeline/timeline-events.server.ts';
import { addSignedCopy, takeAccount } from '#app/services/witnesses/take-account.server.ts';

let stage: EvidenceStage;
beforeEach(async () => {
  stage = await evidenceStage();
});

const account = (values: Partial<TakeAccount> = {}): TakeAccount => ({ clientId: randomUUID(), involvementId: null, personName: 'Perpetua Lindqvist', personRole: 'witness', ageBand: 'adult', language: 'English', words: 'I smelled something burnt.', readBack: true, signedAttachmentId: null, ...values });
const take = (values: Partial<TakeAccount> = {}, actor: Actor = stage.house.investigator) => takeAccount({ actor, caseNumber: stage.caseNumber, account: account(values), takenAt: at('2026-05-10T15:00:00Z'), speaksOfAt: at('2026-05-09T12:00:00Z'), now });
const page = (actor: Actor) => getWitnessPage(db, { actor, caseNumber: stage.caseNumber });

describe('an account of a witness', () => {
  test('is kept in the words of the person, who is a row apart; the log tells of neither', async () => {
    await take();
    const [row] = await db.select().from(witnessAccounts).where(eq(witnessAccounts.caseId, stage.caseId));
    expect(row).toMatchObject({ words: 'I smelled something burnt.', readBack: true, takenById: stage.house.investigator.userId });
    expect(JSON.stringify(row)).not.toContain('Lindqvist');
    const lines = JSON.stringify(await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId)));
    expect(lines).not.toMatch(/Lindqvist|smelled/u);
    expect(lines).toContain('witness.account-taken');
  });

  test('is read by those who may see personal fields, and not by the reporter, who sees the case', async () => {
    await take();
    const { investigator, reviewer, manager, privacyLead, reporter, administrator } = stage.house;
    for (const actor of [investigator, reviewer, manager, privacyLead]) expect((await page(actor))?.accounts).toMatchObject([{ witness: 'Witness A', person: 'Perpetua Lindqvist', words: 'I smelled something burnt.' }]);
    await expect(page(reporter)).rejects.toMatchObject({ code: 'forbidden' });
    expect(await page(administrator)).toBeNull();
  });

  test('is taken by an investigator only', async () => {
    const { reviewer, manager, privacyLead, reporter } = stage.house;
    for (const actor of [reviewer, manager, privacyLead, reporter]) await expect(take({}, actor)).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('keeps the letter of its person, and sent twice is one', async () => {
    await take();
    const [person] = await db.select().from(involvements).where(eq(involvements.caseId, stage.caseId));
    await take({ personName: 'Osric Vane' });
    const clientId = randomUUID();
    for (const _twice of [1, 2]) await take({ clientId, involvementId: person?.id ?? null, personName: '' });
    expect((await page(stage.house.reviewer))?.accounts.map((one) => one.witness)).toEqual(['Witness A', 'Witness B', 'Witness A']);
  });

  test('takes a signed copy among the personal documents of this case only', async () => {
    await take();
    const id = (await page(stage.house.investigator))?.accounts[0]?.id ?? '';
    const sign = (signedAttachmentId: string) => addSignedCopy({ actor: stage.house.investigator, caseNumber: stage.caseNumber, accountId: id, signedAttachmentId });
    await expect(sign((await document(stage)).attachmentId)).rejects.toMatchObject({ fieldErrors: { signedAttachmentId: [expect.stringContaining('personal document')] } });
    await expect(sign((await document(await evidenceStage(), { class: 'personal' })).attachmentId)).rejects.toMatchObject({ fieldErrors: { signedAttachmentId: [expect.stringContaining('of this case')] } });
    await sign((await document(stage, { class: 'personal', title: 'Signed account' })).attachmentId);
    expect((await page(stage.house.reviewer))?.heading).toBe('One account, read back and signed');
  });

  test('cannot be written over, not even past the services', async () => {
    await take();
    await expect(db.update(witnessAccounts).set({ words: 'Something else.' }).where(eq(witnessAccounts.caseId, stage.caseId))).rejects.toMatchObject({ cause: { message: expect.stringContaining('kept as it was taken') } });
  });
});

describe('the timeline', () => {
  const event = (clockErrorS: number, readingAt: Date, actor: Actor = stage.house.investigator) =>
    addTimelineEvent({ actor, caseNumber: stage.caseNumber, event: { clientId: randomUUID(), source: 'alarm-panel', sourceName: 'panel 4', clockErrorMin: clockErrorS, clockErrorBasis: 'compared with a phone', what: 'Smoke detector: alarm', attachmentId: null }, readingAt, now });
  const rows = async (actor: Actor = stage.house.reviewer) => (await getTimelinePage(db, { actor, caseNumber: stage.caseNumber }))?.rows ?? [];

  test('puts every source in the order of true time, with reading and correction', async () => {
    await event(360, at('2026-05-09T13:08:00Z'));
    await createPhoto({ caseId: stage.caseId, label: 1, takenAt: at('2026-05-09T13:01:00Z'), clockErrorS: -120 });
    await take();
    await collected(stage);
    const list = await rows();
    const about = (what: string) => list.find((row) => row.what.startsWith(what));
    // Europe/London is an hour ahead of UTC in May: 13:08 UTC less 6 min reads 14:02 on the wall.
    expect(about('Smoke detector')).toMatchObject({ reading: '14:08', correction: 'less 6 min', trueTime: '14:02' });
    expect(about('Photo taken')).toMatchObject({ reading: '14:01', correction: 'plus 2 min', trueTime: '14:03' });
    expect(about('The moment')).toMatchObject({ trueTime: '13:00', source: 'Witness A', reading: 'no clock read' });
    const order = list.map((row) => row.what);
    expect(order.indexOf('Smoke detector: alarm')).toBeLessThan(order.findIndex((what) => what.startsWith('Photo taken')));
    expect(order.findIndex((what) => what.startsWith('The moment'))).toBeLessThan(order.indexOf('Smoke detector: alarm'));
    expect(JSON.stringify(list)).not.toMatch(/Lindqvist|Ashgrove/u);
  });

  test('keeps a withdrawn event to be read, with its reason', async () => {
    await event(0, at('2026-05-09T13:00:00Z'));
    const [row] = (await rows()).filter((one) => one.eventId !== null);
    const withdraw = (actor: Actor) => withdrawTimelineEvent({ actor, caseNumber: stage.caseNumber, eventId: row?.eventId ?? '', reason: 'Read off the wrong line.', now });
    await expect(withdraw(stage.house.manager)).rejects.toMatchObject({ code: 'forbidden' });
    await withdraw(stage.house.investigator);
    await expect(withdraw(stage.house.investigator)).rejects.toMatchObject({ code: 'conflict' });
    expect((await rows()).find((one) => one.eventId === row?.eventId)).toMatchObject({ withdrawn: 'Read off the wrong line.' });
  });

  test('takes no event that with its clock error is still to come', async () => {
    await expect(event(-3_600, at('2026-06-01T11:30:00Z'))).rejects.toMatchObject({ fieldErrors: { readingAt: [expect.stringContaining('still to come')] } });
  });

  test('is not open to the reporter', async () => {
    await expect(rows(stage.house.reporter)).rejects.toMatchObject({ code: 'forbidden' });
  });
});
