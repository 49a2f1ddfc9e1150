import { db } from '#db/client.server.ts';
import { claimReconstruction, storeFailure, storeResult, updateProgress } from '#db/queries/reconstructions.server.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { computeRun } from '../compute-run.server.ts';

/**
 * Computes one queued run and stores its result. Safe to be called again: a finished run is left alone, an interrupted
 * one is computed anew to the same bytes.
 */
export async function runReconstruction({ reconstructionId }: { reconstructionId: string }): Promise<void> {
  const run = await claimReconstruction(db, reconstructionId);
  if (!run) return;
  await computeRun(run.input, {
    progress: (done, total) => updateProgress(db, reconstructionId, done, total),
    store: (result) => storeResult(db, reconstructionId, { result, resultHash: hashOf(result), zoneRules: process.versions.tz ?? '' }),
    fail: (sentence) => storeFailure(db, reconstructionId, sentence),
    then: 'run it again',
  });
}
