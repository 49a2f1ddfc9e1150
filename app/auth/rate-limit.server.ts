import { db } from '#db/client.server.ts';
import { countHit } from '#db/queries/rate-limits.server.ts';
import { DomainError } from '#app/domain/errors.ts';

/** Refuses the call once `limit` hits have come in the window. The sentence says when to try again. */
export async function limitRate(key: string, limit: number, windowS: number): Promise<void> {
  const hits = await countHit(db, key, windowS);
  if (hits > limit) {
    const minutes = Math.max(1, Math.ceil(windowS / 60));
    throw new DomainError('too-many', `Too many tries. Wait ${minutes === 1 ? 'a minute' : `${minutes} minutes`} and try again.`);
  }
}
