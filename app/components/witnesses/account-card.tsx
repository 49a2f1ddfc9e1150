import { Form, href } from 'react-router';
import { Select } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';

export interface AccountView {
  readonly id: string;
  readonly label: number;
  readonly witness: string;
  readonly person: string;
  readonly role: string;
  readonly taken: string;
  readonly speaksOf: string | null;
  readonly language: string;
  readonly words: string;
  readonly readBack: boolean;
  readonly signedCopy: { readonly id: string; readonly words: string } | null;
}

export interface AccountCardProps {
  readonly account: AccountView;
  /** Documents that may be its signed copy; null where this reader adds none. */
  readonly statements: readonly { readonly id: string; readonly words: string }[] | null;
  readonly answer: FormAnswer | null;
}

/** What one witness said, as taken. The words are not changed; a later account is a further one. */
export function AccountCard({ account, statements, answer }: AccountCardProps) {
  const field = problemFields(answer, {}, `signed-${account.label}-`);
  return (
    <section id={`account-${account.label}`} aria-labelledby={`account-${account.label}-title`} className="grid gap-x-10 gap-y-4 pb-8 desk:grid-cols-[minmax(0,1.8fr)_minmax(0,1fr)]">
      <div className="min-w-0">
        <SectionHeading id={`account-${account.label}-title`} note={account.taken}>Account {account.label}: {account.witness}</SectionHeading>
        <blockquote className="max-w-[64ch] font-serif text-account whitespace-pre-line">{account.words}</blockquote>
      </div>
      <div className="min-w-0 space-y-3">
        <FactList
          layout="columns"
          facts={[
            { term: 'Person', value: account.person, note: account.role },
            { term: 'Speaks of', value: account.speaksOf ?? 'no moment named' },
            { term: 'Language', value: account.language },
            { term: 'Read back', value: account.readBack ? 'yes' : <b>no</b> },
            { term: 'Signed copy', value: account.signedCopy ? <a href={href('/documents/:documentId', { documentId: account.signedCopy.id })} download className="inline-flex min-h-11 desk:min-h-0 items-center">{account.signedCopy.words}</a> : 'none' },
          ]}
        />
        {statements && !account.signedCopy && statements.length > 0 ? (
          <Form method="post" className="space-y-2" data-print="no">
            <input type="hidden" name="intent" value="signed-copy" />
            <input type="hidden" name="accountId" value={account.id} />
            <Select field={field('signedAttachmentId', { required: true })} label={`Signed copy of account ${account.label}`} emptyLabel="Choose" options={statements.map((one) => ({ value: one.id, label: one.words }))} />
            <Button look="outlined">Add the signed copy</Button>
          </Form>
        ) : null}
      </div>
    </section>
  );
}
