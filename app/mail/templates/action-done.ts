import { actionLink, actionName } from './action-words.ts';
import type { ActionMail } from './action-words.ts';
import { mail } from '#app/mail/render.ts';

/** To the verifier. */
export function actionDoneMail(about: ActionMail) {
  const heading = `${actionName(about)} is marked done and waits for you`;
  return { subject: heading, ...mail({ heading, lines: ['Look at the proof, and at the place if you can. Then verify it, or send it back to its owner with a sentence.'], link: actionLink(about) }) };
}

/** To the owner, when the verifier was not satisfied. */
export function actionSentBackMail(about: ActionMail) {
  const heading = `${actionName(about)} came back to you`;
  return { subject: heading, ...mail({ heading, lines: ['The person who checks it asks for something more. What it is stands on the case.'], link: actionLink(about) }) };
}
