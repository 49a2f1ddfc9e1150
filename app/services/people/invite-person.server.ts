import type { z } from 'zod';
import { inTransaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { getSiteById } from '#db/queries/sites.server.ts';
import { getOrganisationName, insertGrant, insertPerson } from '#db/queries/users.server.ts';
import { mailedTokenHash } from '#app/auth/mailed-token.server.ts';
import type { inviteSchema } from '#app/domain/account.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { holdsRole, roleLabels } from '#app/domain/roles.ts';
import { invitationMail } from '#app/mail/templates/account.ts';
import { issueLink } from './password-links.server.ts';

/** Every service on people begins with this. */
export function requireAdministrator(actor: Actor): void {
  if (!holdsRole(actor, ['administrator'], null)) throw new DomainError('forbidden', 'Only an administrator looks after people and roles.');
}

/** Adds a person with one role and mails the link by which they choose a password. */
export function invitePerson(actor: Actor, wanted: z.output<typeof inviteSchema>): Promise<void> {
  requireAdministrator(actor);
  return inTransaction(async (tx) => {
    const siteId = wanted.siteId === '' ? null : wanted.siteId;
    if (siteId && !(await getSiteById(tx, actor.organisationId, siteId))) throw new DomainError('invalid-input', 'Nobody was invited.', { fieldErrors: { siteId: ['Choose a site of your organisation.'] } });
    const userId = await insertPerson(tx, { organisationId: actor.organisationId, email: wanted.email, displayName: wanted.displayName });
    if (!userId) throw new DomainError('conflict', 'Nobody was invited.', { fieldErrors: { email: ['This address has an account already. Add the role in the list below.'] } });
    await insertGrant(tx, { userId, role: wanted.role, siteId });
    const token = await issueLink(tx, userId, 'invitation');
    const organisation = await getOrganisationName(tx, actor.organisationId);
    await insertMail(tx, { dedupeKey: `invitation:${mailedTokenHash(token)}`, toAddress: wanted.email, caseId: null, ...invitationMail({ organisation, invitedBy: actor.displayName, token }) });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: actor.organisationId,
      caseId: null,
      event: 'person.invited',
      subject: 'users',
      subjectId: userId,
      summary: `${wanted.displayName} invited as ${roleLabels[wanted.role]}`,
      after: { role: wanted.role, siteId },
    });
  });
}
