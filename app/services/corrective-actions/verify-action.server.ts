import { listReturnDays } from '#db/queries/corrective-actions.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { actionSteps, effectivenessCheckOn } from '#app/domain/corrective-action.ts';
import { DomainError } from '#app/domain/errors.ts';
import { formatIsoDay } from '#app/domain/local-time.ts';
import { actionSentBackMail } from '#app/mail/templates/action-done.ts';
import { actionWords, changeAction, mailFacts, notify, refuseStep, workOnAction } from './work-on-action.server.ts';
import type { ActionTarget, LockedAction } from './work-on-action.server.ts';

/**
 * Confirms that a fix is in place, by somebody who neither owns it nor marked it done, and puts the effectiveness check
 * on the first day of return.
 *
 * @param effectCheckOn day chosen by the person; null takes the first day of return, or none where none is known.
 */
export function verifyAction(target: ActionTarget & { readonly note: string; readonly effectCheckOn: string | null }): Promise<void> {
  return workOnAction(target, 'action:verify', async (tx, locked) => {
    refuseStep('verify', locked.action);
    refuseDoer(locked);
    const days = (await listReturnDays(tx, [locked.caseRow.id])).map((day) => day.onDay);
    const firstReturnOn = effectivenessCheckOn(locked.today, days);
    refuseEmptyCheck(target.effectCheckOn, firstReturnOn, locked.today);
    const effectCheckOn = target.effectCheckOn ?? firstReturnOn;
    await changeAction(
      tx,
      locked,
      { state: actionSteps.verify.to, verifiedAt: locked.now, verifiedById: locked.actor.userId, verificationNote: target.note, effectCheckOn },
      { event: 'action.verified', summary: `${actionWords(locked.action)} verified; ${effectCheckOn ? `effect to be checked on ${formatIsoDay(effectCheckOn)}` : 'no return of the sun is known to check it by'}.` },
    );
  });
}

function refuseDoer({ action, actor }: LockedAction): void {
  if (action.doneById === actor.userId) throw new DomainError('forbidden', 'You marked this action done yourself: somebody else verifies it.');
}

/** A check before the sun is back shows nothing. */
function refuseEmptyCheck(chosen: string | null, firstReturnOn: string | null, today: string): void {
  if (chosen === null) return;
  const refuse = (sentence: string) => new DomainError('invalid-input', 'The day of the check does not fit.', { fieldErrors: { effectCheckOn: [sentence] } });
  if (chosen < today) throw refuse(`${formatIsoDay(chosen)} has passed; choose a day to come.`);
  if (firstReturnOn !== null && chosen < firstReturnOn) throw refuse(`The sun is first back on ${formatIsoDay(firstReturnOn)}; look on that day or later.`);
}

/** Sends a fix back to its owner with what is still missing. */
export function sendActionBack(target: ActionTarget & { readonly note: string }): Promise<void> {
  return workOnAction(target, 'action:verify', async (tx, locked) => {
    refuseStep('send-back', locked.action);
    await changeAction(
      tx,
      locked,
      { state: actionSteps['send-back'].to, doneAt: null, doneById: null },
      { event: 'action.sent-back', summary: `${actionWords(locked.action)} sent back to its owner.`, reason: target.note },
    );
    const owner = await listRecipients(tx, { organisationId: locked.caseRow.organisationId, userIds: [locked.action.ownerId] });
    await notify(tx, locked, owner, `action-sent-back:${locked.action.id}:${locked.action.version}`, actionSentBackMail(await mailFacts(tx, locked)));
  });
}
