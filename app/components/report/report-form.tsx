import type { RefObject } from 'react';
import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextArea } from '#app/components/forms/text-field.tsx';
import { sightingLabels, sightings } from '#app/domain/incident.ts';
import { reportFieldLabels } from '#app/domain/report-fields.ts';
import { HurtQuestions } from './hurt-questions.tsx';
import { MoreQuestions } from './more-questions.tsx';
import { answerField } from './form-words.ts';
import { PhotoStrip } from './photo-strip.tsx';
import { Question } from './question.tsx';
import './report.css';
import { reportAddress } from './report-addresses.ts';
import { ReportBar } from './report-bar.tsx';
import { reportFields } from './report-fields.ts';
import type { ReportField, ReportFormState } from './report-fields.ts';
import { useHydrated } from './use-hydrated.ts';
import type { ReportView } from './report-view.ts';
import { statedFinding } from './stated-finding.ts';
import { StoryHintLine } from './story-hint.tsx';
import type { ReportDraft } from './use-report-draft.ts';
import type { ReportPhotos } from './use-report-photos.ts';
import type { ReportSending } from './use-report-sending.ts';
import { WhenQuestion } from './when-question.tsx';
import { WhereQuestion } from './where-question.tsx';

export interface ReportFormProps {
  readonly view: ReportView;
  readonly state: ReportFormState;
  readonly formRef: RefObject<HTMLFormElement | null>;
  readonly draft: ReportDraft;
  readonly sending: ReportSending;
  readonly photos: ReportPhotos;
}

/** One page, four answers, the rest as one likes. Posts as it stands without a script. */
export function ReportForm({ view, state, formRef, draft, sending, photos }: ReportFormProps) {
  const { clientId, sites, guest } = view;
  const hydrated = useHydrated();
  const keeps = hydrated && !draft.unkept;
  const field = reportFields(state);
  const site = sites.find((one) => one.id === draft.values['siteId']);
  const fill = (name: string, value: string, onlyEmpty: boolean) => {
    const input = formRef.current?.elements.namedItem(name);
    if (input instanceof HTMLInputElement && !(onlyEmpty && input.value)) input.value = value;
  };
  /* "Just now" means when it was pressed, not when the report got through. */
  const pinNow = (answer: string) => fill('foundNowAt', answer === 'just-now' ? new Date().toISOString() : '', false);
  const startClock = (siteId: string) => {
    const nowLocal = sites.find((one) => one.id === siteId)?.nowLocal ?? '';
    fill('foundLocal', nowLocal, true);
    fill('foundToLocal', nowLocal, true);
  };

  return (
    <Form
      ref={formRef}
      method="post"
      action={reportAddress(clientId, view.guestCode)}
      encType="multipart/form-data"
      noValidate
      className="report-form"
      onInput={() => void draft.keep()}
      onSubmit={(event) => {
        // A device that keeps nothing sends the form as it stands, files and all.
        if (!keeps) return;
        event.preventDefault();
        void draft.keep().then(photos.added).then(photos.dismissRefused).then(sending.send);
      }}
    >
      <input type="hidden" name="clientId" value={clientId} />
      {/* The first button of a form answers the Enter key: it must be the one that sends. */}
      <button type="submit" name="intent" value="send" tabIndex={-1} aria-hidden="true" className="sr-only">Send</button>
      <div className="pb-4 empty:hidden"><ErrorSummary errors={state.formErrors} fields={summaryFields(field, state)} title="Not sent yet. What you typed is still here." /></div>
      <PhotoStrip
        field={field}
        clientId={clientId}
        stored={view.photos}
        photos={photos}
        progress={sending.progress}
        keeps={keeps}
        finding={statedFinding(draft.values, site?.zone ?? null)}
        onUse={(values) => { for (const [name, value] of Object.entries(values)) if (formRef.current) answerField(formRef.current, name, value); }}
      />
      <WhereQuestion field={field} sites={sites} chosen={site} fixed={guest} values={draft.values} onSite={startClock} />
      <WhenQuestion field={field} state={state} site={site} values={draft.values} guestCode={view.guestCode} onAnswer={pinNow} />
      <Question number={3} answers="sighting" title="What do you see?">
        <ChoiceChips field={field('sighting')} legend={<span className="sr-only">What do you see?</span>} options={sightings.map((value) => ({ value, label: sightingLabels[value], dashed: value === 'dont-know' }))} />
        <TextArea field={field('narrative')} label="In your words" help="What, how large, which way it runs. No names, nothing about injuries." rows={3} maxLength={4000} />
        <StoryHintLine story={draft.values['narrative'] ?? ''} />
      </Question>
      <Question number={4} answers="anyoneHurt" title="Was anyone hurt?">
        <ChoiceChips
          field={field('anyoneHurt')}
          legend={<span className="sr-only">Was anyone hurt?</span>}
          options={[{ value: 'no', label: 'No' }, { value: 'yes', label: 'Yes' }, { value: 'dont-know', label: "Don't know", dashed: true }]}
          size="large"
          spread
        />
        <HurtQuestions field={field} />
      </Question>
      <MoreQuestions field={field} guest={guest} units={(site ?? sites[0])?.units ?? 'metric'} values={draft.values} />
      <ReportBar hydrated={hydrated} draft={draft} />
    </Form>
  );
}

/** Each field that is wrong, in the order of the page; sizes of the optic share one line's name. */
function summaryFields(field: ReportField, state: ReportFormState) {
  const known = reportFieldLabels.map(({ name, label }) => ({ field: field(name), label }));
  const sizes = Object.keys(state.fieldErrors).filter((name) => name.startsWith('optic-')).map((name) => ({ field: field(name), label: 'Size of the optic' }));
  return [...known, ...sizes];
}
