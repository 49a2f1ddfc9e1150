import type { Route } from './+types/sun';
import { fromQuery, problemsOf, sunAnswer, sunQuerySchema } from '#app/domain/api-contract.ts';
import { answerJson, otherMethod, ProblemError, requireApiActor } from '#app/http/problem-details.server.ts';

/** `GET /api/v1/sun?lat=55.7&lon=12.4&utc=2026-02-03T09:50:00Z` */
export function loader({ request, context }: Route.LoaderArgs) {
  return answerJson(async () => {
    await requireApiActor({ request, context }, 'read');
    const query = sunQuerySchema.safeParse(fromQuery(new URL(request.url).searchParams));
    if (!query.success) throw new ProblemError(422, 'Some fields of the query have to be mended.', { problems: problemsOf(query.error) });
    return sunAnswer(query.data);
  });
}

export const action = () => otherMethod('GET');
