import { Form } from 'react-router';
import { ClockTimeField } from '#app/components/forms/clock-time-field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { timelineSourceLabels, timelineSources } from '#app/domain/timeline.ts';

export interface EventFormProps {
  readonly clientId: string;
  readonly zone: string;
  readonly documents: readonly { readonly id: string; readonly words: string }[];
  readonly answer: FormAnswer | null;
}

/** An event from a log or a recording: the clock as it was read, and how far that clock was off. */
export function EventForm({ clientId, zone, documents, answer }: EventFormProps) {
  const field = problemFields(answer, {}, 'event-');
  const names = [['source', 'Source'], ['sourceName', 'Name of the source'], ['readingAt', 'Clock reading'], ['clockErrorMin', 'Clock error'], ['clockErrorBasis', 'How it is known'], ['what', 'What happened'], ['attachmentId', 'Document']] as const;
  return (
    <Form method="post" className="max-w-[60rem] space-y-4">
      <input type="hidden" name="intent" value="add-event" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <div className="grid gap-4 tablet:grid-cols-2">
        <Select field={field('source', { required: true })} label="Read from" emptyLabel="Choose" options={timelineSources.map((value) => ({ value, label: timelineSourceLabels[value] }))} />
        <TextInput field={field('sourceName', { required: true })} label="Which one" help="Such as: fire panel in the lobby, camera 3." autoComplete="off" />
        <ClockTimeField field={field('readingAt', { required: true })} fieldFor={field} label="Clock reading" zone={zone} help="As the source shows it, before any correction." />
        <TextInput field={field('clockErrorMin')} label="Clock error, minutes" help="Reading less true time: 6 when the clock is 6 min fast, −1.5 when slow. Empty: none known." inputMode="text" autoComplete="off" />
      </div>
      <TextInput field={field('clockErrorBasis', { required: true })} label="How the error is known" help="Such as: compared with a phone, 3 Feb; or: not checked." />
      <TextInput field={field('what', { required: true })} label="What it shows" help="No names of people." />
      {documents.length > 0 ? <div className="max-w-120"><Select field={field('attachmentId')} label="Document" emptyLabel="None" options={documents.map((document) => ({ value: document.id, label: document.words }))} /></div> : null}
      <Button>Enter the event</Button>
    </Form>
  );
}
