import { z } from 'zod';

/** What a key of the programming interface may do: look sun and sky up, or that and compute. */
export const tokenScopes = ['read', 'compute'] as const;
export type TokenScope = (typeof tokenScopes)[number];
export const tokenScopeLabels: Record<TokenScope, string> = { read: 'Look up sun and sky', compute: 'Look up and compute' };

export const scopeAllows = (scope: TokenScope, kind: TokenScope): boolean => scope === 'compute' || kind === 'read';

/** Days for which a key can be made. Longer than a year nobody remembers that it exists. */
export const tokenLifetimes = ['30', '90', '365'] as const;
export const mostTokens = 10;

export const makeTokenSchema = z.object({
  intent: z.literal('make-token'),
  name: z.string().trim().min(1, 'Say what the key is for, so that you know later which one to end.').max(80, 'Use at most 80 characters.'),
  scope: z.enum(tokenScopes, 'Choose what the key may do.'),
  days: z.enum(tokenLifetimes, 'Choose how long the key holds.'),
});
export const revokeTokenSchema = z.object({ intent: z.literal('revoke-token'), tokenId: z.uuid('Choose the key to end.') });

/** A key as its owner sees it; the word itself is not kept. */
export interface TokenLine {
  readonly id: string;
  readonly name: string;
  readonly scope: TokenScope;
  readonly createdAt: Date;
  readonly expiresAt: Date;
  readonly lastUsedAt: Date | null;
}
