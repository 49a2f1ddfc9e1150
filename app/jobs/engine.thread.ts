import { parentPort, workerData } from 'node:worker_threads';
import { recurrenceAnswer } from '#app/domain/recurrence-request.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import type { EngineTask } from './engine-runner.server.ts';

/** Runs the engine off the event loop of the process that asks. Answers with `progress`, then `result` or `problem`. */
const port = parentPort;
if (!port) throw new Error('The engine thread is started by engine-runner.');

function work(task: EngineTask, onProgress: (done: number, total: number) => void): unknown {
  return task.kind === 'recurrence' ? recurrenceAnswer(task.request) : reconstruct(task.input, onProgress);
}

/** Input that the engine refuses is the person's to mend. A failed guard comes back the same on every try. */
function isRefusal(error: unknown): boolean {
  return error instanceof RangeError || error instanceof TypeError || (error instanceof Error && error.name === 'PhysicsGuardError');
}

try {
  const result = work(workerData, (done, total) => port.postMessage({ kind: 'progress', done, total }));
  port.postMessage({ kind: 'result', result });
} catch (error) {
  port.postMessage({ kind: 'problem', refused: isRefusal(error), message: error instanceof Error ? error.message : String(error) });
}
