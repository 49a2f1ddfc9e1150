import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/roles.ts';
import { siteFormSchema } from '#app/domain/site-form.ts';
import { action as addByForm, loader as loadList } from '#app/routes/sites/list.tsx';
import { action as changeByForm, loader as loadSite } from '#app/routes/sites/site.tsx';
import { identifyHolder } from '#app/services/reports/report-holder.server.ts';
import { addSite, changeSite, setGuestLink } from '#app/services/sites/save-site.server.ts';
import { db } from '#db/client.server.ts';
import { sites } from '#db/schema/all.ts';
import { contextFor, eventsAbout, posted, refusal, settled } from '#tests/db/auth/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createCase, createHouse, createReconstruction, createSite, createSunReturn } from '#tests/support/factories.ts';

let house: House;
beforeEach(async () => {
  house = await createHouse();
});

const facts = { name: 'Tarrow Quay House', address: '12 Tarrow Quay', latitudeDeg: 51.4, longitudeDeg: -2.9, elevationM: 15, zone: '', use: 'dwelling', jurisdiction: 'GB' } as const;
const typed = { intent: 'add-site', code: 'tarrow', name: facts.name, address: facts.address, latitudeDeg: '51.4', longitudeDeg: '-2.9', elevationM: '15', zone: '', use: 'dwelling', jurisdiction: 'GB' };
const siteOf = async (code: string, organisationId = house.organisation.id) => (await db.select().from(sites).where(eq(sites.organisationId, organisationId))).find((row) => row.code === code);
const guestCode = async () => (await siteOf(house.site.code))?.guestCode ?? null;

describe('a site', () => {
  test('is added by a manager or an administrator of all sites, and logged', async () => {
    await addSite(house.manager, { ...facts, code: 'TARROW' });
    await addSite(house.administrator, { ...facts, code: 'TARROW-2' });
    const row = await siteOf('TARROW');
    expect(row).toMatchObject({ ...facts, zone: 'Europe/London', guestCode: null });
    expect(await eventsAbout(row?.id ?? '')).toEqual(['site.added']);
  });

  test('is not added by others, nor by the manager of one site', async () => {
    const ofOneSite = await createActor(house.organisation.id, { role: 'manager', siteId: house.site.id });
    for (const actor of [house.reporter, house.investigator, house.reviewer, house.privacyLead, ofOneSite]) {
      expect((await refusal(Promise.resolve().then(() => addSite(actor, { ...facts, code: 'TARROW' })))).code).toBe('forbidden');
    }
    expect(await siteOf('TARROW')).toBeUndefined();
  });

  test('has a code of its own within the organisation; another organisation may use the same', async () => {
    expect((await refusal(addSite(house.manager, { ...facts, code: house.site.code }))).fieldErrors).toEqual({ code: [expect.stringContaining('Choose another')] });
    const other = await createHouse();
    await addSite(other.manager, { ...facts, code: house.site.code });
    expect(await siteOf(house.site.code, other.organisation.id)).toMatchObject({ name: facts.name });
  });

  test('is changed by its own manager, and not by the manager of another site', async () => {
    const own = await createActor(house.organisation.id, { role: 'manager', siteId: house.site.id });
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const foreign = await createActor(house.organisation.id, { role: 'manager', siteId: elsewhere.id });
    await changeSite(own, house.site.code, { ...facts, name: 'Renamed' });
    expect((await refusal(changeSite(foreign, house.site.code, { ...facts, name: 'Mine now' }))).code).toBe('forbidden');
    expect((await siteOf(house.site.code))?.name).toBe('Renamed');
    expect(await eventsAbout(house.site.id)).toEqual(['site.changed']);
  });

  test('of another organisation is not found', async () => {
    const other = await createHouse();
    expect((await refusal(changeSite(other.manager, house.site.code, facts))).code).toBe('not-found');
    expect((await refusal(setGuestLink(other.administrator, house.site.code, true))).code).toBe('not-found');
  });
});

describe('the time zone of a site', () => {
  // Principal places of zones with their coordinates as in the IANA time zone database, file `zone.tab`.
  test.each([
    ['Europe/London', 51.5083, -0.1253],
    ['America/Phoenix', 33.4483, -112.0733],
    ['America/St_Johns', 47.5667, -52.7167],
    ['Africa/Nairobi', -1.2833, 36.8167],
    ['Asia/Kathmandu', 27.7167, 85.3167],
    ['Australia/Adelaide', -34.9167, 138.5833],
    ['Pacific/Auckland', -36.8667, 174.7667],
  ])('left empty is taken from the coordinates: %s', async (zone, latitudeDeg, longitudeDeg) => {
    await addSite(house.manager, { ...facts, code: 'PLACE', latitudeDeg, longitudeDeg });
    expect((await siteOf('PLACE'))?.zone).toBe(zone);
  });

  test('given is kept', async () => {
    await addSite(house.manager, { ...facts, code: 'PLACE', zone: 'Europe/Dublin' });
    expect((await siteOf('PLACE'))?.zone).toBe('Europe/Dublin');
  });
});

describe('the form of a site', () => {
  test('reads what was typed', () => {
    expect(siteFormSchema.parse(typed)).toEqual({ intent: 'add-site', code: 'TARROW', ...facts });
    // Minutes are sixtieths of a degree (ISO 80000-3).
    expect(siteFormSchema.parse({ ...typed, latitudeDeg: '51° 24′ N', longitudeDeg: '2 54 0 W' })).toMatchObject({ latitudeDeg: expect.closeTo(51.4, 9), longitudeDeg: expect.closeTo(-2.9, 9) });
  });

  test.each([
    ['code', 'roof / south'],
    ['name', ' '],
    ['latitudeDeg', '91'],
    ['latitudeDeg', '53° 60′'],
    ['longitudeDeg', '-180.5'],
    ['longitudeDeg', ''],
    ['elevationM', ''],
    ['elevationM', '9000'],
    ['zone', 'Europe/Tallowmere'],
    ['zone', '+01:00'],
    ['use', ''],
    ['jurisdiction', 'moon'],
  ])('refuses the %s "%s" beside the field, with a sentence, and keeps it', async (field, value) => {
    const answer = await visitList(house.manager, { ...typed, [field]: value });
    expect(answer).toMatchObject({ status: 400, body: { fieldErrors: { [field]: [expect.stringMatching(/^[A-Z].*\.$/u)] }, typed: { [field]: value, address: facts.address } } });
  });
});

describe('the report link of a site', () => {
  test('opened, is a word that cannot be guessed and lets a guest in; closed, it lets nobody in', async () => {
    await setGuestLink(house.manager, house.site.code, true);
    const code = (await guestCode()) ?? '';
    expect(code).toMatch(new RegExp(`^${house.site.code.toLowerCase()}-[\\w-]{12}$`, 'u'));
    expect(await identifyHolder(null, code)).toMatchObject({ kind: 'guest', site: { id: house.site.id } });
    await setGuestLink(house.manager, house.site.code, false);
    expect((await refusal(identifyHolder(null, code))).code).toBe('not-found');
    expect(await eventsAbout(house.site.id)).toEqual(['site.guest-link-opened', 'site.guest-link-closed']);
  });

  test('opened by two presses keeps its first word, which may be posted at the door', async () => {
    await Promise.all([setGuestLink(house.manager, house.site.code, true), setGuestLink(house.administrator, house.site.code, true)]);
    const first = await guestCode();
    await setGuestLink(house.manager, house.site.code, true);
    expect(await guestCode()).toBe(first);
    expect(await eventsAbout(house.site.id)).toEqual(['site.guest-link-opened']);
  });

  test('opened again after closing is another word', async () => {
    const codes = [];
    for (let times = 0; times < 2; times += 1) {
      await setGuestLink(house.manager, house.site.code, true);
      codes.push(await guestCode());
      await setGuestLink(house.manager, house.site.code, false);
    }
    expect(new Set(codes).size).toBe(2);
  });

  test('is opened by those who look after the site only', async () => {
    for (const actor of [house.reporter, house.investigator, house.reviewer, house.privacyLead]) expect((await refusal(setGuestLink(actor, house.site.code, true))).code).toBe('forbidden');
    expect(await guestCode()).toBeNull();
  });
});

function visitList(actor: Actor | null, form?: Record<string, string>) {
  const request = form ? posted('/sites', form) : new Request('http://scorchline.test/sites');
  const args = { request, params: {}, context: contextFor(actor), url: new URL(request.url), pattern: '/sites' as const };
  return settled(Promise.resolve().then<unknown>(() => (form ? addByForm(args) : loadList(args))));
}
function visitSite(actor: Actor | null, form?: Record<string, string>) {
  const url = `/sites/${house.site.code}`;
  const request = form ? posted(url, form) : new Request(`http://scorchline.test${url}`);
  const args = { request, params: { siteCode: house.site.code }, context: contextFor(actor), url: new URL(request.url), pattern: '/sites/:siteCode' as const };
  return settled(Promise.resolve().then<unknown>(() => (form ? changeByForm(args) : loadSite(args))));
}

describe('the pages of sites', () => {
  test('count the cases that the reader may see, and no others', async () => {
    await createCase('triage', { site: house.site });
    await createCase('closed', { site: house.site, reporterId: house.reporter.userId });
    const counts = async (actor: Actor) => (await visitList(actor)).body.sites;
    expect(await counts(house.investigator)).toMatchObject([{ code: house.site.code, cases: 2, open: 1 }]);
    expect(await counts(house.reporter)).toMatchObject([{ cases: 1, open: 0 }]);
    expect(await counts(house.administrator)).toMatchObject([{ cases: 0, open: 0 }]);
    expect(await visitSite(house.reporter)).toMatchObject({ body: { sees: 'own', cases: [{ state: 'closed' }] } });
    expect(await visitSite(house.administrator)).toMatchObject({ body: { sees: 'none', cases: [] } });
  });

  test('put the site where the sun is back first at the top, in the clock of the place', async () => {
    const sydney = await createSite({ organisationId: house.organisation.id, name: 'Another', zone: 'Australia/Sydney', latitudeDeg: -33.9, longitudeDeg: 149.1 });
    for (const [site, onDay] of [[house.site, '2099-08-03'], [sydney, '2099-06-01']] as const) {
      const row = await createCase('corrective-action', { site });
      const run = await createReconstruction({ caseId: row.id, input: Object({}) });
      await createSunReturn({ caseId: row.id, reconstructionId: run.id, onDay });
      await createSunReturn({ caseId: row.id, reconstructionId: run.id, onDay: '2001-01-01' });
    }
    const settledSite = await createSite({ organisationId: house.organisation.id, name: 'A place with nothing open' });
    const closed = await createCase('closed', { site: settledSite });
    const run = await createReconstruction({ caseId: closed.id, input: Object({}) });
    await createSunReturn({ caseId: closed.id, reconstructionId: run.id, onDay: '2098-01-01' });
    // Noon UTC is 22:00 in Sydney in June (UTC+10) and 13:00 in London in August (UTC+1).
    expect((await visitList(house.manager)).body.sites).toMatchObject([
      { name: 'Another', nextReturn: '1 Jun 2099, 22:00' },
      { name: house.site.name, nextReturn: '3 Aug 2099, 13:00' },
      { name: 'A place with nothing open', nextReturn: null },
    ]);
  });

  test('give the exact place to those who work there, and two decimals without address to a reporter', async () => {
    await db.update(sites).set({ latitudeDeg: 53.50417, longitudeDeg: -1.60261, address: 'Kestwick Lane 40' }).where(eq(sites.id, house.site.id));
    for (const actor of [house.investigator, house.reviewer, house.manager, house.privacyLead, house.administrator]) {
      expect((await visitSite(actor)).body).toMatchObject({ isExact: true, latitudeDeg: 53.50417, longitudeDeg: -1.60261, address: 'Kestwick Lane 40' });
    }
    const seen = (await visitSite(house.reporter)).body;
    expect(seen).toMatchObject({ isExact: false, latitudeDeg: 53.5, longitudeDeg: -1.6 });
    expect(JSON.stringify(seen)).not.toMatch(/53\.504|1\.602|Lane/u);
  });

  test('show the report link and the people of the site to those who look after it only', async () => {
    await setGuestLink(house.manager, house.site.code, true);
    const code = (await guestCode()) ?? '';
    const seen = (await visitSite(house.manager)).body;
    expect(seen).toMatchObject({ guest: { code, link: `http://scorchline.test/report?at=${code}` } });
    expect(seen.people).toContainEqual({ role: 'reviewer', name: house.reviewer.displayName, onlyHere: false });
    for (const actor of [house.reporter, house.investigator, house.reviewer]) {
      const body = (await visitSite(actor)).body;
      expect(body).toMatchObject({ guest: null, people: [] });
      expect(JSON.stringify(body)).not.toContain(code);
    }
  });

  test('show no site of another organisation', async () => {
    const other = await createHouse();
    expect((await visitSite(other.manager)).status).toBe(404);
    expect(JSON.stringify((await visitList(other.manager)).body)).not.toContain(house.site.name);
  });

  test('are closed to an insurer reader and send a guest to sign in', async () => {
    const insurer = await createActor(house.organisation.id, 'insurer');
    expect([(await visitList(insurer)).status, (await visitSite(insurer)).status]).toEqual([403, 403]);
    expect((await visitList(null)).location).toBe('/sign-in?next=%2Fsites');
  });

  test('save by form and lead to the site', async () => {
    expect(await visitList(house.manager, typed)).toMatchObject({ status: 302, location: '/sites/TARROW' });
    expect(await visitSite(house.manager, { ...typed, intent: 'change-site', name: 'Renamed' })).toMatchObject({ status: 302, location: `/sites/${house.site.code}` });
    expect((await siteOf(house.site.code))?.name).toBe('Renamed');
    expect((await visitSite(house.reporter, { intent: 'open-guest-link' })).status).toBe(403);
  });
});
