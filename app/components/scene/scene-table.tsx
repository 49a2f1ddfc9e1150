import { FieldError } from '#app/components/forms/field.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { measureMethodLabels, measureMethods } from '#app/domain/scene.ts';
import type { SceneField } from '#app/domain/scene-fields.ts';
import { allSceneFields, fieldName } from '#app/domain/scene-fields.ts';
import type { SceneEdit } from './use-scene-edit.ts';

const shownKeys = ['optic.faceAzimuthDeg', 'optic.faceTiltDeg', 'opening.azimuthDeg', 'opening.distanceMm', 'opening.offsetMm', 'opening.widthMm', 'opening.heightMm', 'opening.sillMm', 'mark.bearingDeg', 'mark.elevationDeg', 'mark.distanceMm', 'mark.surfaceAzimuthDeg', 'mark.surfaceElevationDeg'];
const things = { optic: 'Optic', opening: 'Opening', mark: 'Mark', target: 'Target' } as const;
/** Rows that a handle moves. */
const movedBy: Readonly<Record<string, readonly string[]>> = {
  mark: ['mark.bearingDeg', 'mark.elevationDeg', 'mark.distanceMm'],
  'mark-height': ['mark.bearingDeg', 'mark.elevationDeg', 'mark.distanceMm'],
  faces: ['optic.faceAzimuthDeg'],
  opening: ['opening.azimuthDeg', 'opening.distanceMm'],
  sill: ['opening.sillMm'],
};

export const sceneTableNames = shownKeys.flatMap((name) => [name, `${name}.plusMinus`, `${name}.method`]);
const fields = shownKeys.flatMap((name) => allSceneFields.find((field) => fieldName(field) === name) ?? []);

/** The numbers that plan and section share: typing moves the drawing, dragging changes the numbers. */
export function SceneTable({ edit, field, mayEdit }: { readonly edit: SceneEdit; readonly field: (name: string) => FieldLike; readonly mayEdit: boolean }) {
  const moved = movedBy[edit.chosen ?? ''] ?? [];
  return (
    <DataTable caption="Numbers of the drawing, bearings from true north">
      <TableHead>
        <HeadCell className="max-tablet:hidden">Thing</HeadCell><HeadCell>Measure</HeadCell><HeadCell>Value</HeadCell><HeadCell>Unit</HeadCell><HeadCell>±</HeadCell><HeadCell>Method</HeadCell>
      </TableHead>
      <tbody>{fields.map((one) => <TableLine key={fieldName(one)} of={one} edit={edit} error={field(fieldName(one))} chosen={moved.includes(fieldName(one))} mayEdit={mayEdit} />)}</tbody>
    </DataTable>
  );
}

const methodWords = (method: string | undefined) => measureMethods.filter((known) => known === method).map((known) => measureMethodLabels[known]).join('');

function TableLine({ of, edit, error, chosen, mayEdit }: { readonly of: SceneField; readonly edit: SceneEdit; readonly error: FieldLike; readonly chosen: boolean; readonly mayEdit: boolean }) {
  const name = fieldName(of);
  const box = (part: '' | '.plusMinus', label: string) => (
    <input name={`${name}${part}`} id={part === '' ? `scene-${name}` : undefined} value={edit.values[`${name}${part}`] ?? ''} aria-label={`${of.label}, ${label}`} autoComplete="off" className="field-box !w-24 min-w-0 text-right" onFocus={edit.remember} onChange={(event) => edit.put({ [`${name}${part}`]: event.currentTarget.value, ...(of.bearing ? { [`${name}.north`]: 'true' } : {}) })} />
  );
  const text = (part: '' | '.plusMinus') => (mayEdit ? box(part, part === '' ? 'value' : 'plus or minus') : edit.values[`${name}${part}`]);
  if (!mayEdit && (edit.values[name] ?? '') === '') return null;
  return (
    <Row chosen={chosen} tight className="!align-middle">
      <Cell heading className="max-tablet:hidden">{things[of.part]}</Cell>
      <Cell className="max-tablet:min-w-28"><span className="font-semibold tablet:hidden">{things[of.part]}: </span>{of.label}<FieldError field={error} /></Cell>
      <Cell>{text('')}</Cell>
      <Cell className="whitespace-nowrap text-second">{of.bearing ? '° true' : of.unit}</Cell>
      <Cell>{text('.plusMinus')}</Cell>
      <Cell>
        {mayEdit ? <select name={`${name}.method`} value={edit.values[`${name}.method`] ?? ''} aria-label={`${of.label}, method`} className="field-box !w-56" onChange={(event) => edit.put({ [`${name}.method`]: event.currentTarget.value })}>
          <option value="">how?</option>
          {measureMethods.map((method) => <option key={method} value={method}>{measureMethodLabels[method]}</option>)}
        </select> : methodWords(edit.values[`${name}.method`])}
      </Cell>
    </Row>
  );
}
