import { actionLink, actionName, nextReturnLine } from './action-words.ts';
import type { ActionMail } from './action-words.ts';
import { mail } from '#app/mail/render.ts';

export const inDays = (days: number): string => (days === 0 ? 'today' : days === 1 ? 'tomorrow' : `in ${days} days`);

/** To the owner, before the day. */
export function actionDueMail(about: ActionMail & { readonly daysLeft: number }) {
  const heading = `${actionName(about)} is due ${inDays(about.daysLeft)}`;
  return { subject: heading, ...mail({ heading, lines: [`The day is ${about.dueWords}. If it cannot be met, ask the investigator or the site manager for another day: they move it with a reason.`, ...nextReturnLine(about)], link: actionLink(about) }) };
}

/** To the owner and the managers of the site, once the day has passed. */
export function actionLateMail(about: ActionMail) {
  const heading = `${actionName(about)} is late`;
  return { subject: heading, ...mail({ heading, lines: [`It was due ${about.dueWords}. Mark it done with proof, or agree a new day with the investigator or the site manager.`, ...nextReturnLine(about)], link: actionLink(about) }) };
}

/** To the owner, when a person asks after it from the list. */
export function actionReminderMail(about: ActionMail) {
  const heading = `A reminder of ${actionName(about).toLowerCase()}, due ${about.dueWords}`;
  return { subject: heading, ...mail({ heading, lines: ['Somebody who follows it asks how it stands. Mark it done with proof, or say on the case what holds it up.', ...nextReturnLine(about)], link: actionLink(about) }) };
}

/** To the owner and the managers of the site, before the sun is back on a mark whose fix is not verified. */
export function sunReturnsMail(about: ActionMail & { readonly daysLeft: number }) {
  const heading = `${actionName(about)}: the sun is back ${inDays(about.daysLeft)}, and the fix is not verified`;
  const lines = [...nextReturnLine(about), `The fix is due ${about.dueWords}. Until it is in place, keep the optic shaded or covered, and people and things that burn out of the way.`];
  return { subject: heading, ...mail({ heading, lines, link: actionLink(about) }) };
}
