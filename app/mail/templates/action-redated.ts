import { actionLink, actionName, nextReturnLine } from './action-words.ts';
import type { ActionMail } from './action-words.ts';
import { mail } from '#app/mail/render.ts';

/** To the owner, when somebody else moved the day. The reason stays behind the link. */
export function actionRedatedMail(about: ActionMail & { readonly beforeWords: string }) {
  const heading = `${actionName(about)} is now due ${about.dueWords}`;
  return { subject: heading, ...mail({ heading, lines: [`It was due ${about.beforeWords}. Who moved it, and why, is on the case.`, ...nextReturnLine(about)], link: actionLink(about) }) };
}
