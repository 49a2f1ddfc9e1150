import { href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/reconstructions';
import { db } from '#db/client.server.ts';
import { getRunsPage } from '#db/queries/reconstruction-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { useCaseHeader } from '#app/components/cases/use-case-header.ts';
import { InputPreview } from '#app/components/reconstruction/input-preview.tsx';
import { LiveProgress } from '#app/components/reconstruction/live-progress.tsx';
import { RunForm } from '#app/components/reconstruction/run-form.tsx';
import { RunList } from '#app/components/reconstruction/run-list.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { runNoteSchema } from '#app/domain/run-page.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { requestReconstruction } from '#app/services/reconstructions/request-reconstruction.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const page = await getRunsPage(db, { actor: requireActor(context, request), caseNumber: readCaseNumber(params.caseNumber), now: new Date() });
    if (!page) throw notFound(`Case ${params.caseNumber}`);
    return page;
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const form = await request.formData();
    const parsed = z.object({ note: runNoteSchema }).safeParse(Object.fromEntries(form));
    if (!parsed.success) return formProblem('run', form, { fieldErrors: z.flattenError(parsed.error).fieldErrors });
    try {
      const { number } = await requestReconstruction({ actor, caseNumber: readCaseNumber(params.caseNumber), note: parsed.data.note });
      return redirect(href('/cases/:caseNumber/reconstructions/:number', { caseNumber: params.caseNumber, number: String(number) }), 303);
    } catch (error) {
      return problemFromError('run', form, error);
    }
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `${params.caseNumber}, reconstructions · Scorchline` }];

export default function Reconstructions({ loaderData: page, actionData: problem }: Route.ComponentProps) {
  const head = useCaseHeader();
  const caseNumber = String(head.number);
  const refusal = page.refusal ?? (page.ready ? null : 'A run needs a time: enter when the mark was found, or the latest possible onset.');
  return (
    <div className="space-y-8">
      <LiveProgress pending={page.pending} />
      <section aria-labelledby="runs-heading">
        <SectionHeading id="runs-heading" note={page.runs.length > 0 ? `${page.runs.length} ${page.runs.length === 1 ? 'run' : 'runs'}, newest first; none is ever changed or removed` : undefined}>{page.heading}</SectionHeading>
        {page.runs.filter((run) => run.state === 'done').length > 1 ? <p className="pb-2 text-small"><AppLink href={href('/cases/:caseNumber/reconstructions/compare', { caseNumber })} className="inline-flex min-h-11 items-center desk:min-h-8">Compare two runs</AppLink></p> : null}
        {page.runs.length === 0 ? (
          <EmptyState title="A run tests every minute of the window.">Sun, skyline, opening, optic and mark are put together as entered. What is not known is drawn as such.</EmptyState>
        ) : (
          <RunList runs={page.runs} pathOf={(number) => href('/cases/:caseNumber/reconstructions/:number', { caseNumber, number: String(number) })} />
        )}
      </section>
      <RunForm
        intent="run"
        label={page.runs.length === 0 ? 'Run' : 'Run again'}
        fieldLabel="Why this run"
        help="For the log, such as: bearing corrected to true north. May be left empty."
        refusal={refusal}
        problem={problem}
      />
      <InputPreview origins={page.origins} missing={page.missing} sceneVersion={page.sceneVersion} measurementsHref={href('/cases/:caseNumber/measurements', { caseNumber })} />
    </div>
  );
}
