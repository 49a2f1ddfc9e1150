import type { Route } from './+types/openapi';
import { openApiDocument } from '#app/domain/openapi.ts';
import { answerJson, otherMethod, requireApiActor } from '#app/http/problem-details.server.ts';

/** `GET /api/v1/openapi.json`, made from the schemas that check requests. */
export function loader({ request, context }: Route.LoaderArgs) {
  return answerJson(async () => {
    await requireApiActor({ request, context }, 'read');
    return openApiDocument();
  });
}

export const action = () => otherMethod('GET');
