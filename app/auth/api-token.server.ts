import { randomBytes } from 'node:crypto';
import { db } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import { useApiToken } from '#db/queries/api-tokens.server.ts';
import type { TokenScope } from '#app/domain/api-token.ts';
import type { Actor } from '#app/domain/roles.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

/** Marks a key as one of ours, so that a scan for lost secrets finds it. */
const prefix = 'scl_';

/** A key of 256 random bits. The database keeps its hash only. */
export function newApiToken(): { token: string; tokenHash: string } {
  const token = `${prefix}${randomBytes(32).toString('base64url')}`;
  return { token, tokenHash: sha256Hex(token) };
}

/** The key that a request carries, or null. */
export function bearerOf(request: Request): string | null {
  return /^Bearer +([\w.~+/-]+=*)$/iu.exec(request.headers.get('Authorization') ?? '')?.[1] ?? null;
}

/** The person for whom a key stands; null when the key is unknown, ended or past its time, or the account is closed. */
export async function actorByToken(token: string): Promise<{ actor: Actor; scope: TokenScope } | null> {
  const known = await useApiToken(db, sha256Hex(token));
  const actor = known ? await getActor(db, known.userId) : null;
  return known && actor ? { actor, scope: known.scope } : null;
}
