import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { moveExtra, moveForm } from '#app/domain/move-form.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { MoveOutcome } from './move-case.server.ts';
import { moveCase } from './move-case.server.ts';

/**
 * Makes the move that a posted form asks for.
 *
 * @param typed Fields of the form by name.
 * @throws DomainError as `moveCase`, its sentences named by the fields of the form.
 */
export async function moveByForm(request: { actor: Actor; caseNumber: number; typed: Readonly<Record<string, string>> }): Promise<MoveOutcome> {
  const parsed = moveForm.safeParse(request.typed);
  if (!parsed.success) {
    const fieldErrors: Record<string, string[]> = {};
    for (const issue of parsed.error.issues) (fieldErrors[String(issue.path[0] ?? 'reason')] ??= []).push(issue.message);
    throw new DomainError('invalid-input', 'Some fields cannot be read.', { fieldErrors });
  }
  const { moveId, version, reason } = parsed.data;
  const found = await findCase(db, request.actor, request.caseNumber);
  if (!found) throw notFound('The case');
  try {
    return await moveCase({ actor: request.actor, caseNumber: request.caseNumber, moveId, version, reason, extra: moveExtra(parsed.data, found.row.zone) });
  } catch (error) {
    throw namedAsInForm(error);
  }
}

/** The form asks for a day, the move for an instant. */
function namedAsInForm(error: unknown): unknown {
  if (!(error instanceof DomainError) || !error.fieldErrors['answerDueAt']) return error;
  const { answerDueAt, ...rest } = error.fieldErrors;
  return new DomainError(error.code, error.message, { needs: error.needs, fieldErrors: { ...rest, answerDueOn: answerDueAt } });
}
