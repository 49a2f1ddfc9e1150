import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { getReconstructionSource } from '#db/queries/reconstructions.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { draftInput } from '#app/domain/reconstruction-draft.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { queueRun } from './queue-run.server.ts';

/** Freezes the input and queues a run; returns its number within the case. */
export function requestReconstruction(request: { actor: Actor; caseNumber: number; note: string }): Promise<{ number: number }> {
  return inTransaction(async (tx) => {
    const locked = await lockCase(tx, request.actor, request.caseNumber);
    const source = await getReconstructionSource(tx, request);
    if (!locked || !source) throw notFound('The case');
    authorize(request.actor, 'reconstruction:run', locked.subject);
    const draft = draftInput(source, new Date());
    if (!draft.input) throw new DomainError('invalid-state', 'The reconstruction needs a time.', { needs: draft.missing });
    return queueRun(tx, { actor: request.actor, caseId: source.caseId, sceneVersion: source.sceneVersion, input: draft.input, note: request.note });
  });
}
