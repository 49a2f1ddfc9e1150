import { caseFactsForm } from '#app/domain/case-facts.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { saveFacts } from './save-facts.server.ts';

/**
 * Saves the facts that a posted form holds.
 *
 * @throws DomainError `invalid-input` with a sentence per field, and as `saveFacts`.
 */
export async function saveFactsByForm(request: { actor: Actor; caseNumber: number; typed: Readonly<Record<string, string>> }): Promise<void> {
  const parsed = caseFactsForm.safeParse(request.typed);
  if (!parsed.success) {
    const fieldErrors: Record<string, string[]> = {};
    for (const issue of parsed.error.issues) (fieldErrors[String(issue.path[0])] ??= []).push(issue.message);
    throw new DomainError('invalid-input', 'Some facts cannot be saved as they stand.', { fieldErrors });
  }
  await saveFacts({ actor: request.actor, caseNumber: request.caseNumber, version: Number(request.typed['version']), form: parsed.data });
}
