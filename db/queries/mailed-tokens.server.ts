import { and, eq, gt, isNull, lt, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { mailedTokens, users } from '#db/schema/all.ts';

export type TokenPurpose = 'invitation' | 'password-reset';

export async function insertMailedToken(tx: Transaction, token: { tokenHash: string; userId: string; purpose: TokenPurpose; expiresAt: Date }): Promise<void> {
  await tx.insert(mailedTokens).values(token);
}

const usable = (tokenHash: string, purpose: TokenPurpose) =>
  and(eq(mailedTokens.tokenHash, tokenHash), eq(mailedTokens.purpose, purpose), isNull(mailedTokens.usedAt), gt(mailedTokens.expiresAt, sql`now()`));

/** Whom a link is for, without using it up; null when it is unknown, used or past its time. */
export async function peekMailedToken(db: DbOrTx, tokenHash: string, purpose: TokenPurpose): Promise<{ userId: string; displayName: string; email: string } | null> {
  const [row] = await db
    .select({ userId: users.id, displayName: users.displayName, email: users.email })
    .from(mailedTokens)
    .innerJoin(users, eq(users.id, mailedTokens.userId))
    .where(and(usable(tokenHash, purpose), eq(users.disabled, false)));
  return row ?? null;
}

/** Uses a link up; null when somebody was faster, or it is past its time. */
export async function useMailedToken(tx: Transaction, tokenHash: string, purpose: TokenPurpose): Promise<string | null> {
  const [row] = await tx.update(mailedTokens).set({ usedAt: sql`now()` }).where(usable(tokenHash, purpose)).returning({ userId: mailedTokens.userId });
  return row?.userId ?? null;
}

/** Ends the links of a person that are still open: those of one purpose, or all of them. */
export async function retireMailedTokens(tx: Transaction, userId: string, purpose?: TokenPurpose): Promise<void> {
  await tx
    .update(mailedTokens)
    .set({ usedAt: sql`now()` })
    .where(and(eq(mailedTokens.userId, userId), purpose ? eq(mailedTokens.purpose, purpose) : undefined, isNull(mailedTokens.usedAt)));
}

/** Removes links that ended more than a month ago. */
export async function deleteOldMailedTokens(db: DbOrTx): Promise<void> {
  await db.delete(mailedTokens).where(lt(mailedTokens.expiresAt, sql`now() - interval '30 days'`));
}
