import { useState } from 'react';
import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { NumberTable } from '#app/components/charts/number-table.tsx';
import { entryLabel, EntryRows } from '#app/components/forms/entry-rows.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { describedBy, fieldIds, hasErrors } from '#app/components/forms/field-like.ts';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { leafStates, skylineSources } from '#app/domain/scene.ts';
import { leafLabels, rowName, skylineColumns } from '#app/domain/skyline-form.ts';
import type { SkylineColumn, SkylineRow } from '#app/domain/skyline-form.ts';
import { PanoramaTracer } from './panorama-tracer.tsx';
import type { PanoramaPhoto } from './panorama-tracer.tsx';
import { SkylineFigure } from './skyline-figure.tsx';
import type { SunPathLine } from './skyline-figure.tsx';

export interface SkylineEditorProps {
  readonly rows: readonly SkylineRow[];
  readonly paths: readonly SunPathLine[];
  readonly photos: readonly PanoramaPhoto[];
  /** Sent back with the form: what it was filled from. */
  readonly base: { readonly name: string; readonly value: string };
  readonly saveLabel: string;
  readonly mayEdit: boolean;
  readonly whoEdits: string;
  readonly problem: RefusedForm | undefined;
}

const emptyRow: SkylineRow = { azimuthDeg: '', elevationDeg: '', plusMinusDeg: '', source: 'clinometer', leaf: '', name: '' };
const heads: Record<SkylineColumn, string> = { azimuthDeg: 'Bearing, ° true', elevationDeg: 'Elevation, °', plusMinusDeg: '±, °', source: 'Taken with', leaf: 'Tree', name: 'What it is' };

const spans: Record<SkylineColumn, string> = { azimuthDeg: 'max-desk:col-span-2', elevationDeg: 'max-desk:col-span-2', plusMinusDeg: 'max-desk:col-span-2', source: 'max-desk:col-span-3', leaf: 'max-desk:col-span-3', name: 'max-desk:col-span-6' };
const entryColumns = skylineColumns.map((key) => ({ key, head: heads[key], span: spans[key] }));

function rowsOf(typed: Readonly<Record<string, string>>): SkylineRow[] {
  const count = Object.keys(typed).filter((name) => name.endsWith('.azimuthDeg')).length;
  const cell = (index: number, column: SkylineColumn) => typed[rowName(index, column)] ?? '';
  return Array.from({ length: count }, (_unused, index) => ({ azimuthDeg: cell(index, 'azimuthDeg'), elevationDeg: cell(index, 'elevationDeg'), plusMinusDeg: cell(index, 'plusMinusDeg'), source: cell(index, 'source'), leaf: cell(index, 'leaf'), name: cell(index, 'name') }));
}

/** Skyline as a table, as a picture, and traced on a photo; rows left empty are taken away. */
export function SkylineEditor({ rows: stored, paths, photos, base, saveLabel, mayEdit, whoEdits, problem }: SkylineEditorProps) {
  const { field, refused } = formFields('save-skyline', problem, 'skyline');
  const [rows, setRows] = useState<readonly SkylineRow[]>(refused ? rowsOf(refused.typed) : [...stored, ...(mayEdit ? [emptyRow, emptyRow, emptyRow] : [])]);
  const hydrated = useHydrated();
  const points = rows.flatMap((row) => (row.azimuthDeg !== '' && row.elevationDeg !== '' && Number.isFinite(Number(row.azimuthDeg)) && Math.abs(Number(row.elevationDeg)) <= 90 ? [{ azimuthDeg: ((Number(row.azimuthDeg) % 360) + 360) % 360, elevationDeg: Number(row.elevationDeg), name: row.name, isTree: row.leaf !== '' }] : []));
  const wrong = rows.flatMap((_row, index) => skylineColumns.map((column) => ({ field: field(rowName(index, column)), label: entryLabel(index, heads[column]) })));
  const addRows = (more: readonly SkylineRow[]) => setRows([...rows.filter((row) => row.azimuthDeg !== '' || row.elevationDeg !== ''), ...more]);
  return (
    <div className="space-y-8">
      <SkylineFigure points={points} paths={paths} />
      <Form method="post" className="space-y-5" preventScrollReset>
        {refused ? <ErrorSummary errors={refused.formErrors} fields={[...wrong, { field: field('paste'), label: 'Pasted rows' }, { field: field('note'), label: 'What was measured' }]} /> : null}
        <input type="hidden" name="intent" value="save-skyline" />
        <input type="hidden" name={base.name} value={base.value} />
        {mayEdit ? null : <NumberTable caption="Points of the skyline" columns={skylineColumns.map((column) => ({ head: heads[column], numeric: column.endsWith('Deg') }))} rows={rows.map((row) => skylineColumns.map((column) => row[column]))} />}
        {mayEdit ? (
          <EntryRows
            caption="Points of the skyline"
            columns={entryColumns}
            grid="desk:grid-cols-[1.5rem_7rem_7rem_6rem_10rem_10rem_minmax(10rem,1fr)]"
            rowCount={rows.length}
            fieldOf={(row, column) => field(rowName(row, column))}
            control={(index, column, label) => <CellControl field={field(rowName(index, column))} label={label} column={column} value={rows[index]?.[column] ?? ''} onChange={(value) => setRows(rows.map((one, at) => (at === index ? { ...one, [column]: value } : one)))} />}
          />
        ) : null}
        {mayEdit ? (
          <>
            {hydrated ? <Button type="button" look="outlined" onClick={() => setRows([...rows, emptyRow, emptyRow, emptyRow])}>More rows</Button> : null}
            <details open={refused?.fieldErrors['paste'] !== undefined}>
              <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Paste rows from a table</summary>
              <TextArea field={field('paste')} label="Rows to add" rows={6} spellCheck={false} help='One point a line, parted by commas, semicolons or tabs: bearing, elevation, ±, taken with, tree (bare, in leaf), what it is. A head line is passed over. Such as "121.5, 12.5, 0.5, clinometer, , Grain House".' />
            </details>
            <div className="max-w-[48rem] space-y-4">
              <TextInput field={field('note')} label="What was measured, and by whom" help="Kept with the points and in the log." maxLength={500} required />
              <Button>{saveLabel}</Button>
            </div>
          </>
        ) : <p className="text-small text-second">Changing it now: {whoEdits}</p>}
      </Form>
      {mayEdit && hydrated && photos.length > 0 ? <PanoramaTracer photos={photos} onRows={addRows} /> : null}
      {mayEdit && photos.length === 0 ? <><SectionHeading>Trace on a photo</SectionHeading><p className="text-second">There is no photo to trace on. Add one taken level from the place of the optic, with two things in it whose bearing is known.</p></> : null}
    </div>
  );
}

/** Columns with a list. */
const lists: Partial<Record<SkylineColumn, readonly (readonly [string, string])[]>> = {
  source: skylineSources.map((one) => [one, one] as const),
  leaf: [['', 'no tree'], ...leafStates.map((one) => [one, leafLabels[one]] as const)],
};

interface CellProps {
  readonly field: FieldLike;
  readonly label: string;
  readonly column: SkylineColumn;
  readonly value: string;
  readonly onChange: (value: string) => void;
}

function CellControl({ field, label, column, value, onChange }: CellProps) {
  const shared = { name: field.name, id: fieldIds(field).id, value, 'aria-label': label, 'aria-invalid': hasErrors(field) || undefined, 'aria-describedby': describedBy(field, false), className: 'field-box min-w-0' };
  const list = lists[column];
  if (!list) return <input {...shared} onChange={(event) => onChange(event.currentTarget.value)} autoComplete="off" {...(column === 'name' ? {} : { inputMode: 'text' as const })} />;
  return <select {...shared} onChange={(event) => onChange(event.currentTarget.value)}>{list.map(([one, words]) => <option key={one} value={one}>{words}</option>)}</select>;
}
