import { db, inTransaction } from '#db/client.server.ts';
import { listRoleHolders } from '#db/queries/case-people.server.ts';
import type { Person } from '#db/queries/case-people.server.ts';
import { listActionsToRemind, listReturnDays } from '#db/queries/corrective-actions.server.ts';
import type { ActionRecord, ReturnDay } from '#db/queries/corrective-actions.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { listRecipients } from '#db/queries/recipients.server.ts';
import { daysFrom } from '#app/domain/action-form.ts';
import { returnSpans } from '#app/domain/action-view.ts';
import type { ActionState } from '#app/domain/corrective-action.ts';
import { formatDayClock, formatIsoDay, localDay } from '#app/domain/local-time.ts';
import { actionDueMail, actionLateMail, sunReturnsMail } from '#app/mail/templates/action-due.ts';
import { effectCheckDueMail } from '#app/mail/templates/action-effect.ts';
import type { ActionMail } from '#app/mail/templates/action-words.ts';

export type ReminderKind = 'due-7' | 'due-1' | 'late' | 'check-due' | 'sun-14' | 'sun-3';

/** A reminder and the day it is about; kind, day and person together are sent once. */
export interface Reminder {
  readonly kind: ReminderKind;
  readonly aboutOn: string;
}

export interface ReminderFacts {
  readonly state: ActionState;
  readonly dueOn: string;
  readonly effectCheckOn: string | null;
  /** Local days of the place. */
  readonly today: string;
  readonly givenOn: string;
  /** First day of the next stretch of days on which the sun is back. */
  readonly returnOn: string | null;
}

/**
 * Which reminders are due today. Ranges rather than single days, so that a day on which the worker stood still leaves
 * none out; the key of the message keeps it from being sent twice.
 */
export function remindersFor(facts: ReminderFacts): readonly Reminder[] {
  const due = dueReminder(facts);
  const sun = sunReminder(facts);
  return [...(due ? [due] : []), ...(sun ? [sun] : [])];
}

function dueReminder({ state, dueOn, effectCheckOn, today, givenOn }: ReminderFacts): Reminder | null {
  if (state === 'verified') return effectCheckOn !== null && effectCheckOn <= today ? { kind: 'check-due', aboutOn: effectCheckOn } : null;
  if (state !== 'open' && state !== 'in-progress') return null;
  const daysLeft = daysFrom(today, dueOn);
  if (daysLeft < 0) return { kind: 'late', aboutOn: dueOn };
  // Whoever was given the action today has just been told its day.
  if (givenOn === today || daysLeft > 7) return null;
  return { kind: daysLeft <= 1 ? 'due-1' : 'due-7', aboutOn: dueOn };
}

/** The sun comes back to a mark whose fix nobody has verified, or that was found not to work. */
function sunReminder({ state, today, returnOn }: ReminderFacts): Reminder | null {
  if (state === 'verified' || state === 'effective' || state === 'withdrawn' || returnOn === null) return null;
  const daysLeft = daysFrom(today, returnOn);
  if (daysLeft < 0 || daysLeft > 14) return null;
  return { kind: daysLeft <= 3 ? 'sun-3' : 'sun-14', aboutOn: returnOn };
}

/**
 * Puts the reminders of the day in the outbox: due in 7 days, due in 1, late, sun back in 14 days or 3 before the fix is
 * verified, and time to check the effect. Safe to run at any hour and any number of times: one message per action, kind,
 * day and person.
 *
 * @returns how many reminders were called for, sent now or before.
 */
export async function sendDueReminders(now: Date = new Date()): Promise<number> {
  const actions = await listActionsToRemind(db);
  const returns = await listReturnDays(db, [...new Set(actions.map((action) => action.caseId))]);
  let called = 0;
  for (const action of actions) {
    const today = localDay(now, action.zone);
    const own = returns.filter((day) => day.caseId === action.caseId);
    const returnOn = returnSpans(own.map((day) => day.onDay)).find((span) => span.firstOn >= today)?.firstOn ?? null;
    for (const reminder of remindersFor({ ...action, today, givenOn: localDay(action.createdAt, action.zone), returnOn })) {
      called += 1;
      await remind(action, reminder, today, own.find((day) => day.bestAt > now) ?? null);
    }
  }
  return called;
}

async function remind(action: ActionRecord, { kind, aboutOn }: Reminder, today: string, next: ReturnDay | null): Promise<void> {
  const about: ActionMail = {
    caseNumber: action.caseNumber,
    actionNumber: action.number,
    dueWords: formatIsoDay(action.dueOn),
    nextReturnWords: next ? formatDayClock(next.bestAt, action.zone) : null,
  };
  const message = messageOf(kind, about, { dueIn: daysFrom(today, action.dueOn), aboutIn: daysFrom(today, aboutOn), aboutOn });
  await inTransaction(async (tx) => {
    for (const person of await recipientsOf(kind, action)) {
      await insertMail(tx, { dedupeKey: `action-${kind}:${action.id}:${aboutOn}:${person.userId}`, toAddress: person.email, caseId: action.caseId, ...message });
    }
  });
}

function messageOf(kind: ReminderKind, about: ActionMail, days: { readonly dueIn: number; readonly aboutIn: number; readonly aboutOn: string }) {
  switch (kind) {
    case 'late':
      return actionLateMail(about);
    case 'check-due':
      return effectCheckDueMail({ ...about, checkWords: formatIsoDay(days.aboutOn) });
    case 'sun-14':
    case 'sun-3':
      return sunReturnsMail({ ...about, daysLeft: days.aboutIn });
    default:
      return actionDueMail({ ...about, daysLeft: days.dueIn });
  }
}

/** The owner; the managers of the site as well once it is late or the sun is near; the verifier for the effect. */
async function recipientsOf(kind: ReminderKind, action: ActionRecord): Promise<Person[]> {
  const { organisationId, siteId } = action;
  const named = await listRecipients(db, { organisationId, userIds: [kind === 'check-due' ? action.verifierId : action.ownerId] });
  const toManagers = kind === 'late' || kind === 'sun-14' || kind === 'sun-3';
  const managers = toManagers ? await listRoleHolders(db, { organisationId, siteId, roles: ['manager'] }) : [];
  return [...named, ...managers.filter((manager) => !named.some((person) => person.userId === manager.userId))];
}
