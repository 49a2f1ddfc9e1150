import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { hashPassword, verifyPassword } from '#app/auth/password.server.ts';
import { action, loader } from '#app/routes/auth/sign-in.tsx';
import { signIn } from '#app/services/people/sign-in.server.ts';
import { db } from '#db/client.server.ts';
import { countHit } from '#db/queries/rate-limits.server.ts';
import { rateLimits, sessions } from '#db/schema/all.ts';
import type { users } from '#db/schema/all.ts';
import { actorOf, createOrganisation, createUser } from '#tests/support/factories.ts';
import { contextFor, goodHash, goodPassword, holderOf, otherPassword, posted, refusal, settled } from './stage.ts';

let organisationId: string;
beforeAll(async () => {
  organisationId = (await createOrganisation()).id;
});

/** Each test comes from an address of its own, so that they do not use up each other's tries. */
const fromAnywhere = () => `192.0.2.${randomUUID()}`;
const person = async (values: Partial<typeof users.$inferInsert> = {}) => createUser({ organisationId, grants: ['investigator'], passwordHash: await goodHash(), ...values });
const attempt = (email: string, password = goodPassword, address = fromAnywhere()) => signIn({ email, password, address });

describe('signing in', () => {
  test('with the right password opens a session of that person', async () => {
    const user = await person();
    const { setCookie, userId } = await attempt(user.email);
    expect(userId).toBe(user.id);
    expect(await holderOf(setCookie)).toBe(user.id);
  });

  test('gives a cookie that scripts and other sites cannot use', async () => {
    const { setCookie } = await attempt((await person()).email);
    expect(setCookie).toMatch(/HttpOnly/iu);
    expect(setCookie).toMatch(/SameSite=Lax/iu);
  });

  test('is refused with one sentence for a wrong password, an unknown address, an account switched off and one without a password', async () => {
    const known = await person();
    const off = await person({ disabled: true });
    const invited = await person({ passwordHash: null });
    const refusals = await Promise.all([attempt(known.email, otherPassword), attempt('nobody@scorchline.test'), attempt(off.email), attempt(invited.email)].map(refusal));
    expect(new Set(refusals.map((one) => `${one.code}: ${one.message}`)).size).toBe(1);
    expect(await db.$count(sessions, eq(sessions.userId, off.id))).toBe(0);
  });

  test('does not care in which of two equal forms an accent was typed', async () => {
    const user = await person({ passwordHash: await hashPassword('caf\u00e9 on the terrace') });
    await expect(attempt(user.email, 'cafe\u0301 on the terrace')).resolves.toMatchObject({ userId: user.id });
  });
});

describe('too many tries', () => {
  test('close an account for a while, even for the right password, whatever the address they come from', async () => {
    const user = await person();
    for (let tries = 0; tries < 10; tries += 1) await refusal(attempt(user.email, otherPassword));
    expect(await refusal(attempt(user.email))).toMatchObject({ code: 'too-many', message: expect.stringContaining('15 minutes') });
  });

  test('close an address for a while, whatever the account', async () => {
    const address = fromAnywhere();
    await db.insert(rateLimits).values({ key: `sign-in:address:${address}`, windowStartedAt: new Date(), hits: 60 });
    const user = await person();
    expect((await refusal(attempt(user.email, goodPassword, address))).code).toBe('too-many');
    await expect(attempt(user.email)).resolves.toMatchObject({ userId: user.id });
  });

  test('are forgotten when the window is over', async () => {
    const user = await person();
    await db.insert(rateLimits).values({ key: `sign-in:account:${user.email}`, windowStartedAt: new Date(Date.now() - 901_000), hits: 500 });
    await expect(attempt(user.email)).resolves.toMatchObject({ userId: user.id });
  });

  test('are counted once each, when they come at the same moment', async () => {
    const key = `count:${randomUUID()}`;
    const counts = await Promise.all(Array.from({ length: 12 }, () => countHit(db, key, 60)));
    expect(counts.sort((a, b) => a - b)).toEqual(Array.from({ length: 12 }, (_, index) => index + 1));
  });
});

describe('the stored password', () => {
  test('is argon2id with 19 MiB, two passes and one lane (OWASP Password Storage Cheat Sheet, "Argon2id")', async () => {
    expect(await goodHash()).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/u);
  });

  test('is salted: the same password twice gives two hashes', async () => {
    expect(await hashPassword(goodPassword)).not.toBe(await goodHash());
  });

  test('is compared with a decoy when there is none, and the decoy opens nothing', async () => {
    expect(await verifyPassword(null, 'not a password of anybody')).toBe(false);
    expect(await verifyPassword(await goodHash(), goodPassword)).toBe(true);
  });
});

describe('the sign-in page', () => {
  const post = (typed: Record<string, string>) => {
    const request = posted('/sign-in', { intent: 'sign-in', ...typed });
    return settled(action({ request, params: {}, context: contextFor(null, fromAnywhere()), url: new URL(request.url), pattern: '/sign-in' }));
  };

  test('leads on to where the person was going', async () => {
    const user = await person();
    const answer = await post({ email: user.email.toUpperCase(), password: goodPassword, next: '/cases/118?tab=log' });
    expect(answer).toMatchObject({ status: 302, location: '/cases/118?tab=log' });
    expect(await holderOf(answer.setCookie)).toBe(user.id);
  });

  test('never leads to another host', async () => {
    const user = await person();
    for (const next of ['//elsewhere.example', '/\\elsewhere.example', '/\t/elsewhere.example', 'https://elsewhere.example/cases']) {
      expect((await post({ email: user.email, password: goodPassword, next })).location).toBe('/');
    }
  });

  test('comes back with the address that was typed, and never with the password', async () => {
    const user = await person();
    const answer = await post({ email: user.email, password: otherPassword });
    expect(answer).toMatchObject({ status: 400, setCookie: '', body: { typed: { email: user.email }, formErrors: [expect.stringContaining('do not belong together')] } });
    expect(JSON.stringify(answer.body)).not.toContain(otherPassword);
  });

  test('says 429 when there were too many tries', async () => {
    const user = await person();
    await db.insert(rateLimits).values({ key: `sign-in:account:${user.email}`, windowStartedAt: new Date(), hits: 10 });
    expect((await post({ email: user.email, password: goodPassword })).status).toBe(429);
  });

  test('is passed over by somebody signed in', async () => {
    const actor = await actorOf(await person());
    const request = new Request('http://scorchline.test/sign-in?next=/actions');
    const answer = await settled(Promise.resolve().then(() => loader({ request, params: {}, context: contextFor(actor), url: new URL(request.url), pattern: '/sign-in' })));
    expect(answer).toMatchObject({ status: 302, location: '/actions' });
  });
});
