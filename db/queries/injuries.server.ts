import { and, asc, eq } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, injuries } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type InjuryValues = Pick<typeof injuries.$inferInsert, 'part' | 'kind' | 'treatment' | 'daysAway' | 'restrictedDays' | 'description'>;
type NewInjury = InjuryValues & Pick<typeof injuries.$inferInsert, 'involvementId'>;
export type InjuryRow = typeof injuries.$inferSelect;

/** Injuries of a case. Class health: call it only after `case:read-health` was decided for this actor and case. */
export async function listInjuries(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<InjuryRow[]> {
  const rows = await db
    .select({ injury: injuries })
    .from(injuries)
    .innerJoin(cases, eq(cases.id, injuries.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(injuries.createdAt), asc(injuries.id));
  return rows.map((row) => row.injury);
}

export async function insertInjury(tx: Transaction, caseId: string, values: NewInjury): Promise<string> {
  const [row] = await tx.insert(injuries).values({ caseId, ...values }).returning({ id: injuries.id });
  if (!row) throw new Error('The injury was not stored.');
  return row.id;
}

/** @returns False when the case has no such injury. */
export async function updateInjury(tx: Transaction, params: { caseId: string; injuryId: string; values: InjuryValues }): Promise<boolean> {
  const rows = await tx
    .update(injuries)
    .set(params.values)
    .where(and(eq(injuries.id, params.injuryId), eq(injuries.caseId, params.caseId)))
    .returning({ id: injuries.id });
  return rows.length > 0;
}
