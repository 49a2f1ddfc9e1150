import { Form } from 'react-router';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { formFields } from '#app/components/cases/form-fields.ts';
import { NumberTable } from '#app/components/charts/number-table.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { WeatherRecordView } from '#app/domain/weather-view.ts';

const summaryLook = 'inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8';

export function WeatherRecords({ records, mayEdit, problem }: { readonly records: readonly WeatherRecordView[]; readonly mayEdit: boolean; readonly problem: RefusedForm | undefined }) {
  return (
    <section className="min-w-0">
      <SectionHeading note="each stays as it came; a wrong one is set aside">Records</SectionHeading>
      {records.length === 0 ? <EmptyState title="Nothing yet.">Bring the numbers of the nearest station: its file, the archive, or a few values typed by hand. A station 30 km off cannot prove a clear gap.</EmptyState> : null}
      <ol>{records.map((record) => <Record key={record.number} record={record} mayEdit={mayEdit} problem={problem?.typed['number'] === String(record.number) ? problem : undefined} />)}</ol>
    </section>
  );
}

function Record({ record, mayEdit, problem }: { readonly record: WeatherRecordView; readonly mayEdit: boolean; readonly problem: RefusedForm | undefined }) {
  const { field } = formFields('set-aside', problem, `aside-${record.number}`);
  return (
    <li className={`border-b border-hair py-3 ${record.chosen ? 'border-l-4 border-l-ink bg-wash pl-3' : ''}`}>
      <p><b className="font-semibold">{record.number} {record.source}</b>{record.chosen ? <span className="text-small"> a run goes by this one</span> : null}</p>
      <p>{record.nature}{record.where ? `; ${record.where}` : ''}</p>
      <p className="text-second">{record.what}</p>
      {record.cautions.map((caution) => <p key={caution} className="font-medium">{caution}</p>)}
      {record.setAside ? <p className="font-semibold">{record.setAside}</p> : null}
      <p className="text-axis text-second">{record.added}{record.hashShort ? <>, file <span className="font-mono">{record.hashShort}</span></> : null}{record.licence ? `, ${record.licence}` : ''}</p>
      <div className="flex flex-wrap gap-x-6">
        <details className="min-w-0 max-w-full">
          <summary className={summaryLook}>Values<span className="sr-only"> of record {record.number}</span></summary>
          <NumberTable caption={`Values of record ${record.number}`} columns={record.columns.map((head, index) => ({ head, numeric: index > 1 }))} rows={record.rows.map((row) => row.map((text, index) => (index < 2 ? <span key={index} className="whitespace-nowrap">{text}</span> : text)))} />
          {record.rows.length === 60 ? <p className="text-axis text-second">The first 60 are shown.</p> : null}
        </details>
        {mayEdit && !record.setAside ? (
          <details open={problem !== undefined || undefined}>
            <summary className={summaryLook}>Set aside<span className="sr-only"> record {record.number}</span></summary>
            <Form method="post" className="max-w-[32rem] space-y-3 pb-2">
              <input type="hidden" name="intent" value="set-aside" />
              <input type="hidden" name="number" value={record.number} />
              <TextInput field={field('reason')} label="Why it is not to be used" maxLength={300} required />
              <Button look="outlined">Set record {record.number} aside</Button>
            </Form>
          </details>
        ) : null}
      </div>
    </li>
  );
}
