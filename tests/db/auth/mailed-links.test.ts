import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { action as askForLink } from '#app/routes/auth/forgotten-password.tsx';
import { action as takeUp, loader as look, meta as invitationMeta } from '#app/routes/auth/invitation.tsx';
import { meta as newPasswordMeta } from '#app/routes/auth/new-password.tsx';
import { requestPasswordReset, setPasswordByLink } from '#app/services/people/password-links.server.ts';
import { invitePerson } from '#app/services/people/invite-person.server.ts';
import { signIn } from '#app/services/people/sign-in.server.ts';
import { db } from '#db/client.server.ts';
import { mailedTokens, users } from '#db/schema/all.ts';
import type { House } from '#tests/support/factories.ts';
import { createHouse, createUser } from '#tests/support/factories.ts';
import { contextFor, eventsAbout, goodHash, goodPassword, holderOf, lettersTo, otherPassword, posted, refusal, settled, userOf, wordInLetter } from './stage.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});

const somewhere = () => `192.0.2.${randomUUID()}`;
const person = async () => createUser({ organisationId: house.organisation.id, grants: ['investigator'], passwordHash: await goodHash() });
const opens = (email: string, password: string) => signIn({ email, password, address: somewhere() }).then(() => true, () => false);
const ask = (email: string) => requestPasswordReset({ email, address: somewhere() });
const past = new Date(Date.now() - 1_000);

async function invited(): Promise<string> {
  const email = `${randomUUID()}@scorchline.test`;
  await invitePerson(house.administrator, { intent: 'invite', displayName: 'Iris Newman', email, role: 'reporter', siteId: '' });
  return email;
}

describe('an invitation', () => {
  test('goes by mail, with a link into the product and no password', async () => {
    const email = await invited();
    const [letter] = await lettersTo(email);
    expect(letter).toMatchObject({ state: 'waiting', caseId: null, subject: expect.stringContaining(house.organisation.name) });
    expect(letter?.bodyText).toContain(`http://scorchline.test/invitation/${await wordInLetter(email)}`);
    expect(letter?.bodyHtml).toContain(await wordInLetter(email));
  });

  test('lets the person choose a password once and signs them in', async () => {
    const email = await invited();
    const token = await wordInLetter(email);
    const { setCookie } = await setPasswordByLink({ token, purpose: 'invitation', password: goodPassword });
    const user = await userOf(email);
    expect(await holderOf(setCookie)).toBe(user?.id);
    expect(await opens(email, goodPassword)).toBe(true);
    expect((await refusal(setPasswordByLink({ token, purpose: 'invitation', password: otherPassword }))).message).toContain('used');
    expect(await opens(email, otherPassword)).toBe(false);
  });

  test('pressed twice at the same moment is taken up once', async () => {
    const token = await wordInLetter(await invited());
    const outcomes = await Promise.allSettled([goodPassword, otherPassword].map((password) => setPasswordByLink({ token, purpose: 'invitation', password })));
    expect(outcomes.map((one) => one.status).sort()).toEqual(['fulfilled', 'rejected']);
  });

  test('works for seven days', async () => {
    const email = await invited();
    const [row] = await db.select().from(mailedTokens).where(eq(mailedTokens.userId, (await userOf(email))?.id ?? ''));
    expect(((row?.expiresAt.getTime() ?? 0) - (row?.createdAt.getTime() ?? 0)) / 86_400_000).toBeCloseTo(7, 3);
    await db.update(mailedTokens).set({ expiresAt: past });
    expect((await refusal(setPasswordByLink({ token: await wordInLetter(email), purpose: 'invitation', password: goodPassword }))).message).toContain('past its time');
  });

  test('is kept as a hash only, of a word that cannot be guessed', async () => {
    const email = await invited();
    const token = await wordInLetter(email);
    const [row] = await db.select().from(mailedTokens).where(eq(mailedTokens.userId, (await userOf(email))?.id ?? ''));
    expect(row?.tokenHash).toBe(sha256Hex(token));
    expect(Buffer.from(token, 'base64url')).toHaveLength(32);
  });

  test('does not work as a link of the other kind', async () => {
    const token = await wordInLetter(await invited());
    await refusal(setPasswordByLink({ token, purpose: 'password-reset', password: goodPassword }));
    await expect(setPasswordByLink({ token, purpose: 'invitation', password: goodPassword })).resolves.toBeDefined();
  });

  test('ends when the account is switched off', async () => {
    const email = await invited();
    await db.update(users).set({ disabled: true }).where(eq(users.email, email));
    await refusal(setPasswordByLink({ token: await wordInLetter(email), purpose: 'invitation', password: goodPassword }));
  });
});

describe('a link for a new password', () => {
  test('works once, for an hour, and ends every session that was open', async () => {
    const user = await person();
    const before = await signIn({ email: user.email, password: goodPassword, address: somewhere() });
    await ask(user.email);
    const token = await wordInLetter(user.email);
    const [row] = await db.select().from(mailedTokens).where(eq(mailedTokens.userId, user.id));
    expect(((row?.expiresAt.getTime() ?? 0) - (row?.createdAt.getTime() ?? 0)) / 60_000).toBeCloseTo(60, 1);
    const { setCookie } = await setPasswordByLink({ token, purpose: 'password-reset', password: otherPassword });
    expect(await holderOf(before.setCookie)).toBeNull();
    expect(await holderOf(setCookie)).toBe(user.id);
    expect([await opens(user.email, goodPassword), await opens(user.email, otherPassword)]).toEqual([false, true]);
    await refusal(setPasswordByLink({ token, purpose: 'password-reset', password: goodPassword }));
  });

  test('asked for again ends the one before', async () => {
    const user = await person();
    await ask(user.email);
    const first = await wordInLetter(user.email);
    await ask(user.email);
    await refusal(setPasswordByLink({ token: first, purpose: 'password-reset', password: otherPassword }));
    await setPasswordByLink({ token: await wordInLetter(user.email), purpose: 'password-reset', password: otherPassword });
  });

  test('used by somebody who was invited ends the invitation too', async () => {
    const email = await invited();
    const invitation = await wordInLetter(email);
    await ask(email);
    await setPasswordByLink({ token: await wordInLetter(email), purpose: 'password-reset', password: goodPassword });
    await refusal(setPasswordByLink({ token: invitation, purpose: 'invitation', password: otherPassword }));
  });

  test('past its hour does nothing', async () => {
    const user = await person();
    await ask(user.email);
    await db.update(mailedTokens).set({ expiresAt: past }).where(eq(mailedTokens.userId, user.id));
    await refusal(setPasswordByLink({ token: await wordInLetter(user.email), purpose: 'password-reset', password: otherPassword }));
    expect(await opens(user.email, goodPassword)).toBe(true);
  });

  test('does not take the e-mail address as the password, and can then be used with another', async () => {
    const user = await createUser({ organisationId: house.organisation.id, email: `long-enough-${randomUUID()}@scorchline.test` });
    await ask(user.email);
    const token = await wordInLetter(user.email);
    expect((await refusal(setPasswordByLink({ token, purpose: 'password-reset', password: user.email.toUpperCase() }))).fieldErrors).toHaveProperty('password');
    await setPasswordByLink({ token, purpose: 'password-reset', password: otherPassword });
  });

  test('is logged when asked for and when used', async () => {
    const user = await person();
    await ask(user.email);
    await setPasswordByLink({ token: await wordInLetter(user.email), purpose: 'password-reset', password: otherPassword });
    expect(await eventsAbout(user.id)).toEqual(['account.reset-requested', 'account.password-set']);
  });
});

describe('the page for a forgotten password', () => {
  const post = (email: string, address = somewhere()) => {
    const request = posted('/forgotten-password', { intent: 'send-link', email });
    return settled(askForLink({ request, params: {}, context: contextFor(null, address), url: new URL(request.url), pattern: '/forgotten-password' }));
  };

  test('answers the same whether the address has an account, is unknown or is switched off', async () => {
    const known = await person();
    const off = await createUser({ organisationId: house.organisation.id, disabled: true, passwordHash: await goodHash() });
    const answers = await Promise.all([known.email, 'nobody@scorchline.test', off.email].map((email) => post(email)));
    expect(answers).toEqual([answers[0], answers[0], answers[0]]);
    expect(answers[0]).toMatchObject({ status: 200, body: { ok: true } });
    expect(await lettersTo(known.email)).toHaveLength(1);
    expect(await lettersTo(off.email)).toHaveLength(0);
  });

  test('sends no more than five letters an hour to one address', async () => {
    const user = await person();
    const statuses = [];
    for (let tries = 0; tries < 6; tries += 1) statuses.push((await post(user.email)).status);
    expect(statuses).toEqual([200, 200, 200, 200, 200, 429]);
    expect(await lettersTo(user.email)).toHaveLength(5);
  });
});

describe('the pages that a mailed link opens', () => {
  // Referrer Policy, W3C: under `no-referrer` a browser also sends "Origin: null" with a post, which the framework refuses.
  test.each([['invitation', invitationMeta], ['new password', newPasswordMeta]])('%s: the address goes to no other host, and the form can be sent', (_which, meta) => {
    expect(meta(Object({}))).toContainEqual({ name: 'referrer', content: 'same-origin' });
  });
});

describe('the page of an invitation', () => {
  const args = (token: string, request: Request) => ({ request, params: { token }, context: contextFor(null), url: new URL(request.url), pattern: '/invitation/:token' as const });

  test('looking at it does not use it up', async () => {
    const email = await invited();
    const token = await wordInLetter(email);
    const page = new Request('http://scorchline.test/invitation/x');
    expect(await look(args(token, page))).toMatchObject({ person: { email } });
    expect(await look(args(token, page))).toMatchObject({ person: { email } });
    expect(await look(args('made-up', page))).toEqual({ person: null });
  });

  test('asks for twelve characters beside the field and keeps the link alive', async () => {
    const token = await wordInLetter(await invited());
    const short = posted('/invitation/x', { intent: 'set-password', password: 'short' });
    expect(await settled(takeUp(args(token, short)))).toMatchObject({ status: 400, body: { fieldErrors: { password: [expect.stringContaining('12')] } } });
    const good = posted('/invitation/x', { intent: 'set-password', password: goodPassword });
    expect(await settled(takeUp(args(token, good)))).toMatchObject({ status: 302, location: '/' });
  });
});
