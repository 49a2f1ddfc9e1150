import { and, asc, eq, inArray } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { evidenceNotices, noticeReplies } from '#db/schema/all.ts';

export interface NoticeLine extends Readonly<typeof evidenceNotices.$inferSelect> {
  /** In the order in which they were recorded. */
  readonly answers: readonly (typeof noticeReplies.$inferSelect)[];
}

/** Notices about these items with their answers, first sent first. That the case may be read is the caller's to check. */
export async function listNotices(db: DbOrTx, itemIds: readonly string[]): Promise<NoticeLine[]> {
  const notices = await db.select().from(evidenceNotices).where(inArray(evidenceNotices.itemId, [...itemIds])).orderBy(asc(evidenceNotices.sentAt), asc(evidenceNotices.id));
  if (notices.length === 0) return [];
  const replies = await db.select().from(noticeReplies).where(inArray(noticeReplies.noticeId, notices.map((notice) => notice.id))).orderBy(asc(noticeReplies.createdAt), asc(noticeReplies.id));
  return notices.map((notice) => ({ ...notice, answers: replies.filter((reply) => reply.noticeId === notice.id) }));
}

export async function noticeOfItem(tx: Transaction, params: { readonly itemId: string; readonly noticeId: string }) {
  const [row] = await tx.select().from(evidenceNotices).where(and(eq(evidenceNotices.itemId, params.itemId), eq(evidenceNotices.id, params.noticeId)));
  return row ?? null;
}

export async function noticeByClientId(tx: Transaction, params: { readonly itemId: string; readonly clientId: string }) {
  const [row] = await tx.select().from(evidenceNotices).where(and(eq(evidenceNotices.itemId, params.itemId), eq(evidenceNotices.clientId, params.clientId)));
  return row ?? null;
}

/** Null when the same form has made it before. */
export async function insertNotice(tx: Transaction, values: typeof evidenceNotices.$inferInsert): Promise<string | null> {
  const [row] = await tx.insert(evidenceNotices).values(values).onConflictDoNothing({ target: evidenceNotices.clientId }).returning({ id: evidenceNotices.id });
  return row?.id ?? null;
}

/** Null when the same form has made it before. */
export async function insertReply(tx: Transaction, values: typeof noticeReplies.$inferInsert): Promise<string | null> {
  const [row] = await tx.insert(noticeReplies).values(values).onConflictDoNothing({ target: noticeReplies.clientId }).returning({ id: noticeReplies.id });
  return row?.id ?? null;
}
