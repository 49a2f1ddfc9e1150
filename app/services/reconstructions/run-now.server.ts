import { DomainError } from '#app/domain/errors.ts';
import type { RecurrenceAnswer, RecurrenceRequest } from '#app/domain/recurrence-request.ts';
import { EngineTimeoutError, runEngine, runRecurrence } from '#app/jobs/engine-runner.server.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';

/** Runs that are answered at once, for the programming interface. Nothing is stored and no case is touched. */
const timeoutMs = 20_000;
const runsAtOnce = 2;
const longestQueue = 8;

let running = 0;
const waiting: (() => void)[] = [];

/** Lets two runs compute at a time, so that pages stay quick; the others wait their turn. */
async function inTurn<Result>(work: () => Promise<Result>): Promise<Result> {
  if (running >= runsAtOnce) {
    if (waiting.length >= longestQueue) throw new DomainError('too-many', 'Too many reconstructions are being computed. Wait a minute and ask again.');
    await new Promise<void>((resolve) => waiting.push(resolve));
  } else running += 1;
  try {
    return await work();
  } catch (error) {
    if (error instanceof EngineTimeoutError) throw new DomainError('invalid-input', `${error.message} Ask for a shorter calendar.`);
    throw error;
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

/** The result, or null where it takes longer than the sender should wait: such a run belongs into the queue. */
export function reconstructNow(input: ReconstructionInput): Promise<ReconstructionResult | null> {
  return inTurn(async () => {
    try {
      return await runEngine(input, { timeoutMs });
    } catch (error) {
      if (error instanceof EngineTimeoutError) return null;
      throw error;
    }
  });
}

export function recurrenceNow(request: RecurrenceRequest): Promise<RecurrenceAnswer> {
  return inTurn(() => runRecurrence(request, { timeoutMs }));
}
