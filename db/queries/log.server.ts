import { and, desc, eq, lt } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, logEntries } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

/** What happened, whoever did it. */
export interface LoggedEvent {
  /** Past tense, e.g. `case.closed`. */
  readonly event: string;
  /** The table and row that changed. */
  readonly subject: string;
  readonly subjectId: string;
  /** Names no witness and no holder: the log is read by more people than personal fields are. */
  readonly summary: string;
  readonly reason?: string;
  readonly before?: Record<string, unknown>;
  readonly after?: Record<string, unknown>;
}

export interface NewLogEntry extends LoggedEvent {
  /** Null for the system and for guests; `actorName` then says who. */
  readonly actorId: string | null;
  readonly actorName: string;
  readonly organisationId: string;
  readonly caseId: string | null;
}

/** Writes one line of the log. Takes a transaction only: a change and its line stand or fall together. */
export async function insertLogEntry(tx: Transaction, entry: NewLogEntry): Promise<void> {
  await tx.insert(logEntries).values({ ...entry, reason: entry.reason ?? '' });
}

export interface LogLine {
  readonly sequence: number;
  readonly at: Date;
  readonly actorName: string;
  readonly event: string;
  readonly summary: string;
  readonly reason: string;
}

/** Log of one case, newest first. */
export function listCaseLog(db: DbOrTx, params: { actor: Actor; caseNumber: number; limit: number; before?: number }): Promise<LogLine[]> {
  return db
    .select({
      sequence: logEntries.sequence,
      at: logEntries.at,
      actorName: logEntries.actorName,
      event: logEntries.event,
      summary: logEntries.summary,
      reason: logEntries.reason,
    })
    .from(logEntries)
    .innerJoin(cases, eq(cases.id, logEntries.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), params.before ? lt(logEntries.sequence, params.before) : undefined))
    .orderBy(desc(logEntries.sequence))
    .limit(params.limit);
}
