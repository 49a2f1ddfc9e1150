import type { Route } from './+types/recurrence';
import { problemsOf } from '#app/domain/api-contract.ts';
import { parseRecurrenceRequest } from '#app/domain/recurrence-request.ts';
import { answerJson, otherMethod, ProblemError, readJson, requireApiActor } from '#app/http/problem-details.server.ts';
import { recurrenceNow } from '#app/services/reconstructions/run-now.server.ts';

/** `POST /api/v1/recurrence`: days on which an alignment comes back, in a span of five years at most. */
export function action({ request, context }: Route.ActionArgs) {
  if (request.method !== 'POST') return otherMethod('POST');
  return answerJson(async () => {
    await requireApiActor({ request, context }, 'compute');
    const asked = parseRecurrenceRequest(await readJson(request));
    if (!asked.success) throw new ProblemError(422, 'Some fields of the input have to be mended.', { problems: problemsOf(asked.error) });
    return recurrenceNow(asked.data);
  });
}

export const loader = () => otherMethod('POST');
