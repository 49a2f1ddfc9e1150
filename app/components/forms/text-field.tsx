import type { InputHTMLAttributes, ReactNode, SelectHTMLAttributes, TextareaHTMLAttributes } from 'react';
import { Field } from './field.tsx';
import { describedBy, fieldIds, fieldText, hasErrors } from './field-like.ts';
import type { FieldLike } from './field-like.ts';

interface Common {
  readonly field: FieldLike;
  readonly label: ReactNode;
  readonly help?: ReactNode;
  readonly aside?: ReactNode;
}

function controlProps(field: FieldLike, help: ReactNode) {
  return {
    id: fieldIds(field).id,
    name: field.name,
    'aria-invalid': hasErrors(field) || undefined,
    'aria-describedby': describedBy(field, Boolean(help)),
    required: field.required ?? false,
  };
}

export interface TextInputProps extends Common, Omit<InputHTMLAttributes<HTMLInputElement>, 'id' | 'name'> {}

/** One line of text, number, date, e-mail or password; `type` as in the platform. */
export function TextInput({ field, label, help, aside, className = '', defaultValue, ...rest }: TextInputProps) {
  const start = rest.value === undefined ? { defaultValue: defaultValue ?? fieldText(field) } : {};
  return (
    <Field field={field} label={label} help={help} aside={aside}>
      <input className={`field-box ${className}`} {...controlProps(field, help)} {...start} {...rest} />
    </Field>
  );
}

export interface TextAreaProps extends Common, Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id' | 'name'> {
  /** Opinion and account are set in serif. */
  readonly serif?: boolean;
}

/** Several lines of text. */
export function TextArea({ field, label, help, aside, serif = false, rows = 4, className = '', defaultValue, ...rest }: TextAreaProps) {
  const start = rest.value === undefined ? { defaultValue: defaultValue ?? fieldText(field) } : {};
  return (
    <Field field={field} label={label} help={help} aside={aside}>
      <textarea rows={rows} className={`field-box py-2.5 ${serif ? 'font-serif !text-account' : ''} ${className}`} {...controlProps(field, help)} {...start} {...rest} />
    </Field>
  );
}

export interface SelectOption {
  readonly value: string;
  readonly label: string;
  readonly group?: string;
}
export interface SelectProps extends Common, Omit<SelectHTMLAttributes<HTMLSelectElement>, 'id' | 'name' | 'children'> {
  readonly options: readonly SelectOption[];
  /** First, empty line, such as "Choose a site". */
  readonly emptyLabel?: string;
}

/** A native list to choose from, grouped where options name a group. */
export function Select({ field, label, help, aside, options, emptyLabel, className = '', defaultValue, ...rest }: SelectProps) {
  const start = rest.value === undefined ? { defaultValue: defaultValue ?? fieldText(field) } : {};
  const groups = [...new Set(options.map((option) => option.group ?? ''))];
  const lines = (group: string) =>
    options.filter((option) => (option.group ?? '') === group).map((option) => <option key={option.value} value={option.value}>{option.label}</option>);
  return (
    <Field field={field} label={label} help={help} aside={aside}>
      <select className={`field-box ${className}`} {...controlProps(field, help)} {...start} {...rest}>
        {emptyLabel === undefined ? null : <option value="">{emptyLabel}</option>}
        {groups.map((group) => (group === '' ? lines('') : <optgroup key={group} label={group}>{lines(group)}</optgroup>))}
      </select>
    </Field>
  );
}

export interface TickBoxProps extends Common {
  readonly value?: string;
  readonly defaultChecked?: boolean;
  readonly disabled?: boolean;
}

/** One yes-or-no box with its words at the right. */
export function TickBox({ field, label, help, value = 'on', defaultChecked, disabled = false }: TickBoxProps) {
  const { id, helpId } = fieldIds(field);
  return (
    <div className="flex items-start gap-3">
      <span className="flex min-h-6 items-center">
        <input type="checkbox" className="tick-box" {...controlProps(field, help)} required={false} value={value} disabled={disabled} defaultChecked={defaultChecked ?? fieldText(field) === value} />
      </span>
      <span className="min-h-6 pt-0.5">
        <label htmlFor={id}>{label}</label>
        {help ? <span id={helpId} className="block text-axis text-second">{help}</span> : null}
        {hasErrors(field) ? <span id={fieldIds(field).errorId} className="block text-small font-semibold">{field.errors?.join(' ')}</span> : null}
      </span>
    </div>
  );
}
