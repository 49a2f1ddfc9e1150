import { DomainError } from '#app/domain/errors.ts';
import { log } from '#app/log.server.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { EngineTimeoutError, runEngine } from './engine-runner.server.ts';

/** Less than the 600 s after which the queue takes a job for lost. */
const timeLimitMs = 540_000;
const progressEveryMs = 500;

/** Where the record of a run is kept. */
export interface RunRecord {
  readonly progress: (done: number, total: number) => Promise<void>;
  readonly store: (result: ReconstructionResult) => Promise<void>;
  readonly fail: (sentence: string) => Promise<void>;
  /** What to do once it has failed on our side for good: "run it again". */
  readonly then: string;
}

/**
 * Computes a run in the engine's thread and records how it ends. Input that the engine refuses, and a run that takes too
 * long, end with the engine's sentence and are not tried again: the same input would end in the same way.
 */
export async function computeRun(input: ReconstructionInput, record: RunRecord): Promise<void> {
  let lastReport = 0;
  try {
    const result = await runEngine(input, {
      timeoutMs: timeLimitMs,
      onProgress: (done, total) => {
        const now = Date.now();
        if (now - lastReport < progressEveryMs) return;
        lastReport = now;
        // Progress is for the eye; a lost report is made good by the next one.
        record.progress(done, total).catch((error: unknown) => log.warn({ err: error }, 'progress was not stored'));
      },
    });
    await record.store(result);
  } catch (error) {
    if (error instanceof DomainError || error instanceof EngineTimeoutError) return record.fail(error.message);
    await record.fail(`The run failed on our side. It is tried up to three times; if this stays, ${record.then}.`);
    throw error;
  }
}
