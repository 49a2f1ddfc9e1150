import { href, redirect } from 'react-router';
import type { Route } from './+types/account';
import { db } from '#db/client.server.ts';
import { getCaseAccount } from '#db/queries/case-account.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { AccountText, Lacks, LogLines, Notes, People, PhotoStrip } from '#app/components/cases/account-parts.tsx';
import { InjuryBox } from '#app/components/cases/injury-box.tsx';
import { MovesPanel } from '#app/components/cases/moves-panel.tsx';
import { useCaseHeader } from '#app/components/cases/use-case-header.ts';
import { Columns } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { injuryForm } from '#app/domain/injury.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addNote } from '#app/services/cases/add-note.server.ts';
import { moveByForm } from '#app/services/cases/move-by-form.server.ts';
import { saveInjury } from '#app/services/cases/save-injury.server.ts';

export async function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const account = await getCaseAccount(db, { actor: requireActor(context, request), caseNumber: readCaseNumber(params.caseNumber) });
    if (!account) throw notFound(`Case ${params.caseNumber}`);
    return account;
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
      if (intent === 'save-injury') {
        const parsed = injuryForm.safeParse(typed);
        if (!parsed.success) return formProblem(intent, form, { fieldErrors: parsed.error.flatten().fieldErrors });
        await saveInjury({ actor, caseNumber, form: parsed.data });
      } else if (intent === 'add-note') await addNote({ actor, caseNumber, body: typed['body'] ?? '' });
      else {
        const outcome = await moveByForm({ actor, caseNumber, typed });
        if (outcome.state === 'triage' && typed['moveId'] === 'open-triage') return redirect(`${page}/triage`, 303);
      }
    } catch (error) {
      return problemFromError(intent, form, error);
    }
    return redirect(page, 303);
  });
}

export default function Account({ loaderData: account, actionData: problem }: Route.ComponentProps) {
  const head = useCaseHeader();
  const casePath = href('/cases/:caseNumber', { caseNumber: String(head.number) });
  return (
    <Columns
      sideLabel="Moves and log"
      side={
        <div className="space-y-6">
          <MovesPanel moves={account.moves} version={head.version} casePath={casePath} here="account" problem={problem} />
          {account.log ? (
            <section aria-labelledby="log-heading" className="border-t-[1.5px] border-ink pt-2">
              <h2 id="log-heading" className="text-group font-semibold">Log</h2>
              <LogLines lines={account.log} />
              <p className="pt-1"><AppLink href={`${casePath}/log`} className="inline-flex min-h-(--target-height) items-center text-small">Whole log, {account.logCount} {account.logCount === 1 ? 'line' : 'lines'}</AppLink></p>
            </section>
          ) : null}
        </div>
      }
    >
      <div className="space-y-7">
        {account.warnings.map((warning) => <Caution key={warning} title="Check the window">{warning}</Caution>)}
        <div className="grid gap-x-8 gap-y-5 tablet:grid-cols-[minmax(0,1fr)_minmax(0,17rem)] desk:grid-cols-[minmax(0,1fr)_minmax(0,21rem)]">
          <div className="space-y-5">
            <AccountText account={account} />
            <Notes account={account} problem={problem} />
          </div>
          <section aria-label="Facts"><FactList facts={account.facts.map(({ note, ...fact }) => (note ? { ...fact, note } : fact))} /></section>
        </div>
        <PhotoStrip photos={account.photos} count={account.photoCount} casePath={casePath} />
        <People people={account.people} />
        {account.injuries ? <InjuryBox injuries={account.injuries} problem={problem} /> : null}
        {account.lacks ? <Lacks lacks={account.lacks} /> : null}
      </div>
    </Columns>
  );
}
