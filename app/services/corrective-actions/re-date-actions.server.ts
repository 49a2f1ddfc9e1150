import type { Transaction } from '#db/client.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { formatIsoDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { actionRedatedMail } from '#app/mail/templates/action-redated.ts';
import { refusePast } from './add-action.server.ts';
import { actionWords, changeAction, mailFacts, notify, workOnActions } from './work-on-action.server.ts';
import type { ActionTarget, LockedAction } from './work-on-action.server.ts';

export type ActionChoice = Omit<ActionTarget, 'actor'>;

/** Moves the due day of one action or of several: all of them, or none. The old days stay in the log. */
export function reDateActions({ actor, actions, dueOn, reason }: { readonly actor: Actor; readonly actions: readonly ActionChoice[]; readonly dueOn: string; readonly reason: string }): Promise<number> {
  return workOnActions(actor, actions, 'action:write', (tx, locked) => reDate(tx, locked, dueOn, reason));
}

async function reDate(tx: Transaction, locked: LockedAction, dueOn: string, reason: string): Promise<void> {
  const { action, caseRow, today } = locked;
  refusePast(dueOn, today);
  refuseFinished(locked, 'moved');
  if (action.dueOn === dueOn) return;
  await changeAction(tx, locked, { dueOn }, { event: 'action.re-dated', summary: `${actionWords(action)} re-dated from ${formatIsoDay(action.dueOn)} to ${formatIsoDay(dueOn)}.`, reason });
  const owner = await listRecipients(tx, { organisationId: caseRow.organisationId, userIds: [action.ownerId] });
  const facts = await mailFacts(tx, locked, dueOn);
  await notify(tx, locked, owner, `action-redated:${action.id}:${action.version}`, actionRedatedMail({ ...facts, beforeWords: formatIsoDay(action.dueOn) }));
}

/** Only what is still to be done has a day, an owner to remind, or an owner to change. */
export function refuseFinished({ action }: Pick<LockedAction, 'action'>, what: string): void {
  if (action.state === 'open' || action.state === 'in-progress') return;
  throw new DomainError('invalid-state', `${actionWords(action)} is done or finished and is not ${what}. Take it out of the choice.`);
}
