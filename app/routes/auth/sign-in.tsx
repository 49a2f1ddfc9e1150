import { redirect } from 'react-router';
import type { Route } from './+types/sign-in';
import { actorContext } from '#app/auth/actor-context.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { SignInForm } from '#app/components/auth/sign-in-form.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { safeNext, signInSchema } from '#app/domain/account.ts';
import { homeFor } from '#app/domain/navigation.ts';
import { signIn } from '#app/services/people/sign-in.server.ts';

export function loader({ context, request }: Route.LoaderArgs) {
  const next = safeNext(new URL(request.url).searchParams.get('next'));
  const actor = context.get(actorContext);
  if (actor) throw redirect(next ?? homeFor(actor));
  return { next };
}

export async function action({ context, request }: Route.ActionArgs) {
  const form = await request.formData();
  const parsed = signInSchema.safeParse(Object.fromEntries(form));
  if (!parsed.success) return formProblem('sign-in', form, { fieldErrors: fieldErrorsOf(parsed.error) });
  const next = form.get('next');
  try {
    const { setCookie } = await signIn({ ...parsed.data, address: context.get(clientAddressContext) });
    return redirect(safeNext(typeof next === 'string' ? next : null) ?? '/', { headers: { 'Set-Cookie': setCookie } });
  } catch (error) {
    return problemFromError('sign-in', form, error);
  }
}

export const meta: Route.MetaFunction = () => [{ title: 'Sign in · Scorchline' }];

export default function SignIn({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <Page width="task">
      <PageTitle>Sign in</PageTitle>
      <SignInForm
        next={loaderData.next}
        typedEmail={actionData?.typed.email ?? ''}
        formErrors={actionData?.formErrors ?? []}
        fieldErrors={actionData?.fieldErrors ?? {}}
      />
    </Page>
  );
}
