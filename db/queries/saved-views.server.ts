import { and, asc, count, eq, ne, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { savedViews } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { SavedView } from '#app/domain/saved-view.ts';

/** The actor's own views, by name. */
export function listSavedViews(db: DbOrTx, actor: Actor): Promise<SavedView[]> {
  return db.select({ id: savedViews.id, name: savedViews.name, search: savedViews.search }).from(savedViews).where(eq(savedViews.userId, actor.userId)).orderBy(asc(sql`lower(${savedViews.name})`));
}

/** Views of the actor other than `exceptId` that bear a name, whatever its capitals. */
export async function isNameTaken(tx: Transaction, actor: Actor, name: string, exceptId: string | null): Promise<boolean> {
  const rows = await tx
    .select({ id: savedViews.id })
    .from(savedViews)
    .where(and(eq(savedViews.userId, actor.userId), eq(sql`lower(${savedViews.name})`, sql`lower(${name})`), exceptId ? ne(savedViews.id, exceptId) : undefined));
  return rows.length > 0;
}

export async function countSavedViews(tx: Transaction, actor: Actor): Promise<number> {
  const [row] = await tx.select({ kept: count() }).from(savedViews).where(eq(savedViews.userId, actor.userId));
  return row?.kept ?? 0;
}

export async function insertSavedView(tx: Transaction, actor: Actor, view: { name: string; search: string }): Promise<string> {
  const [row] = await tx.insert(savedViews).values({ ...view, userId: actor.userId }).returning({ id: savedViews.id });
  if (!row) throw new Error('The view was not stored.');
  return row.id;
}

/** @returns The name before; null where the view is not the actor's. */
export async function renameSavedView(tx: Transaction, actor: Actor, id: string, name: string): Promise<string | null> {
  const own = and(eq(savedViews.id, id), eq(savedViews.userId, actor.userId));
  const [before] = await tx.select({ name: savedViews.name }).from(savedViews).where(own).for('update');
  if (!before) return null;
  await tx.update(savedViews).set({ name }).where(own);
  return before.name;
}

/** @returns The name that it had; null where the view is not the actor's. */
export async function deleteSavedView(tx: Transaction, actor: Actor, id: string): Promise<string | null> {
  const [row] = await tx.delete(savedViews).where(and(eq(savedViews.id, id), eq(savedViews.userId, actor.userId))).returning({ name: savedViews.name });
  return row?.name ?? null;
}
