import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { attachments, cases, users } from '#db/schema/all.ts';
import type { AttachmentClass } from '#app/domain/attachment.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type AttachmentRow = typeof attachments.$inferSelect;
export interface AttachmentLine extends AttachmentRow {
  readonly uploadedBy: string;
}

/** The classes of document that this person may read in this case; personal ones by role, not for having reported it. */
export function readableClasses(actor: Actor, subject: CaseSubject): AttachmentClass[] {
  if (!canOnCase(actor, 'attachment:read', subject)) return [];
  return ['ordinary', ...(canOnCase(actor, 'case:read-personal', subject) ? (['personal'] as const) : []), ...(canOnCase(actor, 'case:read-privileged', subject) ? (['legal'] as const) : [])];
}

const uploadedBy = sql<string>`(select ${users.displayName} from ${users} where ${users.id} = ${attachments.uploadedById})`;

/** Documents of these classes of a visible case, by label. */
export async function listAttachments(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number; readonly classes: readonly AttachmentClass[] }): Promise<AttachmentLine[]> {
  if (params.classes.length === 0) return [];
  const rows = await db
    .select({ attachment: attachments, uploadedBy })
    .from(attachments)
    .innerJoin(cases, eq(cases.id, attachments.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), inArray(attachments.class, [...params.classes])))
    .orderBy(asc(attachments.label));
  return rows.map((row) => ({ ...row.attachment, uploadedBy: row.uploadedBy }));
}

/** A document of a visible case, with what permissions need to know of the case. Its class is the caller's to check. */
export async function findAttachment(db: DbOrTx, actor: Actor, attachmentId: string) {
  const [row] = await db.select({ attachment: attachments, case: cases }).from(attachments).innerJoin(cases, eq(cases.id, attachments.caseId)).where(and(visibleTo(actor), eq(attachments.id, attachmentId)));
  return row ?? null;
}

export async function getAttachmentOfCase(tx: DbOrTx, params: { readonly caseId: string; readonly attachmentId: string }): Promise<AttachmentRow | null> {
  const [row] = await tx.select().from(attachments).where(and(eq(attachments.caseId, params.caseId), eq(attachments.id, params.attachmentId)));
  return row ?? null;
}

export async function attachmentByHash(tx: Transaction, params: { readonly caseId: string; readonly sha256: string }): Promise<AttachmentRow | null> {
  const [row] = await tx.select().from(attachments).where(and(eq(attachments.caseId, params.caseId), eq(attachments.sha256, params.sha256)));
  return row ?? null;
}

/** Last label given out in a case; the caller holds the case's row lock. */
export async function lastAttachmentLabel(tx: Transaction, caseId: string): Promise<number> {
  const [row] = await tx.select({ last: sql<number>`coalesce(max(${attachments.label}), 0)::int` }).from(attachments).where(eq(attachments.caseId, caseId));
  return row?.last ?? 0;
}

export async function insertAttachment(tx: Transaction, values: typeof attachments.$inferInsert): Promise<string> {
  const [row] = await tx.insert(attachments).values(values).returning({ id: attachments.id });
  if (!row) throw new Error('The document was not written.');
  return row.id;
}

export async function recordAttachmentCheck(tx: Transaction, params: { readonly attachmentId: string; readonly result: NonNullable<AttachmentRow['hashCheck']> }): Promise<void> {
  await tx.update(attachments).set({ hashCheck: params.result, hashCheckedAt: sql`now()` }).where(eq(attachments.id, params.attachmentId));
}
