import { db } from '#db/client.server.ts';
import { claimComputation, failComputation, storeComputation, updateComputationProgress } from '#db/queries/api-computations.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { log } from '#app/log.server.ts';
import { EngineTimeoutError, runEngine } from '../engine-runner.server.ts';

const timeLimitMs = 540_000;
const progressEveryMs = 500;

/** Computes one queued run of the programming interface. Safe to be called again, as `runReconstruction` is. */
export async function runComputation({ computationId }: { computationId: string }): Promise<void> {
  const run = await claimComputation(db, computationId);
  if (!run) return;
  let lastReport = 0;
  try {
    const result = await runEngine(run.input, {
      timeoutMs: timeLimitMs,
      onProgress: (done, total) => {
        const now = Date.now();
        if (now - lastReport < progressEveryMs) return;
        lastReport = now;
        updateComputationProgress(db, computationId, done, total).catch((error: unknown) => log.warn({ err: error }, 'progress was not stored'));
      },
    });
    await storeComputation(db, computationId, result);
  } catch (error) {
    if (error instanceof DomainError || error instanceof EngineTimeoutError) {
      await failComputation(db, computationId, error.message);
      return;
    }
    await failComputation(db, computationId, 'The run failed on our side. It is tried up to three times; if this stays, ask again.');
    throw error;
  }
}
