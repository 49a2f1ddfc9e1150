import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** To the readers of the recipient. What the case is about stays behind the link. */
export function releaseMadeMail({ caseNumber, releaseNumber, releaseId, endsWords }: { readonly caseNumber: number; readonly releaseNumber: number; readonly releaseId: string; readonly endsWords: string }) {
  const heading = `Case ${caseNumber}: release ${releaseNumber} is open to you`;
  const lines = [`It can be read until ${endsWords}. Each opening is logged.`, 'Names, contacts and the exact place are removed from the bytes; the page says how much was withheld, by class.'];
  return { subject: heading, ...mail({ heading, lines, link: { href: `${env.PUBLIC_URL}/case-files/${releaseId}`, words: `Read release ${releaseNumber}` } }) };
}
