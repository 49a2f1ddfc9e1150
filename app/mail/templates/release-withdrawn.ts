import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** To the readers of a release that went out and is closed before its day. The reason stays in the house. */
export function releaseWithdrawnMail({ caseNumber, releaseNumber }: { readonly caseNumber: number; readonly releaseNumber: number }) {
  const heading = `Case ${caseNumber}: release ${releaseNumber} was withdrawn`;
  const lines = ['It can no longer be opened. Do not use copies of it. Newer releases, where there are any, stand in the list.'];
  return { subject: heading, ...mail({ heading, lines, link: { href: `${env.PUBLIC_URL}/case-files`, words: 'See the releases open to you' } }) };
}
