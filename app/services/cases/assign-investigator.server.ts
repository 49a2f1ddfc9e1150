import { inTransaction } from '#db/client.server.ts';
import { listRoleHolders } from '#db/queries/case-people.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { updateCase } from '#db/queries/cases.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { refuseStaleVersion } from './case-version.server.ts';
import { mailAssigned } from './move-mails.server.ts';

/**
 * Names the investigator: somebody who holds that role for the case's site. While the case is in triage no mail goes
 * out; opening the investigation sends it.
 *
 * @throws DomainError `invalid-input` when the person is not an investigator of the site; `conflict`, `forbidden`, `not-found`.
 */
export async function assignInvestigator(request: { actor: Actor; caseNumber: number; version: number; investigatorId: string }): Promise<void> {
  await inTransaction(async (tx) => {
    const { actor } = request;
    const found = await lockCase(tx, actor, request.caseNumber);
    if (!found) throw notFound('The case');
    await refuseStaleVersion(tx, actor, found, request.version);
    authorize(actor, 'case:assign', found.subject);
    const { row } = found;
    const holders = await listRoleHolders(tx, { organisationId: row.organisationId, siteId: row.siteId, roles: ['investigator'] });
    const chosen = holders.find((person) => person.userId === request.investigatorId);
    if (!chosen) {
      const sentence = 'Choose an investigator of this site from the list.';
      throw new DomainError('invalid-input', sentence, { fieldErrors: { investigatorId: [sentence] } });
    }
    if (row.assignedToId === chosen.userId) return;
    const assigned = await updateCase(tx, row.id, { assignedToId: chosen.userId });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: row.organisationId,
      caseId: row.id,
      event: 'case.assigned',
      subject: 'cases',
      subjectId: row.id,
      summary: `Investigator: ${chosen.displayName}.`,
      before: { assignedToId: row.assignedToId },
      after: { assignedToId: chosen.userId },
    });
    if (row.state !== 'triage') await mailAssigned(tx, { row: assigned, actor, key: `case-assigned:${row.id}:${assigned.version}` });
  });
}
