import { inTransaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { lockSiteByCode, updateSiteSkyline } from '#db/queries/sites.server.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { plainText } from '#app/domain/incident.ts';
import { holdsRole } from '#app/domain/roles.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import type { SceneSkyline } from '#app/domain/scene.ts';
import { readSkylineForm } from '#app/domain/skyline-form.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { lockScene, noteErrors, writeScene } from './write-scene.server.ts';

type Typed = Readonly<Record<string, string>>;

function readTyped(typed: Typed, note: string): SceneSkyline | null {
  const reading = readSkylineForm(typed);
  const fieldErrors = { ...(reading.ok ? {} : reading.fieldErrors), ...noteErrors(note) };
  if (!reading.ok || Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The skyline cannot be saved as it stands.', { fieldErrors });
  return reading.skyline;
}

/** Skyline of one case, as a new version of its measurements. Left empty, the skyline of the site is used again. */
export function saveCaseSkyline(request: { actor: Actor; caseNumber: number; baseVersion: number; note: string; typed: Typed }): Promise<number> {
  return inTransaction(async (tx) => {
    const { actor, typed } = request;
    const locked = await lockScene(tx, actor, request.caseNumber, request.baseVersion);
    const skyline = readTyped(typed, request.note);
    const { skyline: _before, ...rest } = locked.scene ?? sceneSchema.parse({});
    return writeScene(tx, locked, { actor, scene: { ...rest, ...(skyline ? { skyline } : {}) }, note: plainText(500).parse(request.note) });
  });
}

/** Those who may measure the skyline of a site. */
export const siteSkylineRoles: readonly Role[] = ['investigator', 'manager', 'administrator'];

/**
 * Skyline of a site, used by every case there that has none of its own.
 *
 * @throws DomainError `not-found`, `forbidden`, `invalid-input`; `conflict` when somebody saved another in between.
 */
export function saveSiteSkyline(request: { actor: Actor; siteCode: string; base: string; note: string; typed: Typed }): Promise<void> {
  return inTransaction(async (tx) => {
    const { actor, siteCode, typed } = request;
    const site = await lockSiteByCode(tx, actor.organisationId, siteCode);
    if (!site) throw notFound('The site');
    if (!holdsRole(actor, siteSkylineRoles, site.id)) throw new DomainError('forbidden', 'The skyline of a site is measured by an investigator, the site manager or an administrator.');
    if (skylineBase(site.skyline) !== request.base) throw new DomainError('conflict', 'Somebody saved another skyline of this site meanwhile. What you typed is kept; load the page again to see theirs.');
    const skyline = readTyped(typed, request.note);
    if (canonicalJson(skyline) === canonicalJson(site.skyline)) return;
    await updateSiteSkyline(tx, site.id, skyline);
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: actor.organisationId,
      caseId: null,
      event: 'site.skyline-saved',
      subject: 'sites',
      subjectId: site.id,
      summary: skyline ? `Skyline of ${site.name}, ${skyline.points.length} points` : `Skyline of ${site.name} taken away`,
      reason: plainText(500).parse(request.note),
      before: { skyline: site.skyline },
      after: { skyline },
    });
  });
}

/** What a form was filled from, so that nobody overwrites another's points unseen. */
export const skylineBase = (skyline: SceneSkyline | null): string => hashOf(skyline);
