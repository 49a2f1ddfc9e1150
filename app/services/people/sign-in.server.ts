import { db } from '#db/client.server.ts';
import { getAccountByEmail } from '#db/queries/users.server.ts';
import { verifyPassword } from '#app/auth/password.server.ts';
import { openSession } from '#app/auth/session.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { limitRate } from '#app/auth/rate-limit.server.ts';

const windowS = 900;

/**
 * Checks e-mail and password and opens a session.
 *
 * The refusal is the same for an unknown address, a wrong password and a switched-off account, and takes the same work.
 *
 * @returns the cookie to set and whose session it is.
 */
export async function signIn(attempt: { email: string; password: string; address: string }): Promise<{ setCookie: string; userId: string }> {
  await limitRate(`sign-in:address:${attempt.address}`, 60, windowS);
  await limitRate(`sign-in:account:${attempt.email}`, 10, windowS);
  const account = await getAccountByEmail(db, attempt.email);
  const matches = await verifyPassword(account?.passwordHash ?? null, attempt.password);
  if (!account || !matches || account.disabled) {
    throw new DomainError('invalid-input', 'E-mail and password do not belong together. Check both, or ask for a new password.');
  }
  return { setCookie: await openSession(account.id), userId: account.id };
}
