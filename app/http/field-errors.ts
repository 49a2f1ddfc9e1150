import type { z } from 'zod';

/** Sentences of a failed parse, by field name; paths are joined with dots. */
export function fieldErrorsOf(error: z.ZodError): Record<string, string[]> {
  const byField: Record<string, string[]> = {};
  for (const issue of error.issues) (byField[issue.path.join('.')] ??= []).push(issue.message);
  return byField;
}
