import { insertLogEntry } from '#db/queries/log.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { actionReminderMail } from '#app/mail/templates/action-due.ts';
import { refuseFinished } from './re-date-actions.server.ts';
import type { ActionChoice } from './re-date-actions.server.ts';
import { actionWords, mailFacts, notify, workOnActions } from './work-on-action.server.ts';

/** Writes to the owners of one action or of several; once per action and day, however often it is pressed. */
export function remindOwners({ actor, actions }: { readonly actor: Actor; readonly actions: readonly ActionChoice[] }): Promise<number> {
  return workOnActions(actor, actions, 'action:write', async (tx, locked) => {
    const { action, caseRow, today } = locked;
    refuseFinished(locked, 'reminded of');
    const owner = await listRecipients(tx, { organisationId: caseRow.organisationId, userIds: [action.ownerId] });
    await notify(tx, locked, owner, `action-reminder:${action.id}:${today}`, actionReminderMail(await mailFacts(tx, locked)));
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: caseRow.organisationId,
      caseId: caseRow.id,
      event: 'action.reminded',
      subject: 'corrective_actions',
      subjectId: action.id,
      summary: `${actionWords(action)}: owner reminded.`,
    });
  });
}
