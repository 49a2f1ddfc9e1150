import { and, desc, eq, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, logEntries } from '#db/schema/all.ts';
import type { CaseRow } from './case-subject.server.ts';
import { standingMoves } from './moves-in-log.server.ts';

export type CasePatch = Partial<Omit<typeof cases.$inferInsert, 'id' | 'number' | 'clientId' | 'receipt' | 'organisationId' | 'siteId' | 'version'>>;

/** Writes to a case that the caller holds locked, and raises its version. */
export async function updateCase(tx: Transaction, caseId: string, patch: CasePatch): Promise<CaseRow> {
  const [row] = await tx
    .update(cases)
    .set({ ...patch, version: sql`${cases.version} + 1` })
    .where(eq(cases.id, caseId))
    .returning();
  if (!row) throw new Error(`The case ${caseId} is gone although it was locked.`);
  return row;
}

/** When the case came into its present state: the last move in the log that led there and stands, else the time of the report. */
export async function stateSince(db: DbOrTx, row: Pick<CaseRow, 'id' | 'state' | 'reportedAt'>): Promise<Date> {
  const [line] = await db
    .select({ at: logEntries.at })
    .from(logEntries)
    .where(and(standingMoves(row.id), sql`${logEntries.after} ->> 'state' = ${row.state}`))
    .orderBy(desc(logEntries.sequence))
    .limit(1);
  return line?.at ?? row.reportedAt;
}

/** Last line of the case's log, for saying who was faster. */
export async function lastChange(db: DbOrTx, caseId: string): Promise<{ sequence: number; at: Date; actorName: string; summary: string } | null> {
  const [line] = await db
    .select({ sequence: logEntries.sequence, at: logEntries.at, actorName: logEntries.actorName, summary: logEntries.summary })
    .from(logEntries)
    .where(eq(logEntries.caseId, caseId))
    .orderBy(desc(logEntries.sequence))
    .limit(1);
  return line ?? null;
}

/** How many cases point to this one as their main case. */
export async function countDuplicatesOf(db: DbOrTx, caseId: string): Promise<number> {
  const rows = await db.select({ id: cases.id }).from(cases).where(eq(cases.duplicateOfId, caseId));
  return rows.length;
}
