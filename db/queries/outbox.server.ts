import { and, eq, lte, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { outbox } from '#db/schema/all.ts';

export interface NewMail {
  readonly dedupeKey: string;
  readonly toAddress: string;
  readonly subject: string;
  readonly bodyText: string;
  readonly bodyHtml: string;
  readonly caseId: string | null;
  /** Not before so many seconds from now, so that what causes it can be taken back. */
  readonly heldForS?: number;
}

/** Puts a message in the outbox within the caller's transaction. A second message with the same key is dropped. */
export async function insertMail(tx: Transaction, { heldForS = 0, ...mail }: NewMail): Promise<void> {
  await tx
    .insert(outbox)
    .values({ ...mail, nextAttemptAt: sql`now() + make_interval(secs => ${heldForS})` })
    .onConflictDoNothing({ target: outbox.dedupeKey });
}

/**
 * Takes messages out of the outbox that nobody has tried to send, by the start of their keys.
 *
 * @returns How many others with such a key were tried already, and stay.
 */
export async function removeUnsentMail(tx: Transaction, keyStart: string): Promise<number> {
  const ofKey = sql`starts_with(${outbox.dedupeKey}, ${keyStart})`;
  await tx.delete(outbox).where(and(ofKey, eq(outbox.state, 'waiting'), eq(outbox.attempts, 0)));
  return tx.$count(outbox, ofKey);
}

/** Messages that are due, locked for this transaction so that two workers never send the same one. */
export function claimDueMail(tx: Transaction, limit: number) {
  return tx
    .select()
    .from(outbox)
    .where(and(eq(outbox.state, 'waiting'), lte(outbox.nextAttemptAt, sql`now()`)))
    .orderBy(outbox.createdAt)
    .limit(limit)
    .for('update', { skipLocked: true });
}

/** Letters without a case hold links that open an account, so their words are not kept once they have gone. */
export async function markMailSent(db: DbOrTx, mailId: string): Promise<void> {
  const keptOfCase = (column: typeof outbox.bodyText | typeof outbox.bodyHtml) => sql`case when ${outbox.caseId} is null then '' else ${column} end`;
  await db
    .update(outbox)
    .set({ state: 'sent', sentAt: sql`now()`, attempts: sql`${outbox.attempts} + 1`, lastError: null, bodyText: keptOfCase(outbox.bodyText), bodyHtml: keptOfCase(outbox.bodyHtml) })
    .where(eq(outbox.id, mailId));
}

export const mailAttemptLimit = 8;

/** Next try after 1, 2, 4 … minutes; after the last the message stays as failed and is listed for the administrator. */
export async function markMailFailed(db: DbOrTx, mailId: string, error: string): Promise<void> {
  await db
    .update(outbox)
    .set({
      attempts: sql`${outbox.attempts} + 1`,
      lastError: error.slice(0, 500),
      state: sql`case when ${outbox.attempts} + 1 >= ${mailAttemptLimit} then 'failed' else 'waiting' end`,
      nextAttemptAt: sql`now() + interval '1 minute' * power(2, ${outbox.attempts})`,
    })
    .where(eq(outbox.id, mailId));
}
