import { eq } from 'drizzle-orm';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { beforeAll, describe, expect, test } from 'vitest';
import { caseInReview, caseVersion } from '../findings/stage.ts';
import { collected, document } from '../evidence/stage.ts';
import { db } from '#db/client.server.ts';
import { findingReports, logEntries } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { readReport, readReportPdf } from '#app/services/finding-reports/read-report.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';
import { takeAccount } from '#app/services/witnesses/take-account.server.ts';
import { pdfText } from '#app/storage/pdf-text.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { hashOf, sha256Hex } from '#app/storage/sha256.server.ts';

type Stage = Awaited<ReturnType<typeof caseInReview>>;
let stage: Stage;
const pdf = (actor: Actor, version: number | null = null) => readReportPdf({ actor, caseNumber: stage.caseNumber, version });
const flat = (text: string) => text.replace(/\s+/gu, ' ');

beforeAll(async () => {
  stage = await caseInReview();
  await collected(stage);
  await document(stage, { class: 'legal', title: 'Advice of counsel' });
  await takeAccount({
    actor: stage.house.investigator,
    caseNumber: stage.caseNumber,
    account: { clientId: '6b1f8a52-93c5-4d0e-8a1d-0f3a2f6f1b11', involvementId: null, personName: 'Perpetua Lindqvist', personRole: 'witness', ageBand: 'adult', language: 'English', words: 'I smelled something burnt.', readBack: true, signedAttachmentId: null },
    takenAt: new Date('2026-05-10T15:00:00Z'),
    speaksOfAt: null,
    now: new Date('2026-06-01T12:00:00Z'),
  });
});

describe('before the signature', () => {
  test('the report is a draft, says so, and is not open to a manager as one', async () => {
    const draft = await readReport({ actor: stage.house.investigator, caseNumber: stage.caseNumber, version: null });
    expect(draft).toMatchObject({ signed: false, version: 1, documentHash: null });
    expect(flat(await pdfText((await pdf(stage.house.investigator)).bytes))).toContain('before technical review is a draft');
    const forManager = await readReport({ actor: stage.house.manager, caseNumber: stage.caseNumber, version: null });
    expect(JSON.stringify(forManager)).not.toContain('probable cause of the band');
    await expect(readReport({ actor: stage.house.manager, caseNumber: stage.caseNumber, version: 1 })).rejects.toMatchObject({ code: 'not-found' });
    await expect(pdf(stage.house.reporter)).rejects.toMatchObject({ code: expect.stringMatching(/forbidden|not-found/u) });
  });

  test('the printed draft of a reviewer who has not asked holds no opinion, in no byte', async () => {
    const words = flat(await pdfText((await pdf(stage.house.reviewer)).bytes));
    for (const secret of ['probable cause of the band', 'A curved, polished parapet', 'Accidental', 'No conductor within reach']) expect(words).not.toContain(secret);
    expect(words).toContain('The beam met the mark for 31 minutes.');
  });
});

describe('once signed', () => {
  let signed: Awaited<ReturnType<typeof readReportPdf>>;
  beforeAll(async () => {
    await showOpinion({ actor: stage.house.reviewer, caseNumber: stage.caseNumber });
    await moveCase({ actor: stage.house.reviewer, caseNumber: stage.caseNumber, moveId: 'sign', version: await caseVersion(stage.caseId), reason: 'Read whole.' });
    signed = await pdf(stage.house.manager);
  });

  test('it was put together by the signature and is frozen with its hash', async () => {
    const view = await readReport({ actor: stage.house.manager, caseNumber: stage.caseNumber, version: 1 });
    expect(view.signed).toBe(true);
    expect(view.documentHash).toBe(hashOf(view.document));
    await expect(db.update(findingReports).set({ documentHash: '0'.repeat(64) }).where(eq(findingReports.findingId, stage.findingId))).rejects.toMatchObject({ cause: { message: expect.stringContaining('kept as it was made') } });
  });

  test('its parts come in the customary order', async () => {
    const view = await readReport({ actor: stage.house.manager, caseNumber: stage.caseNumber, version: 1 });
    const headings = view.document.blocks.flatMap((block) => (block.kind === 'heading' && block.level === 1 ? [block.text] : []));
    expect(headings).toEqual(['Instruction and scope', 'Who', 'Documents relied on', 'Scene and layout', 'Chronology', 'Accounts of witnesses', 'Evidence and custody', 'Measurements', 'Sun and weather in the window', 'Hypotheses and tests', 'Opinion', 'Classification', 'Recommendations', 'Cautions', 'Appendix A: photos', 'Appendix B: the computation']);
  });

  test('the file holds opinion, evidence and account, and neither the name of a witness or holder nor legal advice', async () => {
    const words = flat(await pdfText(signed.bytes));
    for (const part of ['probable cause of the band', 'Curved steel trim, 550 mm', 'I smelled something burnt.', 'Witness A', 'Accidental', stage.house.reviewer.displayName]) expect(words).toContain(part);
    for (const secret of ['Lindqvist', 'Ashgrove', 'Advice of counsel']) expect(words).not.toContain(secret);
  });

  test('it is tagged, in a stated language, with a title, and every figure has words', async () => {
    const file = await getDocument({ data: new Uint8Array(signed.bytes), verbosity: 0 }).promise;
    expect(await file.getMarkInfo()).toMatchObject({ Marked: true });
    expect((await file.getMetadata()).info).toMatchObject({ Language: 'en-GB', Title: expect.stringContaining('finding version 1') });
    const roles: string[] = [];
    const figures: string[] = [];
    const walk = (node: unknown): void => {
      if (typeof node !== 'object' || node === null) return;
      if ('role' in node && typeof node.role === 'string') roles.push(node.role);
      if ('role' in node && node.role === 'Figure') figures.push('alt' in node && typeof node.alt === 'string' ? node.alt : '');
      if ('children' in node && Array.isArray(node.children)) node.children.forEach(walk);
    };
    for (let number = 1; number <= file.numPages; number += 1) walk(await (await file.getPage(number)).getStructTree());
    expect(new Set(roles)).toEqual(new Set(['Root', 'Document', 'H1', 'H2', 'H3', 'P', 'Table', 'THead', 'TBody', 'TR', 'TH', 'TD', 'Figure']));
    expect(figures.length).toBeGreaterThan(1);
    for (const words of figures) expect(words.length).toBeGreaterThan(40);
    await file.destroy();
  });

  test('the same bytes are handed out again, also after the case went on', async () => {
    await document(stage, { title: 'A later letter' });
    const again = await pdf(stage.house.investigator, 1);
    expect(sha256Hex(again.bytes)).toBe(sha256Hex(signed.bytes));
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId));
    expect(lines.filter((line) => line.event === 'report.downloaded').length).toBeGreaterThan(1);
  });

  test('a stored file that is no longer the one that was made is refused', async () => {
    const [row] = await db.select().from(findingReports).where(eq(findingReports.findingId, stage.findingId));
    await putObject(row?.pdfKey ?? '', new TextEncoder().encode('%PDF-1.7 other'), 'application/pdf');
    await expect(pdf(stage.house.manager, 1)).rejects.toMatchObject({ code: 'conflict' });
  });
});
