import { describe, expect, test } from 'vitest';
import { caseInReview } from './stage.ts';
import { createFinding } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getFindingPage } from '#db/queries/finding-page.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';

type Stage = Awaited<ReturnType<typeof caseInReview>>;
const page = (stage: Stage, actor: Actor, version: number | null = null) => getFindingPage(db, { actor, caseNumber: stage.caseNumber, version });
const secrets = ['probable cause of the band', 'A curved, polished parapet', 'accidental', 'two days later'];

describe('before the opinion is asked for', () => {
  test('nothing that the author concluded leaves the server, and the inputs do', async () => {
    const stage = await caseInReview();
    const before = await page(stage, stage.house.reviewer);
    expect(before).toMatchObject({ allowed: true, mode: 'review', opinionShown: false, chosen: null });
    for (const secret of secrets) expect(JSON.stringify(before)).not.toContain(secret);
    expect(before?.allowed ? before.inputs.map((group) => group.field) : []).toEqual(['onset-window', 'optic', 'mark', 'weather', 'reconstruction', 'photos']);
  });

  test('asking for an earlier version by number does not go round it', async () => {
    const stage = await caseInReview();
    await createFinding({ caseId: stage.caseId, version: 2, state: 'sent', authorId: stage.house.investigator.userId });
    const earlier = await page(stage, stage.house.reviewer, 1);
    for (const secret of secrets) expect(JSON.stringify(earlier)).not.toContain(secret);
  });

  test('after it everything is there', async () => {
    const stage = await caseInReview();
    await showOpinion({ actor: stage.house.reviewer, caseNumber: stage.caseNumber });
    const after = JSON.stringify(await page(stage, stage.house.reviewer));
    for (const secret of secrets) expect(after).toContain(secret);
  });
});

test('the author sees their words and who can sign, and no form to sign', async () => {
  const stage = await caseInReview();
  expect(await page(stage, stage.house.investigator)).toMatchObject({ mode: 'wait', opinionShown: true, reviewClosed: expect.stringContaining('but not the author'), form: null });
});

test('a manager is given signed versions only, and no comment', async () => {
  const stage = await caseInReview();
  const unsigned = await page(stage, stage.house.manager);
  expect(unsigned).toMatchObject({ allowed: true, versions: [], chosen: null, comments: [] });
  for (const secret of secrets) expect(JSON.stringify(unsigned)).not.toContain(secret);
  await createFinding({ caseId: stage.caseId, version: 2, state: 'signed', authorId: stage.house.investigator.userId, opinion: 'The signed words.' });
  const signed = await page(stage, stage.house.manager);
  expect(signed?.allowed ? signed.versions.map((version) => version.version) : []).toEqual([2]);
  expect(JSON.stringify(signed)).toContain('The signed words.');
});
