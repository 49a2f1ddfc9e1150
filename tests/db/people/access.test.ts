import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { openSession } from '#app/auth/session.server.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { action, loader } from '#app/routes/people/list.tsx';
import { addRole, inviteAgain, removeRole, switchAccount } from '#app/services/people/change-access.server.ts';
import { invitePerson } from '#app/services/people/invite-person.server.ts';
import { setPasswordByLink } from '#app/services/people/password-links.server.ts';
import { db } from '#db/client.server.ts';
import { grants, logEntries, users } from '#db/schema/all.ts';
import { contextFor, eventsAbout, goodHash, goodPassword, holderOf, lettersTo, posted, refusal, settled, userOf, wordInLetter } from '#tests/db/auth/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { actorOf, createAction, createCase, createHouse, createSite, createUser } from '#tests/support/factories.ts';

let house: House;
/** The administrator of the house, with a password, as one who can sign in. */
let administrator: Actor;
let other: House;
beforeAll(async () => {
  other = await createHouse();
});
beforeEach(async () => {
  house = await createHouse();
  administrator = house.administrator;
  await db.update(users).set({ passwordHash: await goodHash() }).where(eq(users.id, administrator.userId));
});

const newAddress = () => `${randomUUID()}@scorchline.test`;
const invitation = (email: string, more: { role?: Role; siteId?: string } = {}) => ({ intent: 'invite' as const, displayName: 'Iris Newman', email, role: 'reporter' as Role, siteId: '', ...more });
const grantsOf = (userId: string) => db.select({ id: grants.id, role: grants.role, siteId: grants.siteId }).from(grants).where(eq(grants.userId, userId));
const onlyGrant = async (userId: string) => (await grantsOf(userId))[0]?.id ?? '';
const person = async (role: Role, passwordHash: string | null = null) => createUser({ organisationId: house.organisation.id, grants: [role], passwordHash });

describe('inviting a person', () => {
  test('adds them with one role, writes a letter and a line of the log, all together', async () => {
    const email = newAddress();
    await invitePerson(administrator, invitation(email, { role: 'manager', siteId: house.site.id }));
    const user = await userOf(email);
    expect(user).toMatchObject({ organisationId: house.organisation.id, passwordHash: null, disabled: false });
    expect(await grantsOf(user?.id ?? '')).toMatchObject([{ role: 'manager', siteId: house.site.id }]);
    expect(await lettersTo(email)).toHaveLength(1);
    expect(await eventsAbout(user?.id ?? '')).toEqual(['person.invited']);
  });

  test('whose address has an account is refused beside the field, and nothing is written', async () => {
    const known = await person('reviewer');
    expect((await refusal(invitePerson(administrator, invitation(known.email)))).fieldErrors).toEqual({ email: [expect.stringContaining('account already')] });
    expect([await lettersTo(known.email), await eventsAbout(known.id), (await grantsOf(known.id)).length]).toEqual([[], [], 1]);
  });

  test('for a site of another organisation is refused, and nobody is added', async () => {
    const email = newAddress();
    expect((await refusal(invitePerson(administrator, invitation(email, { siteId: other.site.id })))).fieldErrors).toHaveProperty('siteId');
    expect(await userOf(email)).toBeUndefined();
  });

  test('once more ends the link sent before, until they have taken it up', async () => {
    const email = newAddress();
    await invitePerson(administrator, invitation(email));
    const first = await wordInLetter(email);
    const userId = (await userOf(email))?.id ?? '';
    await inviteAgain(administrator, userId);
    expect(await lettersTo(email)).toHaveLength(2);
    await refusal(setPasswordByLink({ token: first, purpose: 'invitation', password: goodPassword }));
    await setPasswordByLink({ token: await wordInLetter(email), purpose: 'invitation', password: goodPassword });
    expect((await refusal(inviteAgain(administrator, userId))).message).toContain('already');
  });

  test.each<Role>(['reporter', 'investigator', 'reviewer', 'manager', 'privacy-lead', 'insurer'])('is not for the role %s', async (role) => {
    const actor = await actorOf(await person(role));
    expect((await refusal(Promise.resolve().then(() => invitePerson(actor, invitation(newAddress()))))).code).toBe('forbidden');
  });
});

describe('roles', () => {
  test('are added for all sites or for one, and each is logged with what it was', async () => {
    const user = await person('reporter');
    await addRole(administrator, { userId: user.id, role: 'investigator', siteId: null });
    await addRole(administrator, { userId: user.id, role: 'manager', siteId: house.site.id });
    expect((await actorOf(user)).grants).toEqual(expect.arrayContaining([{ role: 'reporter', siteId: null }, { role: 'investigator', siteId: null }, { role: 'manager', siteId: house.site.id }]));
    const lines = await db.select().from(logEntries).where(eq(logEntries.subjectId, user.id)).orderBy(logEntries.sequence);
    expect(lines.map((line) => [line.event, line.actorId, line.summary])).toEqual([
      ['person.role-added', administrator.userId, `${user.displayName}: Investigator`],
      ['person.role-added', administrator.userId, `${user.displayName}: Site manager, ${house.site.name}`],
    ]);
  });

  test('held already are not added twice', async () => {
    const user = await person('reporter');
    expect((await refusal(addRole(administrator, { userId: user.id, role: 'reporter', siteId: null }))).code).toBe('conflict');
    expect(await grantsOf(user.id)).toHaveLength(1);
  });

  test('taken away are gone at the next request, and logged', async () => {
    const user = await person('reviewer');
    await removeRole(administrator, await onlyGrant(user.id));
    expect((await actorOf(user)).grants).toEqual([]);
    expect(await eventsAbout(user.id)).toEqual(['person.role-removed']);
  });

  test('of another organisation are out of reach', async () => {
    const theirs = other.manager.userId;
    expect((await refusal(addRole(administrator, { userId: theirs, role: 'insurer', siteId: null }))).code).toBe('not-found');
    expect((await refusal(removeRole(administrator, await onlyGrant(theirs)))).code).toBe('not-found');
    expect((await refusal(switchAccount(administrator, { userId: theirs, disabled: true, reason: 'Left' }))).code).toBe('not-found');
    expect((await refusal(inviteAgain(administrator, theirs))).code).toBe('not-found');
    expect((await actorOf({ id: theirs })).grants).toEqual(other.manager.grants);
  });

  test('for one site never make an administrator', async () => {
    const user = await person('reporter');
    expect((await refusal(addRole(administrator, { userId: user.id, role: 'administrator', siteId: house.site.id }))).fieldErrors).toHaveProperty('siteId');
    await db.insert(grants).values({ userId: user.id, role: 'administrator', siteId: house.site.id });
    const oneSite = await actorOf(user);
    expect((await refusal(Promise.resolve().then(() => addRole(oneSite, { userId: user.id, role: 'administrator', siteId: null })))).code).toBe('forbidden');
  });
});

describe('the last administrator', () => {
  test('keeps the role', async () => {
    const refused = await refusal(removeRole(administrator, await onlyGrant(administrator.userId)));
    expect(refused).toMatchObject({ code: 'invalid-state', message: expect.stringContaining('last administrator') });
    expect(await grantsOf(administrator.userId)).toHaveLength(1);
  });

  test('is still the last when the other one has never chosen a password, or is switched off', async () => {
    await person('administrator');
    await createUser({ organisationId: house.organisation.id, grants: ['administrator'], passwordHash: await goodHash(), disabled: true });
    await refusal(removeRole(administrator, await onlyGrant(administrator.userId)));
  });

  test('is not switched off by anybody', async () => {
    const second = await person('administrator', await goodHash());
    const secondActor = await actorOf(second);
    await db.update(users).set({ passwordHash: null }).where(eq(users.id, second.id));
    await refusal(switchAccount(secondActor, { userId: administrator.userId, disabled: true, reason: 'Left' }));
    expect(await db.$count(users, eq(users.id, administrator.userId))).toBe(1);
  });

  test('two who take the role from each other at the same moment: one stays', async () => {
    const second = await person('administrator', await goodHash());
    const [theirs, mine, secondActor] = [await onlyGrant(second.id), await onlyGrant(administrator.userId), await actorOf(second)];
    const outcomes = await Promise.allSettled([removeRole(administrator, theirs), removeRole(secondActor, mine)]);
    expect(outcomes.map((one) => one.status).sort()).toEqual(['fulfilled', 'rejected']);
    expect((await grantsOf(administrator.userId)).length + (await grantsOf(second.id)).length).toBe(1);
  });

  test('with a second one beside, may go', async () => {
    await person('administrator', await goodHash());
    await removeRole(administrator, await onlyGrant(administrator.userId));
    expect(await grantsOf(administrator.userId)).toEqual([]);
  });
});

describe('switching an account off', () => {
  test('ends its sessions and its links, is logged with the reason, and keeps what the person did', async () => {
    const user = await person('investigator', await goodHash());
    const held = await createCase('investigation', { site: house.site, assignedToId: user.id });
    const session = await openSession(user.id);
    await switchAccount(administrator, { userId: user.id, disabled: true, reason: 'Left on 30 June' });
    expect(await holderOf(session)).toBeNull();
    const [line] = await db.select().from(logEntries).where(eq(logEntries.subjectId, user.id));
    expect(line).toMatchObject({ event: 'person.switched-off', reason: 'Left on 30 June', actorName: administrator.displayName });
    expect((await loadPeople()).leavers).toEqual([{ displayName: user.displayName, openCases: 1, openActions: 0 }]);
    expect(held.assignedToId).toBe(user.id);
  });

  test('a second time changes nothing and writes nothing', async () => {
    const user = await person('reporter');
    for (let times = 0; times < 2; times += 1) await switchAccount(administrator, { userId: user.id, disabled: true, reason: 'Left' });
    expect(await eventsAbout(user.id)).toEqual(['person.switched-off']);
  });

  test('can be taken back, without the old sessions', async () => {
    const user = await person('reporter', await goodHash());
    const session = await openSession(user.id);
    await switchAccount(administrator, { userId: user.id, disabled: true, reason: 'Mistaken' });
    await switchAccount(administrator, { userId: user.id, disabled: false, reason: '' });
    expect((await actorOf(user)).userId).toBe(user.id);
    expect(await holderOf(session)).toBeNull();
  });

  test('is not done to oneself', async () => {
    expect((await refusal(switchAccount(administrator, { userId: administrator.userId, disabled: true, reason: 'Tired' }))).message).toContain('another administrator');
  });
});

async function loadPeople() {
  const request = new Request('http://scorchline.test/people');
  return loader({ request, params: {}, context: contextFor(administrator), url: new URL(request.url), pattern: '/people' });
}

describe('the people page', () => {
  const visit = (actor: Actor | null, typed?: Record<string, string>) => {
    const request = typed ? posted('/people', typed) : new Request('http://scorchline.test/people');
    const args = { request, params: {}, context: contextFor(actor), url: new URL(request.url), pattern: '/people' as const };
    return settled(Promise.resolve().then<unknown>(() => (typed ? action(args) : loader(args))));
  };

  test('lists the people of the own organisation and nobody else', async () => {
    const { people, leavers } = await loadPeople();
    const own = [house.reporter, house.investigator, house.reviewer, house.manager, house.privacyLead, administrator].map((actor) => actor.userId);
    expect(people.map((one) => one.userId).sort()).toEqual(own.sort());
    expect(leavers).toEqual([]);
  });

  test('tells what a leaver still holds: open cases and actions of theirs, in counts', async () => {
    const leaver = await createUser({ organisationId: house.organisation.id, disabled: true });
    const open = await createCase('investigation', { site: house.site, assignedToId: leaver.id });
    await createCase('closed', { site: house.site, assignedToId: leaver.id });
    const action = { caseId: open.id, ownerId: leaver.id, verifierId: house.manager.userId };
    await createAction(action);
    await createAction({ ...action, state: 'in-progress' });
    await createAction({ ...action, state: 'withdrawn' });
    expect((await loadPeople()).leavers).toEqual([{ displayName: leaver.displayName, openCases: 1, openActions: 2 }]);
  });

  test.each(['reporter', 'investigator', 'reviewer', 'manager', 'privacyLead'] as const)('is closed to the %s, to read and to change', async (role) => {
    expect((await visit(house[role])).status).toBe(403);
    expect((await visit(house[role], { intent: 'remove-role', grantId: await onlyGrant(administrator.userId) })).status).toBe(403);
  });

  test('sends a guest to sign in', async () => {
    expect(await visit(null)).toMatchObject({ status: 302, location: '/sign-in?next=%2Fpeople' });
  });

  test('comes back with what was typed and a sentence beside the field', async () => {
    const answer = await visit(administrator, { intent: 'invite', displayName: 'Iris Newman', email: 'iris', role: 'reporter', siteId: '' });
    expect(answer).toMatchObject({ status: 400, body: { intent: 'invite', typed: { displayName: 'Iris Newman', email: 'iris' }, fieldErrors: { email: [expect.any(String)] } } });
    const userId = house.manager.userId;
    expect(await visit(administrator, { intent: 'switch-off', userId, reason: '' })).toMatchObject({ status: 400, body: { typed: { userId }, fieldErrors: { reason: ['Say why.'] } } });
  });

  test('goes back to itself after a change', async () => {
    const site = await createSite({ organisationId: house.organisation.id });
    expect(await visit(administrator, { intent: 'add-role', userId: house.reporter.userId, role: 'manager', siteId: site.id })).toMatchObject({ status: 302, location: '/people' });
  });
});
