import { inTransaction } from '#db/client.server.ts';
import { insertSitePlan, lockSitePlan, updateSitePlan } from '#db/queries/site-plans.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { placePlan, placementWords } from '#app/domain/site-plan.ts';
import type { KnownPointsReading } from '#app/domain/site-plan-form.ts';
import { planNameSchema, readKnownPoints } from '#app/domain/site-plan-form.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { examinePhoto } from '#app/storage/photo-intake.server.ts';
import type { IncomingFile } from '#app/storage/photo-intake.server.ts';
import { planPicture } from '#app/storage/plan-picture.server.ts';
import { logSite, ownSite } from './own-site.server.ts';

/**
 * Takes a drawing for a site: its bytes are judged as those of a photo, the original is kept, and a copy without the
 * file's own data is what maps show. It lies on no map until it is placed.
 *
 * @returns id of the drawing.
 * @throws DomainError `invalid-input` with a sentence beside the field, `forbidden`, `not-found`.
 */
export async function addSitePlan(params: { actor: Actor; siteCode: string; name: string; file: IncomingFile | null }): Promise<string> {
  const { actor, siteCode, file } = params;
  const name = planNameSchema.safeParse(params.name);
  const fieldErrors: Record<string, string[]> = {};
  if (!name.success) fieldErrors['name'] = name.error.issues.map((issue) => issue.message);
  const examined = file ? await examinePhoto(file) : null;
  if (!examined) fieldErrors['picture'] = ['Choose a picture of the plan: PNG, JPEG or WebP.'];
  else if (!examined.ok) fieldErrors['picture'] = [examined.sentence];
  else if (examined.photo.mime === 'image/heic') fieldErrors['picture'] = ['Plans are taken as PNG, JPEG or WebP. Save it as one of these first.'];
  if (!name.success || !examined?.ok || Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The drawing was not added.', { fieldErrors });
  const { photo } = examined;
  // Rights are checked before anything is stored, and again under the lock.
  await inTransaction((tx) => ownSite(tx, actor, siteCode));
  const copy = await planPicture(photo.bytes);
  const originalKey = `plans/${photo.sha256}/original`;
  const pictureKey = `plans/${photo.sha256}/picture.png`;
  await putObject(originalKey, photo.bytes, photo.mime);
  await putObject(pictureKey, copy.bytes, 'image/png');
  return inTransaction(async (tx) => {
    const site = await ownSite(tx, actor, siteCode);
    const planId = await insertSitePlan(tx, { siteId: site.id, name: name.data, originalKey, sha256: photo.sha256, pictureKey, widthPx: copy.widthPx, heightPx: copy.heightPx, createdById: actor.userId });
    await logSite(tx, actor, site.id, 'site.plan-added', `Drawing “${name.data}” added to ${site.name}`, { planId, sha256: photo.sha256 });
    return planId;
  });
}

/** Lays a drawing on the map by its known points. What was wrong comes back; nothing is changed then. */
export function placeSitePlan(params: { actor: Actor; siteCode: string; planId: string; typed: Readonly<Record<string, string>> }): Promise<KnownPointsReading> {
  const { actor, siteCode, planId, typed } = params;
  return inTransaction(async (tx) => {
    const site = await ownSite(tx, actor, siteCode);
    const plan = await lockSitePlan(tx, { siteId: site.id, planId });
    if (!plan) throw notFound('The drawing');
    const reading = readKnownPoints(typed, plan);
    if (!reading.ok) return reading;
    await updateSitePlan(tx, plan.id, { points: reading.points });
    const placement = placePlan(plan, reading.points);
    await logSite(tx, actor, site.id, 'site.plan-placed', `Drawing “${plan.name}” of ${site.name} placed by ${reading.points.length} points. ${placement ? placementWords(placement) : ''}`.trim(), { planId, points: reading.points });
    return reading;
  });
}

/** Takes a drawing off the maps. The file stays: reports may have been made on it. */
export function removeSitePlan(params: { actor: Actor; siteCode: string; planId: string; now: Date }): Promise<void> {
  const { actor, siteCode, planId, now } = params;
  return inTransaction(async (tx) => {
    const site = await ownSite(tx, actor, siteCode);
    const plan = await lockSitePlan(tx, { siteId: site.id, planId });
    if (!plan) throw notFound('The drawing');
    await updateSitePlan(tx, plan.id, { removedAt: now });
    await logSite(tx, actor, site.id, 'site.plan-removed', `Drawing “${plan.name}” of ${site.name} taken off the maps`, { planId });
  });
}
