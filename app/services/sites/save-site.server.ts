import { randomBytes } from 'node:crypto';
import tzLookup from 'tz-lookup';
import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertSite, lockSiteByCode, updateGuestCode, updateSite } from '#db/queries/sites.server.ts';
import type { NewSite } from '#db/queries/sites.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { holdsRole } from '#app/domain/roles.ts';
import type { Actor } from '#app/domain/roles.ts';

const requireSiteRights = (actor: Actor, siteId: string | null) => {
  if (!holdsRole(actor, ['administrator', 'manager'], siteId)) throw new DomainError('forbidden', 'Sites are looked after by the site manager or an administrator.');
};

const withZone = <Facts extends { zone: string; latitudeDeg: number; longitudeDeg: number }>(facts: Facts): Facts => ({
  ...facts,
  zone: facts.zone === '' ? tzLookup(facts.latitudeDeg, facts.longitudeDeg) : facts.zone,
});

function logSite(tx: Transaction, actor: Actor, siteId: string, event: string, summary: string, after?: Record<string, unknown>): Promise<void> {
  return insertLogEntry(tx, { actorId: actor.userId, actorName: actor.displayName, organisationId: actor.organisationId, caseId: null, event, subject: 'sites', subjectId: siteId, summary, ...(after ? { after } : {}) });
}

export function addSite(actor: Actor, site: NewSite): Promise<void> {
  requireSiteRights(actor, null);
  return inTransaction(async (tx) => {
    const id = await insertSite(tx, actor.organisationId, withZone(site));
    if (!id) throw new DomainError('conflict', 'The site was not added.', { fieldErrors: { code: ['Another site has this code. Choose another.'] } });
    await logSite(tx, actor, id, 'site.added', `Site ${site.name} added`);
  });
}

async function ownSite(tx: Transaction, actor: Actor, code: string) {
  const site = await lockSiteByCode(tx, actor.organisationId, code);
  if (!site) throw notFound('The site');
  requireSiteRights(actor, site.id);
  return site;
}

export function changeSite(actor: Actor, code: string, facts: Omit<NewSite, 'code'>): Promise<void> {
  return inTransaction(async (tx) => {
    const site = await ownSite(tx, actor, code);
    await updateSite(tx, site.id, withZone(facts));
    await logSite(tx, actor, site.id, 'site.changed', `Site ${facts.name} changed`, { ...facts });
  });
}

/** Opens the report link for people without an account, with a word that cannot be guessed, or closes it. */
export function setGuestLink(actor: Actor, code: string, open: boolean): Promise<void> {
  return inTransaction(async (tx) => {
    const site = await ownSite(tx, actor, code);
    // A second press must not make a new word: the first may be posted at the door already.
    if (open === (site.guestCode !== null)) return;
    const guestCode = open ? `${site.code.toLowerCase()}-${randomBytes(9).toString('base64url')}` : null;
    await updateGuestCode(tx, site.id, guestCode);
    await logSite(tx, actor, site.id, open ? 'site.guest-link-opened' : 'site.guest-link-closed', `Report link of ${site.name} ${open ? 'opened' : 'closed'}`);
  });
}
