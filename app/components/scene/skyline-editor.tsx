import { useState } from 'react';
import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { NumberTable } from '#app/components/charts/number-table.tsx';
import { FieldError } from '#app/components/forms/field.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
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

const emptyRow: SkylineRow = { azimuthDeg: '', elevationDeg: '', plusMinusDeg: '', source: '', leaf: '', name: '' };
const heads: Record<SkylineColumn, string> = { azimuthDeg: 'Bearing, ° true', elevationDeg: 'Elevation, °', plusMinusDeg: '±, °', source: 'Taken with', leaf: 'Tree', name: 'What it is' };

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
  const points = rows.flatMap((row) => (row.azimuthDeg !== '' && row.elevationDeg !== '' && Number.isFinite(Number(row.azimuthDeg)) && Number.isFinite(Number(row.elevationDeg)) ? [{ azimuthDeg: ((Number(row.azimuthDeg) % 360) + 360) % 360, elevationDeg: Number(row.elevationDeg), name: row.name, isTree: row.leaf !== '' }] : []));
  const wrong = rows.flatMap((_row, index) => skylineColumns.map((column) => ({ field: field(rowName(index, column)), label: `Row ${index + 1}, ${heads[column]}` })));
  const addRows = (more: readonly SkylineRow[]) => setRows([...rows.filter((row) => row.azimuthDeg !== '' || row.elevationDeg !== ''), ...more]);
  return (
    <div className="space-y-8">
      <SkylineFigure points={points} paths={paths} />
      <Form method="post" className="space-y-5" preventScrollReset>
        {refused ? <ErrorSummary errors={refused.formErrors} fields={[...wrong, { field: field('paste'), label: 'Pasted rows' }, { field: field('note'), label: 'What was measured' }]} /> : null}
        <input type="hidden" name="intent" value="save-skyline" />
        <input type="hidden" name={base.name} value={base.value} />
        {mayEdit ? null : <NumberTable caption="Points of the skyline" columns={skylineColumns.map((column) => ({ head: heads[column], numeric: column.endsWith('Deg') }))} rows={rows.map((row) => skylineColumns.map((column) => row[column]))} />}
        {mayEdit ? <DataTable caption="Points of the skyline">
          <TableHead>{skylineColumns.map((column) => <HeadCell key={column}>{heads[column]}</HeadCell>)}</TableHead>
          <tbody>{rows.map((row, index) => <Line key={index} index={index} row={row} field={field} onChange={(next) => setRows(rows.map((one, at) => (at === index ? next : one)))} />)}</tbody>
        </DataTable> : null}
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

interface LineProps {
  readonly index: number;
  readonly row: SkylineRow;
  readonly field: ReturnType<typeof formFields>['field'];
  readonly onChange: (row: SkylineRow) => void;
}

function Line({ index, row, field, onChange }: LineProps) {
  const label = (column: SkylineColumn) => `Row ${index + 1}, ${heads[column]}`;
  const box = (column: SkylineColumn, width: string) => (
    <Cell>
      <input name={rowName(index, column)} id={`skyline-${rowName(index, column)}`} value={row[column]} onChange={(event) => onChange({ ...row, [column]: event.currentTarget.value })} aria-label={label(column)} autoComplete="off" className={`field-box min-w-0 ${width}`} />
      <FieldError field={field(rowName(index, column))} />
    </Cell>
  );
  const pick = (column: 'source' | 'leaf', options: readonly (readonly [string, string])[]) => (
    <Cell>
      <select name={rowName(index, column)} value={row[column]} onChange={(event) => onChange({ ...row, [column]: event.currentTarget.value })} aria-label={label(column)} className="field-box !w-36">{options.map(([value, words]) => <option key={value} value={value}>{words}</option>)}</select>
      <FieldError field={field(rowName(index, column))} />
    </Cell>
  );
  return (
    <Row tight>
      {box('azimuthDeg', '!w-24')}
      {box('elevationDeg', '!w-24')}
      {box('plusMinusDeg', '!w-20')}
      {pick('source', [['', 'clinometer'], ...skylineSources.map((one) => [one, one] as const)])}
      {pick('leaf', [['', 'no tree'], ...leafStates.map((one) => [one, leafLabels[one]] as const)])}
      {box('name', '!min-w-40')}
    </Row>
  );
}
