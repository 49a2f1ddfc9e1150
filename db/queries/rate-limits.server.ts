import { lt, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { rateLimits } from '#db/schema/all.ts';

/** Counts a hit in the fixed window of `key`, shared by all processes, and returns the hits in the window so far. */
export async function countHit(db: DbOrTx, key: string, windowS: number): Promise<number> {
  const expired = sql`${rateLimits.windowStartedAt} < now() - make_interval(secs => ${windowS})`;
  const [row] = await db
    .insert(rateLimits)
    .values({ key, windowStartedAt: sql`now()`, hits: 1 })
    .onConflictDoUpdate({
      target: rateLimits.key,
      set: {
        hits: sql`case when ${expired} then 1 else ${rateLimits.hits} + 1 end`,
        windowStartedAt: sql`case when ${expired} then now() else ${rateLimits.windowStartedAt} end`,
      },
    })
    .returning({ hits: rateLimits.hits });
  return row?.hits ?? 1;
}

/** Forgets counters of windows that are over; their keys hold addresses. No window is longer than a day. */
export async function deleteOldHits(db: DbOrTx): Promise<void> {
  await db.delete(rateLimits).where(lt(rateLimits.windowStartedAt, sql`now() - interval '1 day'`));
}
