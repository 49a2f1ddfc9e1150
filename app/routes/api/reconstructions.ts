import type { Route } from './+types/reconstructions';
import { actorContext } from '#app/auth/actor-context.ts';
import { problemsOf } from '#app/domain/api-contract.ts';
import { reconstructionSchema } from '#app/domain/reconstruction-schema.ts';
import { answerJson, otherMethod, ProblemError, readJson, requireApiActor } from '#app/http/problem-details.server.ts';
import { reconstructNow } from '#app/services/reconstructions/run-now.server.ts';

/** `POST /api/v1/reconstructions`: the body is the engine's input, the answer its result. Computed in a thread. */
export function action({ request, context }: Route.ActionArgs) {
  if (request.method !== 'POST') return otherMethod('POST');
  return answerJson(async () => {
    await requireApiActor(context.get(actorContext), 'compute');
    const input = reconstructionSchema.safeParse(await readJson(request));
    if (!input.success) throw new ProblemError(422, 'Some fields of the input have to be mended.', { problems: problemsOf(input.error) });
    return reconstructNow(input.data);
  });
}

export const loader = () => otherMethod('POST');
