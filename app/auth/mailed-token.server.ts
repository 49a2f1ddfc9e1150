import { randomBytes } from 'node:crypto';
import { sha256Hex } from '#app/storage/sha256.server.ts';

/** A one-time link word of 256 random bits. The database keeps its hash only. */
export function newMailedToken(): { token: string; tokenHash: string } {
  const token = randomBytes(32).toString('base64url');
  return { token, tokenHash: sha256Hex(token) };
}

export const mailedTokenHash = (token: string): string => sha256Hex(token);

export const tokenLifetimeMs = { invitation: 7 * 86_400_000, 'password-reset': 3_600_000 } as const;
