import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { cases } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { actorOf, createAction, createActor, createCase, createFinding, createHouse, createHypothesis, createInvolvement, createPhoto, createReviewComment, createScene, createSite, createUser } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import { logOf, mailOf, refusal, stored } from './stage.ts';
import type { CaseRow } from './stage.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});

const move = (actor: Actor, row: CaseRow, moveId: string, more: Partial<Parameters<typeof moveCase>[0]> = {}) =>
  moveCase({ actor, caseNumber: row.number, moveId, version: row.version, reason: '', ...more });

const nextWeek = () => new Date(Date.now() + 7 * 86_400_000);

describe('every move', () => {
  test('writes the new state, raises the version, and logs from and to', async () => {
    const row = await createCase('reported', { site: house.site });
    const outcome = await move(house.investigator, row, 'open-triage');
    expect(outcome).toEqual({ state: 'triage', version: row.version + 1 });
    expect(await stored(row)).toMatchObject({ state: 'triage', version: row.version + 1 });
    expect(await logOf(row)).toMatchObject([{ event: 'case.first-looked', actorId: house.investigator.userId, before: { state: 'reported' }, after: { state: 'triage' } }]);
  });

  test('is refused on an older version, with who was faster and what they did', async () => {
    const row = await createCase('reported', { site: house.site });
    await move(house.investigator, row, 'open-triage');
    const error = await refusal(move(house.manager, row, 'open-triage'));
    expect(error.code).toBe('conflict');
    expect(error.message).toContain(house.investigator.displayName);
    expect(error.message).toContain('First look');
  });

  test('is made once when two people move at the same moment', async () => {
    const row = await createCase('reported', { site: house.site });
    const outcomes = await Promise.allSettled([move(house.investigator, row, 'open-triage'), move(house.manager, row, 'open-triage')]);
    expect(outcomes.map((outcome) => outcome.status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await logOf(row)).toHaveLength(1);
  });

  test('is refused from another state than its own', async () => {
    const row = await createCase('triage', { site: house.site });
    const error = await refusal(move(house.investigator, row, 'open-triage'));
    expect(error.code).toBe('invalid-state');
  });

  test('does not tell a stranger that the case exists', async () => {
    const row = await createCase('reported', { site: house.site });
    const stranger = await createActor((await createHouse()).organisation.id, 'investigator');
    expect((await refusal(move(stranger, row, 'open-triage'))).code).toBe('not-found');
    expect((await refusal(move(house.reporter, row, 'open-triage'))).code).toBe('not-found');
    expect((await refusal(move(house.administrator, row, 'open-triage'))).code).toBe('not-found');
  });

  test('is refused to an investigator of another site', async () => {
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const row = await createCase('reported', { site: house.site });
    const other = await createActor(house.organisation.id, { role: 'investigator', siteId: elsewhere.id });
    expect((await refusal(move(other, row, 'open-triage'))).code).toBe('not-found');
  });

  test.each(['mark-duplicate', 'straight-to-action', 'close-at-triage'])('%s needs a reason', async (moveId) => {
    const row = await createCase('triage', { site: house.site });
    const error = await refusal(move(house.investigator, row, moveId));
    expect(error.code).toBe('invalid-input');
    expect(error.fieldErrors['reason']).toHaveLength(1);
    expect(await stored(row)).toMatchObject({ state: 'triage', version: row.version });
  });
});

describe('returning to the reporter', () => {
  test('needs one question and a day in the future', async () => {
    const row = await createCase('triage', { site: house.site });
    const error = await refusal(move(house.investigator, row, 'return', { extra: { answerDueAt: new Date('2020-01-01T00:00:00Z') } }));
    expect(Object.keys(error.fieldErrors).sort()).toEqual(['answerDueAt', 'question']);
  });

  test('writes to a reporter with an account, without the question in the mail', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    await move(house.investigator, row, 'return', { extra: { question: 'Was the cover on the dish?', answerDueAt: nextWeek() } });
    const [message] = await mailOf(row);
    expect(message?.toAddress).toBe(house.reporter.email);
    expect(`${message?.subject} ${message?.bodyText}`).not.toContain('dish');
  });

  test('writes to a guest who left an address', async () => {
    const row = await createCase('triage', { site: house.site, guestReport: true });
    await createInvolvement({ caseId: row.id, role: 'reporter', email: 'guest@example.test' });
    await move(house.investigator, row, 'return', { extra: { question: 'Which window?', answerDueAt: nextWeek() } });
    expect((await mailOf(row)).map((message) => message.toAddress)).toEqual(['guest@example.test']);
  });

  test('lets the reporter answer at once, and an investigator only after the day', async () => {
    const row = await createCase('returned', { site: house.site, reporterId: house.reporter.userId, question: 'Which window?', answerDueAt: nextWeek() });
    const error = await refusal(move(house.investigator, row, 'answer', { extra: { answer: 'No answer came.' } }));
    expect(error.code).toBe('invalid-state');
    await move(house.reporter, row, 'answer', { extra: { answer: 'The left one.' } });
    expect(await stored(row)).toMatchObject({ state: 'triage', answer: 'The left one.', question: 'Which window?' });
    const late = await createCase('returned', { site: house.site, question: 'Which window?', answerDueAt: new Date(Date.now() - 86_400_000) });
    expect((await move(house.investigator, late, 'answer', { extra: { answer: 'No answer came.' } })).state).toBe('triage');
  });
});

describe('duplicates', () => {
  test('point to the main case and keep both', async () => {
    const main = await createCase('triage', { site: house.site });
    const row = await createCase('triage', { site: house.site });
    await move(house.investigator, row, 'mark-duplicate', { reason: 'Same planter.', extra: { mainCaseNumber: main.number } });
    expect(await stored(row)).toMatchObject({ state: 'duplicate', duplicateOfId: main.id, narrative: row.narrative });
    expect((await stored(main)).state).toBe('triage');
  });

  test('refuse themselves, other duplicates, and unseen cases', async () => {
    const row = await createCase('triage', { site: house.site });
    const duplicate = await createCase('duplicate', { site: house.site });
    const foreign = await createCase('triage', { site: (await createHouse()).site });
    for (const mainCaseNumber of [row.number, duplicate.number, foreign.number]) {
      const error = await refusal(move(house.investigator, row, 'mark-duplicate', { reason: 'Same mark.', extra: { mainCaseNumber } }));
      expect(error.fieldErrors['mainCaseNumber']).toHaveLength(1);
    }
  });

  test('cross sites only for a manager of both', async () => {
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const main = await createCase('triage', { site: elsewhere });
    const row = await createCase('triage', { site: house.site });
    const wish = { reason: 'Same mark.', extra: { mainCaseNumber: main.number } };
    expect((await refusal(move(house.investigator, row, 'mark-duplicate', wish))).code).toBe('forbidden');
    const half = await createActor(house.organisation.id, 'investigator', { role: 'manager', siteId: house.site.id });
    expect((await refusal(move(half, row, 'mark-duplicate', wish))).code).toBe('forbidden');
    expect((await move(house.manager, row, 'mark-duplicate', wish)).state).toBe('duplicate');
  });

  test('are undone without a reason for 30 days, and with one after', async () => {
    const main = await createCase('triage', { site: house.site });
    const fresh = await createCase('triage', { site: house.site });
    await move(house.investigator, fresh, 'mark-duplicate', { reason: 'Same mark.', extra: { mainCaseNumber: main.number } });
    await move(house.investigator, await stored(fresh), 'undo-duplicate');
    expect(await stored(fresh)).toMatchObject({ state: 'triage', duplicateOfId: null });
    const old = await createCase('duplicate', { site: house.site, duplicateOfId: main.id, reportedAt: new Date(Date.now() - 31 * 86_400_000) });
    expect((await refusal(move(house.investigator, old, 'undo-duplicate'))).fieldErrors['reason']?.[0]).toContain('30 days');
    expect((await move(house.investigator, old, 'undo-duplicate', { reason: 'Another pane after all.' })).state).toBe('triage');
  });
});

describe('leaving triage', () => {
  const ready = { eventType: 'near-miss', hazardStillPresent: 'no', risk: 'low' } as const;

  test('into investigation needs event, hazard control, investigator and risk, each named', async () => {
    const row = await createCase('triage', { site: house.site, hazardStillPresent: 'yes' });
    const error = await refusal(move(house.investigator, row, 'accept'));
    expect(error.code).toBe('invalid-state');
    expect(error.needs).toHaveLength(4);
    expect(error.needs.join(' ')).toMatch(/kind of event.*interim control.*investigator.*risk/u);
  });

  test('into investigation writes to the investigator, unless they named themselves', async () => {
    const other = await actorOf(await createUser({ organisationId: house.organisation.id, grants: ['investigator'] }));
    const row = await createCase('triage', { site: house.site, ...ready, assignedToId: other.userId });
    await move(house.investigator, row, 'accept');
    expect((await mailOf(row)).map((message) => message.toAddress)).toEqual([other.email]);
    const own = await createCase('triage', { site: house.site, ...ready, assignedToId: house.investigator.userId });
    await move(house.investigator, own, 'accept');
    expect(await mailOf(own)).toEqual([]);
  });

  test('straight to action only for an undesired circumstance with nobody hurt', async () => {
    const hurt = await createCase('triage', { site: house.site, eventType: 'undesired-circumstance', anyoneHurt: 'dont-know' });
    expect((await refusal(move(house.investigator, hurt, 'straight-to-action', { reason: 'Plain bowl on a sill.' }))).needs).toHaveLength(1);
    const row = await createCase('triage', { site: house.site, eventType: 'undesired-circumstance', anyoneHurt: 'no' });
    expect((await move(house.investigator, row, 'straight-to-action', { reason: 'Plain bowl on a sill.' })).state).toBe('corrective-action');
  });

  test('to closed needs a kind of reason from the list', async () => {
    const row = await createCase('triage', { site: house.site });
    expect((await refusal(move(house.investigator, row, 'close-at-triage', { reason: 'A shadow.', extra: { closeReason: 'bored' } }))).fieldErrors['closeReason']).toHaveLength(1);
    await move(house.investigator, row, 'close-at-triage', { reason: 'A shadow.', extra: { closeReason: 'not-heat-event' } });
    const closed = await stored(row);
    expect(closed).toMatchObject({ state: 'closed', closeReason: 'not-heat-event' });
    expect(closed.closedAt).not.toBeNull();
  });

  test('to closed needs a manager when somebody was hurt', async () => {
    const row = await createCase('triage', { site: house.site, anyoneHurt: 'yes' });
    const wish = { reason: 'Sent to the clinic.', extra: { closeReason: 'referred' } };
    expect((await refusal(move(house.investigator, row, 'close-at-triage', wish))).code).toBe('forbidden');
    expect((await move(house.manager, row, 'close-at-triage', wish)).state).toBe('closed');
  });
});

async function underInvestigation(complete: boolean) {
  const row = await createCase('investigation', { site: house.site, assignedToId: house.investigator.userId, ...(complete ? { reconstructionWaiver: 'The optic is gone.' } : {}) });
  if (!complete) return row;
  await createScene({ caseId: row.id, scene: { optic: { kind: 'metal-trim' } } });
  await createPhoto({ caseId: row.id });
  const why = (reason: string) => ({ result: 'not-tested' as const, why: reason });
  await createHypothesis({ caseId: row.id, result: 'possible', evidenceFor: 'Curved edge.', tests: { geometry: why('Gone.'), weather: why('No station.'), energy: why('Gone.'), mark: why('Cleaned.') } });
  for (const kind of ['electrical', 'smoking-materials'] as const) await createHypothesis({ caseId: row.id, kind, result: 'ruled-out', evidenceAgainst: 'No cable and no ash.' });
  await createFinding({ caseId: row.id, authorId: house.investigator.userId });
  return row;
}

describe('findings', () => {
  test('are sent only when everything is there, and each missing thing is named', async () => {
    const row = await createCase('investigation', { site: house.site, onsetEarliestAt: null, onsetLatestAt: null });
    const error = await refusal(move(house.investigator, row, 'send-findings'));
    expect(error.needs.join(' ')).toMatch(/onset window.*optic.*reconstruction.*focused-sunlight.*two alternatives.*photo.*opinion/u);
  });

  test('are sent with word to the reviewers of the site', async () => {
    const row = await underInvestigation(true);
    expect((await move(house.investigator, row, 'send-findings')).state).toBe('findings');
    expect((await mailOf(row)).map((message) => message.toAddress)).toContain(house.reviewer.email);
  });

  test('may be sent with a waiver that comes with the move', async () => {
    const row = await underInvestigation(true);
    await db.update(cases).set({ reconstructionWaiver: null }).where(eq(cases.id, row.id));
    expect((await refusal(move(house.investigator, row, 'send-findings'))).needs).toHaveLength(1);
    await move(house.investigator, row, 'send-findings', { extra: { reconstructionWaiver: 'Optic thrown away.' } });
    expect((await stored(row)).reconstructionWaiver).toBe('Optic thrown away.');
  });

  test('are not reviewed by their author, even one who is also a reviewer', async () => {
    const both = await createActor(house.organisation.id, 'investigator', 'reviewer');
    const row = await createCase('findings', { site: house.site });
    const finding = await createFinding({ caseId: row.id, authorId: both.userId, state: 'sent' });
    expect((await refusal(move(both, row, 'sign'))).code).toBe('forbidden');
    expect((await refusal(move(both, row, 'send-back'))).code).toBe('forbidden');
    await createReviewComment({ findingId: finding.id, authorId: house.reviewer.userId });
    expect((await refusal(move(house.reviewer, row, 'sign'))).needs.join(' ')).toContain('comment');
    expect((await move(house.reviewer, row, 'send-back')).state).toBe('investigation');
  });
});

describe('closing', () => {
  const words = { lesson: 'Look at every curved trim.', externalReports: 'Not needed, checked 1 June.' };
  const inAction = async (more: object = {}) => {
    const row = await createCase('corrective-action', { site: house.site, ...more });
    await createFinding({ caseId: row.id, authorId: house.investigator.userId, state: 'signed' });
    return row;
  };
  const people = () => ({ ownerId: house.manager.userId, verifierId: house.reviewer.userId });

  test('needs actions finished and shown effective, the lesson, and word on outside reports', async () => {
    const row = await inAction();
    await createAction({ caseId: row.id, ...people(), state: 'open' });
    await createAction({ caseId: row.id, ...people(), state: 'verified' });
    await createAction({ caseId: row.id, ...people(), state: 'not-effective' });
    const error = await refusal(move(house.manager, row, 'close'));
    expect(error.needs).toHaveLength(5);
  });

  test('takes lesson and reports with the move, and a waiver for an effect not shown', async () => {
    const row = await inAction({ reporterId: house.reporter.userId });
    await createAction({ caseId: row.id, ...people(), state: 'verified' });
    expect((await refusal(move(house.manager, row, 'close', { extra: words }))).needs).toHaveLength(1);
    await move(house.manager, row, 'close', { extra: { ...words, effectivenessWaiver: 'The trim was removed.' } });
    expect(await stored(row)).toMatchObject({ state: 'closed', ...words, effectivenessWaiver: 'The trim was removed.' });
    expect((await mailOf(row)).map((message) => message.toAddress)).toEqual([house.reporter.email]);
  });

  test('is not open to an investigator', async () => {
    expect((await refusal(move(house.investigator, await inAction(), 'close', { extra: words }))).code).toBe('forbidden');
  });

  test.each(['high', 'severe'] as const)('of %s risk is open only to a manager for every site', async (risk) => {
    const row = await inAction({ risk });
    const siteManager = await createActor(house.organisation.id, { role: 'manager', siteId: house.site.id });
    expect((await refusal(move(siteManager, row, 'close', { extra: words }))).code).toBe('forbidden');
    expect((await move(house.manager, row, 'close', { extra: words })).state).toBe('closed');
  });

  test('of a case without a finding, passed straight to action, needs no signature', async () => {
    const row = await createCase('corrective-action', { site: house.site });
    expect((await move(house.manager, row, 'close', { extra: words })).state).toBe('closed');
  });
});

describe('reopening', () => {
  test('needs a reason, counts, and clears the closing time', async () => {
    const row = await createCase('closed', { site: house.site, eventType: 'fire', risk: 'low', assignedToId: house.investigator.userId, reporterId: house.reporter.userId });
    expect((await refusal(move(house.reviewer, row, 'reopen-investigation'))).fieldErrors['reason']).toHaveLength(1);
    await move(house.reviewer, row, 'reopen-investigation', { reason: 'It was lit again in March.' });
    expect(await stored(row)).toMatchObject({ state: 'investigation', reopenCount: 1, closedAt: null });
    expect((await mailOf(row)).map((message) => message.toAddress)).toEqual([house.reporter.email]);
  });

  test('is not open to an investigator', async () => {
    const row = await createCase('closed', { site: house.site });
    expect((await refusal(move(house.investigator, row, 'reopen-action', { reason: 'Again.' }))).code).toBe('forbidden');
  });

  test('for investigation says what a case closed at triage still lacks', async () => {
    const row = await createCase('closed', { site: house.site, closeReason: 'recorded-only' });
    const error = await refusal(move(house.reviewer, row, 'reopen-investigation', { reason: 'It was lit again.' }));
    expect(error.needs.join(' ')).toMatch(/kind of event.*investigator.*risk/u);
    expect((await move(house.manager, row, 'reopen-action', { reason: 'It was lit again.' })).state).toBe('corrective-action');
  });
});
