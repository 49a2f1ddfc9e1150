import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** To the author. What the comments say stays behind the link. */
export function findingSentBackMail(about: { readonly caseNumber: number; readonly version: number; readonly openComments: number }) {
  const heading = `Case ${about.caseNumber}: your finding came back with ${about.openComments === 1 ? 'one comment' : `${about.openComments} comments`}`;
  const lines = [
    `Version ${about.version} was read in technical review and sent back. Your words are kept, and version ${about.version + 1} stands ready as a copy to work on.`,
    'Each comment names a field. Settle it when you have dealt with it.',
  ];
  return { subject: heading, ...mail({ heading, lines, link: { href: `${env.PUBLIC_URL}/cases/${about.caseNumber}/findings`, words: 'Read the comments' } }) };
}
