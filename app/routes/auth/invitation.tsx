import { redirect } from 'react-router';
import type { Route } from './+types/invitation';
import { db } from '#db/client.server.ts';
import { peekMailedToken } from '#db/queries/mailed-tokens.server.ts';
import { mailedTokenHash } from '#app/auth/mailed-token.server.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { PasswordForm } from '#app/components/auth/password-form.tsx';
import { SpentLink } from '#app/components/auth/spent-link.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { chosenPasswordSchema } from '#app/domain/account.ts';
import { setPasswordByLink } from '#app/services/people/password-links.server.ts';

const purpose = 'invitation';

export async function loader({ params }: Route.LoaderArgs) {
  return { person: await peekMailedToken(db, mailedTokenHash(params.token), purpose) };
}

export async function action({ params, request }: Route.ActionArgs) {
  const form = await request.formData();
  const parsed = chosenPasswordSchema.safeParse(Object.fromEntries(form));
  if (!parsed.success) return formProblem('set-password', form, { fieldErrors: fieldErrorsOf(parsed.error) });
  try {
    const { setCookie } = await setPasswordByLink({ token: params.token, purpose, password: parsed.data.password });
    return redirect('/', { headers: { 'Set-Cookie': setCookie } });
  } catch (error) {
    return problemFromError('set-password', form, error);
  }
}

/** The address holds the link's word, so other hosts never see it. Stricter, `no-referrer` would empty the origin of the post. */
export const meta: Route.MetaFunction = () => [{ title: 'Choose a password and you are in · Scorchline' }, { name: 'referrer', content: 'same-origin' }];

export default function Invitation({ loaderData, actionData }: Route.ComponentProps) {
  const { person } = loaderData;
  if (!person) return <SpentLink />;
  return (
    <Page width="task">
      <PageTitle below={person.email}>Choose a password and you are in</PageTitle>
      <PasswordForm email={person.email} button="Take up the invitation" formErrors={actionData?.formErrors ?? []} passwordErrors={actionData?.fieldErrors.password ?? []} />
    </Page>
  );
}
