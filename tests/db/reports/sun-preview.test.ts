import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { loader } from '#app/routes/resources/report-sun.ts';
import { db } from '#db/client.server.ts';
import { rateLimits } from '#db/schema/all.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createHouse, createOrganisation, createSite } from '#tests/support/factories.ts';
import { contextFor, openGuestLink } from './stage.ts';

let house: House;
let guestCode: string;
beforeAll(async () => {
  house = await createHouse();
  guestCode = await openGuestLink(house.site.id);
});

// Midnight to two o'clock in England in May is night: the sun rises there after four (UTC) on that day.
const night = { foundWhen: 'range', foundFromLocal: '2026-05-09T00:00', foundToLocal: '2026-05-09T02:00' };

async function ask(query: Readonly<Record<string, string>>, actor: Actor | null = null) {
  const url = new URL(`http://scorchline.test/report/sun?${new URLSearchParams(query).toString()}`);
  const answer = await loader({ request: new Request(url), params: {}, context: contextFor(actor), url, pattern: '/report/sun' });
  return { status: answer.status, text: await answer.text() };
}

describe('the sun in the window of a report under way', () => {
  test('is told to a reporter and to a guest of the site, in sentences and nothing else', async () => {
    for (const answer of [await ask({ ...night, siteId: house.site.id }, house.reporter), await ask({ ...night, siteId: house.site.id, at: guestCode })]) {
      expect(answer.status).toBe(200);
      expect(JSON.parse(answer.text)).toEqual({ sentences: [expect.stringContaining('No daylight in this window')], check: true });
    }
  });

  test('tells a guest nothing of another site, and a reporter nothing of another house', async () => {
    const neighbour = await createSite({ organisationId: house.organisation.id });
    const other = await createHouse();
    expect(JSON.parse((await ask({ ...night, siteId: neighbour.id, at: guestCode })).text)).toEqual({ sentences: [], check: false });
    expect(JSON.parse((await ask({ ...night, siteId: other.site.id }, house.reporter)).text)).toEqual({ sentences: [], check: false });
  });

  test('takes zone and place from a typed position while no site is chosen', async () => {
    // Noon in England is deep night in Sydney; the typed hours are those of Sydney, by day.
    const day = { foundWhen: 'range', foundFromLocal: '2026-05-09T10:00', foundToLocal: '2026-05-09T14:00', latitudeDeg: '33 52 S', longitudeDeg: '151 12 E' };
    expect(JSON.parse((await ask(day, house.reporter)).text)).toEqual({ sentences: [expect.stringContaining('of daylight')], check: false });
  });

  test('is closed to strangers, to a closed link and to roles that do not report', async () => {
    const insurer = await createActor((await createOrganisation({ kind: 'insurer' })).id, 'insurer');
    expect((await ask({ ...night, siteId: house.site.id })).status).toBe(403);
    expect((await ask({ ...night, siteId: house.site.id, at: 'no-such-code' })).status).toBe(404);
    expect((await ask({ ...night, siteId: house.site.id }, insurer)).status).toBe(403);
  });

  test('says nothing while times are incomplete, wrong or strange', async () => {
    for (const query of [{ siteId: house.site.id }, { ...night, siteId: 'x' }, { ...night, siteId: house.site.id, foundToLocal: '2199-01-01T00:00' }, { ...night, siteId: house.site.id, foundFromLocal: '\u0000' }]) {
      expect(JSON.parse((await ask(query, house.reporter)).text)).toEqual({ sentences: [], check: false });
    }
  });

  test('is counted, so that it cannot be used to ask without end', async () => {
    const caller = await createActor(house.organisation.id, 'reporter');
    await ask({ ...night, siteId: house.site.id }, caller);
    await db.update(rateLimits).set({ hits: 100_000 }).where(eq(rateLimits.key, `report-sun:person:${caller.userId}`));
    expect((await ask({ ...night, siteId: house.site.id }, caller)).status).toBe(429);
  });
});
