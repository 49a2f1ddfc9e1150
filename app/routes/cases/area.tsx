import { Outlet } from 'react-router';
import type { Route } from './+types/area';
import { requireActorWho } from '#app/auth/middleware.server.ts';

export const middleware: Route.MiddlewareFunction[] = [
  ({ request, context }, next) => {
    requireActorWho(context, request, 'register:read');
    return next();
  },
];

/** Nothing to load; it is here so that moving about in the browser passes the gate as well. */
export function loader() {
  return null;
}

export default function CaseArea() {
  return <Outlet />;
}
