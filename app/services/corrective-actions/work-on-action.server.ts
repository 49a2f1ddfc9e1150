import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { listReturnDays, lockAction, updateAction } from '#db/queries/corrective-actions.server.ts';
import type { ActionChange, ActionRow } from '#db/queries/corrective-actions.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertMail } from '#db/queries/outbox.server.ts';
import { actionSubject } from '#app/domain/action-subject.ts';
import { actionStateLabels, actionSteps, stepAllowed } from '#app/domain/corrective-action.ts';
import type { ActionStep } from '#app/domain/corrective-action.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatDayClock, formatIsoDay, localDay } from '#app/domain/local-time.ts';
import type { CaseAction } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { ActionMail } from '#app/mail/templates/action-words.ts';
import { authorize } from '#app/services/authorize.ts';

/** Which action a person works on, and which version of it they were looking at. */
export interface ActionTarget {
  readonly actor: Actor;
  readonly actionId: string;
  readonly version: number;
}

export interface LockedAction {
  readonly actor: Actor;
  readonly caseRow: CaseRow;
  readonly action: ActionRow;
  /** Local day of the place, `YYYY-MM-DD`. */
  readonly today: string;
  readonly now: Date;
}

/**
 * The action and its case, locked, current, and open to the actor for `permission`.
 *
 * @throws DomainError `not-found`, `forbidden`, `conflict`.
 */
export async function lockForWork(tx: Transaction, target: ActionTarget, permission: CaseAction): Promise<LockedAction> {
  const found = await lockAction(tx, target.actor, target.actionId);
  if (!found) throw notFound('The action');
  authorize(target.actor, permission, actionSubject(found.caseRow, found.action, target.actor.userId));
  refuseStale(found.action, target.version);
  const now = new Date();
  return { actor: target.actor, ...found, now, today: localDay(now, found.caseRow.zone) };
}

/** Runs `work` on one action in a transaction of its own; see `lockForWork` for what is refused. */
export function workOnAction<Result>(target: ActionTarget, permission: CaseAction, work: (tx: Transaction, locked: LockedAction) => Promise<Result>): Promise<Result> {
  return inTransaction(async (tx) => work(tx, await lockForWork(tx, target, permission)));
}

/**
 * Runs `work` on several actions in one transaction: all of them change, or none. They are locked in the order of their
 * ids, so that two people who chose the same rows never wait for each other.
 */
export function workOnActions(actor: Actor, targets: readonly Omit<ActionTarget, 'actor'>[], permission: CaseAction, work: (tx: Transaction, locked: LockedAction) => Promise<void>): Promise<number> {
  return inTransaction(async (tx) => {
    const ordered = [...targets].sort((a, b) => a.actionId.localeCompare(b.actionId));
    for (const target of ordered) await work(tx, await lockForWork(tx, { actor, ...target }, permission));
    return ordered.length;
  });
}

function refuseStale(action: ActionRow, version: number): void {
  if (action.version === version) return;
  throw new DomainError('conflict', `Somebody changed action ${action.number} after you opened the page; it is now "${actionStateLabels[action.state].toLowerCase()}". What you typed is still below: open the page anew beside it, and decide again.`);
}

/** Refuses a step that does not lead from the state in which the action is. */
export function refuseStep(step: ActionStep, action: ActionRow): void {
  if (stepAllowed(step, action.state)) return;
  throw new DomainError('invalid-state', `"${actionSteps[step].label}" is not open while the action is "${actionStateLabels[action.state].toLowerCase()}".`);
}

export interface ActionEvent {
  /** Past tense: `action.done`. */
  readonly event: string;
  readonly summary: string;
  readonly reason?: string;
}

/** Writes the change and its line of the log. */
export async function changeAction(tx: Transaction, { actor, action, caseRow }: LockedAction, change: ActionChange, event: ActionEvent): Promise<void> {
  await updateAction(tx, action.id, change);
  const keys = Object.keys(change);
  const before = Object.fromEntries(Object.entries(action).filter(([key]) => keys.includes(key)));
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: caseRow.organisationId,
    caseId: caseRow.id,
    event: event.event,
    subject: 'corrective_actions',
    subjectId: action.id,
    summary: event.summary,
    reason: event.reason ?? '',
    before,
    after: { ...change },
  });
}

export const actionWords = (action: Pick<ActionRow, 'number' | 'title'>): string => `Action ${action.number}, "${action.title}"`;

/** What every mail about the action says. */
export async function mailFacts(tx: Transaction, { caseRow, action, now }: Pick<LockedAction, 'caseRow' | 'action' | 'now'>, dueOn = action.dueOn): Promise<ActionMail> {
  const next = (await listReturnDays(tx, [caseRow.id])).find((day) => day.bestAt > now);
  return { caseNumber: caseRow.number, actionNumber: action.number, dueWords: formatIsoDay(dueOn), nextReturnWords: next ? formatDayClock(next.bestAt, caseRow.zone) : null };
}

interface Message {
  readonly subject: string;
  readonly bodyText: string;
  readonly bodyHtml: string;
}

/** One message each, not to the person who acts. `occasion` makes it once per event and recipient. */
export async function notify(tx: Transaction, { actor, caseRow }: Pick<LockedAction, 'actor' | 'caseRow'>, people: readonly { readonly userId: string; readonly email: string }[], occasion: string, message: Message): Promise<void> {
  const told = new Set([actor.userId]);
  for (const person of people) {
    if (told.has(person.userId)) continue;
    told.add(person.userId);
    await insertMail(tx, { dedupeKey: `${occasion}:${person.userId}`, toAddress: person.email, caseId: caseRow.id, ...message });
  }
}
