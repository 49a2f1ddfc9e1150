import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** Invites a person to set a password. */
export function invitationMail(about: { organisation: string; invitedBy: string; token: string }) {
  const heading = `You are invited to the register of ${about.organisation}`;
  return {
    subject: heading,
    ...mail({
      heading,
      lines: [`${about.invitedBy} gives you access to the register of burns, melts and near misses from focused sunlight.`, 'The link works once and for seven days.'],
      link: { href: `${env.PUBLIC_URL}/invitation/${about.token}`, words: 'Choose a password' },
    }),
  };
}

export function passwordResetMail(about: { token: string }) {
  const heading = 'Choose a new password';
  return {
    subject: heading,
    ...mail({
      heading,
      lines: ['Somebody asked for a new password for this address. If it was not you, do nothing: the old one stays.', 'The link works once and for an hour. It signs you out everywhere.'],
      link: { href: `${env.PUBLIC_URL}/new-password/${about.token}`, words: 'Choose a new password' },
    }),
  };
}
