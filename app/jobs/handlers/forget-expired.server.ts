import { db } from '#db/client.server.ts';
import { deleteOldComputations } from '#db/queries/api-computations.server.ts';
import { deleteOldApiTokens } from '#db/queries/api-tokens.server.ts';
import { deleteOldMailedTokens } from '#db/queries/mailed-tokens.server.ts';
import { deleteOldHits } from '#db/queries/rate-limits.server.ts';
import { deleteExpiredSessions } from '#db/queries/sessions.server.ts';

/** Removes what serves nobody any more and names people or their devices: ended sessions, spent links and keys, old counters and computations. */
export async function forgetExpired(): Promise<void> {
  await deleteExpiredSessions(db);
  await deleteOldMailedTokens(db);
  await deleteOldHits(db);
  await deleteOldApiTokens(db);
  await deleteOldComputations(db);
}
