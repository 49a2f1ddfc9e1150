import { href, redirect, useLocation, useSearchParams } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/actions';
import { db } from '#db/client.server.ts';
import { getCaseActions } from '#db/queries/action-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { ActionCard } from '#app/components/corrective-actions/action-card.tsx';
import { ActionForm } from '#app/components/corrective-actions/action-form.tsx';
import { YearRibbonKey } from '#app/components/burn-card/year-ribbon.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { actionFormSchema, doneSchema, effectSchema, reassignSchema, reDateSchema, sendBackSchema, verifySchema, withdrawSchema } from '#app/domain/action-form.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addAction } from '#app/services/corrective-actions/add-action.server.ts';
import { checkEffect } from '#app/services/corrective-actions/check-effect.server.ts';
import { completeAction } from '#app/services/corrective-actions/complete-action.server.ts';
import { reDateActions } from '#app/services/corrective-actions/re-date-actions.server.ts';
import { reassignActions } from '#app/services/corrective-actions/reassign-actions.server.ts';
import { startAction } from '#app/services/corrective-actions/start-action.server.ts';
import { sendActionBack, verifyAction } from '#app/services/corrective-actions/verify-action.server.ts';
import { withdrawAction } from '#app/services/corrective-actions/withdraw-action.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getCaseActions(db, { actor, caseNumber: readCaseNumber(params.caseNumber), now: new Date() });
    if (!page) throw notFound('The case');
    if (!page.allowed) throw new DomainError('forbidden', `The actions of this case are not open to you. ${page.whoCan}`);
    return page;
  });
}

const intents = z.enum(['add', 'start', 'mark-done', 'verify', 'send-back', 'check-effect', 'withdraw', 're-date', 'reassign']);
const targetSchema = z.object({ actionId: z.uuid(), version: z.coerce.number().int().min(1) });
const damaged = { formErrors: ['The form is damaged. Open the page anew; what you typed can be copied from here.'] };

export async function action({ request, context, params }: Route.ActionArgs) {
  const actor = requireActor(context, request);
  const form = await request.formData();
  const intent = intents.safeParse(form.get('intent'));
  if (!intent.success) return formProblem('add', form, damaged);
  try {
    const outcome = intent.data === 'add' ? await give(actor, readCaseNumber(params.caseNumber), form) : await step(intent.data, actor, form);
    if (typeof outcome !== 'string') return outcome;
    return redirect(`${href('/cases/:caseNumber/actions', { caseNumber: params.caseNumber })}${outcome}`, 303);
  } catch (error) {
    return respond(async () => problemFromError(intent.data, form, error));
  }
}

async function give(actor: Actor, caseNumber: number, form: FormData) {
  const draft = actionFormSchema.safeParse(Object.fromEntries(form));
  if (!draft.success) return formProblem('add', form, { fieldErrors: fieldErrorsOf(draft.error) });
  const { number } = await addAction({ actor, caseNumber, draft: draft.data });
  return `#action-${number}`;
}

/** Runs one step; gives the form back with sentences when a field has to be mended. */
async function step(intent: Exclude<z.infer<typeof intents>, 'add'>, actor: Actor, form: FormData) {
  const fields = Object.fromEntries(form);
  const parsed = targetSchema.safeParse(fields);
  if (!parsed.success) return formProblem(intent, form, damaged);
  const target = { actor, ...parsed.data };
  const files = form.getAll('files').filter((entry) => entry instanceof File);
  const read = async <Out extends object>(schema: z.ZodType<Out>, run: (typed: Out) => Promise<unknown>) => {
    const typed = schema.safeParse(fields);
    if (!typed.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(typed.error) });
    await run(typed.data);
    return '';
  };
  switch (intent) {
    case 'start':
      await startAction(target);
      return '';
    case 'mark-done':
      return read(doneSchema, ({ note }) => completeAction({ ...target, note, files }));
    case 'verify':
      return read(verifySchema, (typed) => verifyAction({ ...target, ...typed }));
    case 'send-back':
      return read(sendBackSchema, ({ note }) => sendActionBack({ ...target, note }));
    case 'check-effect':
      return read(effectSchema, ({ effective, note, reason }) => checkEffect({ ...target, effective: effective === 'effective', note, reason, files }));
    case 'withdraw':
      return read(withdrawSchema, ({ reason }) => withdrawAction({ ...target, reason }));
    case 're-date':
      return read(reDateSchema, (typed) => reDateActions({ actor, actions: [parsed.data], ...typed }));
    case 'reassign':
      return read(reassignSchema, (typed) => reassignActions({ actor, actions: [parsed.data], ...typed }));
  }
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, actions · Scorchline` }];

export default function CaseActions({ loaderData: page, actionData }: Route.ComponentProps) {
  const { pathname } = useLocation();
  const [search] = useSearchParams();
  const adding = page.mayAdd && (search.get('add') === '1' || actionData?.intent === 'add');
  return (
    <div>
      <div className="flex flex-wrap items-start justify-between gap-4 pb-4">
        <div className="min-w-0 flex-1 basis-80">
          <h2 className="font-serif text-title">{page.cards.length === 0 ? 'No action is given yet' : page.heading}</h2>
          <ReturnsLine upcoming={page.upcoming} zone={page.zone} />
          {page.interimControl ? <p>Until then: {page.interimControl.words}{page.interimControl.ends ? <span className="text-second">, until {page.interimControl.ends}</span> : null}</p> : null}
          {page.onlyOwn ? <p className="text-second">You see the actions that you own or verify.</p> : null}
        </div>
        {page.mayAdd && !adding ? <ButtonLink href="?add=1#action-form">Add an action</ButtonLink> : null}
      </div>
      {adding ? <ActionForm people={page.people} defaults={page.defaults} defaultRisk={page.defaultRisk} todayOn={page.todayOn} answer={actionData} closeHref={pathname} /> : null}
      {page.cards.length === 0 && !adding ? (
        <EmptyState title="A fix has an owner, a day, and somebody else who checks it.">Then it is looked at again when the sun is back. {page.addClosed}</EmptyState>
      ) : (
        page.cards.map((card) => <ActionCard key={`${card.line.id}-${card.line.version}`} card={card} todayOn={page.todayOn} people={page.people} answer={actionData} />)
      )}
      {page.cards.length > 0 ? <YearRibbonKey /> : null}
    </div>
  );
}

function ReturnsLine({ upcoming, zone }: { readonly upcoming: readonly string[]; readonly zone: string }) {
  if (upcoming.length === 0) return <p className="text-second">No return of the sun is known: attach a reconstruction with optic and mark, or the optic has no fixed place.</p>;
  return <p className="text-second">The sun is back on the mark {upcoming.join('; ')}. Clock time at the place, {zone.replaceAll('_', ' ')}.</p>;
}
