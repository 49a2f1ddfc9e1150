import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { NumberTable } from '#app/components/charts/number-table.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { FieldError } from '#app/components/forms/field.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { clockKindLabels, clockKinds, dateOrderLabels, dateOrders, unitsOf } from '#app/domain/weather-table.ts';
import { weatherQuantities } from '#app/domain/weather.ts';
import { sourceLabels, WeatherSourceFields } from './weather-source-fields.tsx';

export interface FileStage {
  readonly look: { readonly format: 'epw' | 'surfrad' | 'table'; readonly formatWords: string; readonly columns: readonly string[] };
  readonly typed: Readonly<Record<string, string>>;
  readonly dryRun: {
    readonly read: number; readonly kept: number; readonly meansWords: string; readonly span: string; readonly problemCount: number;
    readonly problems: readonly { readonly line: number; readonly sentence: string }[];
    readonly cautions: readonly string[];
    readonly sample: readonly { readonly from: string; readonly to: string; readonly direct: string; readonly global: string; readonly cloud: string }[];
  } | null;
}

/** First step: a file, or its lines. */
export function WeatherFileForm({ problem }: { readonly problem: RefusedForm | undefined }) {
  const { field, refused } = formFields('look-at-file', problem, 'look');
  const file = field('file');
  return (
    <Form method="post" encType="multipart/form-data" className="space-y-4" preventScrollReset>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={[{ field: file, label: 'File' }]} title="Nothing was read." /> : null}
      <input type="hidden" name="intent" value="look-at-file" />
      <div>
        <label htmlFor={file.id} className="block pb-1 font-semibold">Station file</label>
        <input type="file" id={file.id} name="file" accept=".csv,.txt,.tsv,.dat,.epw,text/plain,text/csv" className="field-box" />
        <FieldError field={file} />
        <p className="pt-1 text-axis text-second">A table with columns (CSV), an EnergyPlus weather file (EPW), or a daily file of the NOAA surface radiation network. Only the days around the onset window are kept.</p>
      </div>
      <details>
        <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Or paste its lines</summary>
        <TextArea field={field('text')} label="Lines of the file" rows={6} spellCheck={false} />
      </details>
      <Button look="outlined">Look at the file</Button>
    </Form>
  );
}

/** Second step: which column is what, who it comes from, a dry run, then keep it. */
export function WeatherMappingForm({ stage, problem }: { readonly stage: FileStage; readonly problem: RefusedForm | undefined }) {
  const { field: fieldOf, refused } = formFields(problem?.intent ?? 'import', problem, 'map');
  const field = (name: string) => fieldOf(name, stage.typed[name]);
  const labels = [...Object.entries({ ...sourceLabels, dateColumn: 'Date, or date and time', clock: 'Times are', stamp: 'A time is the', intervalMin: 'Length of an interval', headLine: 'Names stand in line', file: 'File', offsetHours: 'Fixed offset' }), ...weatherQuantities.map(({ key, label }): [string, string] => [key, label])];
  return (
    <Form method="post" className="space-y-6" preventScrollReset>
      <p className="text-second">{stage.look.formatWords}</p>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={labels.map(([name, label]) => ({ field: field(name), label }))} title="Not kept yet. The file is still here." /> : null}
      <textarea name="text" defaultValue={stage.typed['text'] ?? ''} readOnly hidden aria-hidden="true" />
      {stage.look.format === 'table' ? <Mapping columns={stage.look.columns} field={field} /> : null}
      <WeatherSourceFields field={field} />
      {stage.dryRun ? <DryRunWords run={stage.dryRun} /> : null}
      <div className="flex flex-wrap gap-3">
        <Button name="intent" value="try-file" look="outlined">Try it, keep nothing</Button>
        <Button name="intent" value="import-file" look={stage.dryRun && stage.dryRun.kept > 0 ? 'filled' : 'waiting'}>{stage.dryRun ? `Keep ${stage.dryRun.kept} values` : 'Keep the values'}</Button>
        <a href="?" className="inline-flex min-h-11 items-center">Take another file</a>
      </div>
    </Form>
  );
}

function Mapping({ columns, field }: { readonly columns: readonly string[]; readonly field: (name: string) => FieldLike }) {
  const choices = columns.map((name, index) => ({ value: String(index), label: `${index + 1}: ${name}` }));
  return (
    <div className="space-y-4">
      <div className="grid gap-4 tablet:grid-cols-2 desk:grid-cols-4">
        <Select field={field('delimiter')} label="Columns are parted by" options={[{ value: ',', label: 'commas' }, { value: ';', label: 'semicolons' }, { value: 'tab', label: 'tabs' }]} />
        <TextInput field={field('headLine')} label="Names stand in line" inputMode="numeric" help="Lines up to this one are passed over." />
        <Select field={field('dateColumn')} label="Date, or date and time" options={choices} />
        <Select field={field('clockColumn')} label="Time, if apart" emptyLabel="in the same column" options={choices} />
        <Select field={field('dateOrder')} label="Dates are written" options={dateOrders.map((value) => ({ value, label: dateOrderLabels[value] }))} />
        <Select field={field('clock')} label="Times are" emptyLabel="Say which" options={clockKinds.map((value) => ({ value, label: clockKindLabels[value] }))} />
        <TextInput field={field('offsetHours')} label="Fixed offset, hours" inputMode="decimal" help="Only for a fixed offset; east of Greenwich positive." />
        <Select field={field('stamp')} label="A time is the" emptyLabel="Say which" options={[{ value: 'start', label: 'start of its interval' }, { value: 'end', label: 'end of its interval' }]} />
        <TextInput field={field('intervalMin')} label="Length of an interval, min" inputMode="numeric" help="Left empty: the gap between lines." />
        <TextInput field={{ ...field('missing'), defaultValue: field('missing').defaultValue || '-999 -9999 -9999.9 NaN NA M' }} label="Marks for missing" />
      </div>
      <div className="grid gap-x-8 tablet:grid-cols-2">
        {weatherQuantities.map(({ key, label }) => (
          <div key={key} className="grid grid-cols-[minmax(0,1fr)_7rem] items-end gap-3 border-b border-hair py-2">
            <Select field={field(key)} label={label} emptyLabel="not in the file" options={choices} />
            <Select field={field(`${key}.unit`)} label="Unit" options={unitsOf[key].map((unit) => ({ value: unit.value, label: unit.label }))} />
          </div>
        ))}
      </div>
    </div>
  );
}

function DryRunWords({ run }: { readonly run: NonNullable<FileStage['dryRun']> }) {
  return (
    <div role="status" className="space-y-2 border-y-[1.5px] border-ink bg-sheet px-4 py-3">
      <p className="font-semibold">{run.read} lines read, {run.meansWords}, {run.span}. {run.kept} lie within a day of the onset window and would be kept.</p>
      {run.cautions.map((caution) => <p key={caution}>{caution}</p>)}
      {run.problemCount > 0 ? (
        <>
          <p>{run.problemCount === 1 ? 'One line cannot be read and would be left out:' : `${run.problemCount} lines cannot be read and would be left out${run.problemCount > run.problems.length ? `; the first ${run.problems.length}` : ''}:`}</p>
          <ul className="list-inside">{run.problems.map((problem) => <li key={problem.line}>Line {problem.line}: {problem.sentence}</li>)}</ul>
        </>
      ) : <p>Every line could be read.</p>}
      {run.sample.length > 0 ? <NumberTable caption="First values with light" columns={[{ head: 'From' }, { head: 'To' }, { head: 'Direct', numeric: true }, { head: 'Global', numeric: true }, { head: 'Cloud', numeric: true }]} rows={run.sample.map((row) => [row.from, row.to, row.direct, row.global, row.cloud])} /> : null}
    </div>
  );
}
