import { db, inTransaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { retireMailedTokens } from '#db/queries/mailed-tokens.server.ts';
import { getAccount, updatePassword, updateUnits } from '#db/queries/users.server.ts';
import { hashPassword, verifyPassword } from '#app/auth/password.server.ts';
import { closeEverySession, openSession } from '#app/auth/session.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { limitRate } from '#app/auth/rate-limit.server.ts';

/** Changes one's own password; every other session ends. Returns the cookie of the new one. */
export async function changePassword(actor: Actor, request: { currentPassword: string; password: string }): Promise<string> {
  await limitRate(`change-password:${actor.userId}`, 10, 900);
  const account = await getAccount(db, actor.userId);
  if (!account || !(await verifyPassword(account.passwordHash, request.currentPassword))) {
    throw new DomainError('invalid-input', 'Nothing was changed.', { fieldErrors: { currentPassword: ['This is not the password you use now.'] } });
  }
  if (request.password.toLowerCase() === account.email) throw new DomainError('invalid-input', 'Nothing was changed.', { fieldErrors: { password: ['Choose something other than your e-mail address.'] } });
  const passwordHash = await hashPassword(request.password);
  await inTransaction(async (tx) => {
    await updatePassword(tx, actor.userId, passwordHash);
    await retireMailedTokens(tx, actor.userId);
    await insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, event: 'account.password-changed', subject: 'users', subjectId: actor.userId, summary: 'Password changed' });
  });
  await closeEverySession(actor.userId);
  return openSession(actor.userId);
}

export async function changeUnits(actor: Actor, units: 'metric' | 'us'): Promise<void> {
  await updateUnits(db, actor.userId, units);
}

/** Ends every session of the person on every device and returns the cookie that clears this one. */
export async function signOutEverywhere(actor: Actor): Promise<string> {
  await inTransaction((tx) =>
    insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, event: 'account.signed-out-everywhere', subject: 'users', subjectId: actor.userId, summary: 'Signed out on every device' }),
  );
  return closeEverySession(actor.userId);
}
