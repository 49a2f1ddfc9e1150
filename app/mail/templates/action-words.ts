import { env } from '#app/env.server.ts';

/** Mails about actions name the case and the action by number: no person, no place, no health words. */
export interface ActionMail {
  readonly caseNumber: number;
  readonly actionNumber: number;
  /** `24 Jul 2026`. */
  readonly dueWords: string;
  /** Next return of the sun, `3 Aug 2026, 13:30`; null when none is known. */
  readonly nextReturnWords: string | null;
}

export const actionName = ({ caseNumber, actionNumber }: Pick<ActionMail, 'caseNumber' | 'actionNumber'>): string => `Action ${actionNumber} of case ${caseNumber}`;

export const actionLink = ({ caseNumber, actionNumber }: Pick<ActionMail, 'caseNumber' | 'actionNumber'>) => ({
  href: `${env.PUBLIC_URL}/cases/${caseNumber}/actions#action-${actionNumber}`,
  words: 'Open the action',
});

export const nextReturnLine = (about: ActionMail): string[] => (about.nextReturnWords ? [`The sun is expected back on the mark on ${about.nextReturnWords}, clock time at the place.`] : []);
