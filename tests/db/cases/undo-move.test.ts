import { eq, sql } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { getCaseHeader } from '#db/queries/case-header.server.ts';
import { stateSince } from '#db/queries/cases.server.ts';
import { getReportProgress } from '#db/queries/reports.server.ts';
import { claimDueMail } from '#db/queries/outbox.server.ts';
import { cases, findings, outbox } from '#db/schema/all.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import type { MoveExtra } from '#app/domain/case-move.ts';
import { moves } from '#app/domain/case-state.ts';
import { isHarmless } from '#app/domain/move-undo.ts';
import type { Actor } from '#app/domain/roles.ts';
import { action as undoAction } from '#app/routes/cases/undo.tsx';
import { addNote } from '#app/services/cases/add-note.server.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { undoMove } from '#app/services/cases/undo-move.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';
import { createActor, createCase, createFinding, createSite } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import { draft, readyCase } from '../findings/stage.ts';
import { logOf, mailOf, refusal, stored } from './stage.ts';
import type { CaseRow } from './stage.ts';

let ready: Awaited<ReturnType<typeof readyCase>>;
let house: House;
beforeAll(async () => {
  ready = await readyCase();
  house = ready.house;
});

/** Everything of the case and its findings but what counts or stamps a write. */
async function asItIs(caseId: string) {
  const { version: _version, updatedAt: _updatedAt, ...row } = await stored({ id: caseId });
  const rows = await db.select().from(findings).where(eq(findings.caseId, caseId));
  return { row, findings: rows.map(({ updatedAt: _at, ...finding }) => finding) };
}
const lastSequence = async (caseId: string) => (await logOf({ id: caseId })).at(-1)?.sequence ?? 0;
const offerTo = async (actor: Actor, row: CaseRow) => (await getCaseHeader(db, { actor, caseNumber: row.number, now: new Date() }))?.undo ?? null;

const move = async (actor: Actor, row: CaseRow, moveId: string, extra: MoveExtra = {}) =>
  moveCase({ actor, caseNumber: row.number, moveId, version: (await stored(row)).version, reason: 'Seen on the spot.', extra });
const undo = async (actor: Actor, row: CaseRow, sequence?: number) => undoMove({ actor, caseNumber: row.number, sequence: sequence ?? (await lastSequence(row.id)) });

/** Makes every line and letter of a case older, as waiting would; the log refuses change, so its trigger rests meanwhile. */
async function letPass(caseId: string, seconds: number): Promise<void> {
  await db.transaction(async (tx) => {
    await tx.execute(sql`alter table log_entries disable trigger log_entries_append_only`);
    await tx.execute(sql`update log_entries set at = at - make_interval(secs => ${seconds}) where case_id = ${caseId}`);
    await tx.execute(sql`alter table log_entries enable trigger log_entries_append_only`);
    await tx.execute(sql`update outbox set next_attempt_at = next_attempt_at - make_interval(secs => ${seconds}) where case_id = ${caseId}`);
  });
}

interface Staged {
  readonly row: CaseRow;
  readonly by: Actor;
  readonly extra?: MoveExtra;
}
const nextWeek = () => new Date(Date.now() + 7 * 86_400_000);
const known = { eventType: 'near-miss', hazardStillPresent: 'no', risk: 'low' } as const;

/** A case in front of each harmless move, with something in every column that the move writes, and the person who makes it. */
const stages: Readonly<Record<string, () => Promise<Staged>>> = {
  'open-triage': async () => ({ row: await createCase('reported', { site: house.site }), by: house.investigator }),
  return: async () => ({
    row: await createCase('triage', { site: house.site, reporterId: house.reporter.userId, question: 'Which room?', answer: 'The left one.', answerDueAt: new Date('2026-05-01T10:00:00Z') }),
    by: house.investigator,
    extra: { question: 'Which window?', answerDueAt: nextWeek() },
  }),
  answer: async () => ({ row: await createCase('returned', { site: house.site, reporterId: house.reporter.userId, question: 'Which window?', answerDueAt: nextWeek() }), by: house.reporter, extra: { answer: 'The left one.' } }),
  'mark-duplicate': async () => ({ row: await createCase('triage', { site: house.site }), by: house.investigator, extra: { mainCaseNumber: (await createCase('triage', { site: house.site })).number } }),
  accept: async () => ({ row: await createCase('triage', { site: house.site, ...known, assignedToId: house.investigator.userId }), by: house.manager }),
  'straight-to-action': async () => ({ row: await createCase('triage', { site: house.site, eventType: 'undesired-circumstance', anyoneHurt: 'no' }), by: house.investigator }),
  'send-findings': async () => {
    await createFinding({ caseId: ready.caseId, authorId: house.investigator.userId, state: 'draft', ...draft(ready.sunlightId) });
    await db.update(cases).set({ noActionReason: 'Said of an earlier version.', reconstructionWaiver: 'The optic was gone then.' }).where(eq(cases.id, ready.caseId));
    return { row: await stored({ id: ready.caseId }), by: house.investigator, extra: { reconstructionWaiver: 'Not needed.', evidenceWaiver: 'Photos only.' } };
  },
  'pass-to-action': async () => {
    const row = await createCase('findings', { site: house.site, noActionReason: 'The lamp was taken down.' });
    await createFinding({ caseId: row.id, authorId: house.investigator.userId, state: 'signed' });
    return { row, by: house.manager };
  },
  'back-to-investigation': async () => ({ row: await createCase('corrective-action', { site: house.site, ...known, assignedToId: house.investigator.userId }), by: house.investigator }),
  'reopen-investigation': async () => ({ row: await createCase('closed', { site: house.site, ...known, assignedToId: house.investigator.userId, reporterId: house.reporter.userId, noActionReason: 'Nothing left.', reopenCount: 1, closeReason: 'referred' }), by: house.reviewer }),
  'reopen-action': async () => ({ row: await createCase('closed', { site: house.site, reporterId: house.reporter.userId, closeReason: 'recorded-only' }), by: house.manager }),
};

test('every harmless move is in the table below', () => {
  expect(Object.keys(stages).sort()).toEqual(moves.map(({ id }) => id).filter(isHarmless).sort());
});

describe('undone in time', () => {
  test.each(Object.keys(stages))('%s leaves case and finding as they were, sends nothing, and keeps both lines in the log', async (moveId) => {
    const { row, by, extra } = (await stages[moveId]?.()) ?? never();
    const before = await asItIs(row.id);
    const since = await stateSince(db, row);
    const linesBefore = (await logOf(row)).length;
    await move(by, row, moveId, extra);
    const moved = await stored(row);
    expect(await asItIs(row.id)).not.toEqual(before);
    expect(await offerTo(by, row)).toMatchObject({ sequence: await lastSequence(row.id), leftMs: expect.any(Number) });
    const outcome = await undo(by, row);
    expect(outcome).toEqual({ state: row.state, moveId });
    expect(await asItIs(row.id)).toEqual(before);
    expect(await mailOf(row)).toEqual([]);
    const after = await stored(row);
    expect(after.version).toBe(moved.version + 1);
    expect(await stateSince(db, after)).toEqual(since);
    const lines = (await logOf(row)).slice(linesBefore);
    expect(lines.at(-1)).toMatchObject({ event: 'case.move-undone', actorId: by.userId, summary: expect.stringContaining('Undone within 10 seconds'), before: { state: moved.state } });
    expect(lines.length).toBeGreaterThanOrEqual(2);
    expect(await offerTo(by, row)).toBeNull();
  });

  test('a state that was taken back is reached on no clock: not on the way of the report, and the next time is the first', async () => {
    const row = await createCase('reported', { site: house.site });
    await move(house.investigator, row, 'open-triage');
    await letPass(row.id, 5);
    await undo(house.investigator, row);
    expect((await getReportProgress(db, row.receipt))?.reachedAt.triage).toBeUndefined();
    await move(house.investigator, row, 'open-triage');
    const [again] = (await logOf(row)).slice(-1);
    expect((await getReportProgress(db, row.receipt))?.reachedAt.triage).toEqual(again?.at);
  });

  test('an answer that was taken back stays readable in the log', async () => {
    const { row, by, extra } = (await stages['answer']?.()) ?? never();
    await move(by, row, 'answer', extra);
    await undo(by, row);
    expect((await logOf(row)).at(-1)?.before).toMatchObject({ answer: 'The left one.', state: 'triage' });
  });

  test('the move can be made again, and then its mail goes', async () => {
    const { row, by, extra } = (await stages['return']?.()) ?? never();
    await move(by, row, 'return', extra);
    await undo(by, row);
    await move(by, row, 'return', extra);
    expect(await mailOf(row)).toHaveLength(1);
  });
});

describe('mail about a move', () => {
  const due = (caseId: string) => db.transaction(async (tx) => (await claimDueMail(tx, 1_000)).filter((mail) => mail.caseId === caseId));

  test('waits until the move can no longer be undone', async () => {
    const { row, by, extra } = (await stages['return']?.()) ?? never();
    await move(by, row, 'return', extra);
    expect(await mailOf(row)).toHaveLength(1);
    expect(await due(row.id)).toEqual([]);
    await letPass(row.id, 13);
    expect(await due(row.id)).toEqual([]);
    expect((await refusal(undo(by, row))).code).toBe('invalid-state');
    await letPass(row.id, 3);
    expect(await due(row.id)).toHaveLength(1);
  });

  test('of a lasting move is due at once', async () => {
    const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
    await move(house.investigator, row, 'close-at-triage', { closeReason: 'not-heat-event' });
    expect(await due(row.id)).toHaveLength(1);
  });

  test('that somebody has tried to send keeps the move', async () => {
    const { row, by, extra } = (await stages['return']?.()) ?? never();
    await move(by, row, 'return', extra);
    await db.update(outbox).set({ attempts: 1 }).where(eq(outbox.caseId, row.id));
    expect((await refusal(undo(by, row))).message).toContain('mail about it has gone out');
    expect(await stored(row)).toMatchObject({ state: 'returned', question: 'Which window?' });
  });
});

describe('not undone', () => {
  const looked = async () => {
    const row = await createCase('reported', { site: house.site });
    await move(house.investigator, row, 'open-triage');
    return row;
  };

  test('when the seconds are over, with no offer any more', async () => {
    const row = await looked();
    await letPass(row.id, 11);
    expect(await offerTo(house.investigator, row)).toBeNull();
    expect((await undo(house.investigator, row)).state).toBe('reported');
    const late = await looked();
    await letPass(late.id, 12.5);
    const error = await refusal(undo(house.investigator, late));
    expect(error).toMatchObject({ code: 'invalid-state', message: expect.stringContaining('those are over') });
    expect((await stored(late)).state).toBe('triage');
  });

  test('by another person, a manager included', async () => {
    const row = await looked();
    expect(await offerTo(house.manager, row)).toBeNull();
    expect(await refusal(undo(house.manager, row))).toMatchObject({ code: 'forbidden' });
    const stranger = await createActor(house.organisation.id, { role: 'investigator', siteId: (await createSite({ organisationId: house.organisation.id })).id });
    expect(await refusal(undo(stranger, row))).toMatchObject({ code: 'not-found' });
    expect((await stored(row)).state).toBe('triage');
  });

  test('when the case was changed since, with who changed it', async () => {
    const row = await looked();
    const sequence = await lastSequence(row.id);
    await addNote({ actor: house.investigator, caseNumber: row.number, body: 'Rang the caretaker.' });
    expect(await offerTo(house.investigator, row)).toBeNull();
    const error = await refusal(undo(house.investigator, row, sequence));
    expect(error).toMatchObject({ code: 'conflict', message: expect.stringContaining(house.investigator.displayName) });
    const other = await looked();
    await db.update(cases).set({ version: sql`${cases.version} + 1` }).where(eq(cases.id, other.id));
    expect(await refusal(undo(house.investigator, other))).toMatchObject({ code: 'conflict' });
  });

  test('once the reviewer has asked for the opinion of a finding that was sent', async () => {
    const stage = await readyCase();
    await createFinding({ caseId: stage.caseId, authorId: stage.house.investigator.userId, state: 'draft', ...draft(stage.sunlightId) });
    const row = await stored({ id: stage.caseId });
    await move(stage.house.investigator, row, 'send-findings');
    const sequence = await lastSequence(row.id);
    await showOpinion({ actor: stage.house.reviewer, caseNumber: row.number });
    expect(await refusal(undo(stage.house.investigator, row, sequence))).toMatchObject({ code: 'conflict' });
  });

  test('twice, nor at the same moment from two pages', async () => {
    const row = await looked();
    const sequence = await lastSequence(row.id);
    const outcomes = await Promise.allSettled([undo(house.investigator, row, sequence), undo(house.investigator, row, sequence)]);
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    const error = await refusal(undo(house.investigator, row, sequence));
    expect(error.message).toContain('undone already');
    expect((await logOf(row)).map((line) => line.event)).toEqual(['case.first-looked', 'case.move-undone']);
  });

  test('a lasting move, nor the undo, nor the line of another case', async () => {
    const row = await createCase('triage', { site: house.site });
    await move(house.investigator, row, 'close-at-triage', { closeReason: 'not-heat-event' });
    expect(await offerTo(house.investigator, row)).toBeNull();
    expect((await refusal(undo(house.investigator, row))).message).toMatch(/stands.*reopened/u);
    const other = await looked();
    expect(await refusal(undo(house.investigator, row, await lastSequence(other.id)))).toMatchObject({ code: 'invalid-input' });
    await undo(house.investigator, other);
    expect(await refusal(undo(house.investigator, other))).toMatchObject({ code: 'invalid-input' });
  });
});

test('a duplicate is still undone by its own move when the seconds are over', async () => {
  const { row, by, extra } = (await stages['mark-duplicate']?.()) ?? never();
  await move(by, row, 'mark-duplicate', extra);
  await letPass(row.id, 29 * 86_400);
  await moveCase({ actor: by, caseNumber: row.number, moveId: 'undo-duplicate', version: (await stored(row)).version, reason: '' });
  expect(await stored(row)).toMatchObject({ state: 'triage', duplicateOfId: null });
});

test('the form is posted without a script: back to the page of the move, or a sentence', async () => {
  const row = await createCase('triage', { site: house.site, reporterId: house.reporter.userId });
  await move(house.investigator, row, 'return', { question: 'Which window?', answerDueAt: nextWeek() });
  const sequence = await lastSequence(row.id);
  const press = async () => {
    const context = new RouterContextProvider();
    context.set(actorContext, house.investigator);
    const url = `http://scorchline.test/cases/${row.number}/undo`;
    const request = new Request(url, { method: 'POST', body: new URLSearchParams({ sequence: String(sequence) }) });
    return undoAction({ request, context, params: { caseNumber: String(row.number) }, url: new URL(url), pattern: '/cases/:caseNumber/undo' });
  };
  const done = await press();
  expect(done instanceof Response ? [done.status, done.headers.get('Location')] : null).toEqual([303, `/cases/${row.number}/triage`]);
  const again = await press();
  expect(again instanceof Response ? null : again).toMatchObject({ init: { status: 409 }, data: { formErrors: [expect.stringContaining('undone already')] } });
});

function never(): never {
  throw new Error('No stage for this move.');
}
