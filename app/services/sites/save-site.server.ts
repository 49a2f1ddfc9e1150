import { randomBytes } from 'node:crypto';
import { inTransaction } from '#db/client.server.ts';
import { insertSite, updateGuestCode, updateSite } from '#db/queries/sites.server.ts';
import type { NewSite } from '#db/queries/sites.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { logSite, ownSite, requireSiteRights } from './own-site.server.ts';
import { zoneAt } from './zone-at.server.ts';

const withZone = <Facts extends { zone: string; latitudeDeg: number; longitudeDeg: number }>(facts: Facts): Facts => ({
  ...facts,
  zone: facts.zone === '' ? zoneAt(facts) : facts.zone,
});

export function addSite(actor: Actor, site: NewSite): Promise<void> {
  requireSiteRights(actor, null);
  return inTransaction(async (tx) => {
    const id = await insertSite(tx, actor.organisationId, withZone(site));
    if (!id) throw new DomainError('conflict', 'The site was not added.', { fieldErrors: { code: ['Another site has this code. Choose another.'] } });
    await logSite(tx, actor, id, 'site.added', `Site ${site.name} added`);
  });
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
