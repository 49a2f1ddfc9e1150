import { and, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { caseVersion, contradictingTests, draft, readyCase } from './stage.ts';
import { createActor, createFinding } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { listFindings } from '#db/queries/findings.server.ts';
import { cases, findings, hypotheses, logEntries, outbox, photos, reconstructions, scenes } from '#db/schema/all.ts';
import { noTests } from '#app/domain/hypothesis.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { saveFinding } from '#app/services/findings/save-finding.server.ts';

type Ready = Awaited<ReturnType<typeof readyCase>>;

const save = (ready: Ready, values: Parameters<typeof draft>[1] = {}, openedAt: Date | null = null) =>
  saveFinding({ actor: ready.house.investigator, caseNumber: ready.caseNumber, openedAt, draft: draft(ready.sunlightId, values) });

const send = async (ready: Ready, actor = ready.house.investigator) =>
  moveCase({ actor, caseNumber: ready.caseNumber, moveId: 'send-findings', version: await caseVersion(ready.caseId), reason: '' });

describe('the draft', () => {
  test('is kept with its author, and saving it again changes the same version', async () => {
    const ready = await readyCase();
    const first = await save(ready);
    const [opened] = await listFindings(db, { actor: ready.house.investigator, caseNumber: ready.caseNumber });
    const second = await save(ready, { opinion: 'Another wording.' }, opened?.updatedAt ?? null);
    expect(second).toEqual(first);
    expect(await listFindings(db, { actor: ready.house.investigator, caseNumber: ready.caseNumber })).toMatchObject([{ version: 1, state: 'draft', opinion: 'Another wording.', authorId: ready.house.investigator.userId }]);
    const lines = await db.select({ event: logEntries.event }).from(logEntries).where(eq(logEntries.caseId, ready.caseId)).orderBy(logEntries.sequence);
    expect(lines.map((line) => line.event)).toEqual(['finding.draft-begun', 'finding.draft-saved']);
  });

  test('saved from an older copy is refused as a conflict', async () => {
    const ready = await readyCase();
    await save(ready);
    await expect(save(ready, {}, new Date('2026-01-01T00:00:00Z'))).rejects.toMatchObject({ code: 'conflict' });
  });

  test('a colleague does not write into it, but begins a version of their own', async () => {
    const ready = await readyCase();
    await save(ready);
    const colleague = await createActor(ready.house.organisation.id, 'investigator');
    const own = await saveFinding({ actor: colleague, caseNumber: ready.caseNumber, openedAt: null, draft: draft(ready.sunlightId, { opinion: 'A second reading.' }) });
    expect(own.version).toBe(2);
    const versions = await listFindings(db, { actor: colleague, caseNumber: ready.caseNumber });
    expect(versions.map(({ version, authorId }) => [version, authorId])).toEqual([[2, colleague.userId], [1, ready.house.investigator.userId]]);
  });

  test('"probable" is refused with fewer than two alternatives, with an open test, and with no supporting test', async () => {
    const ready = await readyCase();
    await db.update(hypotheses).set({ result: 'not-tested' }).where(and(eq(hypotheses.caseId, ready.caseId), eq(hypotheses.kind, 'electrical')));
    await db.update(hypotheses).set({ tests: noTests }).where(eq(hypotheses.id, ready.sunlightId));
    const refused = await save(ready).catch((error: unknown) => error);
    expect(refused).toMatchObject({
      code: 'invalid-input',
      fieldErrors: { certainty: [expect.stringContaining('two alternatives examined; 1 so far'), expect.stringContaining('each of the four tests'), expect.stringContaining('Elimination alone')] },
    });
    await expect(save(ready, { certainty: 'undetermined', selectedHypothesisId: null })).resolves.toMatchObject({ version: 1 });
  });

  test('a certainty names the hypothesis it is about, and not one that was ruled out', async () => {
    const ready = await readyCase();
    await expect(save(ready, { certainty: 'possible', selectedHypothesisId: null })).rejects.toMatchObject({ fieldErrors: { selectedHypothesisId: [expect.stringContaining('which hypothesis is possible')] } });
    const [electrical] = await db.select().from(hypotheses).where(and(eq(hypotheses.caseId, ready.caseId), eq(hypotheses.kind, 'electrical')));
    await expect(save(ready, { certainty: 'possible', selectedHypothesisId: electrical?.id ?? null })).rejects.toMatchObject({ fieldErrors: { selectedHypothesisId: [expect.stringContaining('ruled out')] } });
  });

  test.each(['reviewer', 'manager', 'privacyLead', 'reporter'] as const)('the %s may not write it', async (who) => {
    const ready = await readyCase();
    const writing = saveFinding({ actor: ready.house[who], caseNumber: ready.caseNumber, openedAt: null, draft: draft(ready.sunlightId) });
    await expect(writing).rejects.toMatchObject({ code: who === 'reporter' ? 'not-found' : 'forbidden' });
  });
});

describe('sending it to review', () => {
  test('moves the case, marks the version, and writes to the reviewers', async () => {
    const ready = await readyCase();
    await save(ready);
    await send(ready);
    const [row] = await db.select({ state: cases.state }).from(cases).where(eq(cases.id, ready.caseId));
    expect(row?.state).toBe('findings');
    expect(await listFindings(db, { actor: ready.house.investigator, caseNumber: ready.caseNumber })).toMatchObject([{ state: 'sent', sentAt: expect.any(Date) }]);
    const mails = await db.select({ to: outbox.toAddress }).from(outbox).where(eq(outbox.caseId, ready.caseId));
    expect(mails.map((mail) => mail.to)).toContain(ready.house.reviewer.email);
  });

  const missing: readonly [what: string, take: (ready: Ready) => Promise<unknown>, sentence: string][] = [
    ['the onset window', ({ caseId }) => db.update(cases).set({ onsetEarliestAt: null }).where(eq(cases.id, caseId)), 'Give the onset window'],
    ['the optic', ({ caseId }) => db.delete(scenes).where(eq(scenes.caseId, caseId)), 'Record the optic'],
    ['an attached reconstruction', ({ caseId }) => db.update(reconstructions).set({ supersededAt: new Date() }).where(eq(reconstructions.caseId, caseId)), 'Attach at least one reconstruction'],
    ['the focused-sunlight hypothesis', ({ sunlightId }) => db.update(hypotheses).set({ kind: 'hot-work' }).where(eq(hypotheses.id, sunlightId)), 'Record the focused-sunlight hypothesis'],
    ['the second alternative', ({ caseId }) => db.delete(hypotheses).where(and(eq(hypotheses.caseId, caseId), eq(hypotheses.kind, 'electrical'))), 'Examine at least two alternatives; 1 so far'],
    ['a result of one of the four tests', ({ sunlightId }) => db.update(hypotheses).set({ tests: { ...contradictingTests, mark: { result: 'not-tested', why: '' } } }).where(eq(hypotheses.id, sunlightId)), 'Give each of the four tests a result'],
    ['a photo', ({ caseId }) => db.delete(photos).where(eq(photos.caseId, caseId)), 'Add at least one photo'],
    ['the opinion', ({ caseId }) => db.update(findings).set({ opinion: ' ' }).where(eq(findings.caseId, caseId)), 'Write the opinion'],
    ['the limits', ({ caseId }) => db.update(findings).set({ limits: '' }).where(eq(findings.caseId, caseId)), 'State the limits'],
  ];
  test.each(missing)('without %s it is refused, and the sentence names it', async (_what, take, sentence) => {
    const ready = await readyCase();
    await save(ready);
    await take(ready);
    await expect(send(ready)).rejects.toMatchObject({ code: 'invalid-state', needs: expect.arrayContaining([expect.stringContaining(sentence)]) });
    const [row] = await db.select({ state: cases.state }).from(cases).where(eq(cases.id, ready.caseId));
    expect(row?.state).toBe('investigation');
  });

  test('a certainty that no longer goes with the tests is refused', async () => {
    const ready = await readyCase();
    await save(ready);
    await db.update(hypotheses).set({ result: 'possible' }).where(eq(hypotheses.id, ready.sunlightId));
    await expect(send(ready)).rejects.toMatchObject({ code: 'invalid-state', needs: [expect.stringContaining('not recorded as probable')] });
  });

  test('a colleague does not send what the author has not sent', async () => {
    const ready = await readyCase();
    await createFinding({ caseId: ready.caseId, authorId: ready.house.investigator.userId, ...draft(ready.sunlightId) });
    const colleague = await createActor(ready.house.organisation.id, 'investigator');
    await expect(send(ready, colleague)).rejects.toMatchObject({ code: 'forbidden' });
  });
});
