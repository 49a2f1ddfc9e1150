import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { at, collected, document, evidenceStage, now } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { createCase } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getEvidencePage } from '#db/queries/evidence-page.server.ts';
import { listEvidence } from '#db/queries/evidence.server.ts';
import { evidenceExams, evidenceNotices, logEntries, noticeReplies, plannedExams } from '#db/schema/all.ts';
import type { RecordMade } from '#app/domain/evidence-form.ts';
import type { Actor } from '#app/domain/roles.ts';
import { cancelPlan, changePlan, planExam } from '#app/services/evidence/plan-exam.server.ts';
import { recordExam } from '#app/services/evidence/record-exam.server.ts';
import { recordMadeExam } from '#app/services/evidence/record-made-exam.server.ts';
import { recordAnswer, recordNotice } from '#app/services/evidence/record-notice.server.ts';

let stage: EvidenceStage;
beforeEach(async () => {
  stage = await evidenceStage();
  await collected(stage);
});

const where = (actor: Actor = stage.house.investigator) => ({ actor, caseNumber: stage.caseNumber, label: 1, now });
const later = at('2026-07-01T12:00:00Z');
const plannedAt = at('2026-06-20T10:00:00Z');
const planForm = (values: Partial<Parameters<typeof planExam>[0]['plan']> = {}) => ({ clientId: randomUUID(), method: 'A section of 2 mm', performedBy: 'Laboratory Fennimore', tellRoles: ['owner' as const, 'maker' as const], waitingDays: 10, protocolAttachmentId: null, ...values });
const plan = (values: Parameters<typeof planForm>[0] = {}, actor?: Actor) => planExam({ ...where(actor), plan: planForm(values), plannedAt });
const whole = async () => {
  const [one] = await listEvidence(db, { actor: stage.house.reviewer, caseNumber: stage.caseNumber });
  if (!one) throw new Error('There is no item.');
  return one;
};
const firstPlan = async () => {
  const [one] = (await whole()).plans;
  if (!one) throw new Error('Nothing is planned.');
  return one;
};
const tell = async (partyRole: 'owner' | 'maker' | 'insurer', sentAt: Date, planId: string | null) => {
  const clientId = randomUUID();
  await recordNotice({ ...where(), notice: { clientId, planId, partyRole, toWhom: 'Linnea Aust', way: 'letter' }, sentAt });
  const found = (await whole()).notices.find((notice) => notice.clientId === clientId);
  if (!found) throw new Error('The notice is not there.');
  return found.id;
};
const reply = (noticeId: string, answer: 'agrees' | 'objects', answeredAt: Date, clientId = randomUUID()) => recordAnswer({ ...where(), reply: { clientId, noticeId, answer, note: '' }, answeredAt });
const made = async (values: Partial<RecordMade> = {}, performedAt = plannedAt, actor?: Actor) =>
  recordMadeExam({ ...where(actor), made: { planId: (await firstPlan()).id, clientId: randomUUID(), performedBy: 'Laboratory Fennimore', result: 'Charred through', protocolAttachmentId: null, wentAheadReason: '', ...values }, performedAt, now: later });
const events = async () => (await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId)).orderBy(logEntries.sequence)).map((line) => line.event);

describe('a plan', () => {
  test('is kept once however often it is sent, with a log line that names nobody', async () => {
    const form = planForm();
    await Promise.all([planExam({ ...where(), plan: form, plannedAt }), planExam({ ...where(), plan: form, plannedAt })]);
    expect((await whole()).plans).toHaveLength(1);
    expect(await events()).toEqual(['evidence.collected', 'evidence.exam-planned']);
    expect(JSON.stringify(await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId)))).not.toContain('Fennimore');
  });

  test('is made by an investigator and by nobody else', async () => {
    const { reviewer, manager, privacyLead, reporter, administrator } = stage.house;
    for (const actor of [reviewer, manager, privacyLead, reporter]) await expect(plan({}, actor)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(plan({}, administrator)).rejects.toMatchObject({ code: 'not-found' });
    await plan();
    for (const actor of [reviewer, manager]) await expect(made({}, plannedAt, actor)).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('for a day that has passed, or with a protocol of another case, is refused beside the field', async () => {
    await expect(planExam({ ...where(), plan: planForm(), plannedAt: now })).rejects.toMatchObject({ fieldErrors: { plannedAt: [expect.stringContaining('has passed')] } });
    const foreign = await document({ ...stage, caseNumber: (await createCase('investigation', { site: stage.house.site })).number });
    await expect(plan({ protocolAttachmentId: foreign.attachmentId })).rejects.toMatchObject({ fieldErrors: { protocolAttachmentId: [expect.stringContaining('of this case')] } });
  });

  test('is changed by one person at a time, and what is to be done stays', async () => {
    await plan();
    const { id } = await firstPlan();
    const change = (revision: number, day: Date) => changePlan({ ...where(), change: { planId: id, revision, tellRoles: ['owner'], waitingDays: 3, protocolAttachmentId: null }, plannedAt: day });
    await change(1, at('2026-06-25T10:00:00Z'));
    await change(1, at('2026-06-25T10:00:00Z'));
    await expect(change(1, at('2026-06-26T10:00:00Z'))).rejects.toMatchObject({ code: 'conflict' });
    expect(await firstPlan()).toMatchObject({ revision: 2, waitingDays: 3, tellRoles: ['owner'], plannedAt: at('2026-06-25T10:00:00Z') });
    expect((await events()).filter((event) => event === 'evidence.exam-plan-changed')).toHaveLength(1);
    await expect(db.update(plannedExams).set({ method: 'Burn it' }).where(eq(plannedExams.id, id))).rejects.toMatchObject({ cause: { message: expect.stringContaining('stays as planned') } });
  });

  test('is cancelled with a reason, once', async () => {
    await plan();
    const { id } = await firstPlan();
    const cancel = (cancelReason: string) => cancelPlan({ ...where(), cancel: { planId: id, cancelReason } });
    await cancel('The maker gave the index.');
    await cancel('The maker gave the index.');
    await expect(cancel('Another reason.')).rejects.toMatchObject({ code: 'conflict' });
    await expect(made()).rejects.toMatchObject({ code: 'conflict' });
    expect(await firstPlan()).toMatchObject({ outcome: 'cancelled', cancelReason: 'The maker gave the index.' });
    expect((await events()).filter((event) => event === 'evidence.exam-plan-cancelled')).toHaveLength(1);
  });
});

describe('notices', () => {
  test('and answers are added once however often they are sent, and never changed', async () => {
    await plan();
    const planId = (await firstPlan()).id;
    const form = { clientId: randomUUID(), planId, partyRole: 'owner' as const, toWhom: 'Linnea Aust', way: 'email' as const };
    const send = () => recordNotice({ ...where(), notice: form, sentAt: at('2026-05-20T08:00:00Z') });
    await Promise.all([send(), send()]);
    const [notice] = (await whole()).notices;
    if (!notice) throw new Error('The notice is not there.');
    const clientId = randomUUID();
    await reply(notice.id, 'objects', at('2026-05-21T08:00:00Z'), clientId);
    await reply(notice.id, 'objects', at('2026-05-21T08:00:00Z'), clientId);
    expect((await whole()).notices).toMatchObject([{ partyRole: 'owner', planId, answers: [{ answer: 'objects' }] }]);
    expect((await events()).slice(-2)).toEqual(['evidence.notice-recorded', 'evidence.notice-answered']);
    expect(JSON.stringify(await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId)))).not.toContain('Aust');
    await expect(db.update(evidenceNotices).set({ toWhom: 'Somebody else' }).where(eq(evidenceNotices.id, notice.id))).rejects.toMatchObject({ cause: { message: expect.stringContaining('only ever added') } });
    await expect(db.delete(noticeReplies).where(eq(noticeReplies.noticeId, notice.id))).rejects.toMatchObject({ cause: { message: expect.stringContaining('only ever added') } });
  });

  test('of tomorrow, answers before their notice, and strangers are refused', async () => {
    const id = await tell('owner', at('2026-05-20T08:00:00Z'), null);
    await expect(tell('owner', at('2026-06-01T12:01:00Z'), null)).rejects.toMatchObject({ fieldErrors: { sentAt: [expect.stringContaining('still to come')] } });
    await expect(reply(id, 'agrees', at('2026-05-20T07:59:00Z'))).rejects.toMatchObject({ fieldErrors: { answeredAt: [expect.stringContaining('after the notice')] } });
    await expect(reply(randomUUID(), 'agrees', now)).rejects.toMatchObject({ code: 'not-found' });
    await expect(tell('owner', at('2026-05-20T08:00:00Z'), randomUUID())).rejects.toMatchObject({ code: 'not-found' });
    await expect(recordNotice({ ...where(stage.house.manager), notice: { clientId: randomUUID(), planId: null, partyRole: 'owner', toWhom: 'Linnea Aust', way: 'letter' }, sentAt: now })).rejects.toMatchObject({ code: 'forbidden' });
    await expect(recordAnswer({ ...where(stage.house.reviewer), reply: { clientId: randomUUID(), noticeId: id, answer: 'agrees', note: '' }, answeredAt: now })).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('stand in the log of the case by part, without the person', async () => {
    await tell('owner', at('2026-05-20T08:00:00Z'), null);
    const page = await getEvidencePage(db, { actor: stage.house.reviewer, caseNumber: stage.caseNumber, now });
    expect(page?.notices).toMatchObject([{ role: 'Owner', about: 'the item', answer: null }]);
  });
});

describe('a planned examination', () => {
  const protocolOf = async () => (await document(stage)).attachmentId;

  test('is not made without notice and protocol, and carries both once it is', async () => {
    await plan();
    await expect(made({ wentAheadReason: 'It had to be.' })).rejects.toMatchObject({ fieldErrors: { performedAt: [expect.stringContaining('No notice')], protocolAttachmentId: [expect.any(String)] } });
    const { id } = await firstPlan();
    await tell('owner', at('2026-05-20T08:00:00Z'), id);
    await tell('maker', at('2026-05-21T08:00:00Z'), id);
    const clientId = randomUUID();
    const protocolAttachmentId = await protocolOf();
    await made({ clientId, protocolAttachmentId });
    await made({ clientId, protocolAttachmentId });
    const { exams, plans } = await whole();
    expect(exams).toMatchObject([{ kind: 'may-alter', method: 'A section of 2 mm', performedAt: plannedAt, noticeTo: 'owner, maker', noticeAt: at('2026-05-21T08:00:00Z'), protocolAttachmentId, wentAheadReason: '' }]);
    expect(plans).toMatchObject([{ outcome: 'made', examId: exams[0]?.id }]);
    await expect(made({ protocolAttachmentId })).rejects.toMatchObject({ code: 'conflict' });
    expect((await events()).filter((event) => event === 'evidence.examined')).toHaveLength(1);
  });

  test('is held up by an objection until the party agrees or the recorder says why it went ahead', async () => {
    await plan({ tellRoles: ['owner'] });
    const { id } = await firstPlan();
    const notice = await tell('owner', at('2026-05-20T08:00:00Z'), id);
    await reply(notice, 'objects', at('2026-05-22T08:00:00Z'));
    const protocolAttachmentId = await protocolOf();
    await expect(made({ protocolAttachmentId })).rejects.toMatchObject({ fieldErrors: { wentAheadReason: [expect.stringContaining('objects: owner')] } });
    expect(await db.select().from(evidenceExams).where(eq(evidenceExams.itemId, (await whole()).item.id))).toEqual([]);
    await made({ protocolAttachmentId, wentAheadReason: 'Ordered by the court.' });
    expect((await whole()).exams).toMatchObject([{ wentAheadReason: 'Ordered by the court.' }]);
  });

  test('goes ahead without a reason once the objection is answered by agreement', async () => {
    await plan({ tellRoles: ['owner'] });
    const notice = await tell('owner', at('2026-05-20T08:00:00Z'), (await firstPlan()).id);
    await reply(notice, 'objects', at('2026-05-22T08:00:00Z'));
    await reply(notice, 'agrees', at('2026-05-28T08:00:00Z'));
    await made({ protocolAttachmentId: await protocolOf() });
    expect((await whole()).notices[0]?.answers.map((one) => one.answer)).toEqual(['objects', 'agrees']);
  });
});

describe('an examination that nobody planned', () => {
  const exam = async (examKind: 'may-alter' | 'visual', wentAheadReason: string, protocolAttachmentId: string | null) =>
    recordExam({ ...where(), exam: { clientId: randomUUID(), examKind, method: 'A section of 2 mm', result: 'Charred through', performedBy: 'Laboratory Fennimore', noticeTo: 'owner', protocolAttachmentId, wentAheadReason }, performedAt: at('2026-05-30T10:00:00Z'), noticeAt: at('2026-05-20T08:00:00Z') });

  test('meets the same objection, whether to the item or to what is planned; looking is free', async () => {
    await plan();
    const notice = await tell('owner', at('2026-05-20T08:00:00Z'), (await firstPlan()).id);
    await reply(notice, 'objects', at('2026-05-22T08:00:00Z'));
    const { attachmentId } = await document(stage);
    await expect(exam('may-alter', '', attachmentId)).rejects.toMatchObject({ fieldErrors: { wentAheadReason: [expect.any(String)] } });
    await exam('visual', '', null);
    await exam('may-alter', 'The bag had begun to rot.', attachmentId);
    expect((await whole()).exams.map((one) => one.kind).toSorted()).toEqual(['may-alter', 'visual']);
  });

  test('is not held up by an objection to a plan that was cancelled', async () => {
    await plan();
    const { id } = await firstPlan();
    await reply(await tell('owner', at('2026-05-20T08:00:00Z'), id), 'objects', at('2026-05-22T08:00:00Z'));
    await cancelPlan({ ...where(), cancel: { planId: id, cancelReason: 'The owner objects.' } });
    await exam('may-alter', '', (await document(stage)).attachmentId);
  });
});
