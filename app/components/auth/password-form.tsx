import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { shortestPassword } from '#app/domain/account.ts';

export interface PasswordFormProps {
  readonly email: string;
  readonly button: string;
  readonly formErrors: readonly string[];
  readonly passwordErrors: readonly string[];
}

/** Chooses a password, for an invitation and for a reset. */
export function PasswordForm({ email, button, formErrors, passwordErrors }: PasswordFormProps) {
  const field = { name: 'password', errors: passwordErrors, required: true };
  return (
    <Form method="post" className="space-y-5">
      <ErrorSummary errors={formErrors} fields={[{ field, label: 'Password' }]} title="The password is not set yet." />
      <input type="hidden" name="intent" value="set-password" />
      <input type="text" name="username" value={email} readOnly autoComplete="username" hidden />
      <TextInput field={field} label="Password" type="password" autoComplete="new-password" help={`At least ${shortestPassword} characters. A few unrelated words are easy to keep in mind.`} />
      <Button size="large">{button}</Button>
    </Form>
  );
}
