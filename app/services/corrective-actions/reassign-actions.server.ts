import type { Actor } from '#app/domain/roles.ts';
import { actionGivenMail, actionToVerifyLaterMail } from '#app/mail/templates/action-given.ts';
import { ownerAndVerifier } from './add-action.server.ts';
import { refuseFinished } from './re-date-actions.server.ts';
import type { ActionChoice } from './re-date-actions.server.ts';
import { actionWords, changeAction, mailFacts, notify, workOnActions } from './work-on-action.server.ts';

export interface Reassignment {
  readonly actor: Actor;
  readonly actions: readonly ActionChoice[];
  readonly ownerId: string;
  readonly verifierId: string;
  readonly reason: string;
}

/** Gives one action or several to another owner and verifier: all of them, or none. */
export function reassignActions({ actor, actions, ownerId, verifierId, reason }: Reassignment): Promise<number> {
  return workOnActions(actor, actions, 'action:write', async (tx, locked) => {
    const { action } = locked;
    refuseFinished(locked, 'given to somebody else');
    const { owner, verifier } = await ownerAndVerifier(tx, actor, { ownerId, verifierId });
    if (action.ownerId === ownerId && action.verifierId === verifierId) return;
    await changeAction(tx, locked, { ownerId, verifierId }, { event: 'action.reassigned', summary: `${actionWords(action)} given to ${owner.displayName}, to be verified by ${verifier.displayName}.`, reason });
    const facts = await mailFacts(tx, locked);
    if (action.ownerId !== ownerId) await notify(tx, locked, [owner], `action-given:${action.id}:${action.version + 1}`, actionGivenMail(facts));
    if (action.verifierId !== verifierId) await notify(tx, locked, [verifier], `action-to-verify:${action.id}:${action.version + 1}`, actionToVerifyLaterMail(facts));
  });
}
