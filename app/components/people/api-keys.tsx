import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { VisuallyHidden } from '#app/components/ui/visually-hidden.tsx';
import { tokenLifetimes, tokenScopeLabels, tokenScopes } from '#app/domain/api-token.ts';
import type { TokenScope } from '#app/domain/api-token.ts';

/** A key as the page shows it, its days in words. */
export interface ApiKeyView {
  readonly id: string;
  readonly name: string;
  readonly scope: TokenScope;
  readonly madeOn: string;
  readonly endsOn: string;
  readonly usedOn: string | null;
}

export interface ApiKeysProps {
  readonly keys: readonly ApiKeyView[];
  /** A key just made: shown this once. */
  readonly made: string | null;
  readonly problem: { readonly formErrors: readonly string[]; readonly fieldErrors: Readonly<Record<string, readonly string[]>>; readonly typed: Readonly<Record<string, string>> } | null;
}

const scopeOptions = tokenScopes.map((value) => ({ value, label: tokenScopeLabels[value] }));
const lifetimeOptions = tokenLifetimes.map((value) => ({ value, label: `${value} days` }));

/** Keys of the programming interface: those that hold, each with its end, and a form for a new one. */
export function ApiKeys({ keys, made, problem }: ApiKeysProps) {
  const fieldOf = (name: string, start: string) => ({ name, id: `key-${name}`, errors: problem?.fieldErrors[name] ?? [], required: true, defaultValue: problem?.typed[name] ?? start });
  const name = fieldOf('name', '');
  const scope = fieldOf('scope', 'read');
  const days = fieldOf('days', '90');
  return (
    <section aria-labelledby="keys-heading" className="pt-8">
      <SectionHeading id="keys-heading">Keys for programs</SectionHeading>
      <p className="pt-3">With a key, a program asks for sun, sky and reconstructions in your name. It sees no case. Send it as <code>Authorization: Bearer …</code></p>
      {made ? (
        <div className="pt-4">
          <Notice title="Copy the key now. It is not shown again." role="status">
            <code className="block break-all py-2 font-mono text-small text-ink select-all">{made}</code>
          </Notice>
        </div>
      ) : null}
      {keys.length > 0 ? (
        <ul className="mt-4 border-t border-hair" aria-label="Keys that hold">
          {keys.map((key) => (
            <li key={key.id} className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hair py-2">
              <span className="min-w-0">
                <span className="block font-semibold break-words">{key.name}</span>
                <span className="block text-small text-second">{tokenScopeLabels[key.scope]}. Made {key.madeOn}, ends {key.endsOn}. {key.usedOn ? `Last used ${key.usedOn}.` : 'Not used yet.'}</span>
              </span>
              <Form method="post" preventScrollReset>
                <input type="hidden" name="intent" value="revoke-token" />
                <input type="hidden" name="tokenId" value={key.id} />
                <Button look="outlined">End<VisuallyHidden> the key {key.name}</VisuallyHidden></Button>
              </Form>
            </li>
          ))}
        </ul>
      ) : made ? null : (
        <p className="pt-3 text-second">You hold no key.</p>
      )}
      {/* A new key empties the form. */}
      <Form key={keys.length} method="post" className="space-y-4 pt-4" preventScrollReset noValidate>
        <ErrorSummary
          errors={problem?.formErrors ?? []}
          fields={[{ field: name, label: 'What it is for' }, { field: scope, label: 'What it may do' }, { field: days, label: 'How long it holds' }]}
          title="No key is made."
        />
        <input type="hidden" name="intent" value="make-token" />
        <TextInput field={name} label="What it is for" help="For example the name of the program and its machine." autoComplete="off" />
        <Select field={scope} label="What it may do" options={scopeOptions} />
        <Select field={days} label="How long it holds" options={lifetimeOptions} />
        <Button look="outlined">Make a key</Button>
      </Form>
    </section>
  );
}
