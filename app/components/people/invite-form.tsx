import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { roleLabels, roles } from '#app/domain/roles.ts';

/** What was wrong with the last form that was sent, and what was typed in it. */
export interface FormTrouble {
  readonly intent: string;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;
  readonly typed: Readonly<Record<string, string>>;
}

export interface InviteFormProps {
  readonly sites: readonly { readonly id: string; readonly name: string }[];
  readonly problem: FormTrouble | null;
}

/** Said as the heading of the summary, so not once more as a line of it. */
const notInvited = 'Nobody was invited.';

export function InviteForm({ sites, problem }: InviteFormProps) {
  const field = (name: string) => ({ name, id: `invite-${name}`, defaultValue: problem?.typed[name] ?? '', errors: problem?.fieldErrors[name] ?? [], required: name !== 'siteId' });
  const named = [{ name: 'displayName', label: 'Name' }, { name: 'email', label: 'Work e-mail' }, { name: 'role', label: 'Role' }, { name: 'siteId', label: 'Site' }];
  return (
    <Form method="post" className="space-y-4 pt-3" noValidate>
      <ErrorSummary errors={(problem?.formErrors ?? []).filter((line) => line !== notInvited)} fields={named.map(({ name, label }) => ({ field: field(name), label }))} title={notInvited} />
      <input type="hidden" name="intent" value="invite" />
      <div className="grid gap-4 tablet:grid-cols-2">
        <TextInput field={field('displayName')} label="Name" autoComplete="off" />
        <TextInput field={field('email')} label="Work e-mail" type="email" autoComplete="off" />
        <Select field={field('role')} label="Role" emptyLabel="Choose a role" options={roles.map((role) => ({ value: role, label: roleLabels[role] }))} />
        <Select field={field('siteId')} label="Site" emptyLabel="All sites" options={sites.map((site) => ({ value: site.id, label: site.name }))} />
      </div>
      <Button>Send the invitation</Button>
    </Form>
  );
}
