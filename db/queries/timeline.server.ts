import { and, asc, eq } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, timelineEvents } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type TimelineEventRow = typeof timelineEvents.$inferSelect;

/** Events entered by hand in a visible case, withdrawn ones too. */
export async function listTimelineEvents(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<TimelineEventRow[]> {
  const rows = await db
    .select({ event: timelineEvents })
    .from(timelineEvents)
    .innerJoin(cases, eq(cases.id, timelineEvents.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(timelineEvents.createdAt), asc(timelineEvents.id));
  return rows.map((row) => row.event);
}

/** Null when the same form was kept before. */
export async function insertTimelineEvent(tx: Transaction, values: typeof timelineEvents.$inferInsert): Promise<string | null> {
  const [row] = await tx.insert(timelineEvents).values(values).onConflictDoNothing({ target: timelineEvents.clientId }).returning({ id: timelineEvents.id });
  return row?.id ?? null;
}

export async function lockTimelineEvent(tx: Transaction, params: { readonly caseId: string; readonly eventId: string }): Promise<TimelineEventRow | null> {
  const [row] = await tx.select().from(timelineEvents).where(and(eq(timelineEvents.caseId, params.caseId), eq(timelineEvents.id, params.eventId))).for('update');
  return row ?? null;
}

export async function markEventWithdrawn(tx: Transaction, eventId: string, withdrawn: { readonly at: Date; readonly reason: string }): Promise<void> {
  await tx.update(timelineEvents).set({ withdrawnAt: withdrawn.at, withdrawnReason: withdrawn.reason }).where(eq(timelineEvents.id, eventId));
}
