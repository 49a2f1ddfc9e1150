import { z } from 'zod';
import type { Route } from './+types/reconstruction';
import { db } from '#db/client.server.ts';
import { getComputation } from '#db/queries/api-computations.server.ts';
import type { ComputationAnswer } from '#app/domain/api-contract.ts';
import { answerJson, JsonAnswer, otherMethod, ProblemError, requireApiActor } from '#app/http/problem-details.server.ts';

/** `GET /api/v1/reconstructions/:computationId`: how far a queued run is, and its result once there is one. */
export function loader({ request, context, params }: Route.LoaderArgs) {
  return answerJson(async () => {
    const actor = await requireApiActor({ request, context }, 'read');
    const id = z.uuid().safeParse(params.computationId);
    const run = id.success ? await getComputation(db, { userId: actor.userId, id: id.data }) : null;
    if (!run) throw new ProblemError(404, 'There is no such run of yours. Runs are kept for a week.');
    const answer: ComputationAnswer = {
      id: run.id,
      state: run.state,
      engineVersion: run.engineVersion,
      requestedUtc: run.createdAt.toISOString(),
      finishedUtc: run.finishedAt?.toISOString() ?? null,
      progress: { done: run.progressDone, total: run.progressTotal },
      failure: run.failure,
      result: run.result,
    };
    const pending = run.state === 'queued' || run.state === 'running';
    return new JsonAnswer(answer, 200, pending ? { 'Retry-After': '2' } : {});
  });
}

export const action = () => otherMethod('GET');
