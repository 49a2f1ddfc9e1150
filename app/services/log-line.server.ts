import type { Transaction } from '#db/client.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import type { Actor } from '#app/domain/roles.ts';

export interface CaseLine {
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

/** One line of the case's log, in the transaction of the change. */
export function logLine(tx: Transaction, actor: Actor, row: Pick<CaseRow, 'id' | 'organisationId'>, line: CaseLine): Promise<void> {
  return insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: row.organisationId, caseId: row.id, ...line });
}
