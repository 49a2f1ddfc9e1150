import { env } from '#app/env.server.ts';
import { mail } from '#app/mail/render.ts';

/** To those who take the first look. Why it is urgent stays behind the link: mail shows on lock screens. */
export function reportAlertMail({ caseNumber }: { readonly caseNumber: number }) {
  const heading = `Case ${caseNumber}: a new report needs a first look within the hour`;
  const lines = ['An answer in the report cannot wait for the ordinary first look. Open the case to see which.'];
  return { subject: heading, ...mail({ heading, lines, link: { href: `${env.PUBLIC_URL}/cases/${caseNumber}/triage`, words: `Open case ${caseNumber}` } }) };
}
