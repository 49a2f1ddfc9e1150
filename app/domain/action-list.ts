import { daysFrom } from './action-form.ts';
import { countInWords } from './case-view.ts';
import type { ActionState } from './corrective-action.ts';
import { isOpenAction, isUnprovenAction } from './corrective-action.ts';
import type { Risk } from './incident.ts';
import { risks } from './incident.ts';

/** Facts by which the list of actions is ordered and divided. Days are local days of the place. */
export interface ListedAction {
  readonly state: ActionState;
  readonly dueOn: string;
  readonly risk: Risk;
  readonly ownerId: string;
  readonly verifierId: string;
  readonly effectCheckOn: string | null;
  readonly today: string;
  /** First day of return after today, if one is known. */
  readonly nextReturnOn: string | null;
}

export const actionGroups = ['before-fix', 'after-fix', 'no-return', 'in-place', 'finished'] as const;
export type ActionGroup = (typeof actionGroups)[number];
export const actionGroupLabels: Record<ActionGroup, string> = {
  'before-fix': 'Late, or lit again before the fix is due',
  'after-fix': 'Fix due before the sun returns',
  'no-return': 'No fixed return',
  'in-place': 'In place, effect not shown yet',
  finished: 'Finished',
};

const isBeingDone = (action: ListedAction) => action.state === 'open' || action.state === 'in-progress';

export const isLate = (action: ListedAction): boolean => isBeingDone(action) && action.dueOn < action.today;
export const isLitBeforeFix = (action: ListedAction): boolean => isBeingDone(action) && action.nextReturnOn !== null && action.nextReturnOn <= action.dueOn;
export const isUnfinished = (action: Pick<ListedAction, 'state'>): boolean => action.state !== 'effective' && action.state !== 'withdrawn';
/** The sun has been back since it was verified, or comes back today: somebody can look. */
export const isCheckDue = (action: ListedAction): boolean => isUnprovenAction(action.state) && action.effectCheckOn !== null && action.effectCheckOn <= action.today;

export function groupOf(action: ListedAction): ActionGroup {
  if (!isUnfinished(action)) return 'finished';
  if (action.state === 'not-effective' || isLate(action) || isLitBeforeFix(action)) return 'before-fix';
  if (!isBeingDone(action)) return 'in-place';
  return action.nextReturnOn === null ? 'no-return' : 'after-fix';
}

export const actionViews = ['open', 'mine', 'late', 'to-verify', 'check-due', 'all'] as const;
export type ActionView = (typeof actionViews)[number];
export const actionViewLabels: Record<ActionView, string> = {
  open: 'Open',
  mine: 'Mine',
  late: 'Late',
  'to-verify': 'To verify',
  'check-due': 'Check due',
  all: 'All',
};

export function inView(action: ListedAction, view: ActionView, userId: string): boolean {
  switch (view) {
    case 'open':
      return isUnfinished(action);
    case 'mine':
      return isUnfinished(action) && (action.ownerId === userId || action.verifierId === userId);
    case 'late':
      return isLate(action);
    case 'to-verify':
      return action.state === 'done';
    case 'check-due':
      return isCheckDue(action);
    case 'all':
      return true;
  }
}

/** Soonest return first, then soonest due, then the higher risk. */
export function compareActions(a: ListedAction, b: ListedAction): number {
  const byReturn = (a.nextReturnOn ?? '9999').localeCompare(b.nextReturnOn ?? '9999');
  if (byReturn !== 0) return byReturn;
  const byDue = a.dueOn.localeCompare(b.dueOn);
  return byDue !== 0 ? byDue : risks.indexOf(b.risk) - risks.indexOf(a.risk);
}

/** The finding of the page: what comes back before it is mended, and what is late. */
export function actionsHeading(actions: readonly ListedAction[]): string {
  const open = actions.filter((action) => isOpenAction(action.state));
  const lit = open.filter(isLitBeforeFix).length;
  const late = open.filter(isLate).length;
  const failed = actions.filter((action) => action.state === 'not-effective').length;
  const parts = [
    ...(lit > 0 ? [`${countInWords(lit)} ${lit === 1 ? 'fix is' : 'fixes are'} due after the sun is back`] : []),
    ...(late > 0 ? [`${countInWords(late)} ${late === 1 ? 'is' : 'are'} late`] : []),
    ...(failed > 0 ? [`${countInWords(failed)} did not work`] : []),
  ];
  if (parts.length === 0) return open.length === 0 ? 'No fix is waiting to be made' : 'Every fix is due before the sun is back';
  return parts.map((part, index) => (index === 0 ? part : part.charAt(0).toLowerCase() + part.slice(1))).join(', ');
}

/** What a new due day means for the sun, as one sentence. */
export function dueDayMeaning(dueOn: string, today: string, nextReturnOn: string | null): { readonly sunFirst: boolean; readonly days: number } | null {
  if (nextReturnOn === null) return null;
  const sunFirst = nextReturnOn <= dueOn && nextReturnOn >= today;
  return { sunFirst, days: sunFirst ? daysFrom(nextReturnOn, dueOn) : daysFrom(dueOn, nextReturnOn) };
}
