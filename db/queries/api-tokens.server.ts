import { and, desc, eq, gt, isNull, lt, or, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { apiTokens } from '#db/schema/all.ts';
import type { TokenLine, TokenScope } from '#app/domain/api-token.ts';

const usable = and(isNull(apiTokens.revokedAt), gt(apiTokens.expiresAt, sql`now()`));

export async function insertApiToken(tx: Transaction, token: { userId: string; tokenHash: string; name: string; scope: TokenScope; days: number }): Promise<string> {
  const { days, ...row } = token;
  const [stored] = await tx
    .insert(apiTokens)
    .values({ ...row, expiresAt: sql`now() + make_interval(days => ${days})` })
    .returning({ id: apiTokens.id });
  if (!stored) throw new Error('The key was not stored.');
  return stored.id;
}

/** Keys of a person that still hold, newest first. */
export function listApiTokens(db: DbOrTx, userId: string): Promise<TokenLine[]> {
  return db
    .select({ id: apiTokens.id, name: apiTokens.name, scope: apiTokens.scope, createdAt: apiTokens.createdAt, expiresAt: apiTokens.expiresAt, lastUsedAt: apiTokens.lastUsedAt })
    .from(apiTokens)
    .where(and(eq(apiTokens.userId, userId), usable))
    .orderBy(desc(apiTokens.createdAt));
}

/** Ends one of a person's own keys; its name, or null when there is none such. */
export async function revokeApiToken(tx: Transaction, params: { userId: string; tokenId: string }): Promise<string | null> {
  const [row] = await tx
    .update(apiTokens)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(apiTokens.id, params.tokenId), eq(apiTokens.userId, params.userId), isNull(apiTokens.revokedAt)))
    .returning({ name: apiTokens.name });
  return row?.name ?? null;
}

/** Whom a key stands for and what it may do; null when it is unknown, ended or past its time. Notes the use, to the minute. */
export async function useApiToken(db: DbOrTx, tokenHash: string): Promise<{ userId: string; scope: TokenScope } | null> {
  const [row] = await db.select({ id: apiTokens.id, userId: apiTokens.userId, scope: apiTokens.scope }).from(apiTokens).where(and(eq(apiTokens.tokenHash, tokenHash), usable));
  if (!row) return null;
  await db
    .update(apiTokens)
    .set({ lastUsedAt: sql`now()` })
    .where(and(eq(apiTokens.id, row.id), or(isNull(apiTokens.lastUsedAt), lt(apiTokens.lastUsedAt, sql`now() - interval '1 minute'`))));
  return { userId: row.userId, scope: row.scope };
}

/** Removes keys that ended more than a month ago. */
export async function deleteOldApiTokens(db: DbOrTx): Promise<void> {
  await db.delete(apiTokens).where(or(lt(apiTokens.expiresAt, sql`now() - interval '30 days'`), lt(apiTokens.revokedAt, sql`now() - interval '30 days'`)));
}
