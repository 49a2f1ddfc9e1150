import { eq } from 'drizzle-orm';
import { afterAll, beforeEach, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { loader as picture } from '#app/routes/resources/site-plan.ts';
import { loader as doorCard } from '#app/routes/sites/door-card.tsx';
import { addSitePlan, placeSitePlan, removeSitePlan } from '#app/services/sites/site-plans.server.ts';
import { db } from '#db/client.server.ts';
import { listPlacedPlans, listSitePlans } from '#db/queries/site-plans.server.ts';
import { sitePlans } from '#db/schema/all.ts';
import { eventsAbout, refusal, settled } from '#tests/db/auth/stage.ts';
import { cameraJpeg, plainJpeg } from '#tests/db/photos/picture-files.ts';
import { contextFor, openGuestLink } from '#tests/db/reports/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createHouse, createSite } from '#tests/support/factories.ts';

let house: House;
beforeEach(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

const add = async (actor: Actor, name = 'Roof', bytes?: Uint8Array) => addSitePlan({ actor, siteCode: house.site.code, name, file: { name: 'roof.jpg', bytes: bytes ?? new Uint8Array(await plainJpeg(400, 300)) } });
const twoPoints = { 'point-1-x': '0', 'point-1-y': '0', 'point-1-place': '53.5, -1.6', 'point-2-x': '400', 'point-2-y': '300', 'point-2-place': '53.4997, -1.5994' };
const place = (actor: Actor, planId: string, typed: Readonly<Record<string, string>> = twoPoints) => placeSitePlan({ actor, siteCode: house.site.code, planId, typed });

describe('a drawing of a site', () => {
  test('is added by those who look after the site, lies on no map until it is placed, and each step is logged', async () => {
    const planId = await add(house.manager);
    expect(await listPlacedPlans(db, [house.site.id])).toEqual([]);
    expect(await place(house.administrator, planId)).toMatchObject({ ok: true });
    expect(await listPlacedPlans(db, [house.site.id])).toMatchObject([{ id: planId, name: 'Roof', widthPx: 400, heightPx: 300 }]);
    await removeSitePlan({ actor: house.manager, siteCode: house.site.code, planId, now: new Date() });
    expect(await listSitePlans(db, house.site.id)).toEqual([]);
    expect(await eventsAbout(house.site.id)).toEqual(['site.plan-added', 'site.plan-placed', 'site.plan-removed']);
  });

  test('is not added, placed or removed by anybody else', async () => {
    const planId = await add(house.manager);
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const otherManager = await createActor(house.organisation.id, { role: 'manager', siteId: elsewhere.id });
    for (const actor of [house.reporter, house.investigator, house.reviewer, house.privacyLead, otherManager]) {
      expect((await refusal(add(actor))).code).toBe('forbidden');
      expect((await refusal(place(actor, planId))).code).toBe('forbidden');
      expect((await refusal(removeSitePlan({ actor, siteCode: house.site.code, planId, now: new Date() }))).code).toBe('forbidden');
    }
    expect((await refusal(add((await createHouse()).manager))).code).toBe('not-found');
  });

  test('is refused with a sentence beside the field when it is no picture or has no name', async () => {
    const { fieldErrors } = await refusal(add(house.manager, '', new TextEncoder().encode('not a picture')));
    expect(fieldErrors).toEqual({ name: [expect.stringContaining('Roof')], picture: [expect.stringContaining('roof.jpg')] });
    expect((await refusal(addSitePlan({ actor: house.manager, siteCode: house.site.code, name: 'Roof', file: null }))).fieldErrors).toEqual({ picture: [expect.stringContaining('Choose a picture')] });
  });

  test('stays as it was when its points cannot be read', async () => {
    const planId = await add(house.manager);
    await place(house.manager, planId);
    expect(await place(house.manager, planId, { ...twoPoints, 'point-2-place': 'roof' })).toMatchObject({ ok: false, fieldErrors: { 'point-2-place': [expect.any(String)] } });
    const [row] = await db.select().from(sitePlans).where(eq(sitePlans.id, planId));
    expect(row?.points).toHaveLength(2);
  });
});

describe('its picture', () => {
  const fetchPicture = async (planId: string, actor: Actor | null, query = '') => {
    const url = new URL(`http://scorchline.test/site-plans/${planId}${query}`);
    return settled(picture({ request: new Request(url), params: { planId }, context: contextFor(actor), url, pattern: '/site-plans/:planId' }));
  };

  test('goes to people of the house, not to others, and not to a guest of the site', async () => {
    const planId = await add(house.manager);
    const code = await openGuestLink(house.site.id);
    expect((await fetchPicture(planId, house.reporter)).status).toBe(200);
    expect((await fetchPicture(planId, (await createHouse()).reporter)).status).toBe(404);
    expect((await fetchPicture(planId, null, `?at=${code}`)).status).toBe(302);
  });

  test('carries none of the data of the file that came', async () => {
    const planId = await add(house.manager, 'Roof', new Uint8Array(await cameraJpeg()));
    const url = new URL(`http://scorchline.test/site-plans/${planId}`);
    const answer = await picture({ request: new Request(url), params: { planId }, context: contextFor(house.reporter), url, pattern: '/site-plans/:planId' });
    const bytes = Buffer.from(await answer.arrayBuffer());
    // A PNG (ISO/IEC 15948) without an eXIf chunk; the camera's name stood in the original.
    expect(bytes.subarray(1, 4).toString('latin1')).toBe('PNG');
    expect(bytes.includes('eXIf') || bytes.includes('Box 1')).toBe(false);
  });
});

describe('the card for the door', () => {
  const look = (actor: Actor) => {
    const url = new URL(`http://scorchline.test/sites/${house.site.code}/door-card`);
    return settled(doorCard({ request: new Request(url), params: { siteCode: house.site.code }, context: contextFor(actor), url, pattern: '/sites/:siteCode/door-card' }));
  };

  test('carries the link of the site for those who look after it', async () => {
    const code = await openGuestLink(house.site.id);
    const answer = await look(house.manager);
    expect(JSON.stringify(answer)).toContain(`/report?at=${code}`);
  });

  test('is closed to others, and while the link is closed', async () => {
    expect((await look(house.manager)).status).toBe(409);
    await openGuestLink(house.site.id);
    for (const actor of [house.reporter, house.investigator]) expect((await look(actor)).status).toBe(403);
  });
});
