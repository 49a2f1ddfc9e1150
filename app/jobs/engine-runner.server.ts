import { existsSync } from 'node:fs';
import { Worker } from 'node:worker_threads';
import { DomainError } from '#app/domain/errors.ts';
import type { ReconstructionInput, ReconstructionResult } from '#app/physics/model.ts';

type Answer =
  | { readonly kind: 'progress'; readonly done: number; readonly total: number }
  | { readonly kind: 'result'; readonly result: ReconstructionResult }
  | { readonly kind: 'problem'; readonly refused: boolean; readonly message: string };

/** In development the thread runs from its source; a build bundles it beside the worker, at most two folders above. */
function threadLocation(): { url: URL; execArgv: string[] } {
  if (import.meta.url.endsWith('.ts')) return { url: new URL('./engine.thread.ts', import.meta.url), execArgv: ['--import', 'tsx'] };
  for (const above of ['./', '../', '../../']) {
    const url = new URL(`${above}engine.thread.mjs`, import.meta.url);
    if (existsSync(url)) return { url, execArgv: [] };
  }
  throw new Error('engine.thread.mjs is missing from the build.');
}

/**
 * Runs the engine in a thread of its own.
 *
 * @throws DomainError `invalid-input` when the engine refuses the input, with the engine's sentence; Error when the
 *   thread fails or takes longer than `timeoutMs`.
 */
export function runEngine(input: ReconstructionInput, options: { timeoutMs: number; onProgress?: (done: number, total: number) => void }): Promise<ReconstructionResult> {
  const { url, execArgv } = threadLocation();
  return new Promise((resolve, reject) => {
    const thread = new Worker(url, { workerData: input, execArgv });
    const timer = setTimeout(() => {
      void thread.terminate();
      reject(new Error(`The reconstruction took longer than ${Math.round(options.timeoutMs / 1000)} s and was stopped.`));
    }, options.timeoutMs);
    thread.on('message', (answer: Answer) => {
      if (answer.kind === 'progress') options.onProgress?.(answer.done, answer.total);
      else if (answer.kind === 'result') resolve(answer.result);
      else reject(answer.refused ? new DomainError('invalid-input', answer.message) : new Error(answer.message));
    });
    thread.on('error', reject);
    thread.on('exit', (code) => {
      clearTimeout(timer);
      reject(new Error(`The reconstruction ended without an answer (exit ${code}).`));
    });
  });
}
