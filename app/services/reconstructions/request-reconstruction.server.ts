import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { getReconstructionSource, insertReconstruction } from '#db/queries/reconstructions.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { draftInput } from '#app/domain/reconstruction-draft.ts';
import type { Actor } from '#app/domain/roles.ts';
import { runReconstructionJob } from '#app/jobs/definitions/run-reconstruction.ts';
import { enqueue } from '#app/jobs/queue.server.ts';
import { engineVersion } from '#app/physics/model.ts';
import { authorize } from '#app/services/authorize.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

/** Freezes the input and queues a run; returns its number within the case. */
export function requestReconstruction(request: { actor: Actor; caseNumber: number; note: string }): Promise<{ number: number }> {
  return inTransaction(async (tx) => {
    const locked = await lockCase(tx, request.actor, request.caseNumber);
    const source = await getReconstructionSource(tx, request);
    if (!locked || !source) throw notFound('The case');
    authorize(request.actor, 'reconstruction:run', locked.subject);
    const draft = draftInput(source, new Date());
    if (!draft.input) throw new DomainError('invalid-state', 'The reconstruction needs a time.', { needs: draft.missing });
    const inputHash = hashOf(draft.input);
    const run = await insertReconstruction(tx, {
      caseId: source.caseId,
      sceneVersion: source.sceneVersion,
      input: draft.input,
      inputHash,
      engineVersion,
      requestedById: request.actor.userId,
      note: request.note,
    });
    await insertLogEntry(tx, {
      actorId: request.actor.userId,
      actorName: request.actor.displayName,
      organisationId: request.actor.organisationId,
      caseId: source.caseId,
      event: 'reconstruction.requested',
      subject: 'reconstructions',
      subjectId: run.id,
      summary: `Reconstruction ${run.number} asked for, engine ${engineVersion}`,
      reason: request.note,
      after: { inputHash, sceneVersion: source.sceneVersion },
    });
    await enqueue(tx, runReconstructionJob, { reconstructionId: run.id });
    return { number: run.number };
  });
}
