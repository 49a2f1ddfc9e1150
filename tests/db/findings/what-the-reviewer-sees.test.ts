import { RouterContextProvider } from 'react-router';
import { describe, expect, test } from 'vitest';
import { caseInReview } from './stage.ts';
import { createFinding } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getCaseHeader } from '#db/queries/case-header.server.ts';
import { getFindingPage } from '#db/queries/finding-page.server.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import type { Actor } from '#app/domain/roles.ts';
import { loader as hypothesesLoader } from '#app/routes/cases/hypotheses.tsx';
import { readReport } from '#app/services/finding-reports/read-report.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';

/** What a tab of the case is given for the reviewer. */
function readTab<Answer>(stage: Stage, loader: (args: Parameters<typeof hypothesesLoader>[0]) => Answer, path: string, params: { readonly caseNumber: string }): Answer {
  const context = new RouterContextProvider();
  context.set(actorContext, stage.house.reviewer);
  const request = new Request(`http://localhost${path}`);
  return loader({ request, context, params, url: new URL(request.url), pattern: '/cases/:caseNumber/hypotheses' });
}

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

  test('results of the engine are data and open, tests and results of the hypotheses are not', async () => {
    const stage = await caseInReview();
    const params = { caseNumber: String(stage.caseNumber) };
    const answer = await readTab(stage, hypothesesLoader, `/cases/${stage.caseNumber}/hypotheses`, params);
    expect(answer.engine).toMatchObject({ tests: expect.arrayContaining([expect.objectContaining({ sentence: 'The beam met the mark for 31 minutes.' })]) });
    expect(JSON.stringify(answer.hypotheses)).not.toMatch(/Probable|Ruled out|1 mm from the mark|No conductor within reach/iu);
    expect(answer.heading).toContain('results are hidden');
    const header = await getCaseHeader(db, { actor: stage.house.reviewer, caseNumber: stage.caseNumber, now: new Date() });
    expect(header?.cardNote).toContain('Reconstruction 1');
    const report = JSON.stringify(await readReport({ actor: stage.house.reviewer, caseNumber: stage.caseNumber, version: null }));
    for (const secret of secrets.slice(0, 2)) expect(report).not.toContain(secret);
    expect(report).toContain('The beam met the mark for 31 minutes.');
    expect(report).not.toMatch(/Focused sunlight: probable|No conductor within reach/iu);
    await showOpinion({ actor: stage.house.reviewer, caseNumber: stage.caseNumber });
    expect(JSON.stringify((await readTab(stage, hypothesesLoader, `/cases/${stage.caseNumber}/hypotheses`, params)).hypotheses)).toContain('No conductor within reach');
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
