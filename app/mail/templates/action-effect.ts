import { actionLink, actionName } from './action-words.ts';
import type { ActionMail } from './action-words.ts';
import { mail } from '#app/mail/render.ts';

/** To the verifier, on the day on which the sun is back. */
export function effectCheckDueMail(about: ActionMail & { readonly checkWords: string }) {
  const heading = `${actionName(about)}: time to see whether it works`;
  const lines = [
    `The sun comes back to the mark on ${about.checkWords}. Look from well outside the beam at where it falls, and record what you saw.`,
    'Do not look at the sun, at its reflection, or along the beam, even with sunglasses.',
  ];
  return { subject: heading, ...mail({ heading, lines, link: actionLink(about) }) };
}

/** To the owner, the investigator and the managers of the site. */
export function actionNotEffectiveMail(about: ActionMail & { readonly caseClosed: boolean }) {
  const heading = `${actionName(about)} did not work`;
  const lines = [
    'It was checked and recorded as not effective: take the mark as lit again. Shade or cover the optic now, and keep people and things that burn out of the way.',
    about.caseClosed ? 'The case is closed: a technical reviewer or the site manager reopens it.' : 'The case stays open until another fix is in place, or the case goes back to investigation.',
  ];
  return { subject: heading, ...mail({ heading, lines, link: actionLink(about) }) };
}
