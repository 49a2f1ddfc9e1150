import { and, eq, sql } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { caseInReview, caseVersion } from './stage.ts';
import { actorOf, createActor, createFinding, createHouse, createSite, createUser } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { hasSeenOpinion, listFindings, listReviewComments } from '#db/queries/findings.server.ts';
import { cases, findings, grants, logEntries, outbox } from '#db/schema/all.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import type { Actor } from '#app/domain/roles.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { addReviewComment, settleReviewComment } from '#app/services/findings/review-comments.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

type InReview = Awaited<ReturnType<typeof caseInReview>>;

const move = async (stage: InReview, moveId: 'sign' | 'send-back', actor: Actor = stage.house.reviewer) =>
  moveCase({ actor, caseNumber: stage.caseNumber, moveId, version: await caseVersion(stage.caseId), reason: 'Read against the inputs.' });

const comment = (stage: InReview, actor: Actor = stage.house.reviewer) => addReviewComment({ actor, caseNumber: stage.caseNumber, field: 'limits', body: 'Say how the bearing was taken.' });

const stateOf = async (stage: InReview) => (await db.select({ state: cases.state }).from(cases).where(eq(cases.id, stage.caseId)))[0]?.state;

/** The author, with the reviewer's role as well. */
async function authorWhoReviews(stage: InReview): Promise<Actor> {
  await db.insert(grants).values({ userId: stage.house.investigator.userId, role: 'reviewer', siteId: null });
  return actorOf({ id: stage.house.investigator.userId });
}

describe('who reviews', () => {
  test('the author neither signs, sends back, comments nor opens the block, even as a reviewer', async () => {
    const stage = await caseInReview();
    const author = await authorWhoReviews(stage);
    await expect(move(stage, 'sign', author)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(move(stage, 'send-back', author)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(comment(stage, author)).rejects.toMatchObject({ code: 'forbidden' });
    await expect(showOpinion({ actor: author, caseNumber: stage.caseNumber })).rejects.toMatchObject({ code: 'forbidden' });
    expect(await stateOf(stage)).toBe('findings');
  });

  test('whoever wrote an earlier version does not sign the later one', async () => {
    const stage = await caseInReview();
    const colleague = await createUser({ organisationId: stage.house.organisation.id, grants: ['investigator', 'reviewer'] });
    await createFinding({ caseId: stage.caseId, version: 2, state: 'sent', authorId: stage.house.investigator.userId });
    await db.update(findings).set({ authorId: colleague.id, state: 'sent-back' }).where(eq(findings.id, stage.findingId));
    await expect(move(stage, 'sign', await actorOf(colleague))).rejects.toMatchObject({ code: 'forbidden', message: expect.stringContaining('You wrote a version') });
  });

  test('the table itself refuses a reviewer who is the author', async () => {
    const stage = await caseInReview();
    const writing = db.update(findings).set({ reviewerId: stage.house.investigator.userId }).where(eq(findings.id, stage.findingId));
    await expect(writing).rejects.toMatchObject({ cause: { constraint_name: 'findings_reviewer_not_author' } });
  });

  test('a reviewer of another site and one of another organisation do not find the case', async () => {
    const stage = await caseInReview();
    const elsewhere = await createSite({ organisationId: stage.house.organisation.id });
    const strangers = [await createActor(stage.house.organisation.id, { role: 'reviewer', siteId: elsewhere.id }), (await createHouse()).reviewer];
    for (const stranger of strangers) {
      await expect(move(stage, 'sign', stranger)).rejects.toMatchObject({ code: 'not-found' });
      await expect(comment(stage, stranger)).rejects.toMatchObject({ code: 'not-found' });
      expect(await listFindings(db, { actor: stranger, caseNumber: stage.caseNumber })).toEqual([]);
      expect(await listReviewComments(db, { actor: stranger, caseNumber: stage.caseNumber })).toEqual([]);
    }
  });

  test.each(['manager', 'privacyLead', 'investigator'] as const)('the %s does not sign', async (who) => {
    const stage = await caseInReview();
    await expect(move(stage, 'sign', stage.house[who])).rejects.toMatchObject({ code: 'forbidden' });
  });
});

describe('the opinion', () => {
  test('is opened once, with one line of the log that names reviewer and version', async () => {
    const stage = await caseInReview();
    const { reviewer } = stage.house;
    expect(await hasSeenOpinion(db, { findingId: stage.findingId, userId: reviewer.userId })).toBe(false);
    await showOpinion({ actor: reviewer, caseNumber: stage.caseNumber });
    await showOpinion({ actor: reviewer, caseNumber: stage.caseNumber });
    expect(await hasSeenOpinion(db, { findingId: stage.findingId, userId: reviewer.userId })).toBe(true);
    const lines = await db.select().from(logEntries).where(and(eq(logEntries.caseId, stage.caseId), eq(logEntries.event, 'finding.opinion-shown')));
    expect(lines).toMatchObject([{ actorId: reviewer.userId, summary: expect.stringContaining('version 1') }]);
  });

  test('nobody signs what they have not opened', async () => {
    const stage = await caseInReview();
    await expect(move(stage, 'sign')).rejects.toMatchObject({ code: 'invalid-state', needs: [expect.stringContaining('show the opinion')] });
  });
});

describe('comments', () => {
  test('an open comment keeps the finding from being signed; author or reviewer settles it', async () => {
    const stage = await caseInReview();
    await showOpinion({ actor: stage.house.reviewer, caseNumber: stage.caseNumber });
    const { commentId } = await comment(stage);
    await expect(move(stage, 'sign')).rejects.toMatchObject({ code: 'invalid-state', needs: [expect.stringContaining('Settle every open review comment')] });
    await expect(settleReviewComment({ actor: stage.house.manager, caseNumber: stage.caseNumber, commentId, reason: '' })).rejects.toMatchObject({ code: 'forbidden' });
    await settleReviewComment({ actor: stage.house.investigator, caseNumber: stage.caseNumber, commentId, reason: 'Added to the limits.' });
    await expect(settleReviewComment({ actor: stage.house.reviewer, caseNumber: stage.caseNumber, commentId, reason: '' })).rejects.toMatchObject({ code: 'conflict' });
    await expect(move(stage, 'sign')).resolves.toMatchObject({ state: 'corrective-action' });
    expect(await listReviewComments(db, { actor: stage.house.reviewer, caseNumber: stage.caseNumber })).toMatchObject([{ field: 'limits', settledBy: stage.house.investigator.displayName }]);
  });

  test('sending back needs a comment, keeps the version, copies it into a new draft and writes to the author', async () => {
    const stage = await caseInReview();
    await expect(move(stage, 'send-back')).rejects.toMatchObject({ code: 'invalid-state' });
    await comment(stage);
    await move(stage, 'send-back');
    expect(await stateOf(stage)).toBe('investigation');
    const versions = await listFindings(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber });
    expect(versions.map(({ version, state, opinion, authorId }) => ({ version, state, opinion, authorId }))).toEqual([
      { version: 2, state: 'draft', opinion: versions[1]?.opinion, authorId: stage.house.investigator.userId },
      { version: 1, state: 'sent-back', opinion: versions[1]?.opinion, authorId: stage.house.investigator.userId },
    ]);
    const mails = await db.select().from(outbox).where(and(eq(outbox.caseId, stage.caseId), eq(outbox.toAddress, stage.house.investigator.email)));
    expect(mails).toHaveLength(1);
    expect(mails[0]?.subject).toContain('one comment');
    expect(mails[0]?.bodyText).not.toContain('bearing');
  });
});

describe('a signed finding', () => {
  async function signed() {
    const stage = await caseInReview();
    await showOpinion({ actor: stage.house.reviewer, caseNumber: stage.caseNumber });
    await move(stage, 'sign');
    const [row] = await db.select().from(findings).where(eq(findings.id, stage.findingId));
    if (!row) throw new Error('The finding is gone.');
    return { stage, row };
  }

  test('is frozen whole, with a hash that can be worked out again from what is stored', async () => {
    const { stage, row } = await signed();
    expect(row).toMatchObject({ state: 'signed', reviewerId: stage.house.reviewer.userId });
    expect(row.frozenHash).toBe(sha256Hex(canonicalJson(row.frozen)));
    expect(row.frozen).toMatchObject({
      case: { number: stage.caseNumber, onsetEarliestAt: '2026-05-09T09:00:00.000Z' },
      finding: { version: 1, certainty: 'probable', authorId: stage.house.investigator.userId, reviewerId: stage.house.reviewer.userId },
      hypotheses: [{ kind: 'focused-sunlight' }, { kind: 'electrical' }, { kind: 'smoking-materials' }],
      scene: { version: 1 },
      reconstruction: { number: 1, inputHash: '2'.repeat(64), resultHash: '1'.repeat(64) },
      photos: [{ label: 1, sha256: expect.stringMatching(/^[0-9a-f]{64}$/u) }],
    });
  });

  test('a single changed word changes the hash', async () => {
    const { row } = await signed();
    const text = canonicalJson(row.frozen);
    expect(sha256Hex(text.replace('probable cause', 'possible cause'))).not.toBe(row.frozenHash);
  });

  test('the database itself refuses every change of it', async () => {
    const { stage } = await signed();
    const change = db.update(findings).set({ opinion: 'Another opinion.' }).where(eq(findings.id, stage.findingId));
    await expect(change).rejects.toMatchObject({ cause: { code: '23001' } });
    const thaw = db.execute(sql`update findings set state = 'draft' where id = ${stage.findingId}`);
    await expect(thaw).rejects.toMatchObject({ cause: { code: '23001' } });
  });

  test('managers are told, without a name or a word of the opinion', async () => {
    const { stage } = await signed();
    const mails = await db.select().from(outbox).where(and(eq(outbox.caseId, stage.caseId), eq(outbox.toAddress, stage.house.manager.email)));
    expect(mails).toHaveLength(1);
    expect(mails[0]?.bodyText).not.toContain('parapet');
    expect(mails[0]?.subject).not.toContain(stage.house.investigator.displayName);
  });
});
