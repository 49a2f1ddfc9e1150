import { randomUUID } from 'node:crypto';
import { href } from 'react-router';
import type { Route } from './+types/witnesses';
import { db } from '#db/client.server.ts';
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
import { formProblem } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addSignedCopy, takeAccount } from '#app/services/witnesses/take-account.server.ts';
import { postToCase } from './post-to-case.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getWitnessPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber) });
    if (!page) throw notFound('The case');
    return { ...page, clientId: randomUUID() };
  });
}

export function action(args: Route.ActionArgs) {
  const here = href('/cases/:caseNumber/witnesses', args.params);
  return postToCase(args, {
    'take-account': async ({ actor, caseNumber, zone, form, typed, now }) => {
      const account = takeAccountSchema.safeParse(typed);
      const moments = readMoments(typed, zone, ['takenAt'], ['speaksOfAt']);
      const takenAt = moments.at('takenAt');
      if (!account.success || !takenAt || Object.keys(moments.fieldErrors).length > 0) return formProblem('take-account', form, { fieldErrors: { ...(account.success ? {} : fieldErrorsOf(account.error)), ...moments.fieldErrors } });
      const { label } = await takeAccount({ actor, caseNumber, account: account.data, takenAt, speaksOfAt: moments.at('speaksOfAt'), now });
      return `${here}#account-${label}`;
    },
    'signed-copy': async ({ actor, caseNumber, form, typed }) => {
      const copy = signedCopySchema.safeParse(typed);
      if (!copy.success) return formProblem('signed-copy', form, { fieldErrors: fieldErrorsOf(copy.error) });
      await addSignedCopy({ actor, caseNumber, ...copy.data });
      return here;
    },
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
