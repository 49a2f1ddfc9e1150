import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { getFinishedRun, markAttached, replaceSunReturns } from '#db/queries/reconstructions.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

/** Makes a finished run the one that the case rests on; its days of return become those of the case. */
export function attachReconstruction(request: { actor: Actor; caseNumber: number; number: number; reason: string }): Promise<void> {
  return inTransaction(async (tx) => {
    const locked = await lockCase(tx, request.actor, request.caseNumber);
    if (!locked) throw notFound('The case');
    authorize(request.actor, 'reconstruction:attach', locked.subject);
    const run = await getFinishedRun(tx, locked.row.id, request.number);
    if (!run) throw new DomainError('invalid-state', 'Only a finished reconstruction can be attached. Wait until it is done, or run it again.');
    await markAttached(tx, locked.row.id, run.id, request.actor.userId);
    await replaceSunReturns(tx, locked.row.id, run.id, run.result);
    await insertLogEntry(tx, {
      actorId: request.actor.userId,
      actorName: request.actor.displayName,
      organisationId: request.actor.organisationId,
      caseId: locked.row.id,
      event: 'reconstruction.attached',
      subject: 'reconstructions',
      subjectId: run.id,
      summary: `Reconstruction ${run.number} attached`,
      reason: request.reason,
    });
  });
}
