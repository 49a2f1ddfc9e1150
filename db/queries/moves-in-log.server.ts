import { and, desc, eq, sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { logEntries } from '#db/schema/all.ts';
import { isHarmless, stateAfter, undoLeftMs } from '#app/domain/move-undo.ts';
import type { UndoOffer } from '#app/domain/move-undo.ts';
import { findMove } from '#app/domain/case-state.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { CaseRow } from './case-subject.server.ts';

/** Whether a later line takes this one back. Names are written out: the query has no other table, so columns would stand bare. */
const undone = sql<boolean>`exists (select 1 from log_entries undo where undo.case_id = log_entries.case_id and (undo.after ->> 'undoes')::bigint = log_entries.sequence)`;

/**
 * Lines of a case's log that led to a state, as a condition on `log_entries`. A move that
 * was taken back within its seconds led nowhere: its line and the line of the undo stay in the log, and count for no clock.
 */
export function standingMoves(caseId: string): SQL | undefined {
  return and(
    eq(logEntries.caseId, caseId),
    eq(logEntries.subject, 'cases'),
    sql`${logEntries.after} ->> 'state' is not null`,
    sql`not ${undone}`,
  );
}

const moveLine = {
  sequence: logEntries.sequence,
  actorId: logEntries.actorId,
  before: logEntries.before,
  after: logEntries.after,
  /** By the clock of the database, which stamped the line. [s] */
  ageS: sql<number>`extract(epoch from now() - ${logEntries.at})`.mapWith(Number),
};

/** A line of the log of this case, and whether an undo of it is in the log. */
export async function findMoveLine(tx: Transaction, params: { readonly caseId: string; readonly sequence: number }) {
  const [line] = await tx.select({ ...moveLine, undone }).from(logEntries).where(and(eq(logEntries.caseId, params.caseId), eq(logEntries.sequence, params.sequence)));
  return line ?? null;
}

/** The harmless move that this person has just made, while it may be taken back and nothing has happened since. */
export async function undoOffer(db: DbOrTx, actor: Actor, row: Pick<CaseRow, 'id' | 'version'>): Promise<UndoOffer | null> {
  const [line] = await db.select(moveLine).from(logEntries).where(eq(logEntries.caseId, row.id)).orderBy(desc(logEntries.sequence)).limit(1);
  const made = stateAfter.safeParse(line?.after);
  if (!line || !made.success || line.actorId !== actor.userId || made.data.version !== row.version || !isHarmless(made.data.moveId)) return null;
  const leftMs = undoLeftMs(line.ageS);
  return leftMs === 0 ? null : { sequence: line.sequence, label: findMove(made.data.moveId)?.label ?? '', leftMs };
}
