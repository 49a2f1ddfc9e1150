import { db } from '#db/client.server.ts';
import { claimReconstruction, storeFailure, storeResult, updateProgress } from '#db/queries/reconstructions.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { log } from '#app/log.server.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { runEngine } from '../engine-runner.server.ts';

const timeLimitMs = 600_000;
const progressEveryMs = 500;

/**
 * Computes one queued run and stores its result. Safe to be called again: a finished run is left alone, an interrupted
 * one is computed anew to the same bytes. Input that the engine refuses ends the run with the engine's sentence and is
 * not tried again.
 */
export async function runReconstruction({ reconstructionId }: { reconstructionId: string }): Promise<void> {
  const run = await claimReconstruction(db, reconstructionId);
  if (!run) return;
  let lastReport = 0;
  try {
    const result = await runEngine(run.input, {
      timeoutMs: timeLimitMs,
      onProgress: (done, total) => {
        const now = Date.now();
        if (now - lastReport < progressEveryMs) return;
        lastReport = now;
        // Progress is for the eye; a lost report is made good by the next one.
        updateProgress(db, reconstructionId, done, total).catch((error: unknown) => log.warn({ err: error }, 'progress was not stored'));
      },
    });
    await storeResult(db, reconstructionId, { result, resultHash: hashOf(result), zoneRules: process.versions.tz ?? '' });
  } catch (error) {
    if (error instanceof DomainError) {
      await storeFailure(db, reconstructionId, error.message);
      return;
    }
    await storeFailure(db, reconstructionId, 'The run failed on our side. It is tried up to three times; if this stays, run it again.');
    throw error;
  }
}
