import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { document, evidenceStage, now } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { db } from '#db/client.server.ts';
import { getEvidencePage } from '#db/queries/evidence-page.server.ts';
import { attachments, logEntries } from '#db/schema/all.ts';
import { addAttachment } from '#app/services/attachments/add-attachment.server.ts';
import { readAttachment } from '#app/services/attachments/read-attachment.server.ts';
import { putObject } from '#app/storage/objects.server.ts';

let stage: EvidenceStage;
beforeEach(async () => {
  stage = await evidenceStage();
});

const add = (name: string, bytes: Uint8Array) => addAttachment({ actor: stage.house.investigator, caseNumber: stage.caseNumber, about: { title: 'Panel log', kind: 'log', class: 'ordinary' }, file: { name, bytes } });
const text = (words: string) => new TextEncoder().encode(words);

describe('a document', () => {
  test('is judged by its content, whatever its name says', async () => {
    await expect(add('log.pdf', text('MZ\u0000\u0001 not a log'))).rejects.toMatchObject({ fieldErrors: { file: [expect.stringContaining('log.pdf')] } });
    await expect(add('empty.txt', text(''))).rejects.toMatchObject({ fieldErrors: { file: [expect.stringContaining('is empty')] } });
    await expect(add('latin.csv', Uint8Array.from([0x63, 0xe9, 0x3b]))).rejects.toMatchObject({ code: 'invalid-input' });
    await add('log.csv', text('time,event\n11:02,alarm\n'));
    await add('statement.bin', text('%PDF-1.7 …'));
    const rows = await db.select().from(attachments).where(eq(attachments.caseId, stage.caseId)).orderBy(attachments.label);
    expect(rows.map((row) => [row.label, row.mime])).toEqual([[1, 'text/csv'], [2, 'application/pdf']]);
  });

  test('sent again with the same bytes is the same document', async () => {
    const [first, second] = [await add('a.txt', text('the same words')), await add('b.txt', text('the same words'))];
    expect(second).toEqual(first);
  });

  test('keeps the SHA-256 that FIPS 180-4 gives for "abc"', async () => {
    await add('abc.txt', text('abc'));
    const [row] = await db.select().from(attachments).where(eq(attachments.caseId, stage.caseId));
    expect(row?.sha256).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
  });
});

describe('who may read it', () => {
  test('ordinary: those who work on the case; personal: the same; legal: the privacy lead alone', async () => {
    const { investigator, reviewer, manager, privacyLead, reporter } = stage.house;
    const ids = { ordinary: (await document(stage)).attachmentId, personal: (await document(stage, { class: 'personal' })).attachmentId, legal: (await document(stage, { class: 'legal' })).attachmentId };
    const reads = async (actor: typeof investigator, id: string) => readAttachment({ actor, attachmentId: id }).then(() => true, (error: unknown) => { expect(error).toMatchObject({ code: 'not-found' }); return false; });
    for (const actor of [investigator, reviewer, manager]) expect([await reads(actor, ids.ordinary), await reads(actor, ids.personal), await reads(actor, ids.legal)]).toEqual([true, true, false]);
    expect([await reads(privacyLead, ids.ordinary), await reads(privacyLead, ids.legal)]).toEqual([true, true]);
    expect([await reads(reporter, ids.ordinary), await reads(reporter, ids.personal)]).toEqual([false, false]);
    expect(await reads((await evidenceStage()).house.privacyLead, ids.ordinary)).toBe(false);
  });

  test('a legal document is not even listed for those who may not read it', async () => {
    await document(stage, { class: 'legal', title: 'Advice of counsel' });
    const page = await getEvidencePage(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber, now });
    expect(JSON.stringify(page)).not.toContain('Advice of counsel');
  });
});

describe('each download', () => {
  test('hashes the stored file again, and writes a line', async () => {
    const { attachmentId } = await document(stage, {}, 'Whole words.');
    const file = await readAttachment({ actor: stage.house.reviewer, attachmentId });
    expect(new TextDecoder().decode(file.bytes)).toBe('Whole words.');
    expect(file.fileName).toBe(`case-${stage.caseNumber}-D1.txt`);
    const [row] = await db.select().from(attachments).where(eq(attachments.id, attachmentId));
    expect(row).toMatchObject({ hashCheck: 'same', hashCheckedAt: expect.any(Date) });
  });

  test('refuses a file that is no longer the one that came in, and says so in the log', async () => {
    const { attachmentId } = await document(stage);
    const [row] = await db.select().from(attachments).where(eq(attachments.id, attachmentId));
    await putObject(row?.objectKey ?? '', text('other words'), 'text/plain');
    await expect(readAttachment({ actor: stage.house.investigator, attachmentId })).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('not handed out') });
    const events = (await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId))).map((line) => line.event);
    expect(events).toContain('attachment.hash-differs');
    expect((await getEvidencePage(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber, now }))?.heading).toContain('not what came in');
  });
});
