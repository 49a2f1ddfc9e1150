import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { createActor, createHouse, createCase, createSite } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getEngineSummary, listHypotheses } from '#db/queries/hypotheses.server.ts';
import { hypotheses, logEntries } from '#db/schema/all.ts';
import type { HypothesisDraft } from '#app/domain/hypothesis-form.ts';
import { saveHypothesis } from '#app/services/findings/save-hypothesis.server.ts';
import { contradictingTests, readyCase, supportingTests } from './stage.ts';

const idea: HypothesisDraft = {
  kind: 'lightning',
  statement: 'A strike set the membrane alight.',
  predicts: 'A hole with a fused rim.',
  evidenceFor: '',
  evidenceAgainst: 'No strike within 50 km that day.',
  tests: contradictingTests,
  result: 'ruled-out',
  testedById: null,
};

describe('recording a hypothesis', () => {
  test('keeps it, names the tester, and writes one line of the log', async () => {
    const { house, caseNumber, caseId } = await readyCase();
    const { hypothesisId } = await saveHypothesis({ actor: house.investigator, caseNumber, hypothesisId: null, openedAt: null, draft: { ...idea, testedById: house.investigator.userId } });
    const list = await listHypotheses(db, { actor: house.investigator, caseNumber });
    expect(list.map((hypothesis) => hypothesis.kind)).toEqual(['focused-sunlight', 'electrical', 'smoking-materials', 'lightning']);
    expect(list.at(-1)).toMatchObject({ id: hypothesisId, testedBy: house.investigator.displayName, statement: idea.statement });
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, caseId));
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatchObject({ event: 'hypothesis.added', subjectId: hypothesisId, actorId: house.investigator.userId });
  });

  test('a second focused-sunlight hypothesis is refused beside the field', async () => {
    const { house, caseNumber } = await readyCase();
    const second = saveHypothesis({ actor: house.investigator, caseNumber, hypothesisId: null, openedAt: null, draft: { ...idea, kind: 'focused-sunlight' } });
    await expect(second).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { kind: [expect.stringContaining('already on the list')] } });
  });

  test('"probable" without a supporting test is refused beside the result', async () => {
    const { house, caseNumber } = await readyCase();
    const bold = saveHypothesis({ actor: house.investigator, caseNumber, hypothesisId: null, openedAt: null, draft: { ...idea, result: 'probable' } });
    await expect(bold).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { result: [expect.stringContaining('Elimination alone shows nothing')] } });
  });

  test('a change made on an older copy is refused, and nothing is overwritten', async () => {
    const { house, caseNumber, sunlightId } = await readyCase();
    const [opened] = await listHypotheses(db, { actor: house.investigator, caseNumber });
    const change = (statement: string) =>
      saveHypothesis({ actor: house.investigator, caseNumber, hypothesisId: sunlightId, openedAt: opened?.updatedAt ?? null, draft: { ...idea, kind: 'focused-sunlight', statement, tests: supportingTests, result: 'possible' } });
    await change('First.');
    await expect(change('Second.')).rejects.toMatchObject({ code: 'conflict' });
    const [kept] = await db.select().from(hypotheses).where(eq(hypotheses.id, sunlightId));
    expect(kept?.statement).toBe('First.');
  });

  test('a hypothesis of another case cannot be reached through this one', async () => {
    const one = await readyCase();
    const other = await createCase('investigation', { site: one.house.site });
    const reach = saveHypothesis({ actor: one.house.investigator, caseNumber: other.number, hypothesisId: one.sunlightId, openedAt: null, draft: idea });
    await expect(reach).rejects.toMatchObject({ code: 'not-found' });
  });

  test.each(['reviewer', 'manager', 'privacyLead'] as const)('the %s may not write one', async (who) => {
    const { house, caseNumber } = await readyCase();
    await expect(saveHypothesis({ actor: house[who], caseNumber, hypothesisId: null, openedAt: null, draft: idea })).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('nobody may write one once the finding is with the reviewer', async () => {
    const { house, caseNumber } = await readyCase('findings');
    await expect(saveHypothesis({ actor: house.investigator, caseNumber, hypothesisId: null, openedAt: null, draft: idea })).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('an investigator of another site and one of another organisation do not find the case', async () => {
    const { house, caseNumber } = await readyCase();
    const elsewhere = await createSite({ organisationId: house.organisation.id });
    const stranger = await createHouse();
    const actors = [await createActor(house.organisation.id, { role: 'investigator', siteId: elsewhere.id }), stranger.investigator];
    for (const actor of actors) {
      await expect(saveHypothesis({ actor, caseNumber, hypothesisId: null, openedAt: null, draft: idea })).rejects.toMatchObject({ code: 'not-found' });
      expect(await listHypotheses(db, { actor, caseNumber })).toEqual([]);
      expect(await getEngineSummary(db, { actor, caseNumber })).toBeNull();
    }
  });

  test('somebody of another organisation cannot be named as tester', async () => {
    const { house, caseNumber } = await readyCase();
    const stranger = await createHouse();
    const naming = saveHypothesis({ actor: house.investigator, caseNumber, hypothesisId: null, openedAt: null, draft: { ...idea, testedById: stranger.investigator.userId } });
    await expect(naming).rejects.toMatchObject({ fieldErrors: { testedById: [expect.any(String)] } });
  });
});

test('the engine summary is that of the attached run, without its minutes', async () => {
  const { house, caseNumber } = await readyCase();
  const summary = await getEngineSummary(db, { actor: house.investigator, caseNumber });
  expect(summary).toMatchObject({ number: 1, grade: { word: 'not refuted' } });
  expect(summary?.tests.map(({ test: name, result }) => [name, result])).toEqual([['geometry', 'supports'], ['weather', 'inconclusive'], ['energy', 'supports'], ['mark', 'not tested']]);
  expect(summary).not.toHaveProperty('minutes');
});
