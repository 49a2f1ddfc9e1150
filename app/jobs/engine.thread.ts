import { parentPort, workerData } from 'node:worker_threads';
import { reconstruct } from '#app/physics/reconstruct.ts';

/** Runs the engine off the event loop of the process that asks. Answers with `progress`, then `result` or `problem`. */
const port = parentPort;
if (!port) throw new Error('The engine thread is started by engine-runner.');

try {
  const result = reconstruct(workerData, (done, total) => port.postMessage({ kind: 'progress', done, total }));
  port.postMessage({ kind: 'result', result });
} catch (error) {
  // Input that the engine refuses is the person's to mend; anything else is ours.
  const refused = error instanceof RangeError || error instanceof TypeError;
  port.postMessage({ kind: 'problem', refused, message: error instanceof Error ? error.message : String(error) });
}
