import { TextArea, TextInput, Select } from '#app/components/forms/text-field.tsx';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { triageCloseReasonLabels, triageCloseReasons } from '#app/domain/incident.ts';
import type { formFields } from './form-fields.ts';

type FieldOf = ReturnType<typeof formFields>['field'];

export interface MainCaseOption {
  readonly number: number;
  readonly title: string;
}

export interface MoveFieldsProps {
  readonly moveId: string;
  readonly field: FieldOf;
  readonly asksReason: boolean;
  /** Day proposed for an answer, ISO. */
  readonly proposedDay?: string;
  readonly mainCases?: readonly MainCaseOption[];
}

const reasonLabels: Readonly<Record<string, string>> = {
  'undo-duplicate': 'Why; needed after 30 days',
  'send-back': 'A sentence to the author',
};

/** What a move asks for, beyond the button. */
export function MoveFields({ moveId, field, asksReason, proposedDay, mainCases }: MoveFieldsProps) {
  return (
    <>
      {moveId === 'return' ? (
        <>
          <TextArea field={field('question')} label="One question, for the reporter" rows={2} maxLength={500} required />
          <TextInput field={field('answerDueOn', proposedDay)} label="Answer wanted until" type="date" required />
        </>
      ) : null}
      {moveId === 'answer' ? <TextArea field={field('answer')} label="Answer, or that none came" rows={3} required /> : null}
      {moveId === 'mark-duplicate' ? <MainCaseField field={field} mainCases={mainCases ?? []} /> : null}
      {moveId === 'close-at-triage' ? (
        <ChoiceChips field={{ ...field('closeReason'), required: true }} legend="Why it closes here" options={triageCloseReasons.map((reason) => ({ value: reason, label: triageCloseReasonLabels[reason] }))} />
      ) : null}
      {moveId === 'close' ? <ClosingFields field={field} /> : null}
      {moveId === 'return' || moveId === 'answer' ? null : (
        <TextArea field={field('reason')} label={asksReason ? 'Reason' : (reasonLabels[moveId] ?? 'A word for the log, if needed')} rows={2} required={asksReason} maxLength={2_000} />
      )}
    </>
  );
}

function MainCaseField({ field, mainCases }: { readonly field: FieldOf; readonly mainCases: readonly MainCaseOption[] }) {
  const help = 'Both accounts, photos and reporters are kept; this case then points to the main one.';
  if (mainCases.length === 0) return <TextInput field={field('mainCaseNumber')} label="Number of the main case" inputMode="numeric" required help={help} />;
  return (
    <>
      <TextInput field={field('mainCaseNumber')} label="Number of the main case" inputMode="numeric" required help={help} list="main-cases" />
      <datalist id="main-cases">
        {mainCases.map((one) => <option key={one.number} value={one.number}>{one.title}</option>)}
      </datalist>
    </>
  );
}

function ClosingFields({ field }: { readonly field: FieldOf }) {
  return (
    <>
      <TextArea field={field('lesson')} label="Lesson for other sites" rows={3} help="No names. What should somebody look for elsewhere?" />
      <Select field={field('externalReports')} label="Reports to outside bodies" emptyLabel="Choose" help="Check the local rule first." options={[{ value: 'Checked: not needed.', label: 'Checked: not needed' }, { value: 'Checked: made.', label: 'Checked: made' }]} />
      <TextArea field={field('effectivenessWaiver')} label="If an effect was not shown: why the case may close" rows={2} />
    </>
  );
}
