import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { retireMailedTokens } from '#db/queries/mailed-tokens.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { getSiteById } from '#db/queries/sites.server.ts';
import { deleteGrant, getAccount, getGrant, getOrganisationName, insertGrant, lockAdministrators, updateDisabled } from '#db/queries/users.server.ts';
import { mailedTokenHash } from '#app/auth/mailed-token.server.ts';
import { closeEverySession } from '#app/auth/session.server.ts';
import { administratorForAllSites } from '#app/domain/account.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { roleLabels } from '#app/domain/roles.ts';
import { invitationMail } from '#app/mail/templates/account.ts';
import { requireAdministrator } from './invite-person.server.ts';
import { issueLink } from './password-links.server.ts';

async function ownPerson(tx: Transaction, actor: Actor, userId: string) {
  const account = await getAccount(tx, userId);
  if (!account || account.organisationId !== actor.organisationId) throw notFound('The person');
  return account;
}

function logChange(tx: Transaction, actor: Actor, userId: string, event: string, summary: string, reason = ''): Promise<void> {
  return insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, event, subject: 'users', subjectId: userId, summary, reason });
}

/** Refuses a change after which nobody could look after the organisation. */
async function keepOneAdministrator(tx: Transaction, organisationId: string, leavingUserId: string): Promise<void> {
  const administrators = await lockAdministrators(tx, organisationId);
  if (administrators.length === 1 && administrators[0] === leavingUserId) {
    throw new DomainError('invalid-state', 'This is the last administrator. Give the role to another person first.');
  }
}

export function addRole(actor: Actor, wanted: { userId: string; role: Role; siteId: string | null }): Promise<void> {
  requireAdministrator(actor);
  return inTransaction(async (tx) => {
    const account = await ownPerson(tx, actor, wanted.userId);
    if (wanted.role === 'administrator' && wanted.siteId) throw new DomainError('invalid-input', 'Nothing was changed.', { fieldErrors: { siteId: [administratorForAllSites.said.message] } });
    const site = wanted.siteId ? await getSiteById(tx, actor.organisationId, wanted.siteId) : null;
    if (wanted.siteId && !site) throw notFound('The site');
    if (!(await insertGrant(tx, wanted))) throw new DomainError('conflict', `${account.displayName} holds this role already.`);
    await logChange(tx, actor, account.id, 'person.role-added', `${account.displayName}: ${roleLabels[wanted.role]}${site ? `, ${site.name}` : ''}`);
  });
}

export function removeRole(actor: Actor, grantId: string): Promise<void> {
  requireAdministrator(actor);
  return inTransaction(async (tx) => {
    const grant = await getGrant(tx, actor.organisationId, grantId);
    if (!grant) throw notFound('The role');
    if (grant.role === 'administrator') await keepOneAdministrator(tx, actor.organisationId, grant.userId);
    await deleteGrant(tx, grantId);
    await logChange(tx, actor, grant.userId, 'person.role-removed', `${grant.displayName}: no longer ${roleLabels[grant.role]}`);
  });
}

/** Switches an account off, which ends its sessions, or on again. Nothing that the person did is removed. */
export async function switchAccount(actor: Actor, change: { userId: string; disabled: boolean; reason: string }): Promise<void> {
  requireAdministrator(actor);
  if (change.disabled && change.userId === actor.userId) throw new DomainError('invalid-state', 'You cannot switch off your own account. Ask another administrator.');
  await inTransaction(async (tx) => {
    const account = await ownPerson(tx, actor, change.userId);
    if (account.disabled === change.disabled) return;
    if (change.disabled) await keepOneAdministrator(tx, actor.organisationId, account.id);
    if (change.disabled) await retireMailedTokens(tx, account.id);
    await updateDisabled(tx, account.id, change.disabled);
    await logChange(tx, actor, account.id, change.disabled ? 'person.switched-off' : 'person.switched-on', `${account.displayName}: account ${change.disabled ? 'switched off' : 'switched on'}`, change.reason);
  });
  if (change.disabled) await closeEverySession(change.userId);
}

/** Sends the invitation again to a person who has not taken it up; the link sent before stops working. */
export function inviteAgain(actor: Actor, userId: string): Promise<void> {
  requireAdministrator(actor);
  return inTransaction(async (tx) => {
    const account = await ownPerson(tx, actor, userId);
    if (account.disabled) throw new DomainError('invalid-state', `The account of ${account.displayName} is switched off. Switch it on first.`);
    if (account.passwordHash) throw new DomainError('invalid-state', `${account.displayName} has taken up the invitation already.`);
    const token = await issueLink(tx, account.id, 'invitation');
    const organisation = await getOrganisationName(tx, actor.organisationId);
    await insertMail(tx, { dedupeKey: `invitation:${mailedTokenHash(token)}`, toAddress: account.email, caseId: null, ...invitationMail({ organisation, invitedBy: actor.displayName, token }) });
    await logChange(tx, actor, account.id, 'person.invited-again', `${account.displayName} invited again`);
  });
}
