import { db } from '#db/client.server.ts';
import { claimComputation, failComputation, storeComputation, updateComputationProgress } from '#db/queries/api-computations.server.ts';
import { computeRun } from '../compute-run.server.ts';

/** Computes one queued run of the programming interface. Safe to be called again, as `runReconstruction` is. */
export async function runComputation({ computationId }: { computationId: string }): Promise<void> {
  const run = await claimComputation(db, computationId);
  if (!run) return;
  await computeRun(run.input, {
    progress: (done, total) => updateComputationProgress(db, computationId, done, total),
    store: (result) => storeComputation(db, computationId, result),
    fail: (sentence) => failComputation(db, computationId, sentence),
    then: 'ask again',
  });
}
