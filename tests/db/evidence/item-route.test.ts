import { randomUUID } from 'node:crypto';
import { beforeEach, describe, expect, test } from 'vitest';
import { at, collected, evidenceStage } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { db } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { action, loader } from '#app/routes/cases/evidence-item.tsx';
import { readReport } from '#app/services/finding-reports/read-report.server.ts';
import { contextFor } from '#tests/db/reports/stage.ts';

/** The page of one item as a browser without a script uses it: forms posted as they stand, answers with a status. */
let stage: EvidenceStage;
beforeEach(async () => {
  stage = await evidenceStage();
  await collected(stage);
});

function args(actor: Actor, request: Request) {
  return { request, params: { caseNumber: String(stage.caseNumber), letter: 'A' }, context: contextFor(actor), url: new URL(request.url), pattern: '/cases/:caseNumber/evidence/:letter' as const };
}
const address = () => `http://scorchline.test/cases/${stage.caseNumber}/evidence/A`;
const page = (actor: Actor) => loader(args(actor, new Request(address())));
async function post(actor: Actor, fields: readonly (readonly [string, string])[]) {
  const form = new FormData();
  for (const [name, value] of fields) form.append(name, value);
  const answer = await action(args(actor, new Request(address(), { method: 'POST', body: form })));
  return answer instanceof Response ? { status: answer.status, data: null } : { status: answer.init?.status ?? 200, data: answer.data };
}

const offerFields = (receiverId: string): readonly (readonly [string, string])[] => [['intent', 'offer'], ['clientId', randomUUID()], ['sequence', '1'], ['receiverId', receiverId], ['holderRole', 'site-staff'], ['place', ''], ['purpose', 'Keeping'], ['condition', 'whole'], ['givenBy', 'Quillon Ashgrove']];
const planFields = (values: readonly (readonly [string, string])[]): readonly (readonly [string, string])[] => [['intent', 'plan'], ['clientId', randomUUID()], ['method', 'A section of 2 mm'], ['performedBy', 'Laboratory Fennimore'], ['plannedAt', '2099-06-20T10:00'], ...values];

describe('the page of an item', () => {
  test('takes an offer from the giver, and the signature from the receiver', async () => {
    const { investigator, manager } = stage.house;
    expect(await post(investigator, offerFields(manager.userId))).toMatchObject({ status: 303 });
    const offered = await page(manager);
    expect(offered).toMatchObject({ mayTakeOver: true, item: { openHolderName: 'Quillon Ashgrove' }, offer: { mine: true, purpose: 'Keeping' } });
    const offerId = offered.offer?.id ?? '';
    expect(await post(manager, [['intent', 'take-over'], ['offerId', offerId], ['condition', ''], ['place', 'safe']])).toMatchObject({ status: 400, data: { intent: 'take-over', fieldErrors: { condition: [expect.any(String)] }, typed: { place: 'safe' } } });
    expect(await post(investigator, [['intent', 'take-over'], ['offerId', offerId], ['condition', 'whole'], ['place', '']])).toMatchObject({ status: 403 });
    expect(await post(manager, [['intent', 'take-over'], ['offerId', offerId], ['condition', 'whole'], ['place', '']])).toMatchObject({ status: 303 });
    expect((await page(investigator)).item.custody.at(-1)?.signed).toBe(`given by Quillon Ashgrove, typed by the recorder; taken by ${manager.displayName}, on their own account`);
  });

  test('keeps what was typed into a plan that lacks something, each ticked party too', async () => {
    const typed = [['tellRoles', 'owner'], ['tellRoles', 'maker'], ['waitingDays', 'soon']] as const;
    expect(await post(stage.house.investigator, planFields(typed))).toMatchObject({ status: 400, data: { intent: 'plan', fieldErrors: { waitingDays: [expect.stringContaining('whole days')] }, typed: { tellRoles: 'owner maker', method: 'A section of 2 mm' } } });
    expect(await post(stage.house.investigator, planFields([['waitingDays', '14']]))).toMatchObject({ status: 400, data: { fieldErrors: { tellRoles: [expect.stringContaining('at least one party')] } } });
    expect((await page(stage.house.investigator)).plans).toEqual([]);
  });

  test('says that a damaged form is damaged', async () => {
    expect(await post(stage.house.investigator, [['intent', 'burn']])).toMatchObject({ status: 400, data: { formErrors: [expect.stringContaining('damaged')] } });
  });
});

describe('plan and notices', () => {
  beforeEach(async () => {
    const { investigator } = stage.house;
    await post(investigator, planFields([['tellRoles', 'owner'], ['tellRoles', 'maker'], ['waitingDays', '14']]));
    const [plan] = (await page(investigator)).plans;
    const told = await post(investigator, [['intent', 'notice'], ['clientId', randomUUID()], ['planId', plan?.id ?? ''], ['partyRole', 'owner'], ['toWhom', 'Linnea Aust'], ['way', 'letter'], ['sentAt', '2026-05-20T09:00']]);
    expect(told).toMatchObject({ status: 303 });
  });

  test('are read by those who may read the evidence, and not changed by them', async () => {
    const read = await page(stage.house.reviewer);
    expect(read).toMatchObject({ mayWrite: false, mayOffer: false, receivers: [], notices: [{ role: 'Owner', toWhom: 'Linnea Aust', answer: null }] });
    expect(read.plans[0]?.needs.map((need) => [need.key, need.done])).toEqual([['protocol', false], ['notice-owner', true], ['notice-maker', false], ['waiting', false]]);
    expect(await post(stage.house.reviewer, [['intent', 'cancel-plan'], ['planId', read.plans[0]?.id ?? ''], ['cancelReason', 'I do not like it.']])).toMatchObject({ status: 403 });
  });

  test('stand in the report of the house by part, and not in what a release is made from', async () => {
    const report = JSON.stringify(await readReport({ actor: stage.house.reviewer, caseNumber: stage.caseNumber, version: null }));
    expect(report).toContain(`Planned examinations of ${stage.caseNumber}-A`);
    expect(report).toContain(`Notices about ${stage.caseNumber}-A`);
    expect(report).toContain('Notice to maker: not sent');
    expect(report).not.toMatch(/Aust|Fennimore/u);
    const before = await readCaseBeforeRedaction(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber });
    expect(before?.source.items).toEqual([{ label: 1, kind: 'optic', custody: [{ role: 'investigator', from: at('2026-05-10T09:00:00Z').toISOString(), to: null }], exams: [] }]);
  });
});
