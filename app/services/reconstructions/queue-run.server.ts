import type { Transaction } from '#db/client.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertReconstruction } from '#db/queries/reconstructions.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { runReconstructionJob } from '#app/jobs/definitions/run-reconstruction.ts';
import { enqueue } from '#app/jobs/queue.server.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

export interface RunToQueue {
  readonly actor: Actor;
  readonly caseId: string;
  readonly sceneVersion: number | null;
  readonly input: ReconstructionInput;
  readonly note: string;
  /** Run whose frozen input this one takes, if any. */
  readonly again?: number;
}

/** Freezes an input under the next number of the case, writes the log and queues the computing; the caller holds the lock on the case. */
export async function queueRun(tx: Transaction, { actor, caseId, sceneVersion, input, note, again }: RunToQueue): Promise<{ number: number }> {
  const inputHash = hashOf(input);
  const run = await insertReconstruction(tx, { caseId, sceneVersion, input, inputHash, engineVersion, requestedById: actor.userId, note });
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: actor.organisationId,
    caseId,
    event: again === undefined ? 'reconstruction.requested' : 'reconstruction.repeated',
    subject: 'reconstructions',
    subjectId: run.id,
    summary: again === undefined ? `Reconstruction ${run.number} asked for, engine ${engineVersion}` : `Reconstruction ${again} run again as ${run.number} with the same input, engine ${engineVersion}`,
    reason: note,
    after: { inputHash, sceneVersion },
  });
  await enqueue(tx, runReconstructionJob, { reconstructionId: run.id });
  return { number: run.number };
}
