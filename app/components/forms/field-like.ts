/**
 * The parts of a form field that these controls read. Field metadata of the form library fits it, and so does a plain
 * object `{ name: 'optic' }`.
 */
export interface FieldLike {
  readonly name: string;
  readonly id?: string | undefined;
  readonly errors?: readonly string[] | undefined;
  readonly initialValue?: unknown;
  readonly defaultValue?: unknown;
  readonly required?: boolean | undefined;
}

export interface FieldIds {
  readonly id: string;
  readonly helpId: string;
  readonly errorId: string;
}

export function fieldIds(field: FieldLike): FieldIds {
  const id = field.id ?? field.name.replace(/[^A-Za-z0-9_-]+/g, '-');
  return { id, helpId: `${id}-help`, errorId: `${id}-error` };
}

/** The value to start with: what was typed before a failed save wins over the stored one. */
export function fieldText(field: FieldLike): string {
  const value = field.initialValue ?? field.defaultValue;
  if (typeof value === 'string') return value;
  if (typeof value === 'number' || typeof value === 'bigint') return String(value);
  return '';
}

/** The chosen values of a choice field, one or several. */
export function fieldChoices(field: FieldLike): readonly string[] {
  const value = field.initialValue ?? field.defaultValue;
  if (Array.isArray(value)) return value.filter((one): one is string => typeof one === 'string');
  const text = fieldText(field);
  return text === '' ? [] : [text];
}

export function hasErrors(field: FieldLike): boolean {
  return (field.errors?.length ?? 0) > 0;
}

/** Ids of help and error, in reading order, for `aria-describedby`. */
export function describedBy(field: FieldLike, hasHelp: boolean): string | undefined {
  const { helpId, errorId } = fieldIds(field);
  const ids = [hasErrors(field) ? errorId : '', hasHelp ? helpId : ''].filter(Boolean);
  return ids.length > 0 ? ids.join(' ') : undefined;
}
