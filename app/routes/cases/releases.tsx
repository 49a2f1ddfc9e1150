import { href, redirect } from 'react-router';
import type { Route } from './+types/releases';
import { requireActor } from '#app/auth/middleware.server.ts';
import { PrepareForm } from '#app/components/releases/prepare-form.tsx';
import { KeptReleases } from '#app/components/releases/release-tables.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError } from '#app/domain/errors.ts';
import { prepareSchema, readDecisions } from '#app/domain/release-form.ts';
import { audiences } from '#app/domain/release-policy.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { prepareRelease } from '#app/services/releases/prepare-release.server.ts';
import { getReleaseDesk } from '#app/services/releases/release-desk.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const asked = new URL(request.url).searchParams.get('for');
    const audience = audiences.find((one) => one === asked) ?? 'insurer';
    return getReleaseDesk({ actor, caseNumber: readCaseNumber(params.caseNumber), audience, now: new Date() });
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const form = await request.formData();
    const read = prepareSchema.safeParse(Object.fromEntries(form));
    if (!read.success) return formProblem('prepare', form, damagedOr(fieldErrorsOf(read.error)));
    const { expiresOn, ...rest } = read.data;
    try {
      const number = await prepareRelease({ actor, caseNumber, ...rest, expires: { on: expiresOn }, decisions: readDecisions(form) });
      return redirect(href('/cases/:caseNumber/releases/:number', { caseNumber: String(caseNumber), number: String(number) }), 303);
    } catch (error) {
      if (error instanceof DomainError && error.code === 'not-found') throw error;
      return problemFromError('prepare', form, error);
    }
  });
}

/** Hidden fields have no place of their own for a sentence. */
function damagedOr(fieldErrors: Record<string, string[]>) {
  const hidden = fieldErrors['basis'] ?? fieldErrors['audience'];
  return { fieldErrors, formErrors: hidden ? ['The form is damaged. Open the page anew and decide again.'] : [] };
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, releases · Scorchline` }];

export default function Releases({ loaderData: desk, actionData }: Route.ComponentProps) {
  return (
    <div>
      <h2 className="pb-4 font-serif text-title">{desk.heading}</h2>
      {desk.releases.length > 0 ? <KeptReleases releases={desk.releases} withCase={false} /> : null}
      <PrepareForm key={desk.audience} desk={desk} problem={actionData} />
    </div>
  );
}
