import { Form, href } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { FieldError } from '#app/components/forms/field.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { attachmentClassLabels, attachmentClasses, attachmentKindLabels, attachmentKinds } from '#app/domain/attachment.ts';
import type { DocumentView } from '#app/domain/document-view.ts';

/** Documents that this reader may open; each download is hashed again. */
export function DocumentTable({ documents }: { readonly documents: readonly DocumentView[] }) {
  return (
    <section aria-labelledby="documents" className="pt-6">
      <SectionHeading id="documents" note="hashed again at each download; a file that changed is not handed out">Documents</SectionHeading>
      {documents.length === 0 ? <p className="text-second">No document is open to you here.</p> : (
        <DataTable caption="Documents of the case" className="min-w-[52rem]">
          <TableHead>
            <HeadCell>Document</HeadCell>
            <HeadCell>Title</HeadCell>
            <HeadCell>Who may read it</HeadCell>
            <HeadCell>File</HeadCell>
            <HeadCell>SHA-256 at intake</HeadCell>
          </TableHead>
          <tbody>
            {documents.map((document) => (
              <Row key={document.id}>
                <Cell heading><a href={href('/documents/:documentId', { documentId: document.id })} className="inline-flex min-h-6 items-center" download>{document.code}</a></Cell>
                <Cell note={`${document.kind}; added by ${document.added}`}>{document.title}</Cell>
                <Cell>{document.class}</Cell>
                <Cell className="whitespace-nowrap">{document.size}</Cell>
                <Cell note={document.hashCheck === 'differs' || document.hashCheck === 'missing' ? <b>! {document.hashWords}</b> : document.hashWords}><code className="font-mono text-axis break-all">{document.sha256}</code></Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      )}
    </section>
  );
}

const kindOptions = attachmentKinds.map((value) => ({ value, label: attachmentKindLabels[value] }));
const classOptions = attachmentClasses.map((value) => ({ value, label: attachmentClassLabels[value] }));

export function DocumentForm({ answer }: { readonly answer: FormAnswer | null }) {
  const field = problemFields(answer, { class: 'ordinary' }, 'document-');
  const file = field('file');
  return (
    <Form method="post" encType="multipart/form-data" className="space-y-4">
      <input type="hidden" name="intent" value="add-document" />
      <ErrorSummary errors={answer?.formErrors} fields={[{ field: file, label: 'File' }, { field: field('title'), label: 'Title' }, { field: field('kind'), label: 'Kind' }, { field: field('class'), label: 'Who may read it' }]} title="Not added yet." />
      <div>
        <label htmlFor={file.id} className="block pb-1 font-semibold">File</label>
        <input type="file" id={file.id} name="file" accept=".pdf,.csv,.txt,.jpg,.jpeg,.png,.webp" className="field-box py-2" aria-describedby={`${file.id}-help`} aria-invalid={file.errors ? true : undefined} />
        <FieldError field={file} />
        <p id={`${file.id}-help`} className="mt-1 text-axis text-second">PDF, CSV, plain text, JPEG, PNG or WebP, up to 25 MB.</p>
      </div>
      <TextInput field={field('title', { required: true })} label="Title" help="What it is. No names of people." maxLength={160} />
      <Select field={field('kind', { required: true })} label="Kind" emptyLabel="Choose" options={kindOptions} />
      <ChoiceChips field={field('class')} legend="Who may read it" options={classOptions} help="Personal: whoever may see personal fields. Legal advice: whoever may see the privileged part. Marking a record does not make it privileged. Ask a lawyer." />
      <Button look="outlined">Add the document</Button>
    </Form>
  );
}
