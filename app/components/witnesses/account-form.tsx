import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ClockTimeField } from '#app/components/forms/clock-time-field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { witnessAgeLabels, witnessAges, witnessRoleLabels, witnessRoles } from '#app/domain/witness.ts';

export interface AccountFormProps {
  readonly clientId: string;
  readonly zone: string;
  readonly people: readonly { readonly id: string; readonly words: string }[];
  readonly statements: readonly { readonly id: string; readonly words: string }[];
  readonly answer: FormAnswer | null;
}

/** An account as it is taken. The person is kept apart from the words. */
export function AccountForm({ clientId, zone, people, statements, answer }: AccountFormProps) {
  const field = problemFields(answer, { ageBand: 'adult', personRole: 'witness' }, 'account-');
  const names = [['involvementId', 'Person'], ['personName', 'Name'], ['takenAt', 'Taken at'], ['speaksOfAt', 'Speaks of'], ['language', 'Language'], ['words', 'Account'], ['readBack', 'Read back'], ['signedAttachmentId', 'Signed copy']] as const;
  return (
    <Form method="post" className="max-w-[60rem] space-y-5">
      <input type="hidden" name="intent" value="take-account" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <fieldset className="space-y-4 border-l-4 border-hair pl-4">
        <legend className="pb-2 font-semibold">The person, kept apart from the words</legend>
        {people.length > 0 ? <Select field={field('involvementId')} label="Known in this case" emptyLabel="Somebody new" options={people.map((person) => ({ value: person.id, label: person.words }))} /> : null}
        <div className="grid gap-4 tablet:grid-cols-2">
          <TextInput field={field('personName')} label="Name of a new person" help="Seen by those who may see personal fields. A file for others says Witness A. No name of a child." autoComplete="off" />
          <Select field={field('personRole')} label="Part" options={witnessRoles.map((value) => ({ value, label: witnessRoleLabels[value] }))} />
        </div>
        <ChoiceChips field={field('ageBand')} legend="Age" options={witnessAges.map((value) => ({ value, label: witnessAgeLabels[value], dashed: value === 'unknown' }))} />
      </fieldset>
      <div className="grid gap-4 tablet:grid-cols-2">
        <ClockTimeField field={field('takenAt', { required: true })} fieldFor={field} label="Taken at" zone={zone} />
        <ClockTimeField field={field('speaksOfAt')} fieldFor={field} label="The moment it speaks of, if it names one" zone={zone} />
      </div>
      <div className="tablet:max-w-80"><TextInput field={field('language', { required: true })} label="Language" help="Say if there was an interpreter." autoComplete="off" /></div>
      <TextArea field={field('words', { required: true })} label="Account, in their own words" help="What the person saw, heard and did; not what they think the cause was. Write only what is needed. Injury details go in the injury box." rows={8} serif />
      <ChoiceChips field={field('readBack')} legend="Was it read back to them?" options={[{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }]} />
      {statements.length > 0 ? <div className="max-w-120"><Select field={field('signedAttachmentId')} label="Signed copy" emptyLabel="None yet" options={statements.map((one) => ({ value: one.id, label: one.words }))} /></div> : <p className="text-small text-second">A signed copy is added under Evidence as a personal document, and then named here.</p>}
      <Button>Keep the account</Button>
    </Form>
  );
}
