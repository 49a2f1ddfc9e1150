import { redirect } from 'react-router';
import type { MiddlewareFunction, RouterContextProvider } from 'react-router';
import { db } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
import type { OrganisationAction } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { throwAsResponse } from '#app/http/to-response.server.ts';
import { actorContext, sessionIdContext } from './actor-context.ts';
import { checkSession } from './session.server.ts';

/** Reads the session once, before any loader, and renews its cookie afterwards. */
export const sessionMiddleware: MiddlewareFunction<Response> = async ({ request, context }, next) => {
  const session = await checkSession(request);
  const actor = session.userId ? await getActor(db, session.userId) : null;
  context.set(actorContext, actor);
  context.set(sessionIdContext, session.sessionId);
  const response = await next();
  if (session.setCookie && !response.headers.has('Set-Cookie')) response.headers.append('Set-Cookie', session.setCookie);
  return response;
};

/** The signed-in person; a guest is sent to the sign-in page and comes back to where they were going. */
export function requireActor(context: Readonly<RouterContextProvider>, request: Request): Actor {
  const actor = context.get(actorContext);
  if (actor) return actor;
  const url = new URL(request.url);
  const next = `${url.pathname.replace(/\.data$/u, '')}${url.search}`;
  throw redirect(`/sign-in?next=${encodeURIComponent(next)}`);
}

/** As `requireActor`, and refuses a person whose roles do not include the action. */
export function requireActorWho(context: Readonly<RouterContextProvider>, request: Request, action: OrganisationAction): Actor {
  const actor = requireActor(context, request);
  if (!canInOrganisation(actor, action)) {
    throwAsResponse(new DomainError('forbidden', 'Your roles do not open this page. An administrator of your organisation can change that.'));
  }
  return actor;
}
