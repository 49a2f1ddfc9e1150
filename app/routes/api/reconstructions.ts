import { href } from 'react-router';
import type { Route } from './+types/reconstructions';
import { problemsOf } from '#app/domain/api-contract.ts';
import { isLong } from '#app/domain/reconstruction-length.ts';
import { reconstructionSchema } from '#app/domain/reconstruction-schema.ts';
import { answerJson, JsonAnswer, otherMethod, ProblemError, readJson, requireApiActor } from '#app/http/problem-details.server.ts';
import { queueComputation } from '#app/services/reconstructions/queue-computation.server.ts';
import { reconstructNow } from '#app/services/reconstructions/run-now.server.ts';

/** Seconds after which a queued run is worth asking for. */
const askAgainS = '2';

/**
 * `POST /api/v1/reconstructions`: the body is the engine's input. A short run is answered at once; a long one, or one
 * asked for with `Prefer: respond-async` (RFC 7240), by 202 with the address at which its result will be.
 */
export function action({ request, context }: Route.ActionArgs) {
  if (request.method !== 'POST') return otherMethod('POST');
  return answerJson(async () => {
    const actor = await requireApiActor({ request, context }, 'compute');
    const input = reconstructionSchema.safeParse(await readJson(request));
    if (!input.success) throw new ProblemError(422, 'Some fields of the input have to be mended.', { problems: problemsOf(input.error) });
    const wantsLink = /(^|[,;\s])respond-async($|[,;\s])/iu.test(request.headers.get('Prefer') ?? '');
    const result = wantsLink || isLong(input.data) ? null : await reconstructNow(input.data);
    if (result) return result;
    const { id } = await queueComputation(actor, input.data);
    const address = href('/api/v1/reconstructions/:computationId', { computationId: id });
    return new JsonAnswer({ id, href: address }, 202, { Location: address, 'Retry-After': askAgainS, ...(wantsLink ? { 'Preference-Applied': 'respond-async' } : {}) });
  });
}

export const loader = () => otherMethod('POST');
