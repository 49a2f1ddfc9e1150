import { href, redirect, useLocation } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/hypotheses';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { isConclusionHidden } from '#db/queries/hidden-conclusion.server.ts';
import { engineTests, getEngineSummary, listHypotheses } from '#db/queries/hypotheses.server.ts';
import type { EngineSummary, HypothesisView } from '#db/queries/hypotheses.server.ts';
import { listColleagues } from '#db/queries/recipients.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { EngineSays } from '#app/components/findings/engine-says.tsx';
import { HypothesisForm } from '#app/components/findings/hypothesis-form.tsx';
import { HypothesisList } from '#app/components/findings/hypothesis-list.tsx';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { certaintyFacts } from '#app/domain/finding-form.ts';
import { certaintyObstacles } from '#app/domain/finding.ts';
import { hypothesisFormSchema, suggestedTests } from '#app/domain/hypothesis-form.ts';
import { hypothesesHeading, hypothesisCard, hypothesisFields } from '#app/domain/hypothesis-view.ts';
import { noTests, testLabels } from '#app/domain/hypothesis.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { saveHypothesis } from '#app/services/findings/save-hypothesis.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound('The case');
    if (!canOnCase(actor, 'hypothesis:read', found.subject)) throw new DomainError('forbidden', `The hypotheses are not open to you. ${whoCan('hypothesis:read')}`);
    const list = await listHypotheses(db, { actor, caseNumber });
    const outcomeShown = !(await isConclusionHidden(db, { actor, caseNumber }));
    const engine = await getEngineSummary(db, { actor, caseNumber });
    const editable = canOnCase(actor, 'hypothesis:write', found.subject);
    const url = new URL(request.url);
    return {
      caseNumber,
      heading: outcomeShown ? hypothesesHeading(list) : `${list.length} ${list.length === 1 ? 'hypothesis' : 'hypotheses'} to read; results are hidden`,
      hypotheses: list.map((hypothesis) => hypothesisCard(hypothesis, { zone: found.row.zone, outcomeShown })),
      obstacles: outcomeShown ? certaintyObstacles('probable', certaintyFacts(list, null)) : [],
      engine: engine ? engineWords(engine) : null,
      outcomeHidden: !outcomeShown,
      editable,
      closedBecause: editable ? null : `${whoCan('hypothesis:write').replace(/\.$/u, '')} while the case is under investigation.`,
      takeOverHref: editable && engine ? `?edit=${list.find((hypothesis) => hypothesis.kind === 'focused-sunlight')?.id ?? 'new'}&engine=1#hypothesis-form` : undefined,
      form: editable ? await formView(actor, list, engine, url.searchParams) : null,
    };
  });
}

const engineWords = (engine: EngineSummary) => ({
  number: engine.number,
  grade: engine.grade?.word ?? 'nothing yet',
  because: engine.grade?.because ?? [],
  tests: engine.tests.map((test) => ({ label: testLabels[test.test], result: test.result, sentence: test.sentence })),
});

/** The form as it opens: empty, stored, or with the engine's answers laid over the tests of the sunlight hypothesis. */
async function formView(actor: Actor, list: readonly HypothesisView[], engine: EngineSummary | null, search: URLSearchParams) {
  const edit = search.get('edit');
  if (edit === null) return null;
  const existing = list.find((hypothesis) => hypothesis.id === edit);
  if (edit !== 'new' && !existing) return null;
  const needsSunlight = !list.some((hypothesis) => hypothesis.kind === 'focused-sunlight');
  const start = existing ?? { kind: needsSunlight ? ('focused-sunlight' as const) : ('electrical' as const), statement: '', predicts: '', evidenceFor: '', evidenceAgainst: '', tests: noTests, result: 'not-tested' as const, testedById: actor.userId };
  const mayTakeOver = engine !== null && start.kind === 'focused-sunlight';
  const suggested = mayTakeOver && search.get('engine') === '1';
  return {
    hypothesisId: existing?.id ?? '',
    openedAt: existing?.updatedAt.toISOString() ?? '',
    stored: hypothesisFields(suggested ? { ...start, tests: suggestedTests(engineTests(engine), start.tests) } : start),
    suggested,
    people: await listColleagues(db, actor.organisationId),
  };
}

const targetSchema = z.object({
  hypothesisId: z.union([z.literal('').transform(() => null), z.uuid()]),
  openedAt: z.union([z.literal('').transform(() => null), z.iso.datetime().transform((text) => new Date(text))]),
});

export async function action({ request, context, params }: Route.ActionArgs) {
  const actor = requireActor(context, request);
  const form = await request.formData();
  const typed = Object.fromEntries(form);
  const target = targetSchema.safeParse(typed);
  const parsed = hypothesisFormSchema.safeParse(typed);
  if (!target.success) return formProblem('save-hypothesis', form, { formErrors: ['The form is damaged. Open the page anew; what you typed can be copied from here.'] });
  if (!parsed.success) return formProblem('save-hypothesis', form, { fieldErrors: fieldErrorsOf(parsed.error) });
  try {
    const { hypothesisId } = await saveHypothesis({ actor, caseNumber: readCaseNumber(params.caseNumber), ...target.data, draft: parsed.data });
    return redirect(`${href('/cases/:caseNumber/hypotheses', { caseNumber: params.caseNumber })}#hypothesis-${hypothesisId}`, 303);
  } catch (error) {
    return respond(async () => problemFromError('save-hypothesis', form, error));
  }
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, hypotheses · Scorchline` }];

export default function Hypotheses({ loaderData, actionData }: Route.ComponentProps) {
  const { caseNumber, hypotheses, form, engine } = loaderData;
  const { pathname } = useLocation();
  return (
    <div>
      <h2 className="pb-4 font-serif text-title">{loaderData.heading}</h2>
      {form ? <HypothesisForm {...form} answer={answerTo(actionData, 'save-hypothesis')} closeHref={pathname} key={`${form.hypothesisId}-${form.suggested}`} /> : null}
      {hypotheses.length === 0 ? (
        <EmptyState title="Focused sunlight is one idea among several.">Record it, and at least two others that could have done this. Each is tested for what would disprove it.</EmptyState>
      ) : (
        <HypothesisList caseNumber={caseNumber} hypotheses={hypotheses} editable={loaderData.editable} />
      )}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2 py-3">
        {loaderData.editable && !form ? <ButtonLink href="?edit=new#hypothesis-form" look="outlined">Add a hypothesis</ButtonLink> : null}
        <p className="text-small text-second">Each is tested for what would disprove it. &ldquo;Not ruled out&rdquo; is not &ldquo;shown&rdquo;. There is no total.{loaderData.closedBecause ? ` Changes: ${loaderData.closedBecause}` : ''}</p>
      </div>
      {loaderData.obstacles.length > 0 ? (
        <section aria-labelledby="probable-needs" className="max-w-[64ch] py-3">
          <h3 id="probable-needs" className="font-semibold">&ldquo;Probable&rdquo; is not open yet</h3>
          <ul className="list-disc pl-5">{loaderData.obstacles.map((line) => <li key={line}>{line}</li>)}</ul>
        </section>
      ) : null}
      <div className="mt-4 max-w-[60rem]">
        {loaderData.outcomeHidden ? <p className="pb-3 text-second">The author&rsquo;s tests and results are hidden until you ask to see the opinion. What the engine computed is data, and open.</p> : null}
        <EngineSays caseNumber={caseNumber} words={engine} takeOverHref={form?.suggested ? undefined : loaderData.takeOverHref} />
      </div>
    </div>
  );
}
