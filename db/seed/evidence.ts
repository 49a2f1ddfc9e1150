import { randomUUID } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { demoEvidence } from '#fixtures/demo/evidence.ts';
import type { DemoEvidence } from '#fixtures/demo/evidence.ts';
import type { Transaction } from '#db/client.server.ts';
import { attachments, custodyRecords, evidenceExams, evidenceItems, involvements, photos, timelineEvents, witnessAccounts } from '#db/schema/all.ts';
import { attachmentContent } from '#app/domain/attachment.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { seedOffer, seedPlan } from './evidence-steps.ts';
import { moment } from './moment.ts';
import { pick } from './people-and-sites.ts';
import type { DemoPlaces } from './people-and-sites.ts';

interface Target {
  readonly caseId: string;
  readonly zone: string;
  readonly places: Pick<DemoPlaces, 'userIds' | 'userNames'>;
}

/** Documents, items with their chains, accounts and events of one demonstration case. */
export async function seedEvidence(tx: Transaction, caseNumber: number, { caseId, zone, places }: Target): Promise<void> {
  const demo = demoEvidence.find((one) => one.caseNumber === caseNumber);
  if (!demo) return;
  const userId = pick(places.userIds, demo.recordedBy);
  const at = (local: string) => moment(local, zone);
  const documents = await seedDocuments(tx, demo, { caseId, userId, at });
  for (const [index, item] of demo.items.entries()) {
    const itemId = await seedItem(tx, item, { caseId, userId, at, label: index + 1, documents, recorder: pick(places.userNames, demo.recordedBy) });
    const target = { itemId, zone, userId, places, now: new Date() };
    if (item.planned) await seedPlan(tx, item.planned, target);
    if (item.offer) await seedOffer(tx, { offer: item.offer, custody: item.custody }, target);
  }
  for (const [index, account] of demo.accounts.entries()) {
    const [person] = await tx.select({ id: involvements.id }).from(involvements).where(and(eq(involvements.caseId, caseId), eq(involvements.name, account.witnessName)));
    if (!person) throw new Error(`The witness of case ${caseNumber} is missing.`);
    await tx.insert(witnessAccounts).values({
      caseId,
      clientId: randomUUID(),
      label: index + 1,
      involvementId: person.id,
      takenById: userId,
      takenAt: at(account.takenLocal),
      language: account.language,
      words: account.words,
      readBack: true,
      speaksOfAt: account.speaksOfLocal ? at(account.speaksOfLocal) : null,
      signedAttachmentId: account.signedCopy ? pick(documents, account.signedCopy) : null,
    });
  }
  for (const { label, marks } of demo.photoMarks) await tx.update(photos).set({ marks }).where(and(eq(photos.caseId, caseId), eq(photos.label, label)));
  for (const { readingLocal, document, ...event } of demo.events) {
    await tx.insert(timelineEvents).values({ caseId, clientId: randomUUID(), ...event, readingAt: at(readingLocal), attachmentId: document ? pick(documents, document) : null, createdById: userId });
  }
}

interface Writer {
  readonly caseId: string;
  readonly userId: string;
  readonly at: (local: string) => Date;
}

async function seedDocuments(tx: Transaction, demo: DemoEvidence, { caseId, userId, at }: Writer): Promise<ReadonlyMap<string, string>> {
  const ids = new Map<string, string>();
  for (const [index, { text, local, ...document }] of demo.documents.entries()) {
    const bytes = new TextEncoder().encode(text);
    const mime = attachmentContent(bytes, document.fileName);
    if (!mime) throw new Error(`The demonstration document ${document.fileName} is of no known kind.`);
    const sha256 = sha256Hex(bytes);
    const objectKey = `attachments/${caseId}/${sha256}`;
    await putObject(objectKey, bytes, mime);
    const [row] = await tx.insert(attachments).values({ caseId, label: index + 1, ...document, mime, bytes: bytes.byteLength, sha256, objectKey, uploadedById: userId, createdAt: at(local) }).returning({ id: attachments.id });
    if (row) ids.set(document.fileName, row.id);
  }
  return ids;
}

async function seedItem(tx: Transaction, demo: DemoEvidence['items'][number], writer: Writer & { readonly label: number; readonly documents: ReadonlyMap<string, string>; readonly recorder: string }): Promise<string> {
  const { caseId, userId, at, label, documents, recorder } = writer;
  const [first] = demo.custody;
  if (!first) throw new Error('An item of the demonstration has no holder.');
  const { kind, description, fromWhere, collectedBy, sealNumber } = demo;
  const [item] = await tx.insert(evidenceItems).values({ caseId, clientId: randomUUID(), label, kind, description, fromWhere, collectedBy, collectedAt: at(first.local), sealNumber, createdById: userId, createdAt: at(first.local) }).returning({ id: evidenceItems.id });
  if (!item) throw new Error('The item was not stored.');
  for (const [index, record] of demo.custody.entries()) {
    const next = demo.custody[index + 1];
    const before = demo.custody[index - 1];
    await tx.insert(custodyRecords).values({
      itemId: item.id,
      clientId: randomUUID(),
      sequence: index + 1,
      previousSequence: index === 0 ? null : index,
      holderRole: record.role,
      holderName: record.name,
      place: record.place ?? '',
      purpose: record.purpose,
      condition: record.condition,
      fromAt: at(record.local),
      toAt: next ? at(next.local) : null,
      givenBy: before?.name ?? '',
      receivedBy: record.name,
      receiverId: record.name === recorder ? userId : null,
      recordedById: userId,
      createdAt: at(record.local),
    });
  }
  for (const exam of demo.exams) {
    await tx.insert(evidenceExams).values({
      itemId: item.id,
      clientId: randomUUID(),
      kind: exam.kind,
      method: exam.method,
      result: exam.result,
      performedBy: exam.by,
      performedAt: at(exam.local),
      noticeTo: exam.noticeTo ?? '',
      noticeAt: exam.noticeLocal ? at(exam.noticeLocal) : null,
      protocolAttachmentId: exam.protocol ? pick(documents, exam.protocol) : null,
      recordedById: userId,
      createdAt: at(exam.local),
    });
  }
  return item.id;
}
