import { setTimeout as sleep } from 'node:timers/promises';
import { db, inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertMailedToken, peekMailedToken, retireMailedTokens, useMailedToken } from '#db/queries/mailed-tokens.server.ts';
import type { TokenPurpose } from '#db/queries/mailed-tokens.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { getAccount, getAccountByEmail, updatePassword } from '#db/queries/users.server.ts';
import { mailedTokenHash, newMailedToken, tokenLifetimeMs } from '#app/auth/mailed-token.server.ts';
import { hashPassword } from '#app/auth/password.server.ts';
import { closeEverySession, openSession } from '#app/auth/session.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { limitRate } from '#app/auth/rate-limit.server.ts';
import { passwordResetMail } from '#app/mail/templates/account.ts';

const spentLink = () => new DomainError('invalid-input', 'This link has been used or is past its time. Ask for a new one.');

/** A fresh link for a person; links sent before stop working. */
export async function issueLink(tx: Transaction, userId: string, purpose: TokenPurpose): Promise<string> {
  const { token, tokenHash } = newMailedToken();
  await retireMailedTokens(tx, userId, purpose);
  await insertMailedToken(tx, { tokenHash, userId, purpose, expiresAt: new Date(Date.now() + tokenLifetimeMs[purpose]) });
  return token;
}

/** The answer takes at least this long, so that its time does not tell whether a letter was written. [ms] */
const shortestAnswerMs = 300;

/** Sends a link when the address has an account; the caller cannot tell whether it had. */
export async function requestPasswordReset(request: { email: string; address: string }): Promise<void> {
  await limitRate(`reset:address:${request.address}`, 20, 3_600);
  await limitRate(`reset:account:${request.email}`, 5, 3_600);
  await Promise.all([sendResetLink(request.email), sleep(shortestAnswerMs)]);
}

async function sendResetLink(email: string): Promise<void> {
  const account = await getAccountByEmail(db, email);
  if (!account || account.disabled) return;
  await inTransaction(async (tx) => {
    const token = await issueLink(tx, account.id, 'password-reset');
    await insertMail(tx, { dedupeKey: `password-reset:${mailedTokenHash(token)}`, toAddress: account.email, caseId: null, ...passwordResetMail({ token }) });
    await insertLogEntry(tx, { actorId: account.id, actorName: account.displayName, organisationId: account.organisationId, caseId: null, event: 'account.reset-requested', subject: 'users', subjectId: account.id, summary: 'New password asked for' });
  });
}

/** Sets the password by a mailed link, ends every session and opens a new one. */
export async function setPasswordByLink(request: { token: string; purpose: TokenPurpose; password: string }): Promise<{ setCookie: string }> {
  const tokenHash = mailedTokenHash(request.token);
  // Looked at first, because hashing a password for a made-up link would be work for nothing.
  if (!(await peekMailedToken(db, tokenHash, request.purpose))) throw spentLink();
  const passwordHash = await hashPassword(request.password);
  const userId = await inTransaction(async (tx) => {
    const owner = await useMailedToken(tx, tokenHash, request.purpose);
    const account = owner ? await getAccount(tx, owner) : null;
    if (!account || account.disabled) throw spentLink();
    if (request.password.toLowerCase() === account.email) throw new DomainError('invalid-input', 'The password was not set.', { fieldErrors: { password: ['Choose something other than your e-mail address.'] } });
    await updatePassword(tx, account.id, passwordHash);
    await retireMailedTokens(tx, account.id);
    await insertLogEntry(tx, { actorId: account.id, actorName: account.displayName, organisationId: account.organisationId, caseId: null, event: 'account.password-set', subject: 'users', subjectId: account.id, summary: request.purpose === 'invitation' ? 'Invitation taken up' : 'Password set by a mailed link' });
    return account.id;
  });
  await closeEverySession(userId);
  return { setCookie: await openSession(userId) };
}
