import { describe, expect, test } from 'vitest';
import { holderAccount, offerObstacles, typedSignatureObstacles } from '#app/domain/custody-offer.ts';
import { evidenceHeading } from '#app/domain/evidence-heading.ts';
import { changePlanSchema, planExamSchema } from '#app/domain/evidence-form.ts';
import { answerObstacles, noticeObstacles, objections, partyList, standingAnswer } from '#app/domain/evidence-notice.ts';
import type { NoticeFacts } from '#app/domain/evidence-notice.ts';
import type { ItemFacts } from '#app/domain/evidence-view.ts';
import { custodyFigure } from '#app/domain/figures/custody-figure.ts';
import { madeObstacles, planNeeds, planObstacles, reasonsToWait, toldBefore } from '#app/domain/planned-exam.ts';
import type { PlanFacts } from '#app/domain/planned-exam.ts';
import { reportedItem } from '#app/domain/reported-item.ts';

const at = (utc: string) => new Date(utc);
const zone = 'Europe/Copenhagen';
const now = at('2026-07-15T07:42:00Z');

const notice = (values: Partial<NoticeFacts> = {}): NoticeFacts => ({ id: 'n', planId: 'p', partyRole: 'owner', toWhom: 'Linnea Aust', way: 'letter', sentAt: at('2026-07-09T08:00:00Z'), answers: [], ...values });
const answer = (word: 'agrees' | 'objects' | 'asks-to-attend', utc: string) => ({ answer: word, note: '', answeredAt: at(utc) });
const plan = (values: Partial<PlanFacts> = {}): PlanFacts => ({ id: 'p', method: 'A section of 4 mm', performedBy: 'Laboratory Halm', plannedAt: at('2026-07-24T15:00:00Z'), waitingDays: 14, tellRoles: ['owner', 'maker'], protocolAttachmentId: 'd', outcome: null, cancelReason: '', revision: 1, ...values });
const bothTold = [notice(), notice({ id: 'm', partyRole: 'maker', sentAt: at('2026-07-10T08:00:00Z') })];

describe('answers to a notice', () => {
  test('the newest that had come by then holds, in whatever order they were recorded', () => {
    const told = notice({ answers: [answer('agrees', '2026-07-14T08:00:00Z'), answer('objects', '2026-07-11T08:00:00Z')] });
    expect(standingAnswer(told, at('2026-07-10T00:00:00Z'))).toBeNull();
    expect(standingAnswer(told, at('2026-07-12T00:00:00Z'))?.answer).toBe('objects');
    expect(standingAnswer(told, now)?.answer).toBe('agrees');
    expect([objections([told], at('2026-07-12T00:00:00Z')).length, objections([told], now).length]).toEqual([1, 0]);
  });

  test('of two at one time the one recorded later holds', () => {
    expect(standingAnswer(notice({ answers: [answer('agrees', '2026-07-11T08:00:00Z'), answer('objects', '2026-07-11T08:00:00Z')] }), now)?.answer).toBe('objects');
  });

  test('neither notice nor answer is of tomorrow, and an answer is not before its notice', () => {
    expect(noticeObstacles(at('2026-07-15T07:43:00Z'), now)).toHaveProperty('sentAt');
    expect(noticeObstacles(now, now)).toEqual({});
    expect(answerObstacles(at('2026-07-15T07:43:00Z'), at('2026-07-09T08:00:00Z'), now)).toHaveProperty('answeredAt');
    expect(answerObstacles(at('2026-07-09T07:59:00Z'), at('2026-07-09T08:00:00Z'), now)).toHaveProperty('answeredAt');
    expect(answerObstacles(at('2026-07-09T08:00:00Z'), at('2026-07-09T08:00:00Z'), now)).toEqual({});
  });

  test('parties are listed once, in the order of the list', () => {
    expect(partyList(['maker', 'owner', 'maker'])).toBe('owner, maker');
  });
});

describe('a planned examination', () => {
  const open = (facts: PlanFacts, notices: readonly NoticeFacts[], when = now) => planNeeds(facts, notices, { now: when, zone }).filter((need) => !need.done).map((need) => need.key);

  test('lists the protocol, a notice for each party and the waiting time', () => {
    expect(open(plan({ protocolAttachmentId: null }), [])).toEqual(['protocol', 'notice-owner', 'notice-maker', 'waiting']);
    expect(open(plan(), [notice()])).toEqual(['notice-maker', 'waiting']);
  });

  test('a notice about another examination or the item as a whole is no notice about this one', () => {
    expect(open(plan(), [notice({ planId: 'q' }), notice({ planId: null, partyRole: 'maker' })])).toEqual(['notice-owner', 'notice-maker', 'waiting']);
  });

  test('waits from the last notice, in days of the calendar of the place', () => {
    // From 10 July 14 days lead to 24 July; on 15 July 9 of them are left.
    const waiting = (facts: PlanFacts, when: Date) => planNeeds(facts, bothTold, { now: when, zone }).find((need) => need.key === 'waiting');
    expect(waiting(plan(), now)).toMatchObject({ done: false, note: expect.stringContaining('9 days left') });
    expect(waiting(plan(), at('2026-07-24T00:30:00Z'))).toMatchObject({ done: true });
    expect(waiting(plan({ waitingDays: 15 }), now)).toMatchObject({ done: false, note: expect.stringContaining('put it later') });
    expect(waiting(plan({ waitingDays: 0 }), now)).toMatchObject({ done: true });
  });

  test('shows an objection to it or to the item, and none to another examination', () => {
    const objecting = { answers: [answer('objects', '2026-07-12T08:00:00Z')] };
    expect(open(plan(), [...bothTold, notice({ id: 'i', planId: null, partyRole: 'insurer', ...objecting })])).toEqual(['objection', 'waiting']);
    expect(open(plan(), [...bothTold, notice({ id: 'i', planId: 'q', partyRole: 'insurer', ...objecting })])).toEqual(['waiting']);
  });

  test('is for a day to come', () => {
    expect(planObstacles(now, now)).toHaveProperty('plannedAt');
    expect(planObstacles(at('2026-07-15T07:43:00Z'), now)).toEqual({});
  });
});

describe('a planned examination that was made', () => {
  const performedAt = at('2026-07-24T15:00:00Z');
  const clock = { collectedAt: at('2026-02-03T12:00:00Z'), now: at('2026-07-25T08:00:00Z'), zone };
  const made = (values: Partial<Parameters<typeof madeObstacles>[2]> = {}) => ({ performedAt, protocolAttachmentId: 'd', wentAheadReason: '', ...values });

  test('carries the parties told before it and the last time at which one was told first', () => {
    const reminder = notice({ id: 'r', sentAt: at('2026-07-20T08:00:00Z') });
    const late = notice({ id: 'l', partyRole: 'insurer', sentAt: at('2026-07-24T16:00:00Z') });
    expect(toldBefore(plan(), [...bothTold, reminder, late], performedAt)).toEqual({ noticeTo: 'owner, maker', noticeAt: at('2026-07-10T08:00:00Z') });
  });

  test('needs notice and protocol, whatever the reason given', () => {
    expect(Object.keys(madeObstacles(plan(), [], made({ protocolAttachmentId: null, wentAheadReason: 'The court ordered it.' }), clock)).sort()).toEqual(['performedAt', 'protocolAttachmentId']);
    expect(madeObstacles(plan(), bothTold, made(), clock)).toEqual({});
  });

  test('is not of tomorrow and not before the item was collected', () => {
    expect(madeObstacles(plan(), bothTold, made({ performedAt: at('2026-07-25T08:01:00Z') }), clock)).toHaveProperty('performedAt');
    expect(madeObstacles(plan(), [notice({ sentAt: at('2026-01-01T08:00:00Z') })], made({ performedAt: at('2026-02-01T08:00:00Z') }), clock)['performedAt']?.[0]).toContain('not been collected');
  });

  test('asks why it went ahead when a party objected then, was not told, or was not waited for', () => {
    const objecting = [notice({ answers: [answer('objects', '2026-07-12T08:00:00Z')] }), notice({ id: 'm', partyRole: 'maker', sentAt: at('2026-07-10T08:00:00Z') })];
    expect(reasonsToWait(plan(), objecting, performedAt, zone)).toEqual(['objects: owner']);
    expect(reasonsToWait(plan(), [notice()], performedAt, zone)).toEqual(['not told before it: maker']);
    expect(reasonsToWait(plan(), bothTold, at('2026-07-20T15:00:00Z'), zone)).toEqual(['10 of 14 days of waiting had passed']);
    expect(madeObstacles(plan(), objecting, made(), clock)).toHaveProperty('wentAheadReason');
    expect(madeObstacles(plan(), objecting, made({ wentAheadReason: 'The owner was heard, and the court ordered it.' }), clock)).toEqual({});
  });

  test('an objection that came after it does not reach back', () => {
    expect(madeObstacles(plan(), [...bothTold, notice({ id: 'i', planId: null, partyRole: 'insurer', answers: [answer('objects', '2026-07-24T18:00:00Z')] })], made(), clock)).toEqual({});
  });
});

describe('forms', () => {
  const typed = { clientId: '6b1f8a52-93c5-4d0e-8a1d-0f3a2f6f1b11', method: 'A section', performedBy: 'Laboratory Halm', tellRoles: 'owner maker', waitingDays: '14', protocolAttachmentId: '' };

  test('read parties and days, and take no plan that tells nobody', () => {
    expect(planExamSchema.parse(typed)).toMatchObject({ tellRoles: ['owner', 'maker'], waitingDays: 14, protocolAttachmentId: null });
    expect(planExamSchema.safeParse({ ...typed, tellRoles: '' }).error?.issues.map((issue) => issue.path[0])).toEqual(['tellRoles']);
  });

  test.each(['', 'ten', '-1', '1.5', '366'])('"%s" is no waiting time', (waitingDays) => {
    expect(planExamSchema.safeParse({ ...typed, waitingDays }).error?.issues.map((issue) => issue.path[0])).toEqual(['waitingDays']);
    expect(changePlanSchema.safeParse({ ...typed, planId: typed.clientId, revision: '1', waitingDays }).success).toBe(false);
  });
});

describe('an offer', () => {
  const receivers = [{ userId: 'joss', displayName: 'Joss Penhallow' }, { userId: 'maren', displayName: 'Maren Kvist' }, { userId: 'ruta', displayName: 'Ruta Selwyn' }];
  const rules = { receivers, openRole: 'investigator' as const, holderId: 'ruta', actorId: 'maren' };

  test('goes to somebody who may read the evidence, other than the holder and the one who offers', () => {
    expect(offerObstacles(rules, 'joss')).toEqual({});
    for (const other of ['maren', 'ruta', 'stranger']) expect(offerObstacles(rules, other), other).toHaveProperty('receiverId');
    expect(offerObstacles({ ...rules, openRole: 'disposed' }, 'joss')).toHaveProperty('receiverId');
  });

  test('nobody types the signature of a person with an account but that person', () => {
    expect(Object.keys(typedSignatureObstacles(receivers, 'maren', { holderName: 'joss PENHALLOW ', receivedBy: 'Joss Penhallow' }))).toEqual(['holderName', 'receivedBy']);
    expect(typedSignatureObstacles(receivers, 'maren', { holderName: 'Store Vestre', receivedBy: 'Maren Kvist' })).toEqual({});
    expect(typedSignatureObstacles(receivers, 'maren', { holderName: 'Laboratory Halm', receivedBy: 'Edda Rosmer' })).toEqual({});
  });

  test('who signed for a store does not hold what is in it', () => {
    expect(holderAccount({ holderName: 'Maren Kvist', receivedBy: 'Maren Kvist', receiverId: 'maren' })).toBe('maren');
    expect(holderAccount({ holderName: 'Store Vestre', receivedBy: 'Maren Kvist', receiverId: 'maren' })).toBeNull();
  });
});

describe('what pages and reports say', () => {
  const item: ItemFacts = {
    item: { id: 'i', label: 1, kind: 'optic', description: 'Sphere', fromWhere: 'table', collectedBy: 'Maren Kvist', collectedAt: at('2026-02-03T12:00:00Z'), sealNumber: '40117', disposal: 'undecided', disposalReason: '' },
    custody: [],
    exams: [],
    plans: [plan()],
    notices: [notice({ answers: [answer('objects', '2026-07-12T08:00:00Z')] })],
    offers: [],
  };

  test('the heading names an objection before what is merely missing', () => {
    const standing = { caseNumber: 118, zone, now };
    expect(evidenceHeading([item], [], standing)).toBe('The examination planned for 118-A meets an objection: owner');
    expect(evidenceHeading([{ ...item, notices: [notice()] }], [], standing)).toBe('The examination planned for 118-A still lacks 2 things');
    expect(evidenceHeading([{ ...item, plans: [plan({ outcome: 'cancelled' })] }], [], standing)).toBe('What becomes of 118-A is not decided');
  });

  test('the report names parties by their part and no person', () => {
    const reported = reportedItem(item, 118, zone, now);
    expect(reported.notices).toEqual([{ told: 'Owner', sent: '9 Jul 2026, 10:00', way: 'Letter', about: 'examination of 24 Jul 2026', answer: 'Objects, 12 Jul 2026' }]);
    expect(reported.planned[0]).toMatchObject({ when: '24 Jul 2026, 17:00', lacks: expect.stringContaining('Notice to maker: not sent') });
    expect(JSON.stringify(reported)).not.toMatch(/Aust|Halm/u);
  });

  test('a plan stands as a dashed square beyond the end of the line', () => {
    const line = { code: '118-A', description: 'Sphere', seal: '', holders: [{ role: 'investigator' as const, from: at('2026-07-01T00:00:00Z'), to: null }], exams: [], planned: [at('2026-07-24T15:00:00Z')] };
    const figure = custodyFigure([line], { number: 1, width: 640, textSize: 12, zone, now });
    const lines = figure.marks.flatMap((mark) => (mark.mark === 'line' ? [mark] : []));
    const dashed = lines.filter((mark) => mark.dash && mark.ink === 'ink');
    const held = lines.find((mark) => mark.widthPt === 4);
    const end = Math.max(...(held?.points ?? []).map(([x]) => x));
    expect(dashed.map((mark) => mark.points.length)).toEqual([5, 2]);
    for (const mark of dashed) for (const [x] of mark.points) expect(x).toBeGreaterThan(end);
    expect(figure.alt).toContain('planned, may alter the item, 24 Jul 2026');
    const words = figure.marks.flatMap((mark) => (mark.mark === 'text' ? [mark.text] : []));
    expect(words).toEqual(expect.arrayContaining(['today', '24 Jul']));
  });
});
