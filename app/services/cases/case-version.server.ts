import type { Transaction } from '#db/client.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { lastChange } from '#db/queries/cases.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';

/**
 * Refuses a change made on an older version of the case, and says who was faster, to those who may read the log.
 *
 * @throws DomainError `conflict`
 */
export async function refuseStaleVersion(tx: Transaction, actor: Actor, { row, subject }: { row: CaseRow; subject: CaseSubject }, version: number): Promise<void> {
  if (row.version === version) return;
  const change = canOnCase(actor, 'log:read', subject) ? await lastChange(tx, row.id) : null;
  const who = change ? ` ${change.actorName}, ${formatDayClock(change.at, row.zone)}: ${change.summary}` : '';
  throw new DomainError('conflict', `The case was changed while this page was open.${who} What you typed is kept; load the page again to see the change, then send it once more.`);
}
