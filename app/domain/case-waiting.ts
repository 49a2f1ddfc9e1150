import type { CaseState } from './case-state.ts';
import type { ActionState } from './corrective-action.ts';
import { isOpenAction } from './corrective-action.ts';
import { triageCloseReasonLabels } from './incident.ts';
import type { triageCloseReasons } from './incident.ts';
import { formatDay, formatIsoDay } from './local-time.ts';

export interface WaitingAction {
  readonly title: string;
  readonly state: ActionState;
  readonly dueOn: string;
  readonly effectCheckOn: string | null;
}

/** What the sentence about the next step is made from. */
export interface WaitingFacts {
  readonly state: CaseState;
  readonly zone: string;
  /** Local day of the place, ISO. */
  readonly today: string;
  readonly opticKnown: boolean;
  readonly markBearingKnown: boolean;
  readonly attachedRun: boolean;
  readonly answerDueAt: Date | null;
  readonly openComments: number;
  /** The reviewer signed and said that no action is needed. */
  readonly noActionSaid: boolean;
  readonly draftExists: boolean;
  readonly duplicateOfNumber: number | null;
  readonly closeReason: (typeof triageCloseReasons)[number] | null;
  /** Null for readers who may not see actions. */
  readonly actions: readonly WaitingAction[] | null;
}

/** What a case waits for, in a few words for a row of the register. */
export function waitsFor(facts: WaitingFacts): string {
  switch (facts.state) {
    case 'reported':
      return missingWords(facts) || 'First look';
    case 'triage':
      return missingWords(facts) || 'A decision at triage';
    case 'returned':
      return facts.answerDueAt ? `The reporter's answer, due ${formatDay(facts.answerDueAt, facts.zone)}` : "The reporter's answer";
    case 'investigation':
      if (!facts.attachedRun) return missingWords(facts) || 'A reconstruction';
      return facts.draftExists ? 'The finding, in draft' : 'A finding';
    case 'findings':
      if (facts.noActionSaid) return 'The site manager: no action needed';
      return facts.openComments > 0 ? `Technical review, ${facts.openComments} open` : 'Technical review';
    case 'corrective-action':
      return actionWords(facts);
    case 'closed':
      return facts.closeReason ? triageCloseReasonLabels[facts.closeReason] : 'Nothing';
    case 'duplicate':
      return facts.duplicateOfNumber === null ? 'Account kept' : `Account kept in ${facts.duplicateOfNumber}`;
  }
}

function missingWords(facts: WaitingFacts): string {
  if (!facts.opticKnown && !facts.markBearingKnown) return 'No bearing, no optic';
  if (!facts.opticKnown) return 'No optic';
  return facts.markBearingKnown ? '' : 'No bearing';
}

function actionWords({ actions, today }: WaitingFacts): string {
  if (actions === null) return 'The fix';
  if (actions.length === 0) return 'An action';
  const failed = actions.find((action) => action.state === 'not-effective');
  const open = actions.filter((action) => isOpenAction(action.state)).sort((a, b) => a.dueOn.localeCompare(b.dueOn));
  const first = open[0];
  if (first) {
    const lateDays = daysFrom(first.dueOn, today);
    const due = lateDays > 0 ? `${lateDays} ${lateDays === 1 ? 'day' : 'days'} late` : `due ${formatIsoDay(first.dueOn)}`;
    return `${failed ? `${failed.title} not effective; ` : ''}${first.title}, ${due}`;
  }
  if (failed) return `${failed.title}: not effective`;
  const unproven = actions.find((action) => action.state === 'verified');
  if (unproven) return unproven.effectCheckOn ? `Effect check ${formatIsoDay(unproven.effectCheckOn)}` : 'Effect check';
  return 'Closing';
}

/** Whole days from one ISO day to a later one; negative when it is earlier. */
export function daysFrom(fromDay: string, toDay: string): number {
  return Math.round((Date.parse(`${toDay}T00:00:00Z`) - Date.parse(`${fromDay}T00:00:00Z`)) / 86_400_000);
}
