import { Outlet } from 'react-router';
import type { Route } from './+types/area';
import { requireActor } from '#app/auth/middleware.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { caseRules } from '#app/domain/permissions.ts';
import { holdsRoleAnywhere } from '#app/domain/roles.ts';
import { throwAsResponse } from '#app/http/to-response.server.ts';

export const middleware: Route.MiddlewareFunction[] = [
  ({ request, context }, next) => {
    const actor = requireActor(context, request);
    if (!holdsRoleAnywhere(actor, ['insurer', ...caseRules['release:prepare'].roles, ...caseRules['release:approve'].roles])) {
      throwAsResponse(new DomainError('forbidden', 'Case files are for their readers, and for those who prepare and approve them.'));
    }
    return next();
  },
];

/** Nothing to load; it is here so that moving about in the browser passes the gate as well. */
export function loader() {
  return null;
}

export default function CaseFileArea() {
  return <Outlet />;
}
