import { href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/release';
import { requireActor } from '#app/auth/middleware.server.ts';
import { Columns } from '#app/components/layout/page.tsx';
import { ReleasedDocument } from '#app/components/releases/released-document.tsx';
import { ReleaseChecks, SecondPerson, WithdrawPanel } from '#app/components/releases/release-panels.tsx';
import { WithheldCounts } from '#app/components/releases/withheld-counts.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError } from '#app/domain/errors.ts';
import { withdrawSchema } from '#app/domain/release-form.ts';
import { releaseStatusWords } from '#app/domain/release-view.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { releaseCaseFile } from '#app/services/releases/approve-release.server.ts';
import { getReleasePage } from '#app/services/releases/release-page.server.ts';
import { withdrawRelease } from '#app/services/releases/withdraw-release.server.ts';

const releaseNumber = (text: string): number => z.coerce.number().int().positive().max(1_000_000).catch(0).parse(text);

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    return getReleasePage({ actor, caseNumber: readCaseNumber(params.caseNumber), number: releaseNumber(params.number), now: new Date() });
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const form = await request.formData();
    const target = { actor, caseNumber: readCaseNumber(params.caseNumber), number: releaseNumber(params.number) };
    const intent = z.enum(['approve', 'withdraw']).safeParse(form.get('intent'));
    if (!intent.success) return formProblem('approve', form, { formErrors: ['The form is damaged. Open the page anew.'] });
    try {
      if (intent.data === 'withdraw') {
        const read = withdrawSchema.safeParse(Object.fromEntries(form));
        if (!read.success) return formProblem('withdraw', form, { fieldErrors: fieldErrorsOf(read.error) });
        await withdrawRelease({ ...target, reason: read.data.reason });
      } else {
        await releaseCaseFile(target);
      }
    } catch (error) {
      if (error instanceof DomainError && error.code === 'not-found') throw error;
      return problemFromError(intent.data, form, error);
    }
    return redirect(href('/cases/:caseNumber/releases/:number', { caseNumber: params.caseNumber, number: params.number }), 303);
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, release ${params.number} · Scorchline` }];

const sideHeading = 'border-b-[1.5px] border-ink pb-1 font-semibold';

export default function Release({ loaderData: page, actionData, params }: Route.ComponentProps) {
  const { line, frame } = page;
  const fileHref = (fileName: string) => href('/case-files/:releaseId/files/:fileName', { releaseId: page.id, fileName });
  const side = (
    <div className="space-y-6">
      {page.status === 'prepared' ? <SecondPerson number={line.number} recipient={line.recipient} problem={actionData} {...page} /> : null}
      <section aria-labelledby="bytes-heading">
        <h3 id="bytes-heading" className={sideHeading}>Checked on the bytes, now</h3>
        <ReleaseChecks checks={page.checks} />
      </section>
      <section aria-labelledby="withheld-heading">
        <h3 id="withheld-heading" className={sideHeading}>Withheld</h3>
        <WithheldCounts lines={frame.withheld} />
      </section>
      <Openings openings={page.openings} />
      {page.mayWithdraw ? <WithdrawPanel isOut={page.status !== 'prepared'} problem={actionData} /> : null}
    </div>
  );
  return (
    <div>
      <p className="pb-2"><AppLink href={href('/cases/:caseNumber/releases', { caseNumber: params.caseNumber })} className="inline-flex min-h-6 items-center text-small">All releases of case {params.caseNumber}</AppLink></p>
      <h2 className="font-serif text-title">{headingOf(page)}</h2>
      <p className="pb-4 text-second">For {line.recipient}, {line.audience.toLowerCase()}. Ends {frame.endsWords}. {line.statusNote}. New in it: {frame.changeNote}</p>
      <Columns side={side} sideLabel="Checks and what may be done">
        <p className="pb-2 text-small text-second">What follows is what its reader sees, and nothing else.</p>
        <ReleasedDocument view={page.document} frame={frame} zone={page.zone} fileHref={fileHref} watermark={page.watermark} level={2} />
      </Columns>
    </div>
  );
}

function headingOf({ line, status, passed }: Route.ComponentProps['loaderData']): string {
  if (status === 'prepared') return passed ? `Release ${line.number} waits for a second person` : `Release ${line.number} cannot leave: a search found something`;
  return `Release ${line.number}: ${releaseStatusWords[status].toLowerCase()}`;
}

function Openings({ openings }: { readonly openings: Route.ComponentProps['loaderData']['openings'] }) {
  return (
    <section aria-labelledby="openings-heading">
      <h3 id="openings-heading" className={sideHeading}>Opened {openings.length === 0 ? 'by nobody yet' : openings.length === 1 ? 'once' : `${openings.length} times`}</h3>
      <ul>
        {openings.map((opening, index) => (
          <li key={index} className="border-b border-hair py-1.5">
            {opening.reader}
            <span className="block text-axis text-second">{opening.atWords}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
