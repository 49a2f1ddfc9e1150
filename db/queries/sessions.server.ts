import { lt, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { sessions } from '#db/schema/all.ts';

/** Removes sessions that are past their time; the session library refuses them already. */
export async function deleteExpiredSessions(db: DbOrTx): Promise<void> {
  await db.delete(sessions).where(lt(sessions.expiresAt, sql`now()`));
}
