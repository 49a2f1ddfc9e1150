import { Form } from 'react-router';
import type { Route } from './+types/forgotten-password';
import { clientAddressContext } from '#app/http/client-address.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { forgottenSchema } from '#app/domain/account.ts';
import { requestPasswordReset } from '#app/services/people/password-links.server.ts';

export async function action({ context, request }: Route.ActionArgs) {
  const form = await request.formData();
  const parsed = forgottenSchema.safeParse(Object.fromEntries(form));
  if (!parsed.success) return formProblem('send-link', form, { fieldErrors: fieldErrorsOf(parsed.error) });
  try {
    await requestPasswordReset({ email: parsed.data.email, address: context.get(clientAddressContext) });
    return { ok: true as const };
  } catch (error) {
    return problemFromError('send-link', form, error);
  }
}

export const meta: Route.MetaFunction = () => [{ title: 'Forgotten password · Scorchline' }];

export default function ForgottenPassword({ actionData }: Route.ComponentProps) {
  if (actionData?.ok) {
    return (
      <Page width="task">
        <PageTitle>Look in your mail</PageTitle>
        <p>If the address has an account, a link is on its way. It works for an hour.</p>
      </Page>
    );
  }
  const email = { name: 'email', defaultValue: actionData?.typed.email ?? '', errors: actionData?.fieldErrors.email ?? [], required: true };
  return (
    <Page width="task">
      <PageTitle>Get a link for a new password</PageTitle>
      <Form method="post" className="space-y-4" noValidate>
        <ErrorSummary errors={actionData?.formErrors ?? []} fields={[{ field: email, label: 'Work e-mail' }]} title="No link was sent." />
        <input type="hidden" name="intent" value="send-link" />
        <TextInput field={email} label="Work e-mail" type="email" autoComplete="username" />
        <Button>Send the link</Button>
      </Form>
    </Page>
  );
}
