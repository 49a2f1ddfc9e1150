import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { getRegister } from '#db/queries/register-view.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { pageSize, readRegisterFilter } from '#app/domain/register-filter.ts';
import { createAction, createActor, createCase, createFinding, createHouse, createHypothesis, createReconstruction, createScene, createSite, createSunReturn } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

const now = new Date('2026-07-15T08:42:00Z');
const show = (actor: Actor, query = '') => getRegister(db, { actor, filter: readRegisterFilter(new URLSearchParams(query)), now });
const numbers = (view: Awaited<ReturnType<typeof show>>) => view.rows.map((row) => row.number);
const input = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 0, heightAboveGroundM: 0, zone: 'Europe/London' },
  window: { startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', clockSigmaS: 60 },
  sky: { climateClass: 'temperate-rural' as const },
  seed: 1,
};

async function withReturn(caseId: string, onDay: string) {
  const run = await createReconstruction({ caseId, input });
  await createSunReturn({ caseId, reconstructionId: run.id, onDay });
}

let house: House;
beforeAll(async () => {
  house = await createHouse();
});

describe('the groups', () => {
  let mine: House;
  beforeAll(async () => {
    mine = await createHouse();
  });

  test('stand in order: lit again before the fix is proven soonest first, then new oldest first, then the rest', async () => {
    const { site } = mine;
    const later = await createCase('corrective-action', { site });
    await withReturn(later.id, '2026-11-07');
    const sooner = await createCase('investigation', { site });
    await withReturn(sooner.id, '2026-08-03');
    const past = await createCase('investigation', { site });
    await withReturn(past.id, '2026-05-01');
    const proven = await createCase('corrective-action', { site });
    await withReturn(proven.id, '2026-08-01');
    await createAction({ caseId: proven.id, ownerId: mine.manager.userId, verifierId: mine.reviewer.userId, state: 'effective' });
    const halfProven = await createCase('corrective-action', { site });
    await withReturn(halfProven.id, '2026-09-20');
    await createAction({ caseId: halfProven.id, ownerId: mine.manager.userId, verifierId: mine.reviewer.userId, state: 'effective' });
    await createAction({ caseId: halfProven.id, ownerId: mine.manager.userId, verifierId: mine.reviewer.userId, state: 'verified' });
    const closed = await createCase('closed', { site });
    await withReturn(closed.id, '2026-08-02');
    const newer = await createCase('triage', { site, reportedAt: new Date('2026-07-15T08:00:00Z') });
    const older = await createCase('reported', { site, reportedAt: new Date('2026-07-14T08:00:00Z') });
    const view = await show(mine.manager);
    expect(numbers(view)).toEqual([sooner, halfProven, later, older, newer, closed, proven, past].map((row) => row.number));
    expect(view.groupCounts).toEqual({ 'before-fix': 3, new: 2, settled: 3 });
    expect(view.heading).toBe('Three cases will be lit again before their fix is proven');
    expect(view.rows[0]?.nextReturn).toMatchObject({ words: '3 Aug 2026, 13:00', inWords: 'in 19 days' });
    expect(view.rows.at(-2)?.nextReturn?.words).toBe('1 Aug 2026, 13:00');
    expect(view.rows.find((row) => row.number === closed.number)?.nextReturn).toBeNull();
  });
});

describe('a reporter', () => {
  test('sees their own reports only, in the list, in the counts, and in the search', async () => {
    const own = await createCase('triage', { site: house.site, reporterId: house.reporter.userId, title: 'Melted planter' });
    await createCase('triage', { site: house.site, title: 'Melted saddle' });
    const view = await show(house.reporter);
    expect(numbers(view)).toEqual([own.number]);
    expect(view.counts).toEqual({ all: 1, open: 1, 'first-look': 1, late: null, injury: null, mine: 1 });
    expect(numbers(await show(house.reporter, 'q=melted'))).toEqual([own.number]);
    expect(view.heading).toBe('One of your reports is still open');
  });

  test('is not told of actions, only that a fix is awaited', async () => {
    const row = await createCase('corrective-action', { site: house.site, reporterId: house.reporter.userId });
    await createAction({ caseId: row.id, ownerId: house.manager.userId, verifierId: house.reviewer.userId, title: 'Turn the dish' });
    const view = await show(house.reporter, `q=${row.number}`);
    expect(view.rows[0]?.waitsFor).toBe('The fix');
    const team = await show(house.manager, `q=${row.number}`);
    expect(team.rows[0]?.waitsFor).toContain('Turn the dish');
  });
});

describe('the filter', () => {
  test('for injury is offered and applied only where health fields may be read', async () => {
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const here = await createCase('triage', { site: house.site, anyoneHurt: 'yes' });
    const there = await createCase('triage', { site: elsewhere, anyoneHurt: 'yes' });
    const both = await createActor(house.organisation.id, 'manager', { role: 'investigator', siteId: house.site.id });
    const view = await show(both, 'view=injury');
    expect(numbers(view)).toContain(here.number);
    expect(numbers(view)).not.toContain(there.number);
    expect((await show(house.manager)).counts.injury).toBeNull();
    expect(numbers(await show(house.manager, 'view=injury'))).toEqual([]);
  });

  test('by state, optic, result, and days until the sun returns narrows the list', async () => {
    const fresh = await createHouse();
    const row = await createCase('corrective-action', { site: fresh.site });
    await createScene({ caseId: row.id, scene: { optic: { kind: 'dish' } } });
    await createFinding({ caseId: row.id, authorId: fresh.investigator.userId, state: 'signed', certainty: 'possible' });
    await withReturn(row.id, '2026-08-03');
    const ruledOut = await createCase('closed', { site: fresh.site });
    await createFinding({ caseId: ruledOut.id, authorId: fresh.investigator.userId, state: 'signed', certainty: 'probable' });
    await createHypothesis({ caseId: ruledOut.id, result: 'ruled-out' });
    const bare = await createCase('triage', { site: fresh.site });
    const list = async (query: string) => numbers(await show(fresh.reviewer, query));
    expect(await list('state=triage')).toEqual([bare.number]);
    expect(await list('optic=dish')).toEqual([row.number]);
    expect(await list('result=possible')).toEqual([row.number]);
    expect(await list('result=ruled-out')).toEqual([ruledOut.number]);
    expect(await list('result=probable')).toEqual([]);
    expect(await list('result=none')).toEqual([bare.number]);
    expect(await list('within=30')).toEqual([row.number]);
    expect(await list('within=10')).toEqual([]);
    expect(await list('view=open')).toEqual([row.number, bare.number]);
  });

  test('by words finds number, title, place, site and receipt, and takes % and _ as they are', async () => {
    const fresh = await createHouse();
    const row = await createCase('triage', { site: fresh.site, title: 'Scorch at 50 % slope', placeDetail: 'north_gutter' });
    await createCase('triage', { site: fresh.site, title: 'Something else', placeDetail: 'northXgutter' });
    const list = async (q: string) => numbers(await show(fresh.reviewer, `q=${encodeURIComponent(q)}`));
    for (const q of [String(row.number), `#${row.number}`, '50 %', 'north_gutter', row.receipt.toLowerCase()]) expect(await list(q)).toEqual([row.number]);
    expect(await list(fresh.site.name)).toHaveLength(2);
    expect(await list('%')).toEqual([row.number]);
    expect(await list("'; drop table cases; --")).toEqual([]);
  });

  test('for late lists cases with an unfinished action past its day at the place', async () => {
    const fresh = await createHouse();
    const late = await createCase('corrective-action', { site: fresh.site });
    const due = await createCase('corrective-action', { site: fresh.site });
    const people = { ownerId: fresh.manager.userId, verifierId: fresh.reviewer.userId };
    await createAction({ caseId: late.id, ...people, dueOn: '2026-07-14' });
    await createAction({ caseId: due.id, ...people, dueOn: '2026-07-15' });
    const view = await show(fresh.manager, 'view=late');
    expect(numbers(view)).toEqual([late.number]);
    expect(view.counts.late).toBe(1);
    expect(view.rows[0]?.waitsFor).toContain('1 day late');
  });
});

describe('paging', () => {
  test('keeps a stable order without gaps or repeats', async () => {
    const fresh = await createHouse();
    const same = new Date('2026-07-01T08:00:00Z');
    for (let index = 0; index < pageSize + 7; index += 1) await createCase('triage', { site: fresh.site, reportedAt: same });
    for (const sort of ['return', 'newest', 'oldest', 'risk']) {
      const pages = [await show(fresh.reviewer, `sort=${sort}`), await show(fresh.reviewer, `sort=${sort}&page=2`)];
      const seen = pages.flatMap(numbers);
      expect(pages[0]?.rows).toHaveLength(pageSize);
      expect(pages[0]?.total).toBe(pageSize + 7);
      expect(new Set(seen).size).toBe(pageSize + 7);
    }
  });

  test('takes an address that makes no sense as the first page of everything', () => {
    expect(readRegisterFilter(new URLSearchParams('page=-3&state=lost&view=%00&within=soon&sort=DROP'))).toEqual({ view: 'all', state: null, optic: null, result: null, within: null, q: '', sort: 'return', page: 1 });
  });
});

test('a kind of event that tells of an injury is not named to those who may not read health fields', async () => {
  const row = await createCase('triage', { site: house.site, eventType: 'burn-injury' });
  expect((await show(house.manager, `q=${row.number}`)).rows[0]?.stateNote).toBe('event');
  expect((await show(house.investigator, `q=${row.number}`)).rows[0]?.stateNote).toBe('injury');
});

describe('the first look', () => {
  test('lists reports by their clock: hazard and injury first, those returned last, each with what is left of it', async () => {
    const fresh = await createHouse();
    const at = (clock: string) => new Date(`2026-07-15T${clock}:00Z`);
    // 15 July 2026 is a Wednesday; the desk of the site opens at 09:00 BST, 08:00 UTC.
    const usual = await createCase('reported', { site: fresh.site, reportedAt: at('08:00') });
    const hazard = await createCase('reported', { site: fresh.site, reportedAt: at('08:10'), hazardStillPresent: 'yes' });
    const hurt = await createCase('reported', { site: fresh.site, reportedAt: at('06:00'), anyoneHurt: 'yes' });
    const returned = await createCase('returned', { site: fresh.site, reportedAt: at('05:00') });
    await createCase('investigation', { site: fresh.site });
    const view = await show(fresh.investigator, 'view=first-look');
    expect(numbers(view)).toEqual([hurt, hazard, usual, returned].map((row) => row.number));
    expect(view.rows.map((row) => row.firstLook?.words ?? null)).toEqual(['2 h late', '28 min left', 'due today 13:00', null]);
    expect(view.rows[0]?.stateNote).toContain('first look 2 h late');
    expect(view.heading).toBe('Four reports wait, one is late for a first look');
    expect(view.counts['first-look']).toBe(4);
  });

  test('does not tell by its clock who was hurt, to a manager who may not know', async () => {
    const fresh = await createHouse();
    await createCase('reported', { site: fresh.site, reportedAt: new Date('2026-07-15T08:00:00Z'), anyoneHurt: 'yes' });
    expect((await show(fresh.manager, 'view=first-look')).rows[0]?.firstLook?.words).toBe('due today 13:00');
  });
});
