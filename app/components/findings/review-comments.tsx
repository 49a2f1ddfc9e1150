import { Form } from 'react-router';
import { Select, TextArea } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { CommentPin } from '#app/domain/finding-view.ts';
import { reviewFieldLabels, reviewFields } from '#app/domain/finding.ts';
import { CommentPinMark } from './comment-pin-mark.tsx';
import { problemFields } from './problem-fields.ts';
import type { FormAnswer } from './problem-fields.ts';

export interface ReviewCommentsProps {
  readonly pins: readonly CommentPin[];
  readonly mayAdd: boolean;
  readonly answer: FormAnswer | null;
}

const fieldOptions = reviewFields.map((value) => ({ value, label: reviewFieldLabels[value] }));

/** Comments in the margin, each on one named field. */
export function ReviewComments({ pins, mayAdd, answer }: ReviewCommentsProps) {
  const field = problemFields(answer, {}, 'comment-form-');
  return (
    <section aria-labelledby="comments">
      <SectionHeading id="comments" note={pins.length === 0 ? 'none' : String(pins.length)}>Comments on fields</SectionHeading>
      <ol>
        {pins.map((pin) => <li key={pin.id} id={`comment-${pin.id}`} className="flex gap-3 border-b border-hair py-3"><CommentPinMark pin={pin} /><Comment pin={pin} /></li>)}
      </ol>
      {pins.length > 0 ? <p className="pt-2 text-axis text-second">Filled: open. Ticked: settled. The number stands on the field and here.</p> : null}
      {mayAdd ? (
        <Form method="post" className="mt-4 space-y-3">
          <input type="hidden" name="intent" value="add-comment" />
          <Select field={field('field')} label="A comment on" emptyLabel="Choose a field" options={fieldOptions} />
          <TextArea field={field('body')} label="What is unclear or missing" rows={3} />
          <Button look="outlined" block>Add the comment</Button>
        </Form>
      ) : null}
    </section>
  );
}

function Comment({ pin }: { readonly pin: CommentPin }) {
  return (
    <div className="min-w-0 flex-1">
      <p className="font-semibold">{pin.label}</p>
      {pin.body === null ? <p className="text-second">Hidden until you ask for the opinion.</p> : <p className="font-serif whitespace-pre-line">{pin.body}</p>}
      <p className="text-axis text-second">{pin.by}, on version {pin.version}{pin.settled ? `; ${pin.settled}` : ''}</p>
      {pin.maySettle ? (
        <Form method="post" className="mt-1 flex flex-wrap items-center gap-2">
          <input type="hidden" name="intent" value="settle-comment" />
          <input type="hidden" name="commentId" value={pin.id} />
          <label className="min-w-0 flex-1 basis-40"><span className="sr-only">What was done about comment {pin.pin}</span><input className="field-box" name="reason" placeholder="what was done" /></label>
          <Button look="quiet">Settle<span className="sr-only"> comment {pin.pin}</span></Button>
        </Form>
      ) : null}
    </div>
  );
}
