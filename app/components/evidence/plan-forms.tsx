import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ClockTimeField } from '#app/components/forms/clock-time-field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { fieldText } from '#app/components/forms/field-like.ts';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { answerTo, problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { partyRoleLabels, partyRoles } from '#app/domain/evidence-notice.ts';
import type { PlanView } from '#app/domain/evidence-steps-view.ts';

export interface DocumentChoice {
  readonly id: string;
  readonly words: string;
  readonly protocol: boolean;
}

export const documentOptions = (documents: readonly DocumentChoice[]) => documents.map((document) => ({ value: document.id, label: document.words, group: document.protocol ? 'Protocols' : 'Other documents' }));

const partyOptions = partyRoles.map((value) => ({ value, label: partyRoleLabels[value] }));

/** Parties stand in one field of words, so that they are kept like any other when a form has to be mended. */
const severalOf = (field: FieldLike): FieldLike => ({ ...field, initialValue: fieldText(field).split(' ').filter(Boolean) });

interface PlanFieldsProps {
  readonly field: (name: string, options?: { readonly required?: boolean }) => FieldLike;
  readonly zone: string;
  readonly documents: readonly DocumentChoice[];
}

/** What of a plan may change until it is made: the day, who is told, how long is waited, the protocol. */
function PlanFields({ field, zone, documents }: PlanFieldsProps) {
  return (
    <>
      <ClockTimeField field={field('plannedAt', { required: true })} fieldFor={field} label="Planned for" zone={zone} />
      <ChoiceChips field={severalOf(field('tellRoles'))} legend="Who is told beforehand" options={partyOptions} multiple />
      <TextInput field={field('waitingDays', { required: true })} label="Waiting time, days" help="From the last notice to the examination, as agreed or as your own procedure says. No number is proposed here: we know of none that holds everywhere." inputMode="numeric" autoComplete="off" />
      <Select field={field('protocolAttachmentId')} label="Protocol" help="A document of the case; it can be chosen later." emptyLabel="Not yet" options={documentOptions(documents)} />
    </>
  );
}

const planNames = [['plannedAt', 'Planned for'], ['tellRoles', 'Who is told beforehand'], ['waitingDays', 'Waiting time'], ['protocolAttachmentId', 'Protocol']] as const;

export interface PlanFormProps {
  /** Makes a repeated sending harmless. */
  readonly clientId: string;
  readonly zone: string;
  readonly documents: readonly DocumentChoice[];
  readonly answer: FormAnswer | null;
}

/** A new plan of an examination that may alter the item. */
export function PlanForm({ clientId, zone, documents, answer }: PlanFormProps) {
  const field = problemFields(answer, {}, 'plan-');
  const names = [['method', 'What is to be done'], ['performedBy', 'By whom'], ...planNames] as const;
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="plan" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <TextArea field={field('method', { required: true })} label="What is to be done" help="Which part is cut, heated or taken apart, and why nothing gentler will do." rows={2} />
      <TextInput field={field('performedBy', { required: true })} label="By whom" autoComplete="off" />
      <PlanFields field={field} zone={zone} documents={documents} />
      <Caution>Do not clean the optic. Do not repeat the ignition. A change to an item cannot be undone.</Caution>
      <Button look="outlined">Plan the examination</Button>
    </Form>
  );
}

export interface OnePlanProps {
  readonly plan: PlanView;
  readonly zone: string;
  readonly documents: readonly DocumentChoice[];
  /** Whatever form of the page has to be mended. */
  readonly answer: FormAnswer | undefined;
}

const closed = 'inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-9';
const about = (plan: PlanView) => ({ name: 'planId', value: plan.id });

/** What is to be done, and by whom, stays: the parties were told of that. Another examination is another plan. */
export function ChangePlanForm({ plan, zone, documents, answer: given }: OnePlanProps) {
  const answer = answerTo(given, 'change-plan', about(plan));
  const field = problemFields(answer, { plannedAt: plan.plannedLocal, tellRoles: plan.tellRoles.join(' '), waitingDays: String(plan.waitingDays), protocolAttachmentId: plan.protocolId ?? '' }, `change-${plan.id}-`);
  return (
    <details open={answer !== null} className="border-b border-hair">
      <summary className={closed}>Change the plan</summary>
      <Form method="post" className="space-y-4 pt-1 pb-4">
        <input type="hidden" name="intent" value="change-plan" />
        <input type="hidden" name="planId" value={plan.id} />
        <input type="hidden" name="revision" value={answer?.typed['revision'] ?? plan.revision} />
        <ErrorSummary errors={answer?.formErrors} fields={planNames.map(([name, label]) => ({ field: field(name), label }))} />
        <PlanFields field={field} zone={zone} documents={documents} />
        <Button look="outlined">Keep the change</Button>
      </Form>
    </details>
  );
}

export function CancelPlanForm({ plan, answer: given }: Pick<OnePlanProps, 'plan' | 'answer'>) {
  const answer = answerTo(given, 'cancel-plan', about(plan));
  const field = problemFields(answer, {}, `cancel-${plan.id}-`);
  return (
    <details open={answer !== null} className="border-b border-hair">
      <summary className={closed}>Cancel it</summary>
      <Form method="post" className="space-y-4 pt-1 pb-4">
        <input type="hidden" name="intent" value="cancel-plan" />
        <input type="hidden" name="planId" value={plan.id} />
        <ErrorSummary errors={answer?.formErrors} fields={[{ field: field('cancelReason'), label: 'Why it is not made' }]} />
        <TextArea field={field('cancelReason', { required: true })} label="Why it is not made" rows={2} />
        <Button look="outlined">Cancel the examination</Button>
      </Form>
    </details>
  );
}

/** The planned examination as made. Who was told is taken from the notice log. */
export function MadeForm({ plan, zone, documents, answer: given, clientId }: OnePlanProps & { readonly clientId: string }) {
  const answer = answerTo(given, 'made', about(plan));
  const field = problemFields(answer, { performedBy: plan.by, protocolAttachmentId: plan.protocolId ?? '' }, `made-${plan.id}-`);
  const names = [['performedAt', 'When it was made'], ['performedBy', 'Who made it'], ['result', 'What came of it'], ['protocolAttachmentId', 'Protocol'], ['wentAheadReason', 'Why it went ahead']] as const;
  return (
    <details open={answer !== null} className="border-b border-hair">
      <summary className={closed}>Record it as made</summary>
      <Form method="post" className="space-y-4 pt-1 pb-4">
        <input type="hidden" name="intent" value="made" />
        <input type="hidden" name="planId" value={plan.id} />
        <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
        <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
        <ClockTimeField field={field('performedAt', { required: true })} fieldFor={field} label="When it was made" zone={zone} help="Notices sent before this count as given beforehand." />
        <TextInput field={field('performedBy', { required: true })} label="Who made it" autoComplete="off" />
        <TextArea field={field('result', { required: true })} label="What came of it" help="What was seen or measured, and what of the item was altered." rows={3} />
        <Select field={field('protocolAttachmentId')} label="Protocol" emptyLabel="None" options={documentOptions(documents)} />
        <TextArea field={field('wentAheadReason')} label="Why it went ahead" aside={plan.against.join('; ') || 'if anything spoke against it'} help="Needed where a party objected or had not been told, or the waiting time was not over." rows={2} />
        <Button look="outlined">Record it as made</Button>
      </Form>
    </details>
  );
}
