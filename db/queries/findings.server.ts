import { and, asc, count, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, findings, logEntries, photos, reconstructions, reviewComments, scenes, users } from '#db/schema/all.ts';
import type { FindingDraft } from '#app/domain/finding-form.ts';
import type { ReviewField } from '#app/domain/finding.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

export type FindingRow = typeof findings.$inferSelect;

export interface FindingView extends Omit<FindingRow, 'frozen'> {
  readonly author: string;
  readonly reviewer: string | null;
}

const author = sql<string>`(select ${users.displayName} from ${users} where ${users.id} = ${findings.authorId})`;
const reviewer = sql<string | null>`(select ${users.displayName} from ${users} where ${users.id} = ${findings.reviewerId})`;

const viewColumns = {
  id: findings.id,
  caseId: findings.caseId,
  version: findings.version,
  state: findings.state,
  opinion: findings.opinion,
  selectedHypothesisId: findings.selectedHypothesisId,
  certainty: findings.certainty,
  classification: findings.classification,
  immediateCauses: findings.immediateCauses,
  underlyingCauses: findings.underlyingCauses,
  rootCauses: findings.rootCauses,
  limits: findings.limits,
  authorId: findings.authorId,
  sentAt: findings.sentAt,
  reviewerId: findings.reviewerId,
  reviewedAt: findings.reviewedAt,
  signedAt: findings.signedAt,
  frozenHash: findings.frozenHash,
  createdAt: findings.createdAt,
  updatedAt: findings.updatedAt,
  author,
  reviewer,
};

/** Versions of the finding of a visible case, newest first. What of them may be shown is the caller's to decide. */
export function listFindings(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<FindingView[]> {
  return db
    .select(viewColumns)
    .from(findings)
    .innerJoin(cases, eq(cases.id, findings.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(desc(findings.version));
}

/** What was signed, of one version of a visible case. */
export async function getFrozenFinding(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number; readonly version: number }) {
  const [row] = await db
    .select({ frozen: findings.frozen, frozenHash: findings.frozenHash })
    .from(findings)
    .innerJoin(cases, eq(cases.id, findings.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), eq(findings.version, params.version), eq(findings.state, 'signed')));
  return row ?? null;
}

/** All versions under the lock that the caller holds on the case, newest first. */
export function listFindingRows(tx: Transaction, caseId: string): Promise<FindingRow[]> {
  return tx.select().from(findings).where(eq(findings.caseId, caseId)).orderBy(desc(findings.version)).for('update');
}

export async function insertFindingDraft(tx: Transaction, values: FindingDraft & { readonly caseId: string; readonly version: number; readonly authorId: string }): Promise<string> {
  const [row] = await tx.insert(findings).values({ ...values, state: 'draft' }).returning({ id: findings.id });
  if (!row) throw new Error('The finding was not written.');
  return row.id;
}

export async function updateFindingDraft(tx: Transaction, findingId: string, draft: FindingDraft): Promise<void> {
  await tx.update(findings).set(draft).where(and(eq(findings.id, findingId), eq(findings.state, 'draft')));
}

export async function markFindingSent(tx: Transaction, findingId: string): Promise<void> {
  await tx.update(findings).set({ state: 'sent', sentAt: sql`now()` }).where(eq(findings.id, findingId));
}

/** Back to its author as it was, before any reviewer has asked for it. */
export async function markFindingUnsent(tx: Transaction, findingId: string): Promise<void> {
  await tx.update(findings).set({ state: 'draft', sentAt: null }).where(and(eq(findings.id, findingId), eq(findings.state, 'sent')));
}

export async function markFindingSentBack(tx: Transaction, findingId: string, reviewerId: string): Promise<void> {
  await tx.update(findings).set({ state: 'sent-back', reviewerId, reviewedAt: sql`now()` }).where(eq(findings.id, findingId));
}

export async function markFindingSigned(
  tx: Transaction,
  findingId: string,
  signed: { readonly reviewerId: string; readonly at: Date; readonly frozen: Record<string, unknown>; readonly frozenHash: string },
): Promise<void> {
  await tx
    .update(findings)
    .set({ state: 'signed', reviewerId: signed.reviewerId, reviewedAt: signed.at, signedAt: signed.at, frozen: signed.frozen, frozenHash: signed.frozenHash })
    .where(eq(findings.id, findingId));
}

/** What a signature covers besides the finding itself. */
export async function readSignedBasis(tx: DbOrTx, caseId: string) {
  const [caseRow] = await tx
    .select({ number: cases.number, zone: cases.zone, foundAt: cases.foundAt, foundClockErrorS: cases.foundClockErrorS, onsetEarliestAt: cases.onsetEarliestAt, onsetLatestAt: cases.onsetLatestAt, onsetBasis: cases.onsetBasis, siteId: cases.siteId, organisationId: cases.organisationId })
    .from(cases)
    .where(eq(cases.id, caseId));
  const [scene] = await tx.select({ version: scenes.version, scene: scenes.scene }).from(scenes).where(eq(scenes.caseId, caseId)).orderBy(desc(scenes.version)).limit(1);
  const [run] = await tx
    .select({ number: reconstructions.number, engineVersion: reconstructions.engineVersion, sceneVersion: reconstructions.sceneVersion, inputHash: reconstructions.inputHash, resultHash: reconstructions.resultHash })
    .from(reconstructions)
    .where(and(eq(reconstructions.caseId, caseId), isNotNull(reconstructions.attachedAt), isNull(reconstructions.supersededAt)))
    .orderBy(desc(reconstructions.attachedAt))
    .limit(1);
  const photoRows = await tx.select({ label: photos.label, fileName: photos.fileName, sha256: photos.sha256 }).from(photos).where(eq(photos.caseId, caseId)).orderBy(asc(photos.label));
  if (!caseRow) throw new Error('The case of the finding is gone.');
  return { case: caseRow, scene: scene ?? null, run: run ?? null, photos: photoRows };
}

export interface CommentView {
  readonly id: string;
  readonly findingId: string;
  readonly version: number;
  readonly field: ReviewField;
  readonly body: string;
  readonly authorId: string;
  readonly author: string;
  readonly createdAt: Date;
  readonly settledAt: Date | null;
  readonly settledBy: string | null;
}

const settledBy = sql<string | null>`(select ${users.displayName} from ${users} where ${users.id} = ${reviewComments.settledById})`;

/** Review comments on every version, oldest first, so that their numbers stay. */
export function listReviewComments(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<CommentView[]> {
  return db
    .select({
      id: reviewComments.id,
      findingId: reviewComments.findingId,
      version: findings.version,
      field: reviewComments.field,
      body: reviewComments.body,
      authorId: reviewComments.authorId,
      author: users.displayName,
      createdAt: reviewComments.createdAt,
      settledAt: reviewComments.settledAt,
      settledBy,
    })
    .from(reviewComments)
    .innerJoin(findings, eq(findings.id, reviewComments.findingId))
    .innerJoin(cases, eq(cases.id, findings.caseId))
    .innerJoin(users, eq(users.id, reviewComments.authorId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(reviewComments.createdAt), asc(reviewComments.id));
}

export async function insertReviewComment(tx: Transaction, values: { readonly findingId: string; readonly field: ReviewField; readonly body: string; readonly authorId: string }): Promise<string> {
  const [row] = await tx.insert(reviewComments).values(values).returning({ id: reviewComments.id });
  if (!row) throw new Error('The comment was not written.');
  return row.id;
}

/** A comment of this case under a lock, with the finding it belongs to. */
export async function lockReviewComment(tx: Transaction, params: { readonly caseId: string; readonly commentId: string }) {
  const [row] = await tx
    .select({ id: reviewComments.id, field: reviewComments.field, authorId: reviewComments.authorId, settledAt: reviewComments.settledAt, findingAuthorId: findings.authorId, version: findings.version })
    .from(reviewComments)
    .innerJoin(findings, eq(findings.id, reviewComments.findingId))
    .where(and(eq(reviewComments.id, params.commentId), eq(findings.caseId, params.caseId)))
    .for('update', { of: reviewComments });
  return row ?? null;
}

export async function markCommentSettled(tx: Transaction, commentId: string, userId: string): Promise<void> {
  await tx.update(reviewComments).set({ settledAt: sql`now()`, settledById: userId }).where(eq(reviewComments.id, commentId));
}

/** Comments on one version that nobody has settled. */
export async function openCommentsOf(tx: Transaction, findingId: string): Promise<number> {
  const [row] = await tx.select({ open: count() }).from(reviewComments).where(and(eq(reviewComments.findingId, findingId), isNull(reviewComments.settledAt)));
  return row?.open ?? 0;
}

/** Event of the log line that says a reviewer asked to see an opinion. */
export const opinionShownEvent = 'finding.opinion-shown';

/** Whether this person has asked to see the author's opinion of this version. */
export async function hasSeenOpinion(db: DbOrTx, params: { readonly findingId: string; readonly userId: string }): Promise<boolean> {
  const [row] = await db
    .select({ sequence: logEntries.sequence })
    .from(logEntries)
    .where(and(eq(logEntries.event, opinionShownEvent), eq(logEntries.subjectId, params.findingId), eq(logEntries.actorId, params.userId)))
    .limit(1);
  return row !== undefined;
}
