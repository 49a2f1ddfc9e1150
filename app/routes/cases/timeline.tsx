import { randomUUID } from 'node:crypto';
import { href, redirect } from 'react-router';
import type { Route } from './+types/timeline';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
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
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addTimelineEvent, withdrawTimelineEvent } from '#app/services/timeline/timeline-events.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getTimelinePage(db, { actor, caseNumber: readCaseNumber(params.caseNumber) });
    if (!page) throw notFound('The case');
    return { ...page, clientId: randomUUID() };
  });
}

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound('The case');
    const form = await request.formData();
    const typed = typedValues(form);
    const intent = typed['intent'] === 'withdraw' ? 'withdraw' : 'add-event';
    try {
      if (intent === 'withdraw') {
        const withdrawal = withdrawEventSchema.safeParse(typed);
        if (!withdrawal.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(withdrawal.error) });
        await withdrawTimelineEvent({ actor, caseNumber, ...withdrawal.data, now: new Date() });
      } else {
        const event = timelineEventSchema.safeParse(typed);
        const moments = readMoments(typed, found.row.zone, ['readingAt']);
        const readingAt = moments.at('readingAt');
        if (!event.success || !readingAt) return formProblem(intent, form, { fieldErrors: { ...(event.success ? {} : fieldErrorsOf(event.error)), ...moments.fieldErrors } });
        await addTimelineEvent({ actor, caseNumber, event: event.data, readingAt, now: new Date() });
      }
      return redirect(href('/cases/:caseNumber/timeline', params), 303);
    } catch (error) {
      return problemFromError(intent, form, error);
    }
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
