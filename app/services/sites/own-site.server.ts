import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { lockSiteByCode } from '#db/queries/sites.server.ts';
import type { SiteRow } from '#db/queries/sites.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { holdsRole } from '#app/domain/roles.ts';
import type { Actor } from '#app/domain/roles.ts';

/** @throws DomainError `forbidden` for anyone who does not look after this site, or after all of them when it is null. */
export function requireSiteRights(actor: Actor, siteId: string | null): void {
  if (!holdsRole(actor, ['administrator', 'manager'], siteId)) throw new DomainError('forbidden', 'Sites are looked after by the site manager or an administrator.');
}

/** The site under its lock, for somebody who looks after it. */
export async function ownSite(tx: Transaction, actor: Actor, code: string): Promise<SiteRow> {
  const site = await lockSiteByCode(tx, actor.organisationId, code);
  if (!site) throw notFound('The site');
  requireSiteRights(actor, site.id);
  return site;
}

export function logSite(tx: Transaction, actor: Actor, siteId: string, event: string, summary: string, after?: Record<string, unknown>): Promise<void> {
  return insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, event, subject: 'sites', subjectId: siteId, summary, ...(after ? { after } : {}) });
}
