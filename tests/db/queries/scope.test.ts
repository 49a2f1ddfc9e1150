import { and, asc, eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { caseSubject, findCase } from '#db/queries/case-subject.server.ts';
import { listRegisterRows } from '#db/queries/register.server.ts';
import { visibleTo } from '#db/queries/scope.server.ts';
import { cases, correctiveActions } from '#db/schema/all.ts';
import { caseStates } from '#app/domain/case-state.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { Relation } from '#app/domain/permissions.ts';
import { readRegisterFilter } from '#app/domain/register-filter.ts';
import { roles } from '#app/domain/roles.ts';
import type { Actor } from '#app/domain/roles.ts';
import { actorOf, createAction, createCase, createOrganisation, createSite, createUser } from '#tests/support/factories.ts';
import type { GrantLike } from '#tests/support/factories.ts';

type CaseRow = typeof cases.$inferSelect;

/** Repeatable choice: a fresh seed would make a failure hard to find again. */
function chooser(seed: number) {
  let state = seed;
  return (below: number) => {
    state = (state * 1_103_515_245 + 12_345) % 2_147_483_648;
    return Math.floor((state / 2_147_483_648) * below);
  };
}
function pick<Item>(items: readonly Item[], choose: (below: number) => number): Item {
  const item = items[choose(items.length)];
  if (item === undefined) throw new Error('Nothing to choose from.');
  return item;
}

let actors: Actor[] = [];
let all: CaseRow[] = [];
let actionPeople: { caseId: string; ownerId: string; verifierId: string }[] = [];

beforeAll(async () => {
  const choose = chooser(118);
  for (let organisation = 0; organisation < 2; organisation += 1) {
    const { id: organisationId } = await createOrganisation();
    const sites = [await createSite({ organisationId }), await createSite({ organisationId }), await createSite({ organisationId })];
    const people: Actor[] = [];
    for (const role of roles) {
      const one: GrantLike = { role, siteId: pick(sites, choose).id };
      const more: GrantLike[] = choose(2) === 0 ? [{ role: pick(roles, choose), siteId: pick(sites, choose).id }] : [];
      people.push(await actorOf(await createUser({ organisationId, grants: [role] })));
      people.push(await actorOf(await createUser({ organisationId, grants: [one, ...more.filter((grant) => JSON.stringify(grant) !== JSON.stringify(one))] })));
    }
    people.push(await actorOf(await createUser({ organisationId })));
    for (const state of caseStates) {
      const row = await createCase(state, { site: pick(sites, choose), reporterId: choose(3) === 0 ? null : pick(people, choose).userId });
      if (choose(3) > 0) {
        const owner = choose(people.length);
        await createAction({ caseId: row.id, ownerId: people[owner]?.userId ?? '', verifierId: people[(owner + 1) % people.length]?.userId ?? '' });
      }
    }
    actors = [...actors, ...people];
  }
  all = await db.select().from(cases);
  actionPeople = await db.select({ caseId: correctiveActions.caseId, ownerId: correctiveActions.ownerId, verifierId: correctiveActions.verifierId }).from(correctiveActions);
});

function mayRead(actor: Actor, row: CaseRow): boolean {
  const relations: Relation[] = [];
  if (row.reporterId === actor.userId) relations.push('reporter-of-case');
  if (actionPeople.some((action) => action.caseId === row.id && action.ownerId === actor.userId)) relations.push('owner-of-action');
  if (actionPeople.some((action) => action.caseId === row.id && action.verifierId === actor.userId)) relations.push('verifier-of-action');
  return canOnCase(actor, 'case:read', { organisationId: row.organisationId, siteId: row.siteId, state: row.state, relations });
}

const numbersFor = (actor: Actor) => all.filter((row) => mayRead(actor, row)).map((row) => row.number).sort((a, b) => a - b);

test('the generated people and cases hold both readers and strangers', () => {
  const pairs = actors.flatMap((actor) => all.map((row) => mayRead(actor, row)));
  expect(pairs.filter(Boolean).length).toBeGreaterThan(60);
  expect(pairs.filter((may) => !may).length).toBeGreaterThan(60);
});

describe('for every generated person', () => {
  test('the condition in SQL lets through exactly the cases that the rule case:read does', async () => {
    for (const actor of actors) {
      const rows = await db.select({ number: cases.number }).from(cases).where(visibleTo(actor)).orderBy(asc(cases.number));
      expect(rows.map((row) => row.number)).toEqual(numbersFor(actor));
    }
  });

  test('one case is found exactly when the rule lets it be read, with the same relations', async () => {
    for (const actor of actors) {
      for (const row of all) {
        const found = await findCase(db, actor, row.number);
        expect(found !== null).toBe(mayRead(actor, row));
        if (found) expect(canOnCase(actor, 'case:read', await caseSubject(db, actor, found.row))).toBe(true);
      }
    }
  });

  test('the register lists those cases and no other', async () => {
    for (const actor of actors) {
      const rows = await listRegisterRows(db, { actor, filter: readRegisterFilter(new URLSearchParams()), now: new Date('2026-07-15T08:42:00Z') });
      expect(rows.map((row) => row.number).sort((a, b) => a - b)).toEqual(numbersFor(actor));
    }
  });
});

test('a reader of another organisation sees nothing, whatever their roles', async () => {
  const [first] = all;
  if (!first) throw new Error('no case');
  const stranger: Actor = { userId: first.reporterId ?? first.id, organisationId: first.id, displayName: '', email: '', units: 'metric', grants: roles.map((role) => ({ role, siteId: null })) };
  expect(await db.select({ id: cases.id }).from(cases).where(and(visibleTo(stranger), eq(cases.organisationId, first.organisationId)))).toEqual([]);
});
