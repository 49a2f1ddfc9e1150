import { data } from 'react-router';
import { DomainError } from '#app/domain/errors.ts';
import { statusFor } from './to-response.server.ts';

/** What an action returns when a form has to be mended: general sentences, and sentences beside fields. */
export interface FormProblem {
  readonly ok: false;
  readonly intent: string;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;
  /** What was typed, so that nothing has to be typed again. */
  readonly typed: Readonly<Record<string, string>>;
}

/** Text fields of a form, by name; files and repeated fields are left to the caller. */
export function typedValues(form: FormData): Record<string, string> {
  const typed: Record<string, string> = {};
  for (const [name, value] of form) if (typeof value === 'string' && !(name in typed) && !/password/iu.test(name)) typed[name] = value;
  return typed;
}

export function formProblem(intent: string, form: FormData, problem: { formErrors?: readonly string[]; fieldErrors?: Readonly<Record<string, readonly string[]>> }, status = 400) {
  const payload: FormProblem = { ok: false, intent, formErrors: problem.formErrors ?? [], fieldErrors: problem.fieldErrors ?? {}, typed: typedValues(form) };
  return data(payload, { status });
}

/** A refusal by the domain becomes sentences in the form; anything unexpected is thrown on. */
export function problemFromError(intent: string, form: FormData, error: unknown) {
  if (!(error instanceof DomainError) || error.code === 'not-found') throw error;
  return formProblem(intent, form, { formErrors: [error.message, ...error.needs], fieldErrors: error.fieldErrors }, statusFor(error));
}
