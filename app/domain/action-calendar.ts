import { addDays } from './action-form.ts';
import { actionStateLabels } from './corrective-action.ts';
import type { ActionState } from './corrective-action.ts';
import type { Calendar, CalendarDay, CalendarEvent, CalendarTask } from './icalendar.ts';

export interface CalendarAction {
  readonly id: string;
  readonly caseNumber: number;
  readonly number: number;
  readonly title: string;
  readonly state: ActionState;
  readonly dueOn: string;
  readonly effectCheckOn: string | null;
  readonly version: number;
  /** The minutes of return on the day of the check, if the check lies inside one. */
  readonly checkWindow: { readonly fromAt: Date; readonly toAt: Date } | null;
}

/** Due days as tasks, checks of the effect as events inside the return of the sun. Titles only: no names of people. */
export function actionCalendar(actions: readonly CalendarAction[], context: { readonly publicUrl: string; readonly stampUtc: Date }): Calendar {
  const host = new URL(context.publicUrl).hostname;
  const common = (action: CalendarAction, what: string) => ({
    uid: `${what}-${action.id}@${host}`,
    url: `${context.publicUrl}/cases/${action.caseNumber}/actions#action-${action.number}`,
    sequence: action.version,
  });
  const checked = actions.filter((action) => action.state === 'verified' && action.effectCheckOn !== null);
  return {
    name: 'Scorchline actions',
    stampUtc: context.stampUtc,
    tasks: actions.map((action) => task(action, common(action, 'action'))),
    events: checked.flatMap((action) => (action.checkWindow ? [timed(action, action.checkWindow, common(action, 'check'))] : [])),
    days: checked.flatMap((action) => (action.checkWindow || action.effectCheckOn === null ? [] : [wholeDay(action, action.effectCheckOn, common(action, 'check'))])),
  };
}

interface Common {
  readonly uid: string;
  readonly url: string;
  readonly sequence: number;
}

function statusOf(state: ActionState): CalendarTask['status'] {
  if (state === 'open' || state === 'not-effective') return 'NEEDS-ACTION';
  if (state === 'in-progress' || state === 'done') return 'IN-PROCESS';
  return state === 'withdrawn' ? 'CANCELLED' : 'COMPLETED';
}

const describe = (action: CalendarAction) => `Action ${action.number} of case ${action.caseNumber}. ${actionStateLabels[action.state]}.`;

function task(action: CalendarAction, common: Common): CalendarTask {
  return { ...common, summary: `${action.caseNumber}: ${action.title}`, description: describe(action), dueOn: action.dueOn, status: statusOf(action.state) };
}

const checkWords = (action: CalendarAction) => ({
  summary: `${action.caseNumber}: does it work? ${action.title}`,
  description: `${describe(action)} The sun is back on the mark: look from well outside the beam, never at the sun or along the beam.`,
});

function timed(action: CalendarAction, window: { readonly fromAt: Date; readonly toAt: Date }, common: Common): CalendarEvent {
  return { ...common, ...checkWords(action), startUtc: window.fromAt, endUtc: window.toAt };
}

function wholeDay(action: CalendarAction, onDay: string, common: Common): CalendarDay {
  return { ...common, ...checkWords(action), onDay, nextDay: addDays(onDay, 1) };
}
