import { and, count, desc, eq, isNotNull, isNull } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { correctiveActions, findings, hypotheses, photos, reconstructions, reviewComments, scenes } from '#db/schema/all.ts';
import type { MoveFacts } from '#app/domain/case-state.ts';
import { isOpenAction, isUnprovenAction } from '#app/domain/corrective-action.ts';
import { isExaminedAlternative, untestedWithoutWhy } from '#app/domain/hypothesis.ts';
import type { CaseRow } from './case-subject.server.ts';

/** What decides whether a move is ready. Read it under the lock that the move holds. */
export async function readMoveFacts(db: DbOrTx, row: CaseRow): Promise<MoveFacts> {
  return {
    eventType: row.eventType,
    hazardStillPresent: row.hazardStillPresent,
    interimControl: row.interimControl,
    investigatorId: row.assignedToId,
    risk: row.risk,
    anyoneHurt: row.anyoneHurt,
    onsetEarliestAt: row.onsetEarliestAt,
    onsetLatestAt: row.onsetLatestAt,
    reconstructionWaiver: row.reconstructionWaiver,
    evidenceWaiver: row.evidenceWaiver,
    effectivenessWaiver: row.effectivenessWaiver,
    noActionReason: row.noActionReason,
    lesson: row.lesson,
    externalReports: row.externalReports,
    closedAt: row.closedAt,
    opticStated: await opticStated(db, row.id),
    attachedReconstructions: await countAttached(db, row.id),
    photoCount: await countPhotos(db, row.id),
    ...(await hypothesisFacts(db, row.id)),
    ...(await findingFacts(db, row.id)),
    ...(await actionFacts(db, row.id)),
  };
}

/** An unknown optic counts as stated once somebody has saved the measurements after the report. */
async function opticStated(db: DbOrTx, caseId: string): Promise<boolean> {
  const [latest] = await db.select({ version: scenes.version, scene: scenes.scene }).from(scenes).where(eq(scenes.caseId, caseId)).orderBy(desc(scenes.version)).limit(1);
  return latest !== undefined && (latest.version > 1 || latest.scene.optic.kind !== 'dont-know');
}

async function countAttached(db: DbOrTx, caseId: string): Promise<number> {
  const [row] = await db
    .select({ attached: count() })
    .from(reconstructions)
    .where(and(eq(reconstructions.caseId, caseId), eq(reconstructions.state, 'done'), isNotNull(reconstructions.attachedAt), isNull(reconstructions.supersededAt)));
  return row?.attached ?? 0;
}

async function countPhotos(db: DbOrTx, caseId: string): Promise<number> {
  const [row] = await db.select({ stored: count() }).from(photos).where(eq(photos.caseId, caseId));
  return row?.stored ?? 0;
}

async function hypothesisFacts(db: DbOrTx, caseId: string): Promise<Pick<MoveFacts, 'alternativesExamined' | 'focusedHypotheses' | 'untestedWithoutWhy'>> {
  const rows = await db
    .select({ kind: hypotheses.kind, result: hypotheses.result, evidenceFor: hypotheses.evidenceFor, evidenceAgainst: hypotheses.evidenceAgainst, tests: hypotheses.tests })
    .from(hypotheses)
    .where(eq(hypotheses.caseId, caseId));
  const focused = rows.filter((row) => row.kind === 'focused-sunlight');
  return {
    alternativesExamined: rows.filter((row) => isExaminedAlternative(row)).length,
    focusedHypotheses: focused.length,
    untestedWithoutWhy: focused.reduce((open, row) => open + untestedWithoutWhy(row.tests).length, 0),
  };
}

async function findingFacts(db: DbOrTx, caseId: string): Promise<Pick<MoveFacts, 'finding' | 'openReviewComments'>> {
  const [finding] = await db
    .select({ authorId: findings.authorId, state: findings.state, limits: findings.limits, opinion: findings.opinion, certainty: findings.certainty })
    .from(findings)
    .where(eq(findings.caseId, caseId))
    .orderBy(desc(findings.version))
    .limit(1);
  const [comments] = await db
    .select({ open: count() })
    .from(reviewComments)
    .innerJoin(findings, eq(findings.id, reviewComments.findingId))
    .where(and(eq(findings.caseId, caseId), isNull(reviewComments.settledAt)));
  return { finding: finding ?? null, openReviewComments: comments?.open ?? 0 };
}

async function actionFacts(db: DbOrTx, caseId: string): Promise<Pick<MoveFacts, 'actionsOpen' | 'actionsUnproven' | 'actionsNotEffective'>> {
  const rows = await db.select({ state: correctiveActions.state }).from(correctiveActions).where(eq(correctiveActions.caseId, caseId));
  return {
    actionsOpen: rows.filter((row) => isOpenAction(row.state)).length,
    actionsUnproven: rows.filter((row) => isUnprovenAction(row.state)).length,
    actionsNotEffective: rows.filter((row) => row.state === 'not-effective').length,
  };
}
