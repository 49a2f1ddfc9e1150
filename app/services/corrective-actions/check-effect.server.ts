import type { Transaction } from '#db/client.server.ts';
import { listRoleHolders } from '#db/queries/case-people.server.ts';
import { listReturnDays } from '#db/queries/corrective-actions.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { returnStillToCome } from '#app/domain/action-form.ts';
import { actionSteps } from '#app/domain/corrective-action.ts';
import { DomainError } from '#app/domain/errors.ts';
import { formatIsoDay, localDay } from '#app/domain/local-time.ts';
import { actionNotEffectiveMail } from '#app/mail/templates/action-effect.ts';
import { takeProofs, writeProofs } from './complete-action.server.ts';
import { actionWords, changeAction, mailFacts, notify, refuseStep, workOnAction } from './work-on-action.server.ts';
import type { ActionTarget, LockedAction } from './work-on-action.server.ts';

export interface EffectCheck extends ActionTarget {
  readonly effective: boolean;
  readonly note: string;
  /** Why it can be told before the sun has been back; empty otherwise. */
  readonly reason: string;
  readonly files: readonly File[];
}

/**
 * Records whether a verified fix works. "Effective" before the first day of return needs a reason, since there was no
 * sun to test it; that a fix does not work may be said at any time.
 */
export async function checkEffect(target: EffectCheck): Promise<void> {
  const stored = await takeProofs(target, 'action:check-effect', target.files);
  await workOnAction(target, 'action:check-effect', async (tx, locked) => {
    const step = target.effective ? 'record-effective' : 'record-not-effective';
    refuseStep(step, locked.action);
    if (target.effective) await refuseTooEarly(tx, locked, target.reason);
    await writeProofs(tx, locked, stored);
    await changeAction(
      tx,
      locked,
      { state: actionSteps[step].to, effectNote: target.note, effectAt: locked.now, effectById: locked.actor.userId },
      { event: target.effective ? 'action.shown-effective' : 'action.not-effective', summary: `${actionWords(locked.action)} ${target.effective ? 'shown effective' : 'found not effective'}.`, reason: target.reason },
    );
    if (!target.effective) await tellOfFailure(tx, locked);
  });
}

async function refuseTooEarly(tx: Transaction, { action, caseRow, today }: LockedAction, reason: string): Promise<void> {
  if (action.verifiedAt === null || reason.trim() !== '') return;
  const days = (await listReturnDays(tx, [caseRow.id])).map((day) => day.onDay);
  const firstOn = returnStillToCome({ today, verifiedOn: localDay(action.verifiedAt, caseRow.zone), returnDays: days });
  if (firstOn === null) return;
  throw new DomainError('invalid-input', 'The sun has not been back since the fix was verified.', {
    fieldErrors: { reason: [`The first return is on ${formatIsoDay(firstOn)}. Check then, or say why it can be told now.`] },
  });
}

async function tellOfFailure(tx: Transaction, locked: LockedAction): Promise<void> {
  const { caseRow, action } = locked;
  const named = await listRecipients(tx, { organisationId: caseRow.organisationId, userIds: [action.ownerId, ...(caseRow.assignedToId ? [caseRow.assignedToId] : [])] });
  const managers = await listRoleHolders(tx, { organisationId: caseRow.organisationId, siteId: caseRow.siteId, roles: ['manager'] });
  const facts = await mailFacts(tx, locked);
  await notify(tx, locked, [...named, ...managers], `action-not-effective:${action.id}:${action.version}`, actionNotEffectiveMail({ ...facts, caseClosed: caseRow.state === 'closed' }));
}
