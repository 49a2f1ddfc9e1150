import { href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/reconstruction';
import { db } from '#db/client.server.ts';
import { getRunExport, getRunPage } from '#db/queries/reconstruction-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { useCaseHeader } from '#app/components/cases/use-case-header.ts';
import { LiveProgress, ProgressLine } from '#app/components/reconstruction/live-progress.tsx';
import { RunBody } from '#app/components/reconstruction/run-body.tsx';
import { RunForm } from '#app/components/reconstruction/run-form.tsx';
import { RunHead } from '#app/components/reconstruction/run-head.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { runNoteSchema } from '#app/domain/run-page.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import { attachReconstruction } from '#app/services/reconstructions/attach-reconstruction.server.ts';
import { repeatReconstruction } from '#app/services/reconstructions/repeat-reconstruction.server.ts';
import { requestReconstruction } from '#app/services/reconstructions/request-reconstruction.server.ts';

/** `?format=json` gives the record of the run, input and result to the byte; anything else is the page. */
export const middleware: Route.MiddlewareFunction[] = [
  async ({ request, context, params }, next) => {
    if (request.method !== 'GET' || new URL(request.url).searchParams.get('format') !== 'json') return next();
    return respond(() => takeAway(requireActor(context, request), params));
  },
];

async function takeAway(actor: ReturnType<typeof requireActor>, params: Route.LoaderArgs['params']): Promise<Response> {
  const run = await getRunExport(db, { actor, caseNumber: readCaseNumber(params.caseNumber), number: readCaseNumber(params.number) });
  if (!run) throw notFound(`A finished run ${params.number} of case ${params.caseNumber}`);
  return new Response(canonicalJson(run), {
    headers: { 'Content-Type': 'application/json', 'Content-Disposition': `attachment; filename="case-${run.caseNumber}-run-${run.number}.json"`, 'X-Content-Type-Options': 'nosniff' },
  });
}

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const page = await getRunPage(db, { actor: requireActor(context, request), caseNumber: readCaseNumber(params.caseNumber), number: readCaseNumber(params.number), now: new Date() });
    if (!page) throw notFound(`Run ${params.number} of case ${params.caseNumber}`);
    return page;
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const form = await request.formData();
    const asked = form.get('intent');
    const intent = asked === 'run' || asked === 'repeat' ? asked : 'attach';
    const parsed = z.object({ note: runNoteSchema, reason: runNoteSchema }).safeParse(Object.fromEntries(form));
    if (!parsed.success) return formProblem(intent, form, { fieldErrors: z.flattenError(parsed.error).fieldErrors });
    const pathOf = (number: number) => href('/cases/:caseNumber/reconstructions/:number', { caseNumber: params.caseNumber, number: String(number) });
    try {
      if (intent === 'run') return redirect(pathOf((await requestReconstruction({ actor, caseNumber, note: parsed.data.note })).number), 303);
      const number = readCaseNumber(params.number);
      if (intent === 'repeat') return redirect(pathOf((await repeatReconstruction({ actor, caseNumber, number, note: parsed.data.note })).number), 303);
      await attachReconstruction({ actor, caseNumber, number, reason: parsed.data.reason });
      return redirect(pathOf(number), 303);
    } catch (error) {
      return problemFromError(intent, form, error);
    }
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `${params.caseNumber}, reconstruction ${params.number} · Scorchline` }];

export default function Reconstruction({ loaderData: page, actionData: problem, params }: Route.ComponentProps) {
  const head = useCaseHeader();
  const { line, view } = page;
  const path = href('/cases/:caseNumber/reconstructions/:number', params);
  const sameWindow = head.card.window !== null && view !== null && head.card.window.startUtc === view.card.window?.startUtc && head.card.window.endUtc === view.card.window.endUtc;
  const pending = line.state === 'queued' || line.state === 'running';
  return (
    <div className="space-y-6">
      <LiveProgress pending={pending} />
      <RunHead page={page} listHref={href('/cases/:caseNumber/reconstructions', { caseNumber: params.caseNumber })} href={path} />
      {line.state === 'queued' || line.state === 'running' ? <ProgressLine state={line.state} done={line.progress.done} total={line.progress.total} /> : null}
      {line.state === 'failed' ? <Notice title={line.failure ?? 'The run failed.'} role="note">Nothing else was changed. Mend the value that is named, then run again; earlier runs stay as they are.</Notice> : null}
      {view && line.standing !== 'attached' ? (
        <RunForm intent="attach" label="Attach to the case" fieldLabel="Why this run is attached" help="The case then rests on it: its days of return become those of the case. The run before is kept." refusal={page.attachRefusal} problem={problem} />
      ) : null}
      {view ? <RunBody key={line.number} page={page} view={view} href={path} label={`Case ${head.number}, run ${line.number}`} words={sameWindow ? { start: head.card.startWords, end: head.card.endWords } : null} /> : null}
      {view ? (
        <RunForm intent="repeat" label={`Run ${line.number} again on engine ${engineVersion}`} fieldLabel="Why again" help={line.engineVersion === engineVersion ? 'The same input on the same engine gives the same bytes; a check that nothing changed.' : `The same input, made on engine ${line.engineVersion}. What differs afterwards is the engine’s alone; compare the two.`} refusal={page.refusal} problem={problem} look="outlined" />
      ) : null}
      {pending ? null : <RunForm intent="run" label="Run again" fieldLabel="Why this run" help="A new run goes by the measurements and times as they stand now. May be left empty." refusal={page.refusal} problem={problem} look={view && line.standing !== 'attached' ? 'outlined' : 'filled'} />}
    </div>
  );
}
