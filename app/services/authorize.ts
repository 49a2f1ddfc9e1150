import { DomainError } from '#app/domain/errors.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { CaseAction, CaseSubject } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';

/** First line of every service that changes a case: refuses with who may do it instead. */
export function authorize(actor: Actor, action: CaseAction, subject: CaseSubject): void {
  if (!canOnCase(actor, action, subject)) {
    throw new DomainError('forbidden', `This is not open to you now. ${whoCan(action)}`);
  }
}
