import type { Route } from './+types/openapi';
import { actorContext } from '#app/auth/actor-context.ts';
import { openApiDocument } from '#app/domain/openapi.ts';
import { answerJson, otherMethod, requireApiActor } from '#app/http/problem-details.server.ts';

/** `GET /api/v1/openapi.json`, made from the schemas that check requests. */
export function loader({ context }: Route.LoaderArgs) {
  return answerJson(async () => {
    await requireApiActor(context.get(actorContext), 'read');
    return openApiDocument();
  });
}

export const action = () => otherMethod('GET');
