import { db } from '#db/client.server.ts';
import type { SentReport } from '#db/queries/reports.server.ts';
import { getGuestSite } from '#db/queries/reports.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import type { Actor } from '#app/domain/roles.ts';

/**
 * Who may report here: a guest by the code of a site's link, else the signed-in person. The code wins, so that somebody
 * signed in who scans a door reports for that door.
 *
 * @returns null when nobody is signed in and no code was given.
 * @throws DomainError `not-found` for a code that opens nothing, `forbidden` for roles that do not report.
 */
export async function identifyHolder(actor: Actor | null, guestCode: string | null): Promise<ReportHolder | null> {
  if (guestCode) {
    const site = await getGuestSite(db, guestCode);
    if (!site) throw new DomainError('not-found', 'This link is closed, or was mistyped. Ask at the site for the current one, or sign in to report.');
    if (actor && actor.organisationId === site.organisationId && canInOrganisation(actor, 'report:create')) return { kind: 'person', actor };
    return { kind: 'guest', site };
  }
  if (!actor) return null;
  if (!canInOrganisation(actor, 'report:create')) throw new DomainError('forbidden', 'Your roles do not include reporting. An administrator of your organisation can change that.');
  return { kind: 'person', actor };
}

/** The account behind the holder; null for guests. */
export const holderId = (holder: ReportHolder): string | null => (holder.kind === 'person' ? holder.actor.userId : null);

/** Names the place on a device where this holder's reports lie. */
export const holderKeyOf = (holder: ReportHolder): string => (holder.kind === 'person' ? `person-${holder.actor.userId}` : `site-${holder.site.id}`);

/** Whether a report that was sent is this holder's: the same person, or a guest by the link of the same site. */
export function isHeldBy(sent: Pick<SentReport, 'reporterId' | 'siteId'>, holder: ReportHolder): boolean {
  return holder.kind === 'person' ? sent.reporterId === holder.actor.userId : sent.reporterId === null && sent.siteId === holder.site.id;
}

export const notYourReport = () =>
  new DomainError('forbidden', 'This report was begun by somebody else. Start a new one: nothing of theirs is changed.');
