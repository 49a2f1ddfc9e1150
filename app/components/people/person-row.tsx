import { Form } from 'react-router';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import type { Role } from '#app/domain/roles.ts';
import { roleLabels, roles } from '#app/domain/roles.ts';
import type { FormTrouble } from './invite-form.tsx';

export interface PersonRowProps {
  readonly person: {
    readonly userId: string;
    readonly displayName: string;
    readonly email: string;
    readonly disabled: boolean;
    readonly hasPassword: boolean;
    readonly grants: readonly { readonly grantId: string; readonly role: Role; readonly siteName: string | null }[];
  };
  readonly sites: readonly { readonly id: string; readonly name: string }[];
  readonly isSelf: boolean;
  /** What was wrong with the last change to this person. */
  readonly trouble: FormTrouble | null;
}

/** Heading of the notice, and what a refusal beside a field says for the whole form. */
const unchanged = 'Nothing was changed.';

/** One person: who, which roles where, and the changes folded at the end of the line. */
export function PersonRow({ person, sites, isSelf, trouble }: PersonRowProps) {
  const said = trouble?.formErrors.filter((line) => line !== unchanged) ?? [];
  const state = person.disabled ? 'Account switched off' : person.hasPassword ? null : 'Invited, not taken up yet';
  return (
    <li id={`person-${person.userId}`} className="grid gap-x-8 gap-y-2 border-b border-hair py-3 tablet:grid-cols-2 desk:grid-cols-[300px_minmax(0,1fr)_minmax(0,340px)]">
      <div className="min-w-0">
        <h3 className="font-semibold">{person.displayName}</h3>
        <p className="text-small break-words text-second">{person.email}</p>
        {state ? <p className="text-small font-semibold">{state}</p> : null}
      </div>
      <ul aria-label={`Roles of ${person.displayName}`} className="space-y-1">
        {person.grants.map((grant) => (
          <li key={grant.grantId} className="flex flex-wrap items-center gap-x-4">
            <span>
              {roleLabels[grant.role]}, {grant.siteName ?? 'all sites'}
            </span>
            <Form method="post">
              <input type="hidden" name="intent" value="remove-role" />
              <input type="hidden" name="userId" value={person.userId} />
              <input type="hidden" name="grantId" value={grant.grantId} />
              <Button look="quiet" className="min-h-11 text-small tablet:min-h-6" aria-label={`Take the role ${roleLabels[grant.role]}, ${grant.siteName ?? 'all sites'}, from ${person.displayName}`}>Take away</Button>
            </Form>
          </li>
        ))}
        {person.grants.length === 0 ? <li className="text-second">No role: can sign in, and sees nothing</li> : null}
      </ul>
      <div className="min-w-0 space-y-3 tablet:col-span-2 desk:col-span-1">
        {trouble && said.length > 0 ? <Notice role="alert" title={unchanged}>{said.join(' ')}</Notice> : null}
        <details open={trouble !== null && trouble.intent !== 'remove-role'}>
          <summary className="min-h-11 content-center underline decoration-ember decoration-2 underline-offset-4 tablet:min-h-6">Change<span className="sr-only"> the access of {person.displayName}</span></summary>
          <Changes key={person.grants.length} person={person} sites={sites} isSelf={isSelf} trouble={trouble} />
        </details>
      </div>
    </li>
  );
}

function Changes({ person, sites, isSelf, trouble }: PersonRowProps) {
  const field = (intent: string, name: string) => ({
    name,
    id: `${intent}-${name}-${person.userId}`,
    defaultValue: trouble?.intent === intent ? trouble.typed[name] : undefined,
    errors: trouble?.intent === intent ? trouble.fieldErrors[name] : undefined,
  });
  return (
    <div className="grid gap-6 pt-3 pb-2 tablet:grid-cols-2 desk:grid-cols-1">
      <Form method="post" className="space-y-3" noValidate>
        <input type="hidden" name="intent" value="add-role" />
        <input type="hidden" name="userId" value={person.userId} />
        <Select field={field('add-role', 'role')} label="Role" emptyLabel="Choose a role" options={roles.map((role) => ({ value: role, label: roleLabels[role] }))} />
        <Select field={field('add-role', 'siteId')} label="Site" emptyLabel="All sites" options={sites.map((site) => ({ value: site.id, label: site.name }))} />
        <Button look="outlined">Add the role</Button>
      </Form>
      <div className="space-y-6">
        {person.hasPassword || person.disabled ? null : <OneButton intent="invite-again" userId={person.userId} words="Send the invitation again" />}
        {person.disabled ? <OneButton intent="switch-on" userId={person.userId} words="Switch the account on" /> : null}
        {person.disabled || isSelf ? null : (
          <Form method="post" className="space-y-3" noValidate>
            <input type="hidden" name="intent" value="switch-off" />
            <input type="hidden" name="userId" value={person.userId} />
            <TextInput field={{ ...field('switch-off', 'reason'), required: true }} label="Reason for switching off" help="All sessions end at once. What the person did stays on file." />
            <Button look="outlined">Switch the account off</Button>
          </Form>
        )}
      </div>
    </div>
  );
}

function OneButton({ intent, userId, words }: { readonly intent: string; readonly userId: string; readonly words: string }) {
  return (
    <Form method="post">
      <input type="hidden" name="intent" value={intent} />
      <input type="hidden" name="userId" value={userId} />
      <Button look="outlined">{words}</Button>
    </Form>
  );
}
