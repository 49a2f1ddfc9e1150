import type { RefObject } from 'react';
import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextArea } from '#app/components/forms/text-field.tsx';
import { sightingLabels, sightings } from '#app/domain/incident.ts';
import { reportFieldLabels } from '#app/domain/report-fields.ts';
import { MoreQuestions } from './more-questions.tsx';
import { PhotoStrip } from './photo-strip.tsx';
import type { StoredPhoto } from './photo-strip.tsx';
import { Follows, Question } from './question.tsx';
import './report.css';
import { ReportBar } from './report-bar.tsx';
import { reportFields } from './report-fields.ts';
import type { ReportField, ReportFormState } from './report-fields.ts';
import { useHydrated } from './use-hydrated.ts';
import type { PhotoUploads } from './use-photo-uploads.ts';
import type { ReportDraft } from './use-report-draft.ts';
import type { ReportSending } from './use-report-sending.ts';
import { WhenQuestion } from './when-question.tsx';
import { WhereQuestion } from './where-question.tsx';
import type { SiteChoice } from './where-question.tsx';

export interface ReportFormProps {
  readonly address: string;
  readonly clientId: string;
  readonly sites: readonly SiteChoice[];
  readonly guest: boolean;
  readonly state: ReportFormState;
  readonly stored: readonly StoredPhoto[];
  readonly formRef: RefObject<HTMLFormElement | null>;
  readonly draft: ReportDraft;
  readonly sending: ReportSending;
  readonly uploads: PhotoUploads;
}

/** One page, four answers, the rest as one likes. Posts as it stands without a script. */
export function ReportForm({ address, clientId, sites, guest, state, stored, formRef, draft, sending, uploads }: ReportFormProps) {
  const hydrated = useHydrated();
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
      action={address}
      encType="multipart/form-data"
      noValidate
      className="report-form"
      onInput={draft.keep}
      onSubmit={(event) => {
        event.preventDefault();
        const submitter = event.nativeEvent instanceof SubmitEvent ? event.nativeEvent.submitter : null;
        if (submitter instanceof HTMLButtonElement && submitter.value !== 'send') sending.submitOther(submitter);
        else sending.send();
      }}
    >
      <input type="hidden" name="clientId" value={clientId} />
      {/* The first button of a form answers the Enter key: it must be the one that sends. */}
      <button type="submit" name="intent" value="send" tabIndex={-1} aria-hidden="true" className="sr-only">Send</button>
      <div className="pb-4 empty:hidden"><ErrorSummary errors={state.formErrors} fields={summaryFields(field, state)} title="Not sent yet. What you typed is still here." /></div>
      <PhotoStrip field={field} clientId={clientId} stored={stored} uploads={uploads} />
      <WhereQuestion field={field} sites={sites} chosen={site} fixed={guest} onSite={startClock} />
      <WhenQuestion field={field} state={state} site={site} values={draft.values} onAnswer={pinNow} />
      <Question number={3} answers="sighting" title="What do you see?">
        <ChoiceChips field={field('sighting')} legend={<span className="sr-only">What do you see?</span>} options={sightings.map((value) => ({ value, label: sightingLabels[value], dashed: value === 'dont-know' }))} />
        <TextArea field={field('narrative')} label="In your words" help="What, how large, which way it runs. No names, nothing about injuries." rows={3} maxLength={4000} />
      </Question>
      <Question number={4} answers="anyoneHurt" title="Was anyone hurt?">
        <ChoiceChips
          field={field('anyoneHurt')}
          legend={<span className="sr-only">Was anyone hurt?</span>}
          options={[{ value: 'no', label: 'No' }, { value: 'yes', label: 'Yes' }, { value: 'dont-know', label: "Don't know", dashed: true }]}
          size="large"
          spread
        />
        <Follows on="hurt">
          <ChoiceChips
            field={field('hurtAgeBand')}
            legend="How old, roughly? No name, please."
            options={[{ value: 'adult', label: 'Adult' }, { value: '16-17', label: '16 or 17' }, { value: 'under-16', label: 'Under 16' }, { value: 'unknown', label: "Don't know", dashed: true }]}
          />
          <p className="text-small text-second">Blurred or dark spots in sight: get medical help now. Tell the person in charge of the site. The injury itself is asked about later, and kept apart.</p>
        </Follows>
      </Question>
      <MoreQuestions field={field} guest={guest} />
      <ReportBar hydrated={hydrated} draft={draft} sending={sending.state} photosOnTheWay={uploads.onTheWay} />
    </Form>
  );
}

/** Each field that is wrong, in the order of the page; sizes of the optic share one line's name. */
function summaryFields(field: ReportField, state: ReportFormState) {
  const known = reportFieldLabels.map(({ name, label }) => ({ field: field(name), label }));
  const sizes = Object.keys(state.fieldErrors).filter((name) => name.startsWith('optic-')).map((name) => ({ field: field(name), label: 'Size of the optic' }));
  return [...known, ...sizes];
}
