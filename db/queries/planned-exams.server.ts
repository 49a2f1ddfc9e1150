import { and, asc, eq, inArray } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { plannedExams } from '#db/schema/all.ts';

export type PlanRow = typeof plannedExams.$inferSelect;

/** Planned examinations of these items, soonest first, settled ones too. That the case may be read is the caller's to check. */
export function listPlans(db: DbOrTx, itemIds: readonly string[]): Promise<PlanRow[]> {
  return db.select().from(plannedExams).where(inArray(plannedExams.itemId, [...itemIds])).orderBy(asc(plannedExams.plannedAt), asc(plannedExams.id));
}

export async function planOfItem(tx: Transaction, params: { readonly itemId: string; readonly planId: string }): Promise<PlanRow | null> {
  const [row] = await tx.select().from(plannedExams).where(and(eq(plannedExams.itemId, params.itemId), eq(plannedExams.id, params.planId)));
  return row ?? null;
}

/** Null when the same form has made it before. */
export async function insertPlan(tx: Transaction, values: typeof plannedExams.$inferInsert): Promise<string | null> {
  const [row] = await tx.insert(plannedExams).values(values).onConflictDoNothing({ target: plannedExams.clientId }).returning({ id: plannedExams.id });
  return row?.id ?? null;
}

export async function updatePlan(tx: Transaction, planId: string, change: Partial<typeof plannedExams.$inferInsert>): Promise<void> {
  await tx.update(plannedExams).set(change).where(eq(plannedExams.id, planId));
}
