import type { ReactNode } from 'react';
import { ChipGroup } from '#app/components/ui/chip-group.tsx';
import type { ChipOption } from '#app/components/ui/chip-group.tsx';
import { FieldError, FieldGroup } from './field.tsx';
import { describedBy, fieldChoices, fieldIds, fieldText, hasErrors } from './field-like.ts';
import type { FieldLike } from './field-like.ts';

/** North that a bearing was taken from; there is no silent default. */
export const northFrames: readonly ChipOption[] = [
  { value: 'true', label: 'true' },
  { value: 'magnetic', label: 'magnetic' },
  { value: 'grid', label: 'grid' },
];

export interface MeasuredFieldProps {
  readonly legend: ReactNode;
  readonly value: FieldLike;
  readonly uncertainty: FieldLike;
  /** One unit is written and sent along; several become a list. */
  readonly unit: FieldLike;
  readonly units: readonly { readonly value: string; readonly label: string }[];
  readonly method: FieldLike;
  readonly methods: readonly ChipOption[];
  /** For bearings: which north. */
  readonly frame?: FieldLike;
  readonly help?: ReactNode;
  readonly step?: ReactNode;
}

function SmallBox({ field, label, width, ...rest }: { readonly field: FieldLike; readonly label: string; readonly width: string; readonly inputMode?: 'decimal' }) {
  return (
    <div className={width}>
      <label htmlFor={fieldIds(field).id} className="block pb-1 text-small text-second">{label}</label>
      <input id={fieldIds(field).id} name={field.name} defaultValue={fieldText(field)} autoComplete="off" className="field-box" aria-invalid={hasErrors(field) || undefined} aria-describedby={describedBy(field, false)} {...rest} />
    </div>
  );
}

function UnitBox({ field, units }: { readonly field: FieldLike; readonly units: MeasuredFieldProps['units'] }) {
  const { id } = fieldIds(field);
  const only = units.length === 1 ? units[0] : undefined;
  if (only) {
    return (
      <div className="flex items-end pb-2.5 text-body">
        <input type="hidden" name={field.name} value={only.value} />
        {only.label}
      </div>
    );
  }
  return (
    <div className="w-24">
      <label htmlFor={id} className="block pb-1 text-small text-second">Unit</label>
      <select id={id} name={field.name} defaultValue={fieldText(field) || units[0]?.value} className="field-box">
        {units.map((unit) => <option key={unit.value} value={unit.value}>{unit.label}</option>)}
      </select>
    </div>
  );
}

/** Value, unit, ± and method as one unit of four; a bearing also says which north. */
export function MeasuredField({ legend, value, uncertainty, unit, units, method, methods, frame, help, step }: MeasuredFieldProps) {
  const group: FieldLike = { name: `${value.name}-group`, id: `${fieldIds(value).id}-group` };
  return (
    <FieldGroup field={group} legend={legend} help={help} step={step}>
      <div className="flex flex-wrap gap-2.5">
        <SmallBox field={value} label="Value" width="min-w-24 flex-[2_1_6rem] max-w-56" inputMode="decimal" />
        <UnitBox field={unit} units={units} />
        <SmallBox field={uncertainty} label="±" width="min-w-20 flex-[1_1_5rem] max-w-32" inputMode="decimal" />
      </div>
      <FieldError field={value} />
      <FieldError field={unit} />
      <FieldError field={uncertainty} />
      {frame ? <SubChoice field={frame} legend="Which north" options={northFrames} /> : null}
      <SubChoice field={method} legend="Method" options={methods} />
    </FieldGroup>
  );
}

function SubChoice({ field, legend, options }: { readonly field: FieldLike; readonly legend: string; readonly options: readonly ChipOption[] }) {
  return (
    <fieldset id={fieldIds(field).id} tabIndex={-1} className={`mt-2 ${hasErrors(field) ? 'border-l-5 border-ink pl-3' : ''}`}>
      <legend className="pb-1 text-small text-second">{legend}</legend>
      <ChipGroup name={field.name} idPrefix={fieldIds(field).id} options={options} chosen={fieldChoices(field)} invalid={hasErrors(field)} {...(hasErrors(field) ? { describedBy: fieldIds(field).errorId } : {})} />
      <FieldError field={field} />
    </fieldset>
  );
}
