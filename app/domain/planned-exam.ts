import { examObstacles } from './evidence.ts';
import { objections, partyList, partyRoleLabels, standingAnswer } from './evidence-notice.ts';
import type { NoticeFacts, PartyRole } from './evidence-notice.ts';
import { daysBetween, formatDay } from './local-time.ts';

/** Examinations that may alter an item, while they are planned: what each still lacks, and when it may be recorded as made. */

export const planOutcomes = ['made', 'cancelled'] as const;
export type PlanOutcome = (typeof planOutcomes)[number];

export interface PlanFacts {
  readonly id: string;
  readonly method: string;
  readonly performedBy: string;
  readonly plannedAt: Date;
  /** Days from the last notice to the examination, as the planner set them for this one. [days, 0 to 365] */
  readonly waitingDays: number;
  /** Parties who are told beforehand. */
  readonly tellRoles: readonly PartyRole[];
  readonly protocolAttachmentId: string | null;
  /** Null while it stands. */
  readonly outcome: PlanOutcome | null;
  readonly cancelReason: string;
  /** Raised at each change, so that two people do not overwrite one another. */
  readonly revision: number;
}

export interface PlanNeed {
  readonly key: string;
  readonly done: boolean;
  readonly words: string;
  readonly note: string;
}

interface Clock {
  readonly now: Date;
  /** IANA zone of the place; days are counted on its calendar. */
  readonly zone: string;
}

/** Notices that bear on an examination: those about it, and those about the item as a whole. */
export const noticesFor = (planId: string, notices: readonly NoticeFacts[]): NoticeFacts[] => notices.filter((notice) => notice.planId === null || notice.planId === planId);

/** First notice to a party about this examination; null when there is none before `before`. */
function firstNotice(planId: string, role: PartyRole, notices: readonly NoticeFacts[], before?: Date): NoticeFacts | null {
  const sent = notices.filter((notice) => notice.planId === planId && notice.partyRole === role && (!before || notice.sentAt.getTime() < before.getTime()));
  return sent.reduce<NoticeFacts | null>((first, one) => (first === null || one.sentAt.getTime() < first.sentAt.getTime() ? one : first), null);
}

const latest = (instants: readonly Date[]): Date | null => (instants.length === 0 ? null : new Date(Math.max(...instants.map((instant) => instant.getTime()))));

/** When the last of the named parties had been told; null while one has not. */
function allToldAt({ id, tellRoles }: PlanFacts, notices: readonly NoticeFacts[]): Date | null {
  const first = tellRoles.map((role) => firstNotice(id, role, notices));
  return first.every((notice) => notice !== null) ? latest(first.map((notice) => notice.sentAt)) : null;
}

const days = (count: number): string => `${count} ${count === 1 ? 'day' : 'days'}`;

function noticeNeed(plan: PlanFacts, role: PartyRole, notices: readonly NoticeFacts[], { now, zone }: Clock): PlanNeed {
  const notice = firstNotice(plan.id, role, notices);
  const answer = notice && standingAnswer(notice, now);
  const answered = answer ? { agrees: 'agrees', 'asks-to-attend': 'asks to be present', objects: 'objects' }[answer.answer] : 'no answer yet';
  return { key: `notice-${role}`, done: notice !== null, words: `Notice to ${partyRoleLabels[role].toLowerCase()}`, note: notice ? `sent ${formatDay(notice.sentAt, zone)}, ${answered}` : 'not sent' };
}

function waitingNeed(plan: PlanFacts, notices: readonly NoticeFacts[], { now, zone }: Clock): PlanNeed {
  const need = (done: boolean, note: string): PlanNeed => ({ key: 'waiting', done, words: 'Waiting time over', note });
  const told = allToldAt(plan, notices);
  const set = plan.waitingDays === 0 ? 'none was set' : `${days(plan.waitingDays)} from the last notice`;
  if (!told) return need(false, `${set}; not everybody has been told`);
  if (plan.waitingDays === 0) return need(true, set);
  const room = daysBetween(told, plan.plannedAt, zone);
  if (room < plan.waitingDays) return need(false, `${set}, but it is planned ${days(Math.max(0, room))} after it: put it later`);
  const left = plan.waitingDays - daysBetween(told, now, zone);
  return left > 0 ? need(false, `${set}, ${days(left)} left`) : need(true, set);
}

/** What stands between a plan and the examination, in the order in which it is brought about. */
export function planNeeds(plan: PlanFacts, notices: readonly NoticeFacts[], clock: Clock): PlanNeed[] {
  const against = objections(noticesFor(plan.id, notices), clock.now).map((notice) => notice.partyRole);
  return [
    { key: 'protocol', done: plan.protocolAttachmentId !== null, words: 'Protocol', note: plan.protocolAttachmentId ? 'a document of the case' : 'not chosen' },
    ...plan.tellRoles.map((role) => noticeNeed(plan, role, notices, clock)),
    ...(against.length > 0 ? [{ key: 'objection', done: false, words: 'No objection', note: `${partyList(against)}: objects` }] : []),
    waitingNeed(plan, notices, clock),
  ];
}

/** Why a day cannot be planned for, by field. */
export function planObstacles(plannedAt: Date, now: Date): Record<string, string[]> {
  return plannedAt.getTime() <= now.getTime() ? { plannedAt: ['This day has passed. Plan what is still to come; an examination that was made is recorded instead.'] } : {};
}

/** Who had been told before that moment, and when the last of them had been; what the examination then carries as its notice. */
export function toldBefore(plan: Pick<PlanFacts, 'id'>, notices: readonly NoticeFacts[], performedAt: Date): { readonly noticeTo: string; readonly noticeAt: Date | null } {
  const roles = [...new Set(notices.filter((notice) => notice.planId === plan.id).map((notice) => notice.partyRole))];
  const first = roles.flatMap((role) => firstNotice(plan.id, role, notices, performedAt) ?? []);
  return { noticeTo: partyList(first.map((notice) => notice.partyRole)), noticeAt: latest(first.map((notice) => notice.sentAt)) };
}

/** What spoke against going ahead at that moment, one clause each; empty when nothing did. */
export function reasonsToWait(plan: PlanFacts, notices: readonly NoticeFacts[], performedAt: Date, zone: string): string[] {
  const untold = plan.tellRoles.filter((role) => !firstNotice(plan.id, role, notices, performedAt));
  const told = allToldAt(plan, notices);
  const waited = told && untold.length === 0 ? daysBetween(told, performedAt, zone) : null;
  return [
    ...objectionWords(noticesFor(plan.id, notices), performedAt),
    ...(untold.length > 0 ? [`not told before it: ${partyList(untold)}`] : []),
    ...(waited !== null && waited < plan.waitingDays ? [`${waited} of ${days(plan.waitingDays)} of waiting had passed`] : []),
  ];
}

/** `objects: maker`, when anybody objected at that moment. */
export function objectionWords(notices: readonly NoticeFacts[], at: Date): string[] {
  const against = objections(notices, at);
  return against.length > 0 ? [`objects: ${partyList(against.map((notice) => notice.partyRole))}`] : [];
}

/** The sentence that asks why an examination went ahead; empty when nothing spoke against it or the reason is given. */
export function goAheadObstacles(against: readonly string[], reason: string): Record<string, string[]> {
  if (against.length === 0 || reason.trim() !== '') return {};
  return { wentAheadReason: [`Against it when it was made (${against.join('; ')}). Put the notice log right first, or write why it went ahead.`] };
}

export interface MadeFacts {
  readonly performedAt: Date;
  readonly protocolAttachmentId: string | null;
  readonly wentAheadReason: string;
}

/** What a planned examination still lacks before it may be recorded as made, by field. */
export function madeObstacles(plan: PlanFacts, notices: readonly NoticeFacts[], made: MadeFacts, { collectedAt, now, zone }: Clock & { readonly collectedAt: Date }): Record<string, string[]> {
  const { performedAt, protocolAttachmentId, wentAheadReason } = made;
  const told = toldBefore(plan, notices, performedAt);
  const problems = examObstacles({ kind: 'may-alter', performedAt, ...told, protocolAttachmentId }, collectedAt, now);
  // Notices stand in the log, not in this form: what they lack is said beside the day that they come before.
  delete problems['noticeTo'];
  delete problems['noticeAt'];
  if (told.noticeAt === null) return { ...problems, performedAt: [...(problems['performedAt'] ?? []), 'No notice about it was sent before this. An examination that may alter the item needs notice: record it in the notice log first.'] };
  return { ...problems, ...goAheadObstacles(reasonsToWait(plan, notices, performedAt, zone), wentAheadReason) };
}
