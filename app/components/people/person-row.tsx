import { Form } from 'react-router';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { Role } from '#app/domain/roles.ts';
import { roleLabels, roles } from '#app/domain/roles.ts';

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
}

/** One person: who, which roles where, and the changes folded under the name. */
export function PersonRow({ person, sites, isSelf }: PersonRowProps) {
  const state = person.disabled ? 'Account switched off' : person.hasPassword ? null : 'Invited, not taken up yet';
  return (
    <li className="grid gap-x-8 gap-y-2 border-b border-hair py-3 desk:grid-cols-[300px_minmax(0,1fr)_minmax(0,340px)]">
      <div className="min-w-0">
        <p className="font-semibold">{person.displayName}</p>
        <p className="text-small break-all text-second">{person.email}</p>
        {state ? <p className="text-small">{state}</p> : null}
      </div>
      <ul className="space-y-1">
        {person.grants.map((grant) => (
          <li key={grant.grantId} className="flex flex-wrap items-center gap-x-3">
            <span>
              {roleLabels[grant.role]}, {grant.siteName ?? 'all sites'}
            </span>
            <Form method="post">
              <input type="hidden" name="intent" value="remove-role" />
              <input type="hidden" name="grantId" value={grant.grantId} />
              <Button look="quiet" className="min-h-6" aria-label={`Take the role ${roleLabels[grant.role]} from ${person.displayName}`}>Take away</Button>
            </Form>
          </li>
        ))}
        {person.grants.length === 0 ? <li className="text-second">No role</li> : null}
      </ul>
      <details>
        <summary className="min-h-6 cursor-pointer">Change<span className="sr-only"> the access of {person.displayName}</span></summary>
        <div className="space-y-5 pt-3">
          <Form method="post" className="space-y-3">
            <input type="hidden" name="intent" value="add-role" />
            <input type="hidden" name="userId" value={person.userId} />
            <Select field={{ name: 'role', id: `role-${person.userId}` }} label="Role" options={roles.map((role) => ({ value: role, label: roleLabels[role] }))} />
            <Select field={{ name: 'siteId', id: `site-${person.userId}` }} label="Site" emptyLabel="All sites" options={sites.map((site) => ({ value: site.id, label: site.name }))} />
            <Button look="outlined">Add the role</Button>
          </Form>
          {person.hasPassword || person.disabled ? null : <OneButton intent="invite-again" userId={person.userId} words="Send the invitation again" />}
          {person.disabled ? <OneButton intent="switch-on" userId={person.userId} words="Switch the account on" /> : null}
          {!person.disabled && !isSelf ? (
            <Form method="post" className="space-y-3">
              <input type="hidden" name="intent" value="switch-off" />
              <input type="hidden" name="userId" value={person.userId} />
              <TextInput field={{ name: 'reason', id: `reason-${person.userId}`, required: true }} label="Reason" help="All sessions end at once. What the person did stays on file." />
              <Button look="outlined">Switch the account off</Button>
            </Form>
          ) : null}
        </div>
      </details>
    </li>
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
