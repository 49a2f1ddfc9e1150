import { inTransaction } from '#db/client.server.ts';
import { insertApiToken, listApiTokens, revokeApiToken } from '#db/queries/api-tokens.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { lockUser } from '#db/queries/users.server.ts';
import { newApiToken } from '#app/auth/api-token.server.ts';
import { mostTokens, tokenScopeLabels, type TokenScope } from '#app/domain/api-token.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';

const lineOf = (actor: Actor, tokenId: string) => ({
  actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, subject: 'api_tokens', subjectId: tokenId,
});

/** Makes a key with which a program may act for the person. Returns the word itself: it is not kept, and shown this once. */
export async function makeApiToken(actor: Actor, request: { name: string; scope: TokenScope; days: number }): Promise<string> {
  if (!canInOrganisation(actor, 'register:read')) throw new DomainError('forbidden', 'Your roles do not include the programming interface.');
  const { token, tokenHash } = newApiToken();
  await inTransaction(async (tx) => {
    await lockUser(tx, actor.userId);
    const held = await listApiTokens(tx, actor.userId);
    if (held.length >= mostTokens) throw new DomainError('invalid-state', `You hold ${held.length} keys already. End one that is no longer used, then make a new one.`);
    const id = await insertApiToken(tx, { userId: actor.userId, tokenHash, ...request });
    await insertLogEntry(tx, { ...lineOf(actor, id), event: 'account.token-made', summary: `Key “${request.name}” made: ${tokenScopeLabels[request.scope].toLowerCase()}, ${request.days} days` });
  });
  return token;
}

/** Ends one of the person's own keys at once. */
export function revokeToken(actor: Actor, tokenId: string): Promise<void> {
  return inTransaction(async (tx) => {
    const name = await revokeApiToken(tx, { userId: actor.userId, tokenId });
    if (name === null) throw notFound('A key that holds');
    await insertLogEntry(tx, { ...lineOf(actor, tokenId), event: 'account.token-ended', summary: `Key “${name}” ended` });
  });
}
