import type { Transaction } from '#db/client.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import type { LoggedEvent } from '#db/queries/log.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import type { Actor } from '#app/domain/roles.ts';

/** One line of the case's log, in the transaction of the change. */
export function logLine(tx: Transaction, actor: Actor, row: Pick<CaseRow, 'id' | 'organisationId'>, line: LoggedEvent): Promise<void> {
  return insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: row.organisationId, caseId: row.id, ...line });
}
