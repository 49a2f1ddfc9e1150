import { Form } from 'react-router';
import type { ReactNode } from 'react';
import { answerTo, problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Field } from '#app/components/forms/field.tsx';
import { describedBy, fieldIds } from '#app/components/forms/field-like.ts';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { ActionRights } from '#app/domain/action-view.ts';
import { cautions } from '#app/components/layout/cautions.ts';
import { personOptions } from './action-form.tsx';
import type { PersonOption } from './action-form.tsx';

export interface ActionStepsProps {
  readonly actionId: string;
  readonly number: number;
  readonly version: number;
  readonly rights: ActionRights;
  readonly dueOn: string;
  readonly ownerId: string;
  readonly verifierId: string;
  readonly proposedCheckOn: string | null;
  readonly tooEarlyUntil: string | null;
  readonly todayOn: string;
  readonly people: readonly PersonOption[];
  readonly answer: FormAnswer | undefined;
}

/** The steps that are open to the reader, each folded until it is wanted; a refused one stays open with its sentence. */
export function ActionSteps(props: ActionStepsProps) {
  const { rights } = props;
  return (
    <div className="space-y-1" data-print="no">
      {rights.start ? <StartStep {...props} /> : null}
      {rights.markDone ? <DoneStep {...props} /> : null}
      {rights.verify ? <VerifyStep {...props} /> : null}
      {rights.sendBack ? <NoteStep {...props} intent="send-back" title="Send back to the owner" label="What is still missing" button="Send back" /> : null}
      {rights.checkEffect ? <EffectStep {...props} /> : null}
      {rights.change ? <ReDateStep {...props} /> : null}
      {rights.change ? <ReassignStep {...props} /> : null}
      {rights.withdraw ? <NoteStep {...props} intent="withdraw" title="Withdraw it" label="Reason" button="Withdraw the action" /> : null}
    </div>
  );
}

interface StepProps extends ActionStepsProps {
  readonly intent: string;
  readonly title: string;
  readonly files?: boolean;
  /** Values to start from. */
  readonly stored?: Readonly<Record<string, string>>;
  readonly labels?: readonly (readonly [name: string, label: string])[];
  readonly children: (field: (name: string) => FieldLike) => ReactNode;
}

/** One step: a folded form that posts action, version and intent. */
function Step({ actionId, number, version, intent, title, files = false, stored = {}, labels = [], answer, children }: StepProps) {
  const problem = answerTo(answer, intent, { name: 'actionId', value: actionId });
  const field = problemFields(problem, stored, `${intent}-${number}-`);
  return (
    <details className="border-b border-hair" open={problem !== null}>
      <summary className="min-h-11 py-2.5 font-semibold desk:min-h-8 desk:py-1.5">{title}</summary>
      <Form method="post" {...(files ? { encType: 'multipart/form-data' as const } : {})} className="max-w-[44rem] space-y-3 pt-1 pb-4">
        <input type="hidden" name="intent" value={intent} />
        <input type="hidden" name="actionId" value={actionId} />
        <input type="hidden" name="version" value={version} />
        <ErrorSummary errors={problem?.formErrors} title="Not done yet. What you typed is still here." fields={labels.map(([name, label]) => ({ field: field(name), label }))} />
        {children(field)}
      </Form>
    </details>
  );
}

function StartStep({ actionId, version, number, answer }: ActionStepsProps) {
  const problem = answerTo(answer, 'start', { name: 'actionId', value: actionId });
  return (
    <Form method="post" className="border-b border-hair py-2">
      <input type="hidden" name="intent" value="start" />
      <input type="hidden" name="actionId" value={actionId} />
      <input type="hidden" name="version" value={version} />
      <ErrorSummary errors={problem?.formErrors} title="Not started." />
      <Button look="outlined">Start<span className="sr-only"> action {number}</span></Button>
    </Form>
  );
}

function ProofFiles({ field, label, help }: { readonly field: FieldLike; readonly label: string; readonly help: string }) {
  return (
    <Field field={field} label={label} help={help}>
      <input type="file" id={fieldIds(field).id} name={field.name} multiple accept="image/jpeg,image/png,image/webp,application/pdf" className="field-box" aria-describedby={describedBy(field, true)} aria-invalid={(field.errors?.length ?? 0) > 0 || undefined} />
    </Field>
  );
}

function DoneStep(props: ActionStepsProps) {
  return (
    <Step {...props} intent="mark-done" title="Mark done, with proof" files labels={[['note', 'What was done'], ['files', 'Files']]}>
      {(field) => (
        <>
          <TextArea field={field('note')} label="What was done" rows={3} />
          <ProofFiles field={field('files')} label="Photo or document" help="JPEG, PNG, WebP or PDF, up to 25 MB each, five at most." />
          <p>{cautions.eyes}</p>
          <Button>Mark done</Button>
        </>
      )}
    </Step>
  );
}

function VerifyStep(props: ActionStepsProps) {
  const help = props.proposedCheckOn ? `Left empty: ${props.proposedCheckOn}, the first day on which the sun is back.` : 'No return of the sun is known; choose a day like the one on which the mark was made.';
  return (
    <Step {...props} intent="verify" title="Verify that it is in place" labels={[['note', 'What you checked'], ['effectCheckOn', 'Day of the check']]}>
      {(field) => (
        <>
          <TextArea field={field('note')} label="What you checked, and how" rows={3} />
          <div className="max-w-60"><TextInput field={field('effectCheckOn')} label="See whether it works on" type="date" min={props.proposedCheckOn ?? props.todayOn} aside="not required" help={help} /></div>
          <Button>Verify</Button>
        </>
      )}
    </Step>
  );
}

const effectOptions = [{ value: 'effective', label: 'It works' }, { value: 'not-effective', label: 'It does not work' }];

function EffectStep(props: ActionStepsProps) {
  return (
    <Step {...props} intent="check-effect" title="Record whether it works" files labels={[['effective', 'Result'], ['note', 'What you saw'], ['reason', 'Reason'], ['files', 'Files']]}>
      {(field) => (
        <>
          {props.tooEarlyUntil ? <p>The sun has not been back since it was verified; the first day is {props.tooEarlyUntil}. &ldquo;It works&rdquo; before that day needs a reason.</p> : null}
          <ChoiceChips field={field('effective')} legend="Does it work?" options={effectOptions} />
          <TextArea field={field('note')} label="What you saw, and when" rows={3} />
          {props.tooEarlyUntil ? <TextInput field={field('reason')} label="Why it can be told before the sun is back" aside="only for that" /> : null}
          <ProofFiles field={field('files')} label="Photo or document" help="Not required. Photograph the lit surface from well outside the beam, never the optic." />
          <p>{cautions.eyes}</p>
          <Button>Record it</Button>
        </>
      )}
    </Step>
  );
}

function NoteStep({ label, button, ...props }: ActionStepsProps & { readonly intent: string; readonly title: string; readonly label: string; readonly button: string }) {
  const name = props.intent === 'withdraw' ? 'reason' : 'note';
  return (
    <Step {...props} labels={[[name, label]]}>
      {(field) => (
        <>
          <TextArea field={field(name)} label={label} rows={2} />
          <Button look="outlined">{button}</Button>
        </>
      )}
    </Step>
  );
}

function ReDateStep(props: ActionStepsProps) {
  return (
    <Step {...props} intent="re-date" title="Give it another day" stored={{ dueOn: props.dueOn }} labels={[['dueOn', 'New day'], ['reason', 'Reason']]}>
      {(field) => (
        <>
          <div className="max-w-60"><TextInput field={field('dueOn')} label="New day" type="date" min={props.todayOn} /></div>
          <TextInput field={field('reason')} label="Reason" />
          <Button look="outlined">Re-date</Button>
        </>
      )}
    </Step>
  );
}

function ReassignStep(props: ActionStepsProps) {
  const options = personOptions(props.people);
  return (
    <Step {...props} intent="reassign" title="Give it to somebody else" stored={{ ownerId: props.ownerId, verifierId: props.verifierId }} labels={[['ownerId', 'Owner'], ['verifierId', 'Verifier'], ['reason', 'Reason']]}>
      {(field) => (
        <>
          <div className="grid gap-3 tablet:grid-cols-2">
            <Select field={field('ownerId')} label="Owner" options={options} />
            <Select field={field('verifierId')} label="Verifier" options={options} />
          </div>
          <TextInput field={field('reason')} label="Reason" />
          <Button look="outlined">Give it</Button>
        </>
      )}
    </Step>
  );
}
