import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** To those who may approve it, but not to whoever prepared it. */
export function releasePreparedMail({ caseNumber, releaseNumber }: { readonly caseNumber: number; readonly releaseNumber: number }) {
  const heading = `Case ${caseNumber}: release ${releaseNumber} waits for a second person`;
  const lines = ['It was prepared and stays in the house until somebody else has read it as its reader will, and approved it.'];
  return { subject: heading, ...mail({ heading, lines, link: { href: `${env.PUBLIC_URL}/cases/${caseNumber}/releases/${releaseNumber}`, words: `Read release ${releaseNumber} as its reader will` } }) };
}
