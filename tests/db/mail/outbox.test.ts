import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeEach, describe, expect, test } from 'vitest';
import { startFakeMail } from '#tests/support/fake-mail.ts';

// The address of the mail server is read when the modules load, so they are loaded after it is known.
const server = await startFakeMail();
process.env.SMTP_URL = server.url;
const { sendDueMail } = await import('#app/jobs/handlers/send-mail.server.ts');
const { db, inTransaction } = await import('#db/client.server.ts');
const { insertMail, mailAttemptLimit } = await import('#db/queries/outbox.server.ts');
const { outbox } = await import('#db/schema/all.ts');
const { createCase, createHouse } = await import('#tests/support/factories.ts');

afterAll(() => server.stop());
beforeEach(async () => {
  server.refuse = null;
  await db.delete(outbox);
});

interface Letter {
  readonly dedupeKey: string;
  readonly toAddress: string;
  readonly caseId: string | null;
}
const letter = (values: Partial<Letter> = {}) => ({ dedupeKey: randomUUID(), toAddress: `${randomUUID()}@scorchline.test`, subject: 'Report received', bodyText: 'Thank you: the mark is on file.', bodyHtml: '<p>Thank you: the mark is on file.</p>', caseId: null, ...values });
async function put(values: Partial<Letter> = {}) {
  const mail = letter(values);
  await inTransaction((tx) => insertMail(tx, mail));
  return mail;
}
const rowOf = async (dedupeKey: string) => (await db.select().from(outbox).where(eq(outbox.dedupeKey, dedupeKey)))[0];
const received = (address: string) => server.messages.filter((message) => message.to.includes(address));
const makeDue = () => db.update(outbox).set({ nextAttemptAt: new Date(Date.now() - 1_000) });
const minutesUntil = (at: Date | undefined) => ((at?.getTime() ?? 0) - Date.now()) / 60_000;

describe('a letter in the outbox', () => {
  test('is sent as text and as HTML, once, and then marked sent', async () => {
    const mail = await put();
    expect(await sendDueMail()).toEqual({ sent: 1, failed: 0 });
    expect(await sendDueMail()).toEqual({ sent: 0, failed: 0 });
    expect(received(mail.toAddress)).toMatchObject([{ subject: mail.subject, text: expect.stringContaining(mail.bodyText), html: expect.stringContaining(mail.bodyHtml) }]);
    expect(await rowOf(mail.dedupeKey)).toMatchObject({ state: 'sent', attempts: 1, lastError: null, sentAt: expect.any(Date) });
  });

  test('carries an identity of its own, so that a second copy after a crash is known as the same letter', async () => {
    const mail = await put();
    await sendDueMail();
    const row = await rowOf(mail.dedupeKey);
    expect(received(mail.toAddress)[0]?.messageId).toContain(row?.id);
  });

  test('put in twice for one event is one letter', async () => {
    const mail = await put();
    await put({ dedupeKey: mail.dedupeKey, toAddress: mail.toAddress });
    await sendDueMail();
    expect(received(mail.toAddress)).toHaveLength(1);
  });

  test('is not written when the change that causes it is undone', async () => {
    const mail = letter();
    await expect(
      inTransaction(async (tx) => {
        await insertMail(tx, mail);
        throw new Error('The change failed.');
      }),
    ).rejects.toThrow('The change failed.');
    expect(await rowOf(mail.dedupeKey)).toBeUndefined();
  });

  test('of a case keeps its words; one without a case, which holds a link into an account, loses them once sent', async () => {
    const house = await createHouse();
    const ofCase = await put({ caseId: (await createCase('triage', { site: house.site })).id });
    const ofAccount = await put();
    await sendDueMail();
    expect((await rowOf(ofCase.dedupeKey))?.bodyText).toBe(ofCase.bodyText);
    expect(await rowOf(ofAccount.dedupeKey)).toMatchObject({ bodyText: '', bodyHtml: '' });
    expect(received(ofAccount.toAddress)[0]?.text).toContain(ofAccount.bodyText);
  });
});

describe('a mail server that fails', () => {
  test('costs a wait, not the letter: it goes out at the next due time, once', async () => {
    const mail = await put();
    server.refuse = 'Try later';
    expect(await sendDueMail()).toEqual({ sent: 0, failed: 1 });
    expect(await rowOf(mail.dedupeKey)).toMatchObject({ state: 'waiting', attempts: 1, lastError: expect.stringContaining('Try later'), bodyText: mail.bodyText });
    server.refuse = null;
    expect(await sendDueMail()).toEqual({ sent: 0, failed: 0 });
    await makeDue();
    expect(await sendDueMail()).toEqual({ sent: 1, failed: 0 });
    expect(received(mail.toAddress)).toHaveLength(1);
    expect(await rowOf(mail.dedupeKey)).toMatchObject({ state: 'sent', attempts: 2, lastError: null });
  });

  test('is asked again after 1, 2, 4 minutes and so on, and given up after the last try', async () => {
    const mail = await put();
    server.refuse = 'Try later';
    const waits: number[] = [];
    for (let tries = 0; tries < mailAttemptLimit; tries += 1) {
      await sendDueMail();
      waits.push(Math.round(minutesUntil((await rowOf(mail.dedupeKey))?.nextAttemptAt)));
      await makeDue();
    }
    expect(waits.slice(0, 4)).toEqual([1, 2, 4, 8]);
    expect(await rowOf(mail.dedupeKey)).toMatchObject({ state: 'failed', attempts: mailAttemptLimit });
    server.refuse = null;
    expect(await sendDueMail()).toEqual({ sent: 0, failed: 0 });
  });

  test('does not hold up the letters behind it', async () => {
    const bad = await put({ toAddress: 'not an address' });
    const good = await put();
    expect(await sendDueMail()).toEqual({ sent: 1, failed: 1 });
    expect(received(good.toAddress)).toHaveLength(1);
    expect(await rowOf(bad.dedupeKey)).toMatchObject({ state: 'waiting', attempts: 1 });
  });
});

test('two workers at once send each letter once', async () => {
  const mails = [];
  for (let n = 0; n < 12; n += 1) mails.push(await put());
  const [first, second] = await Promise.all([sendDueMail(), sendDueMail()]);
  expect((first?.sent ?? 0) + (second?.sent ?? 0)).toBe(12);
  expect(mails.map((mail) => received(mail.toAddress).length)).toEqual(mails.map(() => 1));
});
