import { eq } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { describe, expect, test } from 'vitest';
import { draft, readyCase } from './stage.ts';
import { createActor, createCase, createFinding, createReviewComment, createSite } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { getCaseHeader } from '#db/queries/case-header.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getFindingPage } from '#db/queries/finding-page.server.ts';
import { hasSeenOpinion, listFindings } from '#db/queries/findings.server.ts';
import { isConclusionHidden } from '#db/queries/hidden-conclusion.server.ts';
import { getRegister } from '#db/queries/register-view.server.ts';
import { listSimilarCases } from '#db/queries/similar-cases.server.ts';
import { cases, hypotheses } from '#db/schema/all.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import { caseStates } from '#app/domain/case-state.ts';
import type { Certainty } from '#app/domain/finding.ts';
import { findingStates } from '#app/domain/finding.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import { readRegisterFilter } from '#app/domain/register-filter.ts';
import { withAuthorship } from '#app/domain/review-rights.ts';
import type { Actor } from '#app/domain/roles.ts';
import { loader as mapLoader } from '#app/routes/cases/register-map.tsx';
import { readReport, readReportPdf } from '#app/services/finding-reports/read-report.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';
import { pdfText } from '#app/storage/pdf-text.server.ts';

const now = new Date('2026-07-15T08:42:00Z');
const earlier = { opinion: 'The sphere on the sill set the felt alight.', limits: 'Nobody measured the sill.', immediateCauses: 'A sphere in the sun.' };
const secrets = [...Object.values(earlier), 'Say why probable'];

/** A case that was signed once, reopened, and whose second version is with the reviewer. */
async function reopened(certainty: Certainty = 'possible') {
  const ready = await readyCase('findings');
  await db.update(cases).set({ reopenCount: 1 }).where(eq(cases.id, ready.caseId));
  const { house, caseId } = ready;
  const signed = await createFinding({ caseId, authorId: house.investigator.userId, state: 'signed', certainty, ...earlier });
  const second = await createActor(house.organisation.id, 'reviewer');
  await createReviewComment({ findingId: signed.id, authorId: second.userId, field: 'certainty', body: 'Say why probable.', settledAt: now, settledById: second.userId });
  await createReviewComment({ findingId: signed.id, authorId: second.userId, field: 'photos', body: 'Is photo 3 turned?', settledAt: now, settledById: second.userId });
  await createFinding({ caseId, version: 2, authorId: house.investigator.userId, state: 'sent', ...draft(ready.sunlightId) });
  return { ...ready, second };
}

const filter = (search = '') => readRegisterFilter(new URLSearchParams(search));
const found = async (actor: Actor, caseNumber: number, search = '') => (await getRegister(db, { actor, filter: filter(search), now })).rows.find((row) => row.number === caseNumber);
const head = async (actor: Actor, caseNumber: number) => getCaseHeader(db, { actor, caseNumber, now });

describe('a reviewer of a reopened case who has not asked for the opinion', () => {
  test('reads no certainty in the head of the case, the register, the map or the likeness to another case', async () => {
    const { house, caseNumber } = await reopened();
    const reviewer = house.reviewer;
    expect((await head(reviewer, caseNumber))?.stateNote).toMatch(/, reopened$/u);
    expect((await found(reviewer, caseNumber))?.stateNote).toMatch(/^(?!.*possible).*reopened$/u);
    const context = new RouterContextProvider();
    context.set(actorContext, reviewer);
    const request = new Request('http://localhost/cases/map');
    const map = await mapLoader({ request, context, params: {}, url: new URL(request.url), pattern: '/cases/map' });
    expect(JSON.stringify(map)).toContain(`"number":${caseNumber}`);
    expect(JSON.stringify(map)).not.toMatch(/possible, reopened/u);
    const neighbour = await createCase('triage', { site: house.site });
    const [row] = await db.select().from(cases).where(eq(cases.id, neighbour.id));
    const similar = row ? await listSimilarCases(db, { actor: reviewer, row, now }) : [];
    expect(similar.find((one) => one.row.number === caseNumber)?.row.stateNote).toMatch(/^(?!.*possible).*reopened$/u);
  });

  test('does not find the case by its result, but among those without one', async () => {
    const { house, caseNumber } = await reopened();
    expect(await found(house.reviewer, caseNumber, '?result=possible')).toBeUndefined();
    expect(await found(house.reviewer, caseNumber, '?result=none')).toBeDefined();
    expect(await found(house.manager, caseNumber, '?result=possible')).toBeDefined();
    expect(await found(house.manager, caseNumber, '?result=none')).toBeUndefined();
  });

  test('is not told by the return of the sun that sunlight was ruled out', async () => {
    const { house, caseNumber, caseId } = await reopened('undetermined');
    await db.update(hypotheses).set({ result: 'ruled-out' }).where(eq(hypotheses.caseId, caseId));
    expect(await head(house.manager, caseNumber)).toMatchObject({ returnWords: 'not applicable', stateNote: expect.stringContaining('sunlight ruled out') });
    const hidden = await head(house.reviewer, caseNumber);
    expect(hidden?.returnWords).not.toBe('not applicable');
    expect(hidden?.stateNote).not.toContain('ruled out');
    expect(await found(house.reviewer, caseNumber, '?result=ruled-out')).toBeUndefined();
    expect((await found(house.reviewer, caseNumber))?.returnWords).not.toBe('not applicable');
  });

  test('gets no word of the signed version from the finding, the report or its file, by number either', async () => {
    const { house, caseNumber } = await reopened();
    const actor = house.reviewer;
    for (const version of [null, 1, 2]) {
      const answers = [await getFindingPage(db, { actor, caseNumber, version }), await readReport({ actor, caseNumber, version })];
      const file = (await pdfText((await readReportPdf({ actor, caseNumber, version })).bytes)).replace(/\s+/gu, ' ');
      for (const secret of secrets) expect(`${JSON.stringify(answers)} ${file}`).not.toContain(secret);
    }
    const page = await getFindingPage(db, { actor, caseNumber, version: null });
    expect(page?.allowed ? page.comments.map((pin) => pin.body) : []).toEqual([null, 'Is photo 3 turned?']);
  });

  test('reads all of it once they have asked', async () => {
    const { house, caseNumber } = await reopened();
    await showOpinion({ actor: house.reviewer, caseNumber });
    expect((await head(house.reviewer, caseNumber))?.stateNote).toContain('possible, reopened');
    expect(await found(house.reviewer, caseNumber, '?result=possible')).toBeDefined();
    const page = JSON.stringify(await getFindingPage(db, { actor: house.reviewer, caseNumber, version: 1 }));
    for (const secret of secrets) expect(page).toContain(secret);
  });
});

test('everybody else still reads what was signed', async () => {
  const { house, caseNumber, second } = await reopened();
  for (const actor of [house.investigator, house.manager]) expect((await head(actor, caseNumber))?.stateNote).toContain('possible');
  await showOpinion({ actor: second, caseNumber });
  expect((await head(second, caseNumber))?.stateNote).toContain('possible');
  expect((await head(house.reviewer, caseNumber))?.stateNote).not.toContain('possible');
});

test('the condition in SQL is the rule of the review', async () => {
  const { house } = await readyCase();
  const elsewhere = await createSite({ organisationId: house.organisation.id });
  const both = await createActor(house.organisation.id, 'reviewer', 'investigator');
  const here = await createActor(house.organisation.id, { role: 'reviewer', siteId: house.site.id });
  const actors = [house.reviewer, house.investigator, house.manager, both, here, await createActor(house.organisation.id, { role: 'reviewer', siteId: elsewhere.id }, 'privacy-lead')];
  let hidden = 0;
  for (const state of caseStates) {
    for (const findingState of findingStates) {
      const row = await createCase(state, { site: house.site });
      await createFinding({ caseId: row.id, version: 1, authorId: both.userId, state: 'sent-back' });
      await createFinding({ caseId: row.id, version: 2, authorId: house.investigator.userId, state: findingState });
      if (state === 'findings' && findingState === 'sent') await showOpinion({ actor: here, caseNumber: row.number });
      for (const actor of actors) {
        const query = { actor, caseNumber: row.number };
        const subject = (await findCase(db, actor, row.number))?.subject;
        const versions = await listFindings(db, query);
        const [latest] = versions;
        if (!subject || !latest) throw new Error('Everybody here sees every case.');
        const rule = latest.state === 'sent' && canOnCase(actor, 'finding:review', withAuthorship(subject, versions, actor.userId)) && !(await hasSeenOpinion(db, { findingId: latest.id, userId: actor.userId }));
        expect(await isConclusionHidden(db, query), `${state}, ${findingState}, ${actor.displayName}`).toBe(rule);
        hidden += Number(rule);
      }
    }
  }
  expect(hidden).toBe(1);
});
