import { randomUUID } from 'node:crypto';
import { desc, eq, inArray } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { at, collected, collectedAt, evidenceStage, handOverForm, itemForm, now } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { createActor } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getEvidencePage, getItemPage } from '#db/queries/evidence-page.server.ts';
import { listEvidence } from '#db/queries/evidence.server.ts';
import { custodyOffers, custodyRecords, logEntries, outbox, users } from '#db/schema/all.ts';
import type { OfferItem } from '#app/domain/evidence-form.ts';
import type { Actor } from '#app/domain/roles.ts';
import { declineOffer, takeOverItem, withdrawOffer } from '#app/services/evidence/answer-offer.server.ts';
import { collectItem } from '#app/services/evidence/collect-item.server.ts';
import { handOverItem } from '#app/services/evidence/hand-over.server.ts';
import { offerItem } from '#app/services/evidence/offer-item.server.ts';

let stage: EvidenceStage;
beforeEach(async () => {
  stage = await evidenceStage();
  await collected(stage);
});

const where = (actor: Actor) => ({ actor, caseNumber: stage.caseNumber, label: 1 });
const offerForm = (values: Partial<OfferItem> = {}): OfferItem => ({ clientId: randomUUID(), sequence: 1, receiverId: stage.house.manager.userId, holderRole: 'site-staff', place: 'safe', purpose: 'Keeping', condition: 'seal whole', givenBy: 'Quillon Ashgrove', ...values });
const offer = (values: Partial<OfferItem> = {}, actor = stage.house.investigator) => offerItem({ ...where(actor), offer: offerForm(values) });
const whole = async () => {
  const [one] = await listEvidence(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber });
  if (!one) throw new Error('There is no item.');
  return one;
};
const waiting = async () => {
  const found = (await whole()).offers.find((one) => one.answer === null);
  if (!found) throw new Error('No offer waits.');
  return found;
};
const holders = async () => (await whole()).custody.map((record) => [record.sequence, record.holderName, record.toAt === null]);
const take = async (actor: Actor, offerId?: string) => takeOverItem({ ...where(actor), takeOver: { offerId: offerId ?? (await waiting()).id, place: 'safe', condition: 'seal whole, a scratch on the bag' }, now });
const events = async () => (await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId)).orderBy(desc(logEntries.sequence))).map((line) => line.event);

describe('an offered item', () => {
  test('is held by the giver until the receiver signs, and by the receiver from that instant', async () => {
    await offer();
    expect(await holders()).toEqual([[1, 'Quillon Ashgrove', true]]);
    await take(stage.house.manager);
    const { custody } = await whole();
    expect(custody).toMatchObject([
      { sequence: 1, toAt: now },
      { sequence: 2, fromAt: now, toAt: null, holderRole: 'site-staff', holderName: stage.house.manager.displayName, receivedBy: stage.house.manager.displayName, receiverId: stage.house.manager.userId, givenBy: 'Quillon Ashgrove', condition: 'seal whole, a scratch on the bag', recordedById: stage.house.manager.userId },
    ]);
    expect((await events()).slice(0, 2)).toEqual(['evidence.handed-over', 'evidence.offered']);
  });

  test('is told to the receiver by one mail that names the label only, and the log names no holder', async () => {
    const form = offerForm();
    for (let sent = 0; sent < 2; sent += 1) await offerItem({ ...where(stage.house.investigator), offer: form });
    const mails = await db.select().from(outbox).where(eq(outbox.caseId, stage.caseId));
    expect(mails).toMatchObject([{ toAddress: stage.house.manager.email, subject: `Item ${stage.caseNumber}-A is offered to you` }]);
    expect(mails[0]?.bodyText).toContain(`/cases/${stage.caseNumber}/evidence/A`);
    expect(`${mails[0]?.subject} ${mails[0]?.bodyText}`).not.toMatch(/Ashgrove|trim|Person/u);
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId));
    expect(lines.map((line) => line.event)).toEqual(['evidence.collected', 'evidence.offered']);
    expect(lines.map((line) => line.summary).join()).not.toMatch(/Ashgrove|Person/u);
  });

  test('by a form sent twice at once is one offer', async () => {
    const form = offerForm();
    await Promise.all([offerItem({ ...where(stage.house.investigator), offer: form }), offerItem({ ...where(stage.house.investigator), offer: form })]);
    expect((await whole()).offers).toHaveLength(1);
  });

  test('taken over twice by a phone that lost the answer is taken over once', async () => {
    await offer();
    const { id } = await waiting();
    await Promise.all([take(stage.house.manager, id), take(stage.house.manager, id)]);
    expect((await whole()).custody).toHaveLength(2);
  });

  test('is offered once at a time, and not handed over on another way meanwhile', async () => {
    await offer();
    await expect(offer({ receiverId: stage.house.reviewer.userId })).rejects.toMatchObject({ code: 'conflict' });
    await expect(handOverItem({ ...where(stage.house.investigator), handOver: handOverForm(), handedAt: at('2026-05-12T08:30:00Z'), now })).rejects.toMatchObject({ code: 'conflict' });
    expect(await holders()).toEqual([[1, 'Quillon Ashgrove', true]]);
  });

  test('from a page that is out of date is a conflict', async () => {
    await handOverItem({ ...where(stage.house.investigator), handOver: handOverForm(), handedAt: at('2026-05-12T08:30:00Z'), now });
    await expect(offer()).rejects.toMatchObject({ code: 'conflict' });
  });

  test('is declined with a reason, told to the one who offered it, and can then be offered again', async () => {
    await offer();
    const { id } = await waiting();
    const decline = () => declineOffer({ ...where(stage.house.manager), offerId: id, reason: 'The seal is broken.', now });
    await decline();
    await decline();
    expect(await holders()).toEqual([[1, 'Quillon Ashgrove', true]]);
    expect((await events()).filter((event) => event === 'evidence.offer-declined')).toHaveLength(1);
    expect(await db.select({ to: outbox.toAddress }).from(outbox).where(eq(outbox.dedupeKey, `custody-declined:${id}`))).toEqual([{ to: stage.house.investigator.email }]);
    await expect(take(stage.house.manager, id)).rejects.toMatchObject({ code: 'conflict' });
    await offer({ receiverId: stage.house.reviewer.userId });
    expect((await waiting()).receiverId).toBe(stage.house.reviewer.userId);
  });

  test('is withdrawn by who made it, and by nobody else while they are there', async () => {
    await offer();
    const { id } = await waiting();
    const second = await createActor(stage.house.organisation.id, 'investigator');
    const withdraw = (actor: Actor) => withdrawOffer({ ...where(actor), offerId: id, now });
    for (const actor of [stage.house.manager, stage.house.reviewer, second]) await expect(withdraw(actor)).rejects.toMatchObject({ code: 'forbidden' });
    await db.update(users).set({ disabled: true }).where(eq(users.id, stage.house.investigator.userId));
    await expect(withdraw(stage.house.reviewer)).rejects.toMatchObject({ code: 'forbidden' });
    await withdraw(second);
    expect((await whole()).offers).toMatchObject([{ answer: 'withdrawn' }]);
  });
});

describe('who may', () => {
  test('offer: an investigator, and whoever holds the item; take over: the one to whom it is offered', async () => {
    const { reviewer, manager, privacyLead, reporter, administrator } = stage.house;
    for (const actor of [reviewer, manager, privacyLead, reporter]) await expect(offer({}, actor)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(offer({}, administrator)).rejects.toMatchObject({ code: 'not-found' });
    await offer();
    const { id } = await waiting();
    for (const actor of [stage.house.investigator, reviewer, privacyLead, reporter]) await expect(take(actor, id)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(declineOffer({ ...where(reviewer), offerId: id, reason: 'Not mine.', now })).rejects.toMatchObject({ code: 'forbidden' });
    await take(manager, id);
    await offer({ sequence: 2, receiverId: reviewer.userId, givenBy: manager.displayName }, manager);
    expect((await waiting()).offeredById).toBe(manager.userId);
  });

  test('be offered it: people of the house who may read the evidence, and others are refused beside the field', async () => {
    const { reporter, administrator, investigator } = stage.house;
    const stranger = (await evidenceStage()).house.manager;
    for (const person of [reporter, administrator, stranger, investigator]) await expect(offer({ receiverId: person.userId })).rejects.toMatchObject({ fieldErrors: { receiverId: [expect.any(String)] } });
    const page = await getItemPage(db, { ...where(investigator), now });
    expect(page?.receivers.map((person) => person.userId).toSorted()).toEqual([stage.house.reviewer, stage.house.manager, stage.house.privacyLead].map((person) => person.userId).toSorted());
  });

  test('see it: the receiver on the page of the item and in the list of the case', async () => {
    await offer();
    const { manager, reviewer, investigator } = stage.house;
    const rights = async (actor: Actor) => {
      const page = await getItemPage(db, { ...where(actor), now });
      return [page?.offer?.mine, page?.mayTakeOver, page?.mayWithdraw];
    };
    expect([await rights(manager), await rights(investigator), await rights(reviewer)]).toEqual([[true, true, false], [false, false, true], [false, false, false]]);
    expect((await getEvidencePage(db, { actor: manager, caseNumber: stage.caseNumber, now }))?.offers).toMatchObject([{ mine: true, receiver: manager.displayName }]);
  });
});

describe('a typed signature', () => {
  const typed = (receivedBy: string, holderName = receivedBy) => handOverItem({ ...where(stage.house.investigator), handOver: handOverForm({ receivedBy, holderName }), handedAt: at('2026-05-12T08:30:00Z'), now });

  test('of a person with an account is refused beside the field; of anybody else it is recorded as typed', async () => {
    await expect(typed(stage.house.manager.displayName)).rejects.toMatchObject({ fieldErrors: { receivedBy: [expect.stringContaining('offer the item')], holderName: [expect.any(String)] } });
    await typed('Fennimore, reception');
    const page = await getItemPage(db, { ...where(stage.house.reviewer), now });
    expect(page?.item.custody.map((record) => record.signed)).toEqual(['Quillon Ashgrove, typed by the recorder', 'given by Quillon Ashgrove, taken by Fennimore, reception; both typed by the recorder']);
  });

  test('of the recorder is their own', async () => {
    const { investigator } = stage.house;
    await collectItem({ actor: investigator, caseNumber: stage.caseNumber, item: itemForm({ holderName: investigator.displayName }), collectedAt, now });
    await typed(investigator.displayName);
    const records = await db.select({ receiverId: custodyRecords.receiverId }).from(custodyRecords).where(eq(custodyRecords.recordedById, investigator.userId)).orderBy(custodyRecords.createdAt);
    expect(records.map((record) => record.receiverId)).toEqual([null, investigator.userId, investigator.userId]);
  });
});

describe('the table of offers', () => {
  test('takes no second open offer, no second answer and no removal', async () => {
    await offer();
    const { id } = await waiting();
    const refused = (work: Promise<unknown>) => work.then(() => 'taken', (error: unknown) => (error instanceof Error && error.cause instanceof Error ? `${Reflect.get(error.cause, 'constraint_name') ?? ''} ${error.cause.message}` : String(error)));
    const [row] = await db.select().from(custodyOffers).where(eq(custodyOffers.id, id));
    if (!row) throw new Error('There is no offer.');
    const { id: _id, ...values } = row;
    expect(await refused(db.insert(custodyOffers).values({ ...values, clientId: randomUUID() }))).toContain('custody_offers_one_open');
    expect(await refused(db.update(custodyOffers).set({ receiverId: stage.house.reviewer.userId }).where(eq(custodyOffers.id, id)))).toContain('kept as it was written');
    await withdrawOffer({ ...where(stage.house.investigator), offerId: id, now });
    expect(await refused(db.update(custodyOffers).set({ answer: 'taken' }).where(eq(custodyOffers.id, id)))).toContain('answered once');
    expect(await refused(db.delete(custodyOffers).where(inArray(custodyOffers.id, [id])))).toContain('only ever added');
  });
});
