import type { FieldLike } from '#app/components/forms/field-like.ts';
import type { RepeatedHours } from '#app/domain/report-fields.ts';

/** What came back when a report had to be mended. */
export interface ReportFormState {
  readonly typed: Readonly<Record<string, string>>;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;
  readonly repeated: RepeatedHours;
  /** Days of an onset window that is asked about. */
  readonly longWindowDays: number | null;
}

/** A field by name, with what was typed and what is wrong with it. */
export type ReportField = (name: string, fallback?: string) => FieldLike;

export function reportFields(state: ReportFormState): ReportField {
  return (name, fallback = '') => ({ name, id: name, errors: state.fieldErrors[name], defaultValue: state.typed[name] ?? fallback });
}
