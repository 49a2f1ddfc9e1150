import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { getReconstruction } from '#db/queries/reconstructions.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { parseReconstructionInput } from '#app/domain/reconstruction-schema.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { queueRun } from './queue-run.server.ts';

/**
 * Runs the frozen input of an earlier run on the engine as it is now, under a number of its own. The earlier run stays
 * as it is; what differs is then the engine's alone.
 *
 * @throws DomainError `invalid-state` where the engine of today cannot read the input any more, naming the fields.
 */
export function repeatReconstruction(request: { actor: Actor; caseNumber: number; number: number; note: string }): Promise<{ number: number }> {
  return inTransaction(async (tx) => {
    const locked = await lockCase(tx, request.actor, request.caseNumber);
    const run = await getReconstruction(tx, request);
    if (!locked || !run) throw notFound('The run');
    authorize(request.actor, 'reconstruction:run', locked.subject);
    const parsed = parseReconstructionInput(run.input);
    if (!parsed.ok) throw new DomainError('invalid-state', 'The engine of today cannot read the input of this run. Run the case again from its measurements.', { needs: parsed.problems.map(({ field, message }) => `${field}: ${message}`) });
    return queueRun(tx, { actor: request.actor, caseId: locked.row.id, sceneVersion: run.sceneVersion, input: run.input, note: request.note, again: request.number });
  });
}
