import { actionLink, actionName, nextReturnLine } from './action-words.ts';
import type { ActionMail } from './action-words.ts';
import { mail } from '#app/mail/render.ts';

/** To the new owner. */
export function actionGivenMail(about: ActionMail) {
  const heading = `${actionName(about)} is now yours, due ${about.dueWords}`;
  const lines = ['You were named as its owner. When it is done, say so on the case and add a photo or a document: somebody else checks it.', ...nextReturnLine(about)];
  return { subject: heading, ...mail({ heading, lines, link: actionLink(about) }) };
}

/** To the new verifier. */
export function actionToVerifyLaterMail(about: ActionMail) {
  const heading = `${actionName(about)}: you verify it once it is done`;
  return { subject: heading, ...mail({ heading, lines: [`It is due ${about.dueWords}. You hear from us when its owner marks it done.`], link: actionLink(about) }) };
}
