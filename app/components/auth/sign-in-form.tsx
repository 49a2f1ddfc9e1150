import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';

export interface SignInFormProps {
  readonly next: string | null;
  readonly typedEmail?: string;
  readonly formErrors?: readonly string[];
  readonly fieldErrors?: Readonly<Record<string, readonly string[]>>;
}

export function SignInForm({ next, typedEmail = '', formErrors = [], fieldErrors = {} }: SignInFormProps) {
  const email = { name: 'email', defaultValue: typedEmail, errors: fieldErrors.email ?? [], required: true };
  const password = { name: 'password', errors: fieldErrors.password ?? [], required: true };
  return (
    <Form method="post" action="/sign-in" className="space-y-4" noValidate>
      <ErrorSummary errors={formErrors} fields={[{ field: email, label: 'Work e-mail' }, { field: password, label: 'Password' }]} title="You are not signed in." />
      <input type="hidden" name="intent" value="sign-in" />
      {next ? <input type="hidden" name="next" value={next} /> : null}
      <TextInput field={email} label="Work e-mail" type="email" autoComplete="username" inputMode="email" />
      <TextInput field={password} label="Password" type="password" autoComplete="current-password" />
      <Button block>Sign in</Button>
      <p className="flex flex-wrap justify-between gap-x-4 gap-y-2 text-small">
        <AppLink href="/forgotten-password" className="inline-flex min-h-(--target-height) items-center">Forgotten password</AppLink>
        <AppLink href="/progress" className="inline-flex min-h-(--target-height) items-center">Follow a report by its code</AppLink>
      </p>
    </Form>
  );
}
