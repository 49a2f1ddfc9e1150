import { and, eq, lt, ne, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { apiComputations } from '#db/schema/all.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';

export interface NewComputation {
  readonly userId: string;
  readonly input: ReconstructionInput;
  readonly inputHash: string;
  readonly engineVersion: string;
}

/** Stores a run, or finds the one that the same person began with the same input. A failed one is begun anew. */
export async function insertComputation(tx: Transaction, run: NewComputation): Promise<{ id: string; isNew: boolean }> {
  const [stored] = await tx
    .insert(apiComputations)
    .values(run)
    .onConflictDoUpdate({
      target: [apiComputations.userId, apiComputations.inputHash, apiComputations.engineVersion],
      set: { state: 'queued', failure: null, finishedAt: null, progressDone: 0 },
      setWhere: eq(apiComputations.state, 'failed'),
    })
    .returning({ id: apiComputations.id });
  if (stored) return { id: stored.id, isNew: true };
  const [known] = await tx
    .select({ id: apiComputations.id })
    .from(apiComputations)
    .where(and(eq(apiComputations.userId, run.userId), eq(apiComputations.inputHash, run.inputHash), eq(apiComputations.engineVersion, run.engineVersion)));
  if (!known) throw new Error('The run was neither stored nor found.');
  return { id: known.id, isNew: false };
}

/** One of a person's own runs; null when it is not there or another's. */
export async function getComputation(db: DbOrTx, params: { userId: string; id: string }) {
  const [row] = await db.select().from(apiComputations).where(and(eq(apiComputations.id, params.id), eq(apiComputations.userId, params.userId)));
  return row ?? null;
}

/** Takes a run for this worker; null when it is finished or gone. Called again after a crash, it takes it once more. */
export async function claimComputation(db: DbOrTx, id: string): Promise<{ input: ReconstructionInput } | null> {
  const [row] = await db
    .update(apiComputations)
    .set({ state: 'running', startedAt: sql`now()`, failure: null })
    .where(and(eq(apiComputations.id, id), ne(apiComputations.state, 'done')))
    .returning({ input: apiComputations.input });
  return row ?? null;
}

export async function updateComputationProgress(db: DbOrTx, id: string, done: number, total: number): Promise<void> {
  await db.update(apiComputations).set({ progressDone: done, progressTotal: total }).where(and(eq(apiComputations.id, id), eq(apiComputations.state, 'running')));
}

/** Writes the result once; a second writer finds the run done and changes nothing. */
export async function storeComputation(db: DbOrTx, id: string, result: ReconstructionResult): Promise<void> {
  await db
    .update(apiComputations)
    .set({ result, state: 'done', finishedAt: sql`now()`, progressDone: sql`${apiComputations.progressTotal}` })
    .where(and(eq(apiComputations.id, id), ne(apiComputations.state, 'done')));
}

export async function failComputation(db: DbOrTx, id: string, failure: string): Promise<void> {
  await db.update(apiComputations).set({ state: 'failed', failure, finishedAt: sql`now()` }).where(and(eq(apiComputations.id, id), ne(apiComputations.state, 'done')));
}

/** Removes runs a week after they were asked for. */
export async function deleteOldComputations(db: DbOrTx): Promise<void> {
  await db.delete(apiComputations).where(lt(apiComputations.createdAt, sql`now() - interval '7 days'`));
}
