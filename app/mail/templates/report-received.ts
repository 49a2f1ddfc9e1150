import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** To whoever reported. Holds the receipt and nothing that was reported. */
export function reportReceivedMail({ receipt }: { readonly receipt: string }) {
  const heading = `Report ${receipt} received`;
  const lines = [
    'Thank you. Your report is stored, and somebody will look at it.',
    'If there is a question, it comes to you by this receipt. If you see the bright patch again, cover or shade it from the shaded side, do not look along the beam, and report it.',
    'Anyone with the receipt can read how far it is. That page holds no names.',
  ];
  return { subject: heading, ...mail({ heading, lines, link: { href: `${env.PUBLIC_URL}/progress?code=${encodeURIComponent(receipt)}`, words: 'Follow your report' } }) };
}
