import { redirect } from 'react-router';
import type { Route } from './+types/sign-out';
import { sessionIdContext } from '#app/auth/actor-context.ts';
import { closeSession } from '#app/auth/session.server.ts';

/** Signing out is a post, so that no link or image on another page can do it. */
export function loader() {
  return redirect('/');
}

export async function action({ context }: Route.ActionArgs) {
  const sessionId = context.get(sessionIdContext);
  if (!sessionId) return redirect('/');
  return redirect('/', { headers: { 'Set-Cookie': await closeSession(sessionId) } });
}
