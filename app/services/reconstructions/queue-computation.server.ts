import { inTransaction } from '#db/client.server.ts';
import { insertComputation } from '#db/queries/api-computations.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { runComputationJob } from '#app/jobs/definitions/run-computation.ts';
import { enqueue } from '#app/jobs/queue.server.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

/** Stores a long run for whoever asks and queues it; the same request sent again finds the run that it began. */
export function queueComputation(actor: Actor, input: ReconstructionInput): Promise<{ id: string }> {
  return inTransaction(async (tx) => {
    const { id, isNew } = await insertComputation(tx, { userId: actor.userId, input, inputHash: hashOf(input), engineVersion });
    if (!isNew) return { id };
    await enqueue(tx, runComputationJob, { computationId: id });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: actor.organisationId,
      caseId: null,
      event: 'computation.requested',
      subject: 'api_computations',
      subjectId: id,
      summary: 'Reconstruction asked for through the programming interface; no case is touched',
    });
    return { id };
  });
}
