import { FieldError } from '#app/components/forms/field.tsx';
import { describedBy, fieldIds, fieldText, hasErrors } from '#app/components/forms/field-like.ts';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { measureMethodLabels, measureMethods } from '#app/domain/scene.ts';
import { northLabels, norths } from '#app/domain/scene-bearings.ts';
import type { SceneField } from '#app/domain/scene-fields.ts';
import { fieldName } from '#app/domain/scene-fields.ts';

export interface MeasuredRowsProps {
  readonly fields: readonly SceneField[];
  readonly field: (name: string) => FieldLike;
  /** Who and when of the stored number, by field name. */
  readonly stamps?: Readonly<Record<string, string>>;
}

const northOptions = [['', 'which north?'], ...norths.map((north) => [north, northLabels[north]] as const)] as const;
const methods = [['', 'how?'], ...measureMethods.map((method) => [method, measureMethodLabels[method]] as const)] as const;

/** Value, ±, unit, north and method of each measured thing, one row each. */
export function MeasuredRows({ fields, field, stamps = {} }: MeasuredRowsProps) {
  return <div>{fields.map((one) => <MeasuredRow key={fieldName(one)} of={one} field={field} stamp={stamps[fieldName(one)]} />)}</div>;
}

function MeasuredRow({ of, field, stamp }: { readonly of: SceneField; readonly field: MeasuredRowsProps['field']; readonly stamp: string | undefined }) {
  const name = fieldName(of);
  const value = field(name);
  const { id } = fieldIds(value);
  return (
    <fieldset id={`${id}-row`} className={`border-b border-hair py-2 ${hasErrors(value) ? 'border-l-5 border-l-ink pl-3' : ''}`}>
      <legend className="sr-only">{of.label}</legend>
      <div className="grid grid-cols-[minmax(0,1fr)_3.25rem_minmax(0,1fr)] items-center gap-x-2 gap-y-1 tablet:grid-cols-[minmax(0,1fr)_5.5rem_3rem_4.5rem_8.5rem_14rem]">
        <div className="max-tablet:col-span-3">
          <label htmlFor={id} className="font-medium">{of.label}</label>
          {of.help ? <span className="block text-axis text-second" id={fieldIds(value).helpId}>{of.help}</span> : null}
          {stamp ? <span className="block text-axis text-second">{stamp}</span> : null}
        </div>
        <Box label={`${of.label}, value`} field={value} describedBy={describedBy(value, Boolean(of.help))} invalid={hasErrors(value)} id={id} />
        <span className="whitespace-nowrap text-second">{of.unit} <span aria-hidden="true">±</span></span>
        <Box label={`${of.label}, plus or minus`} field={field(`${name}.plusMinus`)} />
        {of.bearing ? <Pick label={`${of.label}, which north`} field={field(`${name}.north`)} options={northOptions} /> : <span className="max-tablet:hidden" />}
        <Pick label={`${of.label}, method`} field={field(`${name}.method`)} options={methods} />
      </div>
      <FieldError field={value} />
    </fieldset>
  );
}

interface BoxProps {
  readonly label: string;
  readonly field: FieldLike;
  readonly id?: string;
  readonly describedBy?: string | undefined;
  readonly invalid?: boolean;
}

function Box({ label, field, id, describedBy: description, invalid = false }: BoxProps) {
  return <input id={id ?? fieldIds(field).id} name={field.name} defaultValue={fieldText(field)} aria-label={label} aria-describedby={description} aria-invalid={invalid || undefined} autoComplete="off" inputMode="text" className="field-box w-full min-w-0" />;
}

function Pick({ label, field, options }: { readonly label: string; readonly field: FieldLike; readonly options: readonly (readonly [string, string])[] }) {
  return (
    <select name={field.name} id={fieldIds(field).id} defaultValue={fieldText(field)} aria-label={label} className="field-box w-full min-w-0 max-tablet:last:col-span-3">
      {options.map(([value, words]) => <option key={value} value={value}>{words}</option>)}
    </select>
  );
}
