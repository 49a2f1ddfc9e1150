import { db, inTransaction } from '#db/client.server.ts';
import { listRoleHolders } from '#db/queries/case-people.server.ts';
import type { Person } from '#db/queries/case-people.server.ts';
import { listActionsToRemind, listReturnDays } from '#db/queries/corrective-actions.server.ts';
import type { ActionRecord, ReturnDay } from '#db/queries/corrective-actions.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { daysFrom } from '#app/domain/action-form.ts';
import { formatDayClock, formatIsoDay, localDay } from '#app/domain/local-time.ts';
import { actionDueMail, actionLateMail } from '#app/mail/templates/action-due.ts';
import { effectCheckDueMail } from '#app/mail/templates/action-effect.ts';
import type { ActionMail } from '#app/mail/templates/action-words.ts';

export type ReminderKind = 'due-7' | 'due-1' | 'late' | 'check-due';

/**
 * Which reminder is due today, if any. Ranges rather than single days, so that a day on which the worker stood still
 * leaves none out; the key of the message keeps it from being sent twice.
 */
export function reminderFor(action: Pick<ActionRecord, 'state' | 'dueOn' | 'effectCheckOn'>, today: string, givenOn: string): ReminderKind | null {
  if (action.state === 'verified') return action.effectCheckOn !== null && action.effectCheckOn <= today ? 'check-due' : null;
  if (action.state !== 'open' && action.state !== 'in-progress') return null;
  const daysLeft = daysFrom(today, action.dueOn);
  if (daysLeft < 0) return 'late';
  // Whoever was given the action today has just been told its day.
  if (givenOn === today) return null;
  if (daysLeft <= 1) return 'due-1';
  return daysLeft <= 7 ? 'due-7' : null;
}

/**
 * Puts the reminders of the day in the outbox: due in 7 days, due in 1, late, and time to check the effect. Safe to run
 * at any hour and any number of times: one message per action, kind, day and person.
 *
 * @returns how many actions called for one, sent now or before.
 */
export async function sendDueReminders(now: Date = new Date()): Promise<number> {
  const actions = await listActionsToRemind(db);
  const returns = await listReturnDays(db, [...new Set(actions.map((action) => action.caseId))]);
  let reminded = 0;
  for (const action of actions) {
    const today = localDay(now, action.zone);
    const kind = reminderFor(action, today, localDay(action.createdAt, action.zone));
    if (kind === null) continue;
    reminded += 1;
    await remind(action, kind, today, returns.find((day) => day.caseId === action.caseId && day.bestAt > now) ?? null);
  }
  return reminded;
}

async function remind(action: ActionRecord, kind: ReminderKind, today: string, next: ReturnDay | null): Promise<void> {
  const about: ActionMail = {
    caseNumber: action.caseNumber,
    actionNumber: action.number,
    dueWords: formatIsoDay(action.dueOn),
    nextReturnWords: next ? formatDayClock(next.bestAt, action.zone) : null,
  };
  const message = messageOf(kind, about, action, today);
  const day = kind === 'check-due' ? action.effectCheckOn : action.dueOn;
  await inTransaction(async (tx) => {
    for (const person of await recipientsOf(kind, action)) {
      await insertMail(tx, { dedupeKey: `action-${kind}:${action.id}:${day}:${person.userId}`, toAddress: person.email, caseId: action.caseId, ...message });
    }
  });
}

function messageOf(kind: ReminderKind, about: ActionMail, action: ActionRecord, today: string) {
  if (kind === 'late') return actionLateMail(about);
  if (kind === 'check-due') return effectCheckDueMail({ ...about, checkWords: formatIsoDay(action.effectCheckOn ?? today) });
  return actionDueMail({ ...about, daysLeft: daysFrom(today, action.dueOn) });
}

/** The owner; once it is late the managers of the site as well; the verifier when the effect is to be looked at. */
async function recipientsOf(kind: ReminderKind, action: ActionRecord): Promise<Person[]> {
  const { organisationId, siteId } = action;
  const named = await listRecipients(db, { organisationId, userIds: [kind === 'check-due' ? action.verifierId : action.ownerId] });
  const managers = kind === 'late' ? await listRoleHolders(db, { organisationId, siteId, roles: ['manager'] }) : [];
  return [...named, ...managers.filter((manager) => !named.some((person) => person.userId === manager.userId))];
}
