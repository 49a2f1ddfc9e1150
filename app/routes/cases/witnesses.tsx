import { randomUUID } from 'node:crypto';
import { href, redirect } from 'react-router';
import type { Route } from './+types/witnesses';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getWitnessPage } from '#db/queries/witness-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { AccountCard } from '#app/components/witnesses/account-card.tsx';
import { AccountForm } from '#app/components/witnesses/account-form.tsx';
import { EmptyState, Notice } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { readMoments } from '#app/domain/typed-moment.ts';
import { signedCopySchema, takeAccountSchema } from '#app/domain/witness.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addSignedCopy, takeAccount } from '#app/services/witnesses/take-account.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getWitnessPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber) });
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
    const intent = typed['intent'] === 'signed-copy' ? 'signed-copy' : 'take-account';
    const done = (label: string) => redirect(`${href('/cases/:caseNumber/witnesses', params)}${label}`, 303);
    try {
      if (intent === 'signed-copy') {
        const copy = signedCopySchema.safeParse(typed);
        if (!copy.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(copy.error) });
        await addSignedCopy({ actor, caseNumber, ...copy.data });
        return done('');
      }
      const account = takeAccountSchema.safeParse(typed);
      const moments = readMoments(typed, found.row.zone, ['takenAt'], ['speaksOfAt']);
      const takenAt = moments.at('takenAt');
      if (!account.success || !takenAt || Object.keys(moments.fieldErrors).length > 0) return formProblem(intent, form, { fieldErrors: { ...(account.success ? {} : fieldErrorsOf(account.error)), ...moments.fieldErrors } });
      const { label } = await takeAccount({ actor, caseNumber, account: account.data, takenAt, speaksOfAt: moments.at('speaksOfAt'), now: new Date() });
      return done(`#account-${label}`);
    } catch (error) {
      return problemFromError(intent, form, error);
    }
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, witnesses · Scorchline` }];

export default function Witnesses({ loaderData: page, actionData }: Route.ComponentProps) {
  return (
    <div>
      <h2 className="pb-4 font-serif text-title">{page.heading}</h2>
      <div className="pb-6"><Notice role="note">Names on this page are personal. They are seen by those who may see personal fields, and are left out of every file that leaves the house.</Notice></div>
      {page.accounts.length === 0 ? <EmptyState title="Take accounts early, each apart from the others.">Write down what the person saw, heard and did, in their words, and read it back.{page.mayWrite ? '' : ` ${page.whoWrites}`}</EmptyState> : null}
      {page.accounts.map((account) => <AccountCard key={account.id} account={account} statements={page.mayWrite ? page.statements : null} answer={answerTo(actionData, 'signed-copy', { name: 'accountId', value: account.id })} />)}
      {page.mayWrite ? (
        <section aria-labelledby="take-account" data-print="no">
          <SectionHeading id="take-account">Take an account</SectionHeading>
          <AccountForm key={page.accounts.length} clientId={page.clientId} zone={page.zone} people={page.people} statements={page.statements} answer={answerTo(actionData, 'take-account')} />
        </section>
      ) : null}
    </div>
  );
}
