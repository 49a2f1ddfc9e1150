import type { Route } from './+types/action-calendar';
import { db } from '#db/client.server.ts';
import { listActions, listReturnDays } from '#db/queries/corrective-actions.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { actionCalendar } from '#app/domain/action-calendar.ts';
import { calendarText } from '#app/domain/icalendar.ts';
import { env } from '#app/env.server.ts';
import { respond } from '#app/http/to-response.server.ts';

/** Due days and effect checks as iCalendar, of the actions that the reader may see; `?mine=1` narrows it to their own. */
export function loader({ request, context }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const onlyMine = new URL(request.url).searchParams.get('mine') === '1';
    const all = await listActions(db, { actor });
    const actions = onlyMine ? all.filter((action) => action.ownerId === actor.userId || action.verifierId === actor.userId) : all;
    const returns = await listReturnDays(db, [...new Set(actions.map((action) => action.caseId))]);
    const calendar = actionCalendar(
      actions.map((action) => ({ ...action, checkWindow: returns.find((day) => day.caseId === action.caseId && day.onDay === action.effectCheckOn) ?? null })),
      { publicUrl: env.PUBLIC_URL, stampUtc: new Date() },
    );
    return new Response(calendarText(calendar), {
      headers: {
        'Content-Type': 'text/calendar; charset=utf-8',
        'Content-Disposition': 'attachment; filename="scorchline-actions.ics"',
        'Cache-Control': 'private, no-store',
      },
    });
  });
}
