import { addDays, daysFrom } from './action-form.ts';
import { compareActions, isLate } from './action-list.ts';
import type { ListedAction } from './action-list.ts';
import { inDaysWords } from './case-view.ts';
import { actionStateLabels, actionSteps, controlLevelLabels, stepAllowed } from './corrective-action.ts';
import type { ActionState, ActionStep, ControlLevel } from './corrective-action.ts';
import { riskLabels } from './incident.ts';
import type { Risk } from './incident.ts';
import { formatClock, formatDay, formatDayClock, formatIsoDay, localDay } from './local-time.ts';
import { actionSubject } from './action-subject.ts';
import { canOnCase } from './permissions.ts';
import type { CaseAction } from './permissions.ts';
import type { CaseState } from './case-state.ts';
import type { Actor } from './roles.ts';

export interface ReturnSpan {
  readonly firstOn: string;
  readonly lastOn: string;
}

/** Days in a row as one span, as the ribbon draws them. */
export function returnSpans(days: readonly string[]): ReturnSpan[] {
  const spans: { firstOn: string; lastOn: string }[] = [];
  for (const day of [...days].sort()) {
    const last = spans.at(-1);
    if (last && addDays(last.lastOn, 1) >= day) last.lastOn = day;
    else spans.push({ firstOn: day, lastOn: day });
  }
  return spans;
}

export interface ActionSource {
  readonly id: string;
  readonly caseNumber: number;
  readonly caseState: CaseState;
  readonly organisationId: string;
  readonly siteId: string;
  readonly siteName: string;
  readonly zone: string;
  readonly interimControl: string | null;
  readonly number: number;
  readonly title: string;
  readonly why: string;
  readonly controlLevel: ControlLevel;
  readonly interim: boolean;
  readonly ownerId: string;
  readonly owner: string | null;
  readonly verifierId: string;
  readonly verifier: string | null;
  readonly dueOn: string;
  readonly risk: Risk;
  readonly cost: number | null;
  readonly costCurrency: string | null;
  readonly state: ActionState;
  readonly proof: string;
  readonly doneAt: Date | null;
  readonly doneById: string | null;
  readonly doneBy: string | null;
  readonly verifiedAt: Date | null;
  readonly verifiedBy: string | null;
  readonly verificationNote: string;
  readonly effectCheckOn: string | null;
  readonly effectNote: string;
  readonly effectAt: Date | null;
  readonly effectBy: string | null;
  readonly withdrawnReason: string | null;
  readonly version: number;
}

export interface ReturnMoment {
  readonly onDay: string;
  readonly bestAt: Date;
}

/** An action with what a list shows of it: words, the days of return, and its place in the order. */
export interface ActionLine extends ListedAction {
  readonly id: string;
  readonly number: number;
  readonly caseNumber: number;
  readonly title: string;
  readonly siteName: string;
  readonly level: string;
  readonly interim: boolean;
  readonly owner: string;
  readonly verifier: string;
  readonly untilThen: string;
  readonly dueWords: string;
  readonly dueNote: string;
  readonly stateWords: string;
  readonly returnWords: string;
  readonly returnNote: string;
  readonly spans: readonly ReturnSpan[];
  readonly version: number;
}

export function actionLine(source: ActionSource, returns: readonly ReturnMoment[], now: Date): ActionLine {
  const today = localDay(now, source.zone);
  const next = returns.find((moment) => moment.bestAt > now) ?? null;
  const place = { state: source.state, dueOn: source.dueOn, risk: source.risk, ownerId: source.ownerId, verifierId: source.verifierId, effectCheckOn: source.effectCheckOn, today, nextReturnOn: next?.onDay ?? null };
  return {
    ...place,
    id: source.id,
    number: source.number,
    caseNumber: source.caseNumber,
    title: source.title,
    siteName: source.siteName,
    level: controlLevelLabels[source.controlLevel].toLowerCase(),
    interim: source.interim,
    owner: source.owner ?? 'a person who has left',
    verifier: source.verifier ?? 'a person who has left',
    untilThen: source.interimControl ?? 'nothing recorded',
    dueWords: formatIsoDay(source.dueOn),
    dueNote: isLate(place) ? lateWords(daysFrom(source.dueOn, today)) : `${riskLabels[source.risk].toLowerCase()} risk`,
    stateWords: actionStateLabels[source.state],
    returnWords: next ? `${formatDay(next.bestAt, source.zone)}, ${formatClock(next.bestAt, source.zone)}` : returns.length > 0 ? 'no further return known' : 'no fixed return',
    returnNote: next ? inDaysWords(daysFrom(today, next.onDay)) : '',
    spans: returnSpans(returns.map((moment) => moment.onDay)),
    version: source.version,
  };
}

export const lateWords = (days: number): string => `${days} ${days === 1 ? 'day' : 'days'} late`;

export const inOrder = (lines: readonly ActionLine[]): ActionLine[] => [...lines].sort((a, b) => compareActions(a, b) || a.caseNumber - b.caseNumber || a.number - b.number);

/** What the reader may do to one action now. */
export interface ActionRights {
  readonly start: boolean;
  readonly markDone: boolean;
  readonly verify: boolean;
  readonly sendBack: boolean;
  readonly checkEffect: boolean;
  readonly withdraw: boolean;
  readonly change: boolean;
}

const permissionOf: Record<ActionStep, CaseAction> = {
  start: 'action:do',
  'mark-done': 'action:do',
  verify: 'action:verify',
  'send-back': 'action:verify',
  'record-effective': 'action:check-effect',
  'record-not-effective': 'action:check-effect',
  withdraw: 'action:write',
};

export function actionRights(actor: Actor, source: ActionSource): ActionRights {
  const subject = actionSubject({ organisationId: source.organisationId, siteId: source.siteId, state: source.caseState }, source, actor.userId);
  const may = (step: ActionStep) => stepAllowed(step, source.state) && canOnCase(actor, permissionOf[step], subject);
  return {
    start: may('start'),
    markDone: may('mark-done'),
    verify: may('verify') && source.doneById !== actor.userId,
    sendBack: may('send-back'),
    checkEffect: may('record-not-effective'),
    withdraw: may('withdraw'),
    change: (source.state === 'open' || source.state === 'in-progress') && canOnCase(actor, 'action:write', subject),
  };
}

/** What has been said and shown of an action, step by step. */
export function actionStory(source: ActionSource): { readonly term: string; readonly value: string; readonly note: string }[] {
  const at = (instant: Date | null) => (instant ? formatDayClock(instant, source.zone) : '');
  const lines = [
    { term: 'Done', value: source.doneAt ? source.proof : '', note: [source.doneBy ?? source.owner, at(source.doneAt)].filter(Boolean).join(', ') },
    { term: 'Verified', value: source.verifiedAt ? source.verificationNote : '', note: [source.verifiedBy, at(source.verifiedAt)].filter(Boolean).join(', ') },
    { term: 'Effect', value: source.effectAt ? source.effectNote : '', note: [source.effectBy, at(source.effectAt)].filter(Boolean).join(', ') },
    { term: 'Withdrawn', value: source.withdrawnReason ?? '', note: '' },
  ];
  return lines.filter((line) => line.value.trim() !== '');
}

export const stepLabel = (step: ActionStep): string => actionSteps[step].label;
