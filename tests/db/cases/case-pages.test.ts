import { eq } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { getCaseAccount } from '#db/queries/case-account.server.ts';
import { getCaseHeader } from '#db/queries/case-header.server.ts';
import { getTriage, mayOpenTriage } from '#db/queries/triage.server.ts';
import { caseNotes, injuries, outbox } from '#db/schema/all.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { FormProblem } from '#app/http/form-result.server.ts';
import { action as accountAction } from '#app/routes/cases/account.tsx';
import { action as triageAction } from '#app/routes/cases/triage.tsx';
import { actorOf, createActor, createCase, createHouse, createInjury, createInvolvement, createNote, createPhoto, createScene, createUser } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import { logOf, stored } from './stage.ts';
import type { CaseRow } from './stage.ts';

const now = new Date('2026-07-15T08:42:00Z');
let house: House;
beforeAll(async () => {
  house = await createHouse();
});


interface Posted {
  readonly status: number;
  readonly location: string | null;
  readonly problem: Pick<FormProblem, 'fieldErrors' | 'formErrors' | 'typed'> | null;
}

/** Posts a form as a browser without scripts does, and reads the answer of the route. */
async function post(page: 'account' | 'triage', actor: Actor, row: CaseRow, fields: Record<string, string>): Promise<Posted> {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  const url = `http://scorchline.test/cases/${row.number}${page === 'triage' ? '/triage' : ''}`;
  const request = new Request(url, { method: 'POST', body: new URLSearchParams(fields), headers: { 'Content-Type': 'application/x-www-form-urlencoded' } });
  const args = { request, context, params: { caseNumber: String(row.number) }, url: new URL(url), pattern: '' } as const;
  const answer = page === 'triage' ? await triageAction({ ...args, pattern: '/cases/:caseNumber/triage' }) : await accountAction({ ...args, pattern: '/cases/:caseNumber' });
  if (answer instanceof Response) return { status: answer.status, location: answer.headers.get('Location'), problem: null };
  return { status: answer.init?.status ?? 200, location: null, problem: answer.data };
}

describe('the head of a case', () => {
  test('shows tabs by what the person may read', async () => {
    const row = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId });
    const tabs = async (actor: Actor) => (await getCaseHeader(db, { actor, caseNumber: row.number, now }))?.tabs.map((tab) => tab.key);
    expect(await tabs(house.reporter)).toEqual(['account', 'photos']);
    expect(await tabs(house.investigator)).toEqual(['account', 'triage', 'measurements', 'photos', 'reconstructions', 'evidence', 'witnesses', 'timeline', 'hypotheses', 'findings', 'report', 'actions', 'releases', 'log']);
    expect(await tabs(house.reviewer)).toEqual(['account', 'measurements', 'photos', 'reconstructions', 'evidence', 'witnesses', 'timeline', 'hypotheses', 'findings', 'report', 'actions', 'log']);
    expect(await tabs(house.administrator)).toBeUndefined();
  });

  test('says whether somebody was hurt only to those who may read health fields', async () => {
    const row = await createCase('triage', { site: house.site, anyoneHurt: 'yes' });
    const subtitle = async (actor: Actor) => (await getCaseHeader(db, { actor, caseNumber: row.number, now }))?.subtitle ?? '';
    expect(await subtitle(house.investigator)).toContain('Somebody was hurt');
    for (const actor of [house.reviewer, house.manager]) expect(await subtitle(actor)).not.toContain('hurt');
  });

  test('takes the clock error off the find and keeps the raw reading beside it', async () => {
    const row = await createCase('triage', { site: house.site, foundAt: new Date('2026-02-03T11:02:00Z'), foundClockErrorS: 360, onsetEarliestAt: new Date('2026-02-03T08:40:00Z'), onsetLatestAt: new Date('2026-02-03T10:56:00Z') });
    const head = await getCaseHeader(db, { actor: house.investigator, caseNumber: row.number, now });
    expect(head?.card.foundAtUtc).toBe('2026-02-03T10:56:00.000Z');
    expect(head?.card.endWords).toEqual(['10:56 found,', '11:02 less 6 min clock error']);
  });

  test('without a run shows all daylight of the window as undecided, never as a gap', async () => {
    const row = await createCase('triage', { site: house.site });
    const head = await getCaseHeader(db, { actor: house.investigator, caseNumber: row.number, now });
    expect(head?.card.runs.map((run) => run.verdict)).toEqual(['cannot-tell']);
    expect(head?.cardNote).toContain('no reconstruction yet');
  });
});

describe('what the account gives away', () => {
  test('names of people only to those who may read them, and children to fewer still', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    await createInvolvement({ caseId: row.id, role: 'reporter', name: 'Tomas Weir', email: 'tomas@example.test' });
    await createInvolvement({ caseId: row.id, role: 'witness', name: 'Ilse Farrow' });
    await createInvolvement({ caseId: row.id, role: 'injured', name: 'Pim Aldous', ageBand: 'under-16', guardianContact: 'guardian@example.test' });
    const told = async (actor: Actor) => JSON.stringify(await getCaseAccount(db, { actor, caseNumber: row.number }));
    for (const actor of [house.investigator, house.privacyLead]) expect(await told(actor)).toMatch(/Ilse Farrow.*Pim Aldous.*guardian@example/u);
    for (const actor of [house.reviewer, house.manager]) {
      expect(await told(actor)).toContain('Ilse Farrow');
      expect(await told(actor)).not.toMatch(/Pim Aldous|guardian@example/u);
    }
    expect(await told(house.reporter)).toContain('Tomas Weir');
    expect(await told(house.reporter)).not.toMatch(/Ilse Farrow|Pim Aldous|guardian@example/u);
  });

  test('injuries only to an investigator and the privacy lead of the site', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    await createInjury({ caseId: row.id, part: 'right hand', kind: 'superficial-burn' });
    for (const actor of [house.investigator, house.privacyLead]) expect((await getCaseAccount(db, { actor, caseNumber: row.number }))?.injuries).toHaveLength(1);
    for (const actor of [house.reviewer, house.manager, house.reporter]) {
      const account = await getCaseAccount(db, { actor, caseNumber: row.number });
      expect(account?.injuries).toBeNull();
      expect(JSON.stringify(account)).not.toContain('right hand');
    }
  });

  test('no log, no list of what is lacking and no moves of others to the reporter', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    const account = await getCaseAccount(db, { actor: house.reporter, caseNumber: row.number });
    expect(account).toMatchObject({ log: null, logCount: 0, lacks: null, moves: { open: [], closed: [] } });
  });

  test('a move that is not theirs with who can make it', async () => {
    const row = await createCase('closed', { site: house.site });
    const account = await getCaseAccount(db, { actor: house.investigator, caseNumber: row.number });
    expect(account?.moves.open).toEqual([]);
    expect(account?.moves.closed.map((move) => move.whoCan)).toEqual(Array(2).fill('Open to a technical reviewer or the site manager.'));
  });

  test('a warning for a window of night only and for one of many days', async () => {
    const night = await createCase('triage', { site: house.site, onsetEarliestAt: new Date('2026-01-10T19:00:00Z'), onsetLatestAt: new Date('2026-01-10T23:00:00Z') });
    const long = await createCase('triage', { site: house.site, onsetEarliestAt: new Date('2026-01-01T00:00:00Z'), onsetLatestAt: new Date('2026-01-20T00:00:00Z') });
    const warnings = async (row: CaseRow) => (await getCaseAccount(db, { actor: house.investigator, caseNumber: row.number }))?.warnings;
    expect(await warnings(night)).toEqual([expect.stringContaining('no daylight')]);
    expect(await warnings(long)).toEqual([expect.stringContaining('19 days long')]);
  });
});

describe('notes', () => {
  test('are added by the reporter and an investigator until the case is closed, and logged', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    expect(await post('account', house.reporter, row, { intent: 'add-note', body: ' The sheet blew off. ' })).toMatchObject({ status: 303, location: `/cases/${row.number}` });
    expect(await post('account', house.manager, row, { intent: 'add-note', body: 'Seen.' })).toMatchObject({ status: 403 });
    expect((await db.select().from(caseNotes).where(eq(caseNotes.caseId, row.id))).map((note) => note.body)).toEqual(['The sheet blew off.']);
    expect((await logOf(row)).map((line) => line.event)).toEqual(['case.note-added']);
    const closed = await createCase('closed', { site: house.site, reporterId: house.reporter.userId });
    expect((await post('account', house.reporter, closed, { intent: 'add-note', body: 'Late.' })).status).toBe(403);
  });

  test('that are empty or too long are refused beside the field, and what was typed is kept', async () => {
    const row = await createCase('triage', { site: house.site });
    expect((await post('account', house.investigator, row, { intent: 'add-note', body: '  ' })).problem?.fieldErrors['body']).toHaveLength(1);
    const long = 'x'.repeat(4_001);
    const answer = await post('account', house.investigator, row, { intent: 'add-note', body: long });
    expect(answer.problem?.fieldErrors['body']).toHaveLength(1);
    expect(answer.problem?.typed['body']).toBe(long);
  });

  test('stand in the order in which they were written, under the account that never changes', async () => {
    const row = await createCase('triage', { site: house.site, narrative: 'As it was written.' });
    await createNote({ caseId: row.id, body: 'first' });
    await createNote({ caseId: row.id, body: 'second' });
    const account = await getCaseAccount(db, { actor: house.investigator, caseNumber: row.number });
    expect(account?.notes.map((note) => note.body)).toEqual(['first', 'second']);
    expect(account?.narrative).toBe('As it was written.');
  });
});

describe('the injury box', () => {
  const fields = { intent: 'save-injury', injuryId: '', kind: 'superficial-burn', part: 'left hand', treatment: 'first-aid', daysAway: '2', restrictedDays: '', description: 'Blister.' };

  test('is written by an investigator or the privacy lead, and its words stay out of the log', async () => {
    const row = await createCase('investigation', { site: house.site });
    expect((await post('account', house.privacyLead, row, fields)).status).toBe(303);
    const [injury] = await db.select().from(injuries).where(eq(injuries.caseId, row.id));
    expect(injury).toMatchObject({ part: 'left hand', daysAway: 2, restrictedDays: null });
    expect((await post('account', house.investigator, row, { ...fields, injuryId: injury?.id ?? '', treatment: 'none' })).status).toBe(303);
    const log = await logOf(row);
    expect(log.map((line) => line.event)).toEqual(['case.injury-added', 'case.injury-changed']);
    expect(JSON.stringify(log)).not.toMatch(/hand|blister|burn/iu);
  });

  test('is closed to a reviewer, a manager and the reporter', async () => {
    const row = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId });
    for (const actor of [house.reviewer, house.manager, house.reporter]) expect((await post('account', actor, row, fields)).status).toBe(403);
    expect(await db.select().from(injuries).where(eq(injuries.caseId, row.id))).toEqual([]);
  });

  test('does not change an injury of another case', async () => {
    const row = await createCase('investigation', { site: house.site });
    const other = await createInjury({ caseId: (await createCase('investigation', { site: house.site })).id });
    await expect(post('account', house.investigator, row, { ...fields, injuryId: other.id })).rejects.toMatchObject({ init: { status: 404 } });
  });

  test('refuses days that are not whole', async () => {
    const row = await createCase('investigation', { site: house.site });
    const answer = await post('account', house.investigator, row, { ...fields, daysAway: 'two' });
    expect(answer.status).toBe(400);
    expect(answer.problem?.fieldErrors['daysAway']?.[0]).toContain('whole days');
  });
});

describe('the first look', () => {
  const facts = { intent: 'save-facts', title: 'Brown band', eventType: 'near-miss', hazardStillPresent: 'no', interimControl: '', interimControlEnds: '', onsetEarliest: '2026-05-09T10:00', onsetLatest: '2026-05-09T15:00', onsetBasis: 'last-seen-sound', extent: 'surface-mark', weatherSeen: 'clear', foundByMeans: 'inspection', clockErrorMin: '6', potentialConsequence: 'major', likelihood: 'likely', risk: 'high', riskBasis: 'Dry litter below.' };

  test('is taken by one press, from either page', async () => {
    const row = await createCase('reported', { site: house.site });
    const answer = await post('account', house.investigator, row, { intent: 'move-open-triage', moveId: 'open-triage', version: String(row.version) });
    expect(answer).toMatchObject({ status: 303, location: `/cases/${row.number}/triage` });
  });

  test('saves the facts in the clock of the place, and logs each change from what to what', async () => {
    const row = await createCase('triage', { site: house.site });
    expect(await post('triage', house.investigator, row, { ...facts, version: String(row.version) })).toMatchObject({ status: 303, location: `/cases/${row.number}/triage` });
    expect(await stored(row)).toMatchObject({ title: 'Brown band', eventType: 'near-miss', onsetEarliestAt: new Date('2026-05-09T09:00:00Z'), onsetLatestAt: new Date('2026-05-09T14:00:00Z'), foundClockErrorS: 360, risk: 'high', extent: 'surface-mark', version: row.version + 1 });
    const [line] = await logOf(row);
    expect(line).toMatchObject({ event: 'case.facts-changed', before: { title: row.title, risk: null }, after: { title: 'Brown band', risk: 'high' } });
    expect(line?.summary).toContain('clock error');
  });

  test('says who was faster when two save, and keeps what the second typed', async () => {
    const row = await createCase('triage', { site: house.site });
    await post('triage', house.investigator, row, { ...facts, version: String(row.version) });
    const other = await createActor(house.organisation.id, 'investigator');
    const answer = await post('triage', other, row, { ...facts, title: 'Another title', version: String(row.version) });
    expect(answer.status).toBe(409);
    expect(answer.problem?.formErrors[0]).toContain(house.investigator.displayName);
    expect(answer.problem?.typed['title']).toBe('Another title');
    expect((await stored(row)).title).toBe('Brown band');
  });

  test.each([
    [{ onsetEarliest: '2026-05-09T15:30' }, 'onsetEarliest'],
    [{ onsetLatest: '' }, 'onsetLatest'],
    [{ onsetLatest: '2026-05-09T15:10' }, 'onsetLatest'],
    [{ onsetLatest: '2199-05-09T15:10' }, 'onsetLatest'],
    [{ onsetEarliest: 'yesterday' }, 'onsetEarliest'],
    [{ clockErrorMin: 'six' }, 'clockErrorMin'],
    [{ title: '  ' }, 'title'],
    [{ hazardStillPresent: 'yes', interimControl: 'Sheet over it' }, 'interimControlEnds'],
    [{ eventType: 'explosion' }, 'eventType'],
  ])('refuses %j beside the field and changes nothing', async (change, field) => {
    const row = await createCase('triage', { site: house.site });
    const answer = await post('triage', house.investigator, row, { ...facts, ...change, version: String(row.version) });
    expect(answer.status).toBe(400);
    expect(Object.keys(answer.problem?.fieldErrors ?? {})).toEqual([field]);
    expect((await stored(row)).version).toBe(row.version);
  });

  test('asks which pass is meant in the hour that the clocks repeat, and explains the hour they skip', async () => {
    const row = await createCase('triage', { site: house.site, foundAt: null });
    const save = (onsetEarliest: string, onsetLatest: string, more: object = {}) => post('triage', house.investigator, row, { ...facts, onsetEarliest, onsetLatest, ...more, version: String(row.version) });
    const repeated = await save('2025-10-26T01:30', '2025-10-26T09:00');
    expect(repeated.problem?.fieldErrors['onsetEarliest']?.[0]).toContain('twice');
    const skipped = await save('2026-03-29T01:30', '2026-03-29T09:00');
    expect(skipped.problem?.fieldErrors['onsetEarliest']?.[0]).toContain('02:30');
    expect((await save('2025-10-26T01:30', '2025-10-26T09:00', { onsetEarliestWhich: 'second' })).status).toBe(303);
    expect((await stored(row)).onsetEarliestAt).toEqual(new Date('2025-10-26T01:30:00Z'));
  });

  test('keeps event and risk of a case under investigation', async () => {
    const row = await createCase('investigation', { site: house.site });
    const answer = await post('triage', house.investigator, row, { ...facts, eventType: '', risk: '', version: String(row.version) });
    expect(Object.keys(answer.problem?.fieldErrors ?? {}).sort()).toEqual(['eventType', 'risk']);
  });

  test('names an investigator of the site only; a manager may name one, a reviewer may not', async () => {
    const row = await createCase('triage', { site: house.site });
    const assign = (actor: Actor, investigatorId: string) => post('triage', actor, row, { intent: 'assign', version: String(row.version), investigatorId });
    expect((await assign(house.manager, house.reviewer.userId)).problem?.fieldErrors['investigatorId']).toHaveLength(1);
    expect((await assign(house.reviewer, house.investigator.userId)).status).toBe(403);
    expect((await assign(house.manager, house.investigator.userId)).status).toBe(303);
    expect((await stored(row)).assignedToId).toBe(house.investigator.userId);
    expect(await db.select().from(outbox).where(eq(outbox.caseId, row.id))).toEqual([]);
  });

  test('writes to an investigator who is named once work has begun', async () => {
    const row = await createCase('investigation', { site: house.site });
    const next = await actorOf(await createUser({ organisationId: house.organisation.id, grants: ['investigator'] }));
    await post('triage', house.manager, row, { intent: 'assign', version: String(row.version), investigatorId: next.userId });
    expect((await db.select().from(outbox).where(eq(outbox.caseId, row.id))).map((mail) => mail.toAddress)).toEqual([next.email]);
  });

  test('makes its moves, and gives back the question and day that were typed when it cannot', async () => {
    const row = await createCase('triage', { site: house.site });
    const fields = { intent: 'move-return', moveId: 'return', version: String(row.version), question: 'Which window?' };
    const refused = await post('triage', house.investigator, row, { ...fields, answerDueOn: '2020-01-01' });
    expect(refused.problem?.fieldErrors['answerDueOn']).toHaveLength(1);
    expect(refused.problem?.typed['question']).toBe('Which window?');
    expect((await post('triage', house.investigator, row, { ...fields, answerDueOn: '2199-07-20' })).status).toBe(303);
    expect(await stored(row)).toMatchObject({ state: 'returned', question: 'Which window?', answerDueAt: new Date('2199-07-20T22:59:00Z') });
  });

  test('is not open to a reviewer, nor to the reporter', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    for (const actor of [house.reviewer, house.reporter]) {
      const triage = await getTriage(db, { actor, caseNumber: row.number, now });
      expect(triage && mayOpenTriage(actor, triage.subject)).toBe(false);
    }
  });

  test('shows similar cases of the same site or optic that this person may see, with why', async () => {
    const fresh = await createHouse();
    const row = await createCase('triage', { site: fresh.site, foundAt: new Date('2026-01-05T12:00:00Z') });
    await createScene({ caseId: row.id, scene: { optic: { kind: 'dish' } } });
    const near = await createCase('closed', { site: fresh.site, foundAt: new Date('2024-12-20T12:00:00Z') });
    const far = await createCase('closed', { site: fresh.site, foundAt: new Date('2025-06-20T12:00:00Z') });
    const foreign = await createCase('triage', { site: house.site });
    await createScene({ caseId: foreign.id, scene: { optic: { kind: 'dish' } } });
    const triage = await getTriage(db, { actor: fresh.investigator, caseNumber: row.number, now });
    expect(triage?.view.similar.map((one) => [one.row.number, one.reasons])).toEqual([
      [near.number, ['same site', 'sun as high as on 20 Dec 2024']],
      [far.number, ['same site']],
    ]);
  });

  test('lists photos, and says plainly that the sun on the mark is not known without a run', async () => {
    const row = await createCase('triage', { site: house.site });
    await createPhoto({ caseId: row.id });
    const triage = await getTriage(db, { actor: house.investigator, caseNumber: row.number, now });
    expect(triage?.view.photoCount).toBe(1);
    expect(triage?.view.sun.words).toContain('Not known');
    expect(triage?.view.sun.skyWords).toMatch(/^Sun [\d.]+° up at [\d.]+° true; sets \d\d:\d\d\.$/u);
  });
});
