import type { FieldLike } from '#app/components/forms/field-like.ts';

/** What an action answers when a form has to be mended, as far as the fields need it. */
export interface FormAnswer {
  readonly intent: string;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[] | undefined>>;
  readonly typed: Readonly<Record<string, string>>;
}

export interface FieldOptions {
  /** Keeps ids apart where one page holds the same form several times. */
  readonly prefix?: string;
  readonly required?: boolean;
}

/** Fields of one form: what was typed before a failed save wins over the stored value. */
export function problemFields(answer: FormAnswer | null | undefined, stored: Readonly<Record<string, string | undefined>> = {}, prefix = '') {
  return (name: string, options: FieldOptions = {}): FieldLike => ({
    name,
    id: `${options.prefix ?? prefix}${name}`,
    errors: answer?.fieldErrors[name],
    initialValue: answer?.typed[name] ?? stored[name],
    required: options.required,
  });
}

/** The answer, if it belongs to this form; several forms of a page share one action. */
export function answerTo<Answer extends FormAnswer>(answer: Answer | undefined, intent: string, about?: { readonly name: string; readonly value: string }): Answer | null {
  if (!answer || answer.intent !== intent) return null;
  return about && answer.typed[about.name] !== about.value ? null : answer;
}
