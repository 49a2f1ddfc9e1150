import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { hasSeenOpinion, listFindingRows, opinionShownEvent } from '#db/queries/findings.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { withAuthorship } from '#app/domain/review-rights.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

/** Opens the author's opinion and results to a reviewer who has read the inputs; the log keeps when that was. */
export async function showOpinion({ actor, caseNumber }: { readonly actor: Actor; readonly caseNumber: number }): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    const versions = await listFindingRows(tx, found.row.id);
    authorize(actor, 'finding:review', withAuthorship(found.subject, versions, actor.userId));
    const [latest] = versions;
    if (latest?.state !== 'sent') throw new DomainError('invalid-state', 'No version of the finding is with the reviewer.');
    if (await hasSeenOpinion(tx, { findingId: latest.id, userId: actor.userId })) return;
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: opinionShownEvent,
      subject: 'findings',
      subjectId: latest.id,
      summary: `Opinion and results of finding version ${latest.version} shown to the reviewer.`,
    });
  });
}
