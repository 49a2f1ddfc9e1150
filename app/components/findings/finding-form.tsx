import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TickLine } from '#app/components/ui/tick-line.tsx';
import { certainties, certaintyLabels, classificationLabels, classifications } from '#app/domain/finding.ts';
import { problemFields } from './problem-fields.ts';
import type { FormAnswer } from './problem-fields.ts';

export interface FindingFormView {
  readonly openedAt: string;
  readonly caseVersion: number;
  readonly stored: Readonly<Record<string, string>>;
  readonly hypotheses: readonly { readonly id: string; readonly label: string }[];
  /** Why "probable" is not open now. */
  readonly probableObstacles: readonly string[];
  readonly checklist: readonly { readonly done: boolean; readonly label: string }[];
  readonly asksReconstructionWaiver: boolean;
  readonly asksEvidenceWaiver: boolean;
}

export interface FindingFormProps {
  readonly view: FindingFormView;
  readonly answer: FormAnswer | null;
}

const certaintyOptions = certainties.map((value) => ({ value, label: certaintyLabels[value] }));
const classificationOptions = classifications.map((value) => ({ value, label: classificationLabels[value], dashed: value === 'not-classified' }));

/** The draft: typed by a person, kept at any stage, sent once nothing is missing. */
export function FindingForm({ view, answer }: FindingFormProps) {
  const field = problemFields(answer, view.stored);
  const hypothesisOptions = [...view.hypotheses.map(({ id, label }) => ({ value: id, label })), { value: '', label: 'None', dashed: true }];
  return (
    <Form method="post" className="gap-x-10 desk:grid desk:grid-cols-[minmax(0,1.7fr)_minmax(0,1.2fr)_minmax(15rem,0.9fr)]">
      <input type="hidden" name="openedAt" value={view.openedAt} />
      <input type="hidden" name="version" value={view.caseVersion} />
      <div className="desk:col-span-3 pb-4 empty:hidden">
        <ErrorSummary
          errors={answer?.formErrors}
          title={answer?.intent === 'send' ? 'Not sent yet. What you typed is still here.' : 'Not saved yet. What you typed is still here.'}
          fields={[{ field: field('opinion'), label: 'Opinion' }, { field: field('selectedHypothesisId'), label: 'Selected hypothesis' }, { field: field('certainty'), label: 'Certainty' }, { field: field('classification'), label: 'Classification' }]}
        />
      </div>
      <div className="space-y-5">
        <SectionHeading note="typed by a person, a draft until reviewed">Opinion</SectionHeading>
        <TextArea field={field('opinion')} label="The opinion" serif rows={9} help="What happened, how sure you are of it, and what it rests on. Facts, opinion and reasoning apart." />
        <ChoiceChips field={field('selectedHypothesisId')} legend="Selected hypothesis" options={hypothesisOptions} />
        <ChoiceChips field={field('certainty')} legend="Certainty" options={certaintyOptions}>
          {view.probableObstacles.length > 0 ? <ul className="text-small text-second">{view.probableObstacles.map((line) => <li key={line}>{line}</li>)}</ul> : null}
        </ChoiceChips>
        <ChoiceChips field={field('classification')} legend="Classification, only if someone needs it" options={classificationOptions} />
      </div>
      <div className="space-y-5 max-desk:mt-6">
        <SectionHeading note="what, why there, why at all">Causes</SectionHeading>
        <TextArea field={field('immediateCauses')} label="Immediate" help="What gave the heat, and what it reached." rows={3} />
        <TextArea field={field('underlyingCauses')} label="Underlying" help="Why it stood like that." rows={3} />
        <TextArea field={field('rootCauses')} label="Root" help="What in planning or care let it." rows={3} />
        <SectionHeading>Limits</SectionHeading>
        <TextArea field={field('limits')} label="Limits of this opinion" help="What was not measured, not seen, or seen too late." rows={5} />
      </div>
      <div className="max-desk:mt-6">
        <SectionHeading>Before it can be sent</SectionHeading>
        {view.checklist.map((line) => <TickLine key={line.label} done={line.done}>{line.label}</TickLine>)}
        <div className="mt-4 space-y-3">
          {view.asksReconstructionWaiver ? <TextInput field={field('reconstructionWaiver')} label="Why there is no reconstruction" help="Only if there is none to attach." /> : null}
          {view.asksEvidenceWaiver ? <TextInput field={field('evidenceWaiver')} label="Why there is no photo" help="Only if there is none to add." /> : null}
          <Button name="intent" value="save-draft" look="outlined" block>Save the draft</Button>
          <Button name="intent" value="send" block look={view.checklist.every((line) => line.done) ? 'filled' : 'waiting'}>Send the finding to review</Button>
          <p className="text-small text-second">Sending keeps the draft first. A technical reviewer who is not the author reads the inputs before the opinion.</p>
        </div>
      </div>
    </Form>
  );
}
