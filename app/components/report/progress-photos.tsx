import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { describedBy, hasErrors } from '#app/components/forms/field-like.ts';
import { Field } from '#app/components/forms/field.tsx';
import { Select } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { photoViewLabels, photoViews } from '#app/domain/incident.ts';
import { photoFileTypes } from '#app/domain/photo.ts';

export interface ProgressPhotosProps {
  readonly receipt: string;
  readonly photos: {
    /** How many are with the report, and since when. */
    readonly words: string;
    /** Why none can be added any more; null while they can. */
    readonly closedWords: string | null;
  };
  /** Set when the page is shown right after photos were stored. */
  readonly justStored: boolean;
  readonly problem: { readonly formErrors: readonly string[]; readonly fieldErrors: Readonly<Record<string, readonly string[]>>; readonly typed: Readonly<Record<string, string>> } | null;
}

/** Photos that are added after the report was sent, by whoever holds its receipt. None of them is shown here. */
export function ProgressPhotos({ receipt, photos, justStored, problem }: ProgressPhotosProps) {
  const files: FieldLike = { name: 'photos', id: 'progress-photos', errors: problem?.fieldErrors['photos'] };
  return (
    <section id="photos" className="mb-6 scroll-mt-4 space-y-3">
      <SectionHeading>Photos</SectionHeading>
      {problem ? <ErrorSummary errors={problem.formErrors} fields={[{ field: files, label: 'Photos' }]} title="Not every photo was stored." /> : null}
      {justStored && !problem ? <Notice title="Stored with the team">{photos.words}</Notice> : <p>{photos.words}</p>}
      {photos.closedWords ? (problem ? null : <p className="text-second">{photos.closedWords}</p>) : (
        <Form method="post" encType="multipart/form-data" action={`/progress?code=${receipt}&add=photos`} className="space-y-4">
          <Field field={files} label="Add photos" help="No faces, no names, no number plates. They are not shown on this page.">
            <input type="file" id="progress-photos" name="photos" multiple accept={photoFileTypes} className="field-box" aria-invalid={hasErrors(files) || undefined} aria-describedby={describedBy(files, true)} />
          </Field>
          <Select field={{ name: 'view', defaultValue: problem?.typed['view'] }} label="What kind of view?" emptyLabel="Not said" options={photoViews.map((value) => ({ value, label: photoViewLabels[value] }))} />
          <Button look="outlined" size="large" block>Add the photos</Button>
        </Form>
      )}
    </section>
  );
}
