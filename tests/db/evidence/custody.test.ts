import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { at, collected, collectedAt, document, evidenceStage, handOverForm, itemForm, now } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { createCase } from '#tests/support/factories.ts';
import { db, inTransaction } from '#db/client.server.ts';
import { getEvidencePage } from '#db/queries/evidence-page.server.ts';
import { listEvidence } from '#db/queries/evidence.server.ts';
import { cases, custodyRecords, evidenceExams, evidenceItems, logEntries } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { collectItem } from '#app/services/evidence/collect-item.server.ts';
import { decideDisposal } from '#app/services/evidence/decide-disposal.server.ts';
import { handOverItem } from '#app/services/evidence/hand-over.server.ts';
import { recordExam } from '#app/services/evidence/record-exam.server.ts';

let stage: EvidenceStage;
beforeEach(async () => {
  stage = await evidenceStage();
});

const chain = async () => (await listEvidence(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber }))[0]?.custody ?? [];
const handOver = (values: Parameters<typeof handOverForm>[0], handedAt: Date, actor: Actor = stage.house.investigator) => handOverItem({ actor, caseNumber: stage.caseNumber, label: 1, handOver: handOverForm(values), handedAt, now });
const collect = (actor: Actor) => collectItem({ actor, caseNumber: stage.caseNumber, item: itemForm(), collectedAt, now });

describe('an item', () => {
  test('has a label, a first holder from the moment of collection, and a log line without a name', async () => {
    expect(await collected(stage)).toEqual({ label: 1 });
    expect(await collected(stage)).toEqual({ label: 2 });
    expect(await chain()).toMatchObject([{ sequence: 1, holderRole: 'investigator', fromAt: collectedAt, toAt: null }]);
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId));
    expect(lines.map((line) => line.event)).toEqual(['evidence.collected', 'evidence.collected']);
    expect(JSON.stringify(lines)).not.toContain('Ashgrove');
  });

  test('sent twice by a phone that lost the answer is one item', async () => {
    const item = itemForm();
    const send = () => collectItem({ actor: stage.house.investigator, caseNumber: stage.caseNumber, item, collectedAt, now });
    expect(await Promise.all([send(), send()])).toEqual([{ label: 1 }, { label: 1 }]);
    expect(await db.select().from(evidenceItems).where(eq(evidenceItems.caseId, stage.caseId))).toHaveLength(1);
  });

  test('is recorded by an investigator and by nobody else', async () => {
    const { reviewer, manager, privacyLead, administrator, reporter } = stage.house;
    for (const actor of [reviewer, manager, privacyLead, reporter]) await expect(collect(actor)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(collect(administrator)).rejects.toMatchObject({ code: 'not-found' });
    await expect(collect((await evidenceStage()).house.investigator)).rejects.toMatchObject({ code: 'not-found' });
  });

  test('is not open to the reporter of the case, and is to those who work on it', async () => {
    await collected(stage);
    await expect(getEvidencePage(db, { actor: stage.house.reporter, caseNumber: stage.caseNumber, now })).rejects.toMatchObject({ code: 'forbidden' });
    for (const actor of [stage.house.investigator, stage.house.reviewer, stage.house.manager, stage.house.privacyLead]) expect((await getEvidencePage(db, { actor, caseNumber: stage.caseNumber, now }))?.items).toHaveLength(1);
    expect(await getEvidencePage(db, { actor: stage.house.administrator, caseNumber: stage.caseNumber, now })).toBeNull();
  });

  test('cannot have been collected tomorrow', async () => {
    await expect(collectItem({ actor: stage.house.investigator, caseNumber: stage.caseNumber, item: itemForm(), collectedAt: at('2026-06-02T12:00:00Z'), now })).rejects.toMatchObject({ fieldErrors: { collectedAt: [expect.stringContaining('still to come')] } });
  });
});

describe('a hand-over', () => {
  test('ends one record and begins the next at the same instant', async () => {
    await collected(stage);
    await handOver({}, at('2026-05-12T08:30:00Z'));
    await handOver({ sequence: 2, holderRole: 'store', holderName: 'Store Quay', givenBy: 'Fennimore, reception', receivedBy: 'Store Quay' }, at('2026-05-20T16:00:00Z'));
    const records = await chain();
    expect(records.map((record) => [record.sequence, record.fromAt.toISOString(), record.toAt?.toISOString() ?? null])).toEqual([
      [1, '2026-05-10T09:00:00.000Z', '2026-05-12T08:30:00.000Z'],
      [2, '2026-05-12T08:30:00.000Z', '2026-05-20T16:00:00.000Z'],
      [3, '2026-05-20T16:00:00.000Z', null],
    ]);
  });

  test('before the last one, or in the future, is refused beside the field', async () => {
    await collected(stage);
    await expect(handOver({}, collectedAt)).rejects.toMatchObject({ fieldErrors: { handedAt: [expect.stringContaining('after the one before')] } });
    await expect(handOver({}, at('2026-06-01T12:01:00Z'))).rejects.toMatchObject({ fieldErrors: { handedAt: [expect.stringContaining('still to come')] } });
  });

  test('from a page that is out of date is a conflict, and sent twice it is one', async () => {
    await collected(stage);
    const clientId = randomUUID();
    await handOver({ clientId }, at('2026-05-12T08:30:00Z'));
    await handOver({ clientId }, at('2026-05-12T08:30:00Z'));
    expect(await chain()).toHaveLength(2);
    await expect(handOver({}, at('2026-05-13T08:30:00Z'))).rejects.toMatchObject({ code: 'conflict' });
  });

  test('goes on after the case is closed, and not before its first look', async () => {
    const closed = await evidenceStage('closed');
    expect(await collected(closed)).toEqual({ label: 1 });
    const fresh = await evidenceStage('reported');
    await expect(collected(fresh)).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('to nobody, for good, needs the decision to destroy and no legal hold', async () => {
    await collected(stage);
    const dispose = () => handOver({ holderRole: 'disposed' }, at('2026-05-12T08:30:00Z'));
    const decide = () => decideDisposal({ actor: stage.house.investigator, caseNumber: stage.caseNumber, label: 1, decision: { disposal: 'destroy', reason: 'Claim closed, owner agrees.' } });
    await expect(dispose()).rejects.toMatchObject({ fieldErrors: { holderRole: [expect.stringContaining('decision to destroy')] } });
    await db.update(cases).set({ legalHold: true, legalHoldReason: 'A claim.' }).where(eq(cases.id, stage.caseId));
    await expect(decide()).rejects.toMatchObject({ fieldErrors: { disposal: [expect.stringContaining('hold')] } });
    await db.update(cases).set({ legalHold: false, legalHoldReason: null }).where(eq(cases.id, stage.caseId));
    await decide();
    await dispose();
    await expect(handOver({ sequence: 2 }, at('2026-05-14T08:30:00Z'))).rejects.toMatchObject({ fieldErrors: { holderRole: [expect.stringContaining('disposed of')] } });
  });
});

/** What the table itself refuses, past every service. */
describe('the custody table', () => {
  const refusal = async (work: Promise<unknown>) => {
    const error: unknown = await work.then(() => null, (reason: unknown) => reason);
    if (!(error instanceof Error)) throw new Error('The table took it.');
    return `${error.message} ${error.cause instanceof Error ? `${Reflect.get(error.cause, 'constraint_name') ?? ''} ${error.cause.message}` : ''}`;
  };
  const record = async () => {
    await collected(stage);
    const [first] = await chain();
    if (!first) throw new Error('There is no first record.');
    return first;
  };
  const next = (itemId: string, values: Partial<typeof custodyRecords.$inferInsert>) => ({ itemId, clientId: randomUUID(), sequence: 2, previousSequence: 1, holderRole: 'store' as const, holderName: 'S', purpose: 'p', condition: 'c', fromAt: at('2026-05-12T08:00:00Z'), givenBy: 'g', receivedBy: 'r', recordedById: stage.house.investigator.userId, ...values });

  test('takes no second open holder', async () => {
    const first = await record();
    expect(await refusal(db.insert(custodyRecords).values(next(first.itemId, {})))).toContain('custody_records_one_open');
  });

  test('takes no gap and no overlap between one record and the next', async () => {
    const first = await record();
    for (const fromAt of [at('2026-05-12T08:00:01Z'), at('2026-05-12T07:59:59Z')]) {
      const write = inTransaction(async (tx) => {
        await tx.update(custodyRecords).set({ toAt: at('2026-05-12T08:00:00Z') }).where(eq(custodyRecords.id, first.id));
        await tx.insert(custodyRecords).values(next(first.itemId, { fromAt }));
      });
      expect(await refusal(write)).toContain('custody_records_no_gap');
    }
  });

  test('leaves no item without a holder', async () => {
    const first = await record();
    expect(await refusal(db.update(custodyRecords).set({ toAt: at('2026-05-12T08:00:00Z') }).where(eq(custodyRecords.id, first.id)))).toContain('exactly one holder');
    const { item } = (await listEvidence(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber }))[0] ?? {};
    if (!item) throw new Error('There is no item.');
    const { id: _id, ...values } = item;
    expect(await refusal(db.insert(evidenceItems).values({ ...values, clientId: randomUUID(), label: 9 }))).toContain('exactly one holder');
  });

  test('keeps what was written: no other words, no other start, no removal', async () => {
    const first = await record();
    for (const change of [{ holderName: 'Somebody else' }, { fromAt: at('2026-05-01T00:00:00Z') }]) expect(await refusal(db.update(custodyRecords).set(change).where(eq(custodyRecords.id, first.id)))).toContain('kept as it was written');
    expect(await refusal(db.delete(custodyRecords).where(eq(custodyRecords.id, first.id)))).toContain('only ever added');
  });
});

describe('an examination', () => {
  const exam = (values: Partial<Parameters<typeof recordExam>[0]['exam']> = {}, times: { performedAt?: Date; noticeAt?: Date | null } = {}, actor: Actor = stage.house.investigator) =>
    recordExam({
      actor,
      caseNumber: stage.caseNumber,
      label: 1,
      exam: { clientId: randomUUID(), examKind: 'may-alter', method: 'A section of 2 mm', result: 'Charred through', performedBy: 'Laboratory Fennimore', noticeTo: '', protocolAttachmentId: null, wentAheadReason: '', ...values },
      performedAt: times.performedAt ?? at('2026-05-20T10:00:00Z'),
      noticeAt: times.noticeAt ?? null,
      now,
    });

  test('that may alter the item says each thing that it lacks, and is then recorded once it has them', async () => {
    await collected(stage);
    await expect(exam()).rejects.toMatchObject({ fieldErrors: { noticeTo: [expect.any(String)], noticeAt: [expect.any(String)], protocolAttachmentId: [expect.any(String)] } });
    const { attachmentId } = await document(stage);
    const whole = { noticeTo: 'owner, insurer', protocolAttachmentId: attachmentId };
    await expect(exam(whole, { noticeAt: at('2026-05-20T10:00:00Z') })).rejects.toMatchObject({ fieldErrors: { noticeAt: [expect.stringContaining('before the examination')] } });
    await exam(whole, { noticeAt: at('2026-05-13T10:00:00Z') });
    expect((await listEvidence(db, { actor: stage.house.reviewer, caseNumber: stage.caseNumber }))[0]?.exams).toMatchObject([{ kind: 'may-alter', protocolAttachmentId: attachmentId }]);
  });

  test('takes no protocol of another case', async () => {
    await collected(stage);
    const foreign = await document({ ...stage, caseNumber: (await createCase('investigation', { site: stage.house.site })).number });
    await expect(exam({ noticeTo: 'owner', protocolAttachmentId: foreign.attachmentId }, { noticeAt: at('2026-05-13T10:00:00Z') })).rejects.toMatchObject({ fieldErrors: { protocolAttachmentId: [expect.stringContaining('of this case')] } });
  });

  test('that alters nothing needs no notice, is not before the collection, and is the investigator’s to record', async () => {
    await collected(stage);
    await expect(exam({ examKind: 'visual' }, { performedAt: at('2026-05-09T10:00:00Z') })).rejects.toMatchObject({ fieldErrors: { performedAt: [expect.stringContaining('not been collected')] } });
    await expect(exam({ examKind: 'visual' }, {}, stage.house.reviewer)).rejects.toMatchObject({ code: 'forbidden' });
    await exam({ examKind: 'visual' });
  });

  test('is refused by the table itself without notice and protocol', async () => {
    await collected(stage);
    const [one] = await listEvidence(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber });
    const write = db.insert(evidenceExams).values({ itemId: one?.item.id ?? '', clientId: randomUUID(), kind: 'may-alter', method: 'm', result: 'r', performedBy: 'p', performedAt: at('2026-05-20T10:00:00Z'), recordedById: stage.house.investigator.userId });
    await expect(write).rejects.toMatchObject({ cause: { constraint_name: 'evidence_exams_may_alter_needs' } });
  });
});
