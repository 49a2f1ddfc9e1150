import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertInjury, updateInjury } from '#db/queries/injuries.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { InjuryForm } from '#app/domain/injury.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { holdsRole } from '#app/domain/roles.ts';

/**
 * Adds an injury to a case, or changes one. The log says that health fields were changed, never what they say.
 *
 * @throws DomainError `forbidden` for anyone but an investigator or the privacy lead of the site; `not-found`.
 */
export async function saveInjury(request: { actor: Actor; caseNumber: number; form: InjuryForm }): Promise<void> {
  await inTransaction(async (tx) => {
    const { actor } = request;
    const found = await lockCase(tx, actor, request.caseNumber);
    if (!found) throw notFound('The case');
    const { row, subject } = found;
    if (!canOnCase(actor, 'case:read-health', subject) || !holdsRole(actor, ['investigator', 'privacy-lead'], row.siteId)) {
      throw new DomainError('forbidden', 'Injury details are kept by an investigator or the privacy lead.');
    }
    const { injuryId, ...values } = request.form;
    const subjectId = injuryId === '' ? await insertInjury(tx, row.id, values) : injuryId;
    if (injuryId !== '' && !(await updateInjury(tx, { caseId: row.id, injuryId, values }))) throw notFound('The injury');
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: row.organisationId,
      caseId: row.id,
      event: injuryId === '' ? 'case.injury-added' : 'case.injury-changed',
      subject: 'injuries',
      subjectId,
      summary: injuryId === '' ? 'Health fields added.' : 'Health fields changed.',
    });
  });
}
