import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Worker } from 'node:worker_threads';
import { DomainError } from '#app/domain/errors.ts';
import type { RecurrenceAnswer, RecurrenceRequest } from '#app/domain/recurrence-request.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';

/** What a thread is asked to do. */
export type EngineTask =
  | { readonly kind: 'reconstruction'; readonly input: ReconstructionInput }
  | { readonly kind: 'recurrence'; readonly request: RecurrenceRequest };

type Answer<Result> =
  | { readonly kind: 'progress'; readonly done: number; readonly total: number }
  | { readonly kind: 'result'; readonly result: Result }
  | { readonly kind: 'problem'; readonly refused: boolean; readonly message: string };

export interface EngineOptions {
  readonly timeoutMs: number;
  readonly onProgress?: (done: number, total: number) => void;
}

/** The thread was stopped because it took too long. */
export class EngineTimeoutError extends Error {
  constructor(timeoutMs: number) {
    super(`The reconstruction took longer than ${Math.round(timeoutMs / 1000)} s and was stopped.`);
    this.name = 'EngineTimeoutError';
  }
}

/** A build has the thread beside the worker, at most two folders above this file. */
function builtThread(): URL | null {
  for (const above of ['./', '../', '../../']) {
    const url = new URL(`${above}engine.thread.mjs`, import.meta.url);
    if (existsSync(url)) return url;
  }
  return null;
}

/** In development and in tests the thread is bundled anew each time: quicker than loading every module in it. */
async function threadFromSource(): Promise<string> {
  const { build } = await import('esbuild');
  const { outputFiles } = await build({
    entryPoints: [fileURLToPath(new URL('./engine.thread.ts', import.meta.url))],
    bundle: true,
    write: false,
    platform: 'node',
    format: 'cjs',
    target: 'node20',
    logLevel: 'silent',
  });
  const [bundle] = outputFiles;
  if (!bundle) throw new Error('engine.thread.ts could not be bundled.');
  return bundle.text;
}

async function startThread(task: EngineTask): Promise<Worker> {
  if (import.meta.url.endsWith('.ts')) return new Worker(await threadFromSource(), { eval: true, workerData: task, execArgv: [] });
  const url = builtThread();
  if (!url) throw new Error('engine.thread.mjs is missing from the build.');
  return new Worker(url, { workerData: task, execArgv: [] });
}

async function inThread<Result>(task: EngineTask, options: EngineOptions): Promise<Result> {
  const thread = await startThread(task);
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => {
      void thread.terminate();
      reject(new EngineTimeoutError(options.timeoutMs));
    }, options.timeoutMs);
    thread.on('message', (answer: Answer<Result>) => {
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

/**
 * Runs the engine in a thread of its own.
 *
 * @throws DomainError `invalid-input` when the engine refuses the input, with the engine's sentence; EngineTimeoutError
 *   when it takes longer than `timeoutMs`; Error when the thread fails.
 */
export function runEngine(input: ReconstructionInput, options: EngineOptions): Promise<ReconstructionResult> {
  return inThread({ kind: 'reconstruction', input }, options);
}

/** The calendar of return alone, in a thread of its own. Throws as `runEngine`. */
export function runRecurrence(request: RecurrenceRequest, options: EngineOptions): Promise<RecurrenceAnswer> {
  return inThread({ kind: 'recurrence', request }, options);
}
