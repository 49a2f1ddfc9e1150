import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** Subjects and bodies carry the label of the item only: no names, no description. */
export interface OfferMail {
  /** `118-A` */
  readonly code: string;
  /** `/cases/118/evidence/A` */
  readonly path: string;
}

const itemLink = ({ code, path }: OfferMail) => ({ href: `${env.PUBLIC_URL}${path}`, words: `Open item ${code}` });

/** To the person who is to take the item over. */
export function custodyOfferedMail(about: OfferMail) {
  const heading = `Item ${about.code} is offered to you`;
  return { subject: heading, ...mail({ heading, lines: ['You were named as the one who takes this item of evidence over. Sign for it on its page when you have it in your hands, or decline with a reason. Until then whoever gives it still holds it.'], link: itemLink(about) }) };
}

/** To the person who offered it. */
export function offerDeclinedMail(about: OfferMail) {
  const heading = `Item ${about.code} was not taken over`;
  return { subject: heading, ...mail({ heading, lines: ['The person to whom you offered this item of evidence declined it. Whoever held it holds it still; the reason is on its page.'], link: itemLink(about) }) };
}
