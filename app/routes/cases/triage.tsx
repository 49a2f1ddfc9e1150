import { href, redirect } from 'react-router';
import type { Route } from './+types/triage';
import { db } from '#db/client.server.ts';
import { getTriage, mayOpenTriage } from '#db/queries/triage.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { AccountText, PhotoStrip } from '#app/components/cases/account-parts.tsx';
import { FactsForm } from '#app/components/cases/facts-form.tsx';
import { MovesPanel } from '#app/components/cases/moves-panel.tsx';
import { AssignForm, HazardLine, SimilarCases, SunOnIt, WaitingList } from '#app/components/cases/triage-parts.tsx';
import { WherePlan } from '#app/components/cases/where-plan.tsx';
import { useCaseHeader } from '#app/components/cases/use-case-header.ts';
import { Caution } from '#app/components/ui/caution.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import type { TriageView } from '#app/domain/case-view.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { whoCan } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { assignInvestigator } from '#app/services/cases/assign-investigator.server.ts';
import { moveByForm } from '#app/services/cases/move-by-form.server.ts';
import { saveFactsByForm } from '#app/services/cases/save-facts-by-form.server.ts';
import { sunToday } from '#app/services/cases/sun-today.server.ts';

async function load(actor: Actor, caseNumber: number, now: Date): Promise<TriageView> {
  const triage = await getTriage(db, { actor, caseNumber, now });
  if (!triage) throw notFound('The case');
  if (!mayOpenTriage(actor, triage.subject)) throw new DomainError('forbidden', `The first look is not open to you now. ${whoCan('case:triage')}`);
  return triage.view;
}

export async function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const now = new Date();
    const view = await load(actor, caseNumber, now);
    const asked = new URL(request.url).searchParams.get('sun') === 'today' && view.sun.mayWorkOut;
    const workedOut = asked ? { ...(await sunToday({ actor, caseNumber, now })), cursorUtc: now.toISOString() } : null;
    return { view, workedOut };
  });
}

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const form = await request.formData();
    const typed = typedValues(form);
    const intent = typed['intent'] ?? '';
    const page = href('/cases/:caseNumber', { caseNumber: String(caseNumber) });
    try {
      if (intent === 'save-facts') await saveFactsByForm({ actor, caseNumber, typed });
      else if (intent === 'assign') await assignInvestigator({ actor, caseNumber, version: Number(typed['version']), investigatorId: typed['investigatorId'] ?? '' });
      else {
        const outcome = await moveByForm({ actor, caseNumber, typed });
        if (outcome.state !== 'triage') return redirect(page, 303);
      }
    } catch (error) {
      return problemFromError(intent, form, error);
    }
    return redirect(`${page}/triage`, 303);
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, facts and risk · Scorchline` }];

export default function Triage({ loaderData: { view, workedOut }, actionData: problem }: Route.ComponentProps) {
  const head = useCaseHeader();
  const casePath = href('/cases/:caseNumber', { caseNumber: String(head.number) });
  return (
    <div className="desk:grid desk:grid-cols-[minmax(0,1fr)_280px] desk:gap-x-10 min-[1400px]:grid-cols-[220px_minmax(0,1fr)_280px]">
      <div className="hidden min-[1400px]:block"><WaitingList waiting={view.waiting} current={head.number} nowUtc={view.nowUtc} /></div>
      <div className="min-w-0 space-y-7">
        <HazardLine hazard={view.hazard} hurtWords={view.hurtWords} />
        <div className="grid gap-x-8 gap-y-5 [&>*]:min-w-0 tablet:grid-cols-2">
          <div className="space-y-5">
            <AccountText account={view.account} />
            <PhotoStrip photos={view.photos} count={view.photoCount} casePath={casePath} />
          </div>
          <WherePlan where={view.where} similar={view.similar} caseNumber={head.number} />
        </div>
        <SunOnIt sun={view.sun} workedOut={workedOut} workOutHref={`${casePath}/triage?sun=today#sun`} />
        <SimilarCases similar={view.similar} />
        {view.warnings.map((warning) => <Caution key={warning} title="Check the window">{warning}</Caution>)}
        {view.mayEdit ? (
          <section aria-labelledby="facts-heading">
            <SectionHeading id="facts-heading" note="saved together; the log keeps what they were">Facts</SectionHeading>
            <FactsForm facts={view.facts} version={view.version} zone={head.zone} problem={problem} similar={view.similar} caseNumber={head.number} />
          </section>
        ) : null}
      </div>
      <aside aria-label="Moves" className="min-w-0 space-y-5 max-desk:mt-8 desk:border-l desk:border-hair desk:pl-6">
        {view.investigators ? <AssignForm investigators={view.investigators} investigatorId={view.investigatorId} version={view.version} problem={problem} /> : null}
        <MovesPanel moves={view.moves} version={view.version} casePath={casePath} here="triage" problem={problem} proposedDay={view.proposedAnswerDay} mainCases={view.similar.map(({ row }) => ({ number: row.number, title: row.title }))} />
        <div className="min-[1400px]:hidden"><WaitingList waiting={view.waiting} current={head.number} nowUtc={view.nowUtc} /></div>
      </aside>
    </div>
  );
}
