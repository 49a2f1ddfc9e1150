import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { actorContext, sessionIdContext } from '#app/auth/actor-context.ts';
import { sessionMiddleware } from '#app/auth/middleware.server.ts';
import { openSession } from '#app/auth/session.server.ts';
import { forgetExpired } from '#app/jobs/handlers/forget-expired.server.ts';
import { action as account } from '#app/routes/auth/account.tsx';
import { action as signOut } from '#app/routes/auth/sign-out.tsx';
import { changePassword, signOutEverywhere } from '#app/services/people/own-account.server.ts';
import { signIn } from '#app/services/people/sign-in.server.ts';
import { db } from '#db/client.server.ts';
import { mailedTokens, rateLimits, sessions, users } from '#db/schema/all.ts';
import { actorOf, createOrganisation, createUser } from '#tests/support/factories.ts';
import { contextFor, eventsAbout, goodHash, goodPassword, holderOf, otherPassword, posted, refusal, requestWith, settled } from './stage.ts';

let organisationId: string;
beforeAll(async () => {
  organisationId = (await createOrganisation()).id;
});

const person = async () => createUser({ organisationId, grants: ['reviewer'], passwordHash: await goodHash() });
const opens = (email: string, password: string) => signIn({ email, password, address: randomUUID() }).then(() => true, () => false);

describe('changing one’s own password', () => {
  test('ends every other session and goes on in a new one', async () => {
    const user = await person();
    const [phone, desk] = [await openSession(user.id), await openSession(user.id)];
    const setCookie = await changePassword(await actorOf(user), { currentPassword: goodPassword, password: otherPassword });
    expect([await holderOf(phone), await holderOf(desk), await holderOf(setCookie)]).toEqual([null, null, user.id]);
    expect([await opens(user.email, goodPassword), await opens(user.email, otherPassword)]).toEqual([false, true]);
    expect(await eventsAbout(user.id)).toEqual(['account.password-changed']);
  });

  test('asks for the one used now', async () => {
    const user = await person();
    const session = await openSession(user.id);
    expect((await refusal(changePassword(await actorOf(user), { currentPassword: otherPassword, password: otherPassword }))).fieldErrors).toHaveProperty('currentPassword');
    expect(await holderOf(session)).toBe(user.id);
    expect(await opens(user.email, goodPassword)).toBe(true);
  });

  test('ends a link for a new password that is still lying in a mailbox', async () => {
    const user = await person();
    await db.insert(mailedTokens).values({ tokenHash: randomUUID(), userId: user.id, purpose: 'password-reset', expiresAt: new Date(Date.now() + 60_000) });
    await changePassword(await actorOf(user), { currentPassword: goodPassword, password: otherPassword });
    const [link] = await db.select().from(mailedTokens).where(eq(mailedTokens.userId, user.id));
    expect(link?.usedAt).toBeInstanceOf(Date);
  });

  test('cannot be tried without end', async () => {
    const user = await person();
    await db.insert(rateLimits).values({ key: `change-password:${user.id}`, windowStartedAt: new Date(), hits: 10 });
    expect((await refusal(changePassword(await actorOf(user), { currentPassword: goodPassword, password: otherPassword }))).code).toBe('too-many');
  });
});

describe('signing out', () => {
  test('ends this session only', async () => {
    const user = await person();
    const [here, there] = [await openSession(user.id), await openSession(user.id)];
    const context = contextFor(await actorOf(user));
    context.set(sessionIdContext, here.split(';')[0]?.split('=')[1] ?? '');
    const request = posted('/sign-out', {});
    const answer = await settled(signOut({ request, params: {}, context, url: new URL(request.url), pattern: '/sign-out' }));
    expect(answer).toMatchObject({ status: 302, location: '/' });
    expect([await holderOf(here), await holderOf(there)]).toEqual([null, user.id]);
  });

  test('everywhere ends every session of this person and of nobody else', async () => {
    const [user, other] = [await person(), await person()];
    const [phone, desk, theirs] = [await openSession(user.id), await openSession(user.id), await openSession(other.id)];
    const cleared = await signOutEverywhere(await actorOf(user));
    expect([await holderOf(phone), await holderOf(desk), await holderOf(theirs)]).toEqual([null, null, other.id]);
    expect(await holderOf(cleared)).toBeNull();
    expect(await eventsAbout(user.id)).toEqual(['account.signed-out-everywhere']);
  });
});

describe('the account page', () => {
  const post = async (typed: Record<string, string>, user: { readonly id: string }) => {
    const request = posted('/account', typed);
    return settled(account({ request, params: {}, context: contextFor(await actorOf(user)), url: new URL(request.url), pattern: '/account' }));
  };

  test('changes the units', async () => {
    const user = await person();
    expect((await post({ intent: 'change-units', units: 'us' }, user)).status).toBe(200);
    expect((await actorOf(user)).units).toBe('us');
    expect((await post({ intent: 'change-units', units: 'cubits' }, user)).status).toBe(400);
  });

  test('never gives a password back', async () => {
    const answer = await post({ intent: 'change-password', currentPassword: 'something else', password: otherPassword }, await person());
    expect(answer.status).toBe(400);
    expect(JSON.stringify(answer.body)).not.toContain(otherPassword);
  });
});

describe('who asks', () => {
  const asks = async (cookie: string) => {
    const context = contextFor(null);
    const request = requestWith(cookie);
    const response = await sessionMiddleware({ request, params: {}, context, url: new URL(request.url), pattern: '/cases' }, () => Promise.resolve(new Response('page')));
    return { actor: context.get(actorContext), setCookie: response instanceof Response ? response.headers.get('Set-Cookie') : null };
  };

  test('is the person of the session, with the roles of this moment', async () => {
    const user = await person();
    expect((await asks(await openSession(user.id))).actor).toMatchObject({ userId: user.id, grants: [{ role: 'reviewer', siteId: null }] });
  });

  test('is a guest without a cookie, with a made-up one, and with one past its time, which is then cleared', async () => {
    const session = await openSession((await person()).id);
    await db.update(sessions).set({ expiresAt: new Date(Date.now() - 1_000) }).where(eq(sessions.id, session.split(';')[0]?.split('=')[1] ?? ''));
    expect((await asks('')).actor).toBeNull();
    expect((await asks('scorchline_session=made-up')).actor).toBeNull();
    const old = await asks(session);
    expect(old.actor).toBeNull();
    expect(old.setCookie).toMatch(/scorchline_session=;/u);
  });

  test('is a guest once the account is switched off, although the session is still there', async () => {
    const user = await person();
    const session = await openSession(user.id);
    await db.update(users).set({ disabled: true }).where(eq(users.id, user.id));
    expect((await asks(session)).actor).toBeNull();
  });
});

test('what has run out is forgotten, and nothing else', async () => {
  const user = await person();
  const live = await openSession(user.id);
  const day = 86_400_000;
  await db.insert(sessions).values({ id: `old-${user.id}`, userId: user.id, expiresAt: new Date(Date.now() - 1_000) });
  await db.insert(mailedTokens).values([
    { tokenHash: `old-${user.id}`, userId: user.id, purpose: 'invitation', expiresAt: new Date(Date.now() - 31 * day) },
    { tokenHash: `fresh-${user.id}`, userId: user.id, purpose: 'invitation', expiresAt: new Date(Date.now() + day) },
  ]);
  await db.insert(rateLimits).values([
    { key: `old-${user.id}`, windowStartedAt: new Date(Date.now() - 2 * day), hits: 3 },
    { key: `fresh-${user.id}`, windowStartedAt: new Date(), hits: 3 },
  ]);
  await forgetExpired();
  expect(await holderOf(live)).toBe(user.id);
  expect(await db.$count(sessions, eq(sessions.userId, user.id))).toBe(1);
  expect((await db.select({ hash: mailedTokens.tokenHash }).from(mailedTokens).where(eq(mailedTokens.userId, user.id))).map((row) => row.hash)).toEqual([`fresh-${user.id}`]);
  expect([await db.$count(rateLimits, eq(rateLimits.key, `old-${user.id}`)), await db.$count(rateLimits, eq(rateLimits.key, `fresh-${user.id}`))]).toEqual([0, 1]);
});
