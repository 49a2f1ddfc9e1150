import { mail } from '#app/mail/render.ts';
import { env } from '#app/env.server.ts';

/** Subjects and bodies carry the case's number only: no names, no places, no health words. */
export interface CaseMail {
  readonly caseNumber: number;
  readonly receipt: string;
}

const caseLink = (caseNumber: number, tab = '') => `${env.PUBLIC_URL}/cases/${caseNumber}${tab}`;
const progressLink = (receipt: string) => `${env.PUBLIC_URL}/progress?code=${encodeURIComponent(receipt)}`;

/** To the investigator who was named. */
export function assignedMail({ caseNumber }: CaseMail) {
  const heading = `Case ${caseNumber} is now yours to investigate`;
  return { subject: heading, ...mail({ heading, lines: ['You were named as its investigator. The account, the photos and what is still missing are on the case.'], link: { href: caseLink(caseNumber), words: `Open case ${caseNumber}` } }) };
}

/** To the reporter, when one question is open. The question itself stays behind the link. */
export function returnedMail({ caseNumber, receipt }: CaseMail, dueWords: string) {
  const heading = `One question about your report ${receipt}`;
  return { subject: heading, ...mail({ heading, lines: [`The person looking at case ${caseNumber} needs one answer from you, until ${dueWords}.`, 'Your report keeps its number. If you do not know, say so: that helps too.'], link: { href: progressLink(receipt), words: 'Read and answer the question' } }) };
}

/** To the reporter, when the case is closed. */
export function closedMail({ caseNumber, receipt }: CaseMail) {
  const heading = `Your report ${receipt} is closed`;
  return { subject: heading, ...mail({ heading, lines: [`Case ${caseNumber} has been looked into and is now closed. What came of it is on your report's page.`, 'If you see the mark again, or a new one, please report it: that is how a fix is tested.'], link: { href: progressLink(receipt), words: 'See what came of it' } }) };
}

/** To the reporter, when a closed case is taken up again. */
export function reopenedMail({ caseNumber, receipt }: CaseMail) {
  const heading = `Your report ${receipt} was taken up again`;
  return { subject: heading, ...mail({ heading, lines: [`Case ${caseNumber} was closed and is now open again, because there is something new to look at.`], link: { href: progressLink(receipt), words: 'Follow your report' } }) };
}

/** To the technical reviewers of the site. */
export function findingSentMail({ caseNumber }: CaseMail) {
  const heading = `Case ${caseNumber}: a finding waits for review`;
  return { subject: heading, ...mail({ heading, lines: ['The finding was sent to technical review. Whoever wrote it cannot sign it.'], link: { href: caseLink(caseNumber, '/findings'), words: 'Read the inputs and the finding' } }) };
}

/** To the managers of the site. */
export function findingSignedMail({ caseNumber }: CaseMail) {
  const heading = `Case ${caseNumber}: the finding is signed`;
  return { subject: heading, ...mail({ heading, lines: ['The finding passed review and the case is in corrective action. Each action needs an owner, a verifier and a day.'], link: { href: caseLink(caseNumber, '/actions'), words: 'Open the actions' } }) };
}

/** To the managers of the site, when the reviewer sees nothing to be done. */
export function noActionMail({ caseNumber }: CaseMail) {
  const heading = `Case ${caseNumber}: signed, no action needed`;
  return { subject: heading, ...mail({ heading, lines: ['The finding is signed, and the reviewer says that no action is needed. A manager of the site, who is another person, closes the case or passes it to action after all.'], link: { href: caseLink(caseNumber), words: `Open case ${caseNumber}` } }) };
}
