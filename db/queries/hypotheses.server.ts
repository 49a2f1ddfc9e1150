import { and, asc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, hypotheses, reconstructions, users } from '#db/schema/all.ts';
import type { EngineTest, HypothesisDraft } from '#app/domain/hypothesis-form.ts';
import type { FourTests, HypothesisKind, HypothesisResult } from '#app/domain/hypothesis.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import type { Grade, TestSummary } from '#app/physics/model/tests.ts';
import { visibleTo } from './scope.server.ts';

export interface HypothesisView {
  readonly id: string;
  readonly kind: HypothesisKind;
  readonly statement: string;
  readonly predicts: string;
  readonly evidenceFor: string;
  readonly evidenceAgainst: string;
  readonly tests: FourTests;
  readonly result: HypothesisResult;
  readonly testedById: string | null;
  readonly testedBy: string | null;
  readonly updatedAt: Date;
}

const columns = {
  id: hypotheses.id,
  kind: hypotheses.kind,
  statement: hypotheses.statement,
  predicts: hypotheses.predicts,
  evidenceFor: hypotheses.evidenceFor,
  evidenceAgainst: hypotheses.evidenceAgainst,
  tests: hypotheses.tests,
  result: hypotheses.result,
  testedById: hypotheses.testedById,
  testedBy: users.displayName,
  updatedAt: hypotheses.updatedAt,
};
/** Focused sunlight first, then in the order in which the ideas came. */
const order = [sql`${hypotheses.kind} <> 'focused-sunlight'`, asc(hypotheses.createdAt), asc(hypotheses.id)];

/** Hypotheses of a case that the actor may see. */
export function listHypotheses(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<HypothesisView[]> {
  return db
    .select(columns)
    .from(hypotheses)
    .innerJoin(cases, eq(cases.id, hypotheses.caseId))
    .leftJoin(users, eq(users.id, hypotheses.testedById))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(...order);
}

/** The same under a lock that the caller already holds on the case. */
export function listHypothesesOfCase(tx: Transaction, caseId: string): Promise<HypothesisView[]> {
  return tx.select(columns).from(hypotheses).leftJoin(users, eq(users.id, hypotheses.testedById)).where(eq(hypotheses.caseId, caseId)).orderBy(...order);
}

export async function insertHypothesis(tx: Transaction, caseId: string, draft: HypothesisDraft): Promise<string> {
  const [row] = await tx.insert(hypotheses).values({ caseId, ...draft }).returning({ id: hypotheses.id });
  if (!row) throw new Error('The hypothesis was not written.');
  return row.id;
}

export async function updateHypothesis(tx: Transaction, params: { readonly caseId: string; readonly hypothesisId: string }, draft: HypothesisDraft): Promise<void> {
  await tx.update(hypotheses).set(draft).where(and(eq(hypotheses.id, params.hypothesisId), eq(hypotheses.caseId, params.caseId)));
}

/** What the engine said in the run that the case stands on, without its minutes. */
export interface EngineSummary {
  readonly reconstructionId: string;
  readonly number: number;
  readonly engineVersion: string;
  readonly inputHash: string;
  readonly resultHash: string | null;
  readonly grade: Grade | null;
  readonly tests: readonly TestSummary[];
}

/** Summary of the attached reconstruction of a visible case; null when none is attached. */
export async function getEngineSummary(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<EngineSummary | null> {
  const [row] = await db
    .select({
      reconstructionId: reconstructions.id,
      number: reconstructions.number,
      engineVersion: reconstructions.engineVersion,
      inputHash: reconstructions.inputHash,
      resultHash: reconstructions.resultHash,
      grade: sql<ReconstructionResult['grade'] | null>`${reconstructions.result} -> 'grade'`,
      tests: sql<ReconstructionResult['tests'] | null>`${reconstructions.result} -> 'tests'`,
    })
    .from(reconstructions)
    .innerJoin(cases, eq(cases.id, reconstructions.caseId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), isNotNull(reconstructions.attachedAt), isNull(reconstructions.supersededAt)))
    .orderBy(sql`${reconstructions.attachedAt} desc`)
    .limit(1);
  return row ? { ...row, tests: row.tests ?? [] } : null;
}

export const engineTests = (summary: EngineSummary): readonly EngineTest[] => summary.tests.map(({ test, result, sentence }) => ({ test, result, sentence }));
