import type { FieldLike } from '#app/components/forms/field-like.ts';

/** The parts of a refused form that a field needs; the payload of `formProblem` fits it. */
export interface RefusedForm {
  readonly intent: string;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;
  readonly typed: Readonly<Record<string, string>>;
}

/** Fields of one form: what was typed before a refusal wins over what is stored. */
export function formFields(intent: string, problem: RefusedForm | undefined, idPrefix = intent) {
  const refused = problem?.intent === intent ? problem : undefined;
  return {
    refused,
    field: (name: string, stored?: string | number | null): FieldLike => ({
      name,
      id: `${idPrefix}-${name}`,
      errors: refused?.fieldErrors[name],
      defaultValue: refused && name in refused.typed ? refused.typed[name] : stored === null || stored === undefined ? '' : String(stored),
    }),
  };
}
