import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ClockTimeField } from '#app/components/forms/clock-time-field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { fieldText } from '#app/components/forms/field-like.ts';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { disposalLabels, disposals, examKindLabels, examKinds, holderRoleLabels, holderRoles } from '#app/domain/evidence.ts';
import type { Disposal } from '#app/domain/evidence.ts';
import { documentOptions } from './plan-forms.tsx';
import type { DocumentChoice } from './plan-forms.tsx';

interface FormProps {
  /** Makes a repeated sending harmless. */
  readonly clientId: string;
  readonly zone: string;
  readonly answer: FormAnswer | null;
}

/** For a taker without an account, or the recorder: the open record ends and the next begins at the moment given here. */
export function HandOverForm({ clientId, zone, answer, sequence, holderName }: FormProps & { readonly sequence: number; readonly holderName: string }) {
  const field = problemFields(answer, { givenBy: holderName }, 'hand-');
  const names = [['handedAt', 'When'], ['holderRole', 'Taken over by, part'], ['holderName', 'Taken over by, name'], ['purpose', 'Purpose'], ['condition', 'Condition'], ['givenBy', 'Signed by the giver'], ['receivedBy', 'Signed by the taker']] as const;
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="hand-over" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <input type="hidden" name="sequence" value={sequence} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <ClockTimeField field={field('handedAt', { required: true })} fieldFor={field} label="When" zone={zone} help="The giver holds it up to this moment, the taker from it on." />
      <div className="grid gap-4 tablet:grid-cols-2">
        <Select field={field('holderRole', { required: true })} label="Taken over by, part" emptyLabel="Choose" options={holderRoles.map((value) => ({ value, label: holderRoleLabels[value] }))} />
        <TextInput field={field('holderName', { required: true })} label="Taken over by, name" help="A person, or the name of the store." autoComplete="off" />
        <TextInput field={field('place')} label="Kept where" aside="room, shelf" />
        <TextInput field={field('purpose', { required: true })} label="Purpose" />
      </div>
      <TextInput field={field('condition', { required: true })} label="Condition of item and seal" />
      <div className="grid gap-4 tablet:grid-cols-2">
        <TextInput field={field('givenBy', { required: true })} label="Signed by the giver" autoComplete="off" />
        <TextInput field={field('receivedBy', { required: true })} label="Signed by the taker" autoComplete="off" />
      </div>
      <p className="text-axis text-second">Both signatures are typed by you, and the chain says so. A taker who has an account signs on it: offer the item to them.</p>
      <Button look="outlined">Record the hand-over</Button>
    </Form>
  );
}

export interface ExamFormProps extends FormProps {
  readonly documents: readonly DocumentChoice[];
  /** What speaks against an examination that may alter the item, such as `objects: maker`. */
  readonly against: readonly string[];
}

/** An examination that was made. One that may alter the item asks for notice and protocol. */
export function ExamForm({ clientId, zone, answer, documents, against }: ExamFormProps) {
  const field = problemFields(answer, {}, 'exam-');
  const names = [['examKind', 'Kind'], ['performedAt', 'When'], ['performedBy', 'Made by'], ['method', 'Method'], ['result', 'Result'], ['noticeTo', 'Who was told'], ['noticeAt', 'When they were told'], ['protocolAttachmentId', 'Protocol'], ['wentAheadReason', 'Why it went ahead']] as const;
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="exam" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <ChoiceChips field={field('examKind')} legend="Kind of examination" options={examKinds.map((value) => ({ value, label: examKindLabels[value] }))} />
      <div className="grid gap-4 tablet:grid-cols-2">
        <ClockTimeField field={field('performedAt', { required: true })} fieldFor={field} label="When" zone={zone} />
        <TextInput field={field('performedBy', { required: true })} label="Made by" autoComplete="off" />
      </div>
      <TextArea field={field('method', { required: true })} label="Method" help="What was done, with which instrument." rows={2} />
      <TextArea field={field('result', { required: true })} label="Result" rows={3} />
      <fieldset className="space-y-4 border-l-4 border-hair pl-4">
        <legend className="pb-1 font-semibold">Needed where it may alter the item</legend>
        <TextInput field={field('noticeTo')} label="Who was told beforehand" help="By part: owner, insurer, maker, other parties." />
        <ClockTimeField field={field('noticeAt')} fieldFor={field} label="When they were told" zone={zone} />
        <Select field={field('protocolAttachmentId')} label="Protocol" help="A document of the case. Add it on the evidence page first." emptyLabel="None" options={documentOptions(documents)} />
        {against.length > 0 || field('wentAheadReason').errors || fieldText(field('wentAheadReason')) !== '' ? <TextArea field={field('wentAheadReason')} label="Why it went ahead" aside={against.join('; ')} help="Needed while a party objects." rows={2} /> : null}
      </fieldset>
      <Caution>Do not clean the optic. Do not repeat the ignition. A change to an item cannot be undone.</Caution>
      <Button look="outlined">Record the examination</Button>
    </Form>
  );
}

export function DisposalForm({ answer, disposal }: { readonly answer: FormAnswer | null; readonly disposal: Disposal }) {
  const field = problemFields(answer, { disposal }, 'disposal-');
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="disposal" />
      <ErrorSummary errors={answer?.formErrors} fields={[{ field: field('disposal'), label: 'Decision' }, { field: field('reason'), label: 'Reason' }]} />
      <ChoiceChips field={field('disposal')} legend="What is to become of it" options={disposals.map((value) => ({ value, label: disposalLabels[value], dashed: value === 'undecided' }))} />
      <TextArea field={field('reason', { required: true })} label="Reason" help="Who agreed, and from when it holds. Not before claims are closed." rows={2} />
      <Button look="outlined">Keep the decision</Button>
    </Form>
  );
}
