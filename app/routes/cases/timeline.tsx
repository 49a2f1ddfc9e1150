import { randomUUID } from 'node:crypto';
import { href } from 'react-router';
import type { Route } from './+types/timeline';
import { db } from '#db/client.server.ts';
import { getTimelinePage } from '#db/queries/timeline-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { EventForm } from '#app/components/timeline/event-form.tsx';
import { TimelineTable } from '#app/components/timeline/timeline-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { timelineEventSchema, withdrawEventSchema } from '#app/domain/timeline.ts';
import { readMoments } from '#app/domain/typed-moment.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addTimelineEvent, withdrawTimelineEvent } from '#app/services/timeline/timeline-events.server.ts';
import { postToCase } from './post-to-case.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getTimelinePage(db, { actor, caseNumber: readCaseNumber(params.caseNumber) });
    if (!page) throw notFound('The case');
    return { ...page, clientId: randomUUID() };
  });
}

export function action(args: Route.ActionArgs) {
  const here = href('/cases/:caseNumber/timeline', args.params);
  return postToCase(args, {
    'add-event': async ({ actor, caseNumber, zone, form, typed, now }) => {
      const event = timelineEventSchema.safeParse(typed);
      const moments = readMoments(typed, zone, ['readingAt']);
      const readingAt = moments.at('readingAt');
      if (!event.success || !readingAt) return formProblem('add-event', form, { fieldErrors: { ...(event.success ? {} : fieldErrorsOf(event.error)), ...moments.fieldErrors } });
      await addTimelineEvent({ actor, caseNumber, event: event.data, readingAt, now });
      return here;
    },
    withdraw: async ({ actor, caseNumber, form, typed, now }) => {
      const withdrawal = withdrawEventSchema.safeParse(typed);
      if (!withdrawal.success) return formProblem('withdraw', form, { fieldErrors: fieldErrorsOf(withdrawal.error) });
      await withdrawTimelineEvent({ actor, caseNumber, ...withdrawal.data, now });
      return here;
    },
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, timeline · Scorchline` }];

export default function Timeline({ loaderData: page, actionData }: Route.ComponentProps) {
  return (
    <div>
      <h2 className="pb-1 font-serif text-title">{page.heading}</h2>
      <p className="pb-4 text-second">Clock time at the place, {page.zone.replaceAll('_', ' ')}. True time is the reading less the error of the clock.</p>
      <TimelineTable caseNumber={page.caseNumber} rows={page.rows} mayWrite={page.mayWrite} answer={answerTo(actionData, 'withdraw')} />
      {page.mayWrite ? (
        <section aria-labelledby="add-event" className="pt-8" data-print="no">
          <SectionHeading id="add-event">Enter an event from a log or a recording</SectionHeading>
          <EventForm key={page.rows.length} clientId={page.clientId} zone={page.zone} documents={page.documents} answer={answerTo(actionData, 'add-event')} />
        </section>
      ) : <p className="pt-6 text-second">Events are entered by those who work on the case. {page.whoWrites}</p>}
    </div>
  );
}
