import type { CaseState } from './case-state.ts';
import type { Certainty } from './finding.ts';
import type { HypothesisKind } from './hypothesis.ts';
import { hypothesisKindLabels } from './hypothesis.ts';
import type { triageCloseReasons } from './incident.ts';
import { caseRules } from './permissions.ts';

/** What a reporter may know of a case, in plain words: no names, no place, nothing of the account. */
export interface ProgressFacts {
  readonly state: CaseState;
  readonly closeReason: (typeof triageCloseReasons)[number] | null;
  readonly result: { readonly certainty: Certainty; readonly kind: HypothesisKind | null } | null;
}

const closeReasonWords: Record<(typeof triageCloseReasons)[number], string> = {
  'not-heat-event': 'It was looked at, and heat was not what made the mark',
  'outside-scope': 'It was looked at, and is outside what this register covers',
  referred: 'It was looked at, and passed to another body',
  'recorded-only': 'It was looked at and recorded',
};

/** The signed result; null while there is none. A person signed it: it is repeated here, not worked out. */
export function resultInWords(result: ProgressFacts['result']): string | null {
  if (!result) return null;
  if (result.certainty === 'undetermined') return 'The cause could not be determined';
  if (!result.kind) return 'A result was signed';
  const cause = result.kind === 'other' ? 'Something other than sunlight' : hypothesisKindLabels[result.kind];
  return `${cause}: ${result.certainty === 'probable' ? 'the probable cause' : 'a possible cause'}`;
}

/** The finding of the page, as its heading. */
export function progressHeading(facts: ProgressFacts): string {
  const result = resultInWords(facts.result);
  switch (facts.state) {
    case 'reported':
      return 'Your report is in. The first look is still to come';
    case 'triage':
      return 'Somebody is taking a first look';
    case 'returned':
      return 'One question is waiting for you';
    case 'investigation':
      return 'It is being investigated';
    case 'findings':
      return 'The result is being checked by a second person';
    case 'corrective-action':
      return result ? `${result}. It is being put right` : 'It is being put right';
    case 'closed':
      return result ?? (facts.closeReason ? closeReasonWords[facts.closeReason] : 'It is closed');
    case 'duplicate':
      return 'Somebody else had reported the same mark; both accounts are kept together';
  }
}

export interface ProgressStep {
  readonly state: CaseState;
  /** What the step is called on a page for everybody. */
  readonly name: string;
  readonly words: string;
  /** When it was reached; null when that is not known, or still to come. */
  readonly at: Date | null;
  readonly reached: boolean;
  readonly now: boolean;
}

const names: Record<CaseState, string> = {
  reported: 'Received',
  triage: 'First look',
  returned: 'One question',
  investigation: 'Measured and tested',
  findings: 'Result checked',
  'corrective-action': 'Being put right',
  closed: 'Closed',
  duplicate: 'Joined with an earlier report',
};

const path: readonly { readonly state: CaseState; readonly words: string }[] = [
  { state: 'reported', words: 'The report and its photos are stored.' },
  { state: 'triage', words: 'Somebody looks at it, and has the place covered or closed off if it needs that.' },
  { state: 'investigation', words: 'The place is measured, and several explanations are tested.' },
  { state: 'findings', words: 'A second person checks the result.' },
  { state: 'corrective-action', words: 'What can be changed is changed, and checked when the sun is back.' },
  { state: 'closed', words: 'It stays on record. It is taken up again if the mark comes back.' },
];

const sideWords: Partial<Record<CaseState, string>> = {
  returned: 'The first look needs one answer from you.',
  duplicate: 'It goes on under the earlier report of the same mark.',
};

/** The line of states: what was, what is, and what is still to come. States that a case jumped over are left out. */
export function progressSteps(facts: ProgressFacts, times: { readonly reportedAt: Date; readonly closedAt: Date | null; readonly reachedAt: Partial<Record<CaseState, Date>> }): ProgressStep[] {
  const timeOf = (state: CaseState) => (state === 'reported' ? times.reportedAt : state === 'closed' ? times.closedAt : (times.reachedAt[state] ?? null));
  const onPath = facts.state === 'returned' || facts.state === 'duplicate' ? 'triage' : facts.state;
  const present = path.findIndex(({ state }) => state === onPath);
  const steps = path.flatMap(({ state, words }, index): ProgressStep[] => {
    const at = timeOf(state);
    const reached = index <= present;
    const jumped = index < present && at === null && state !== 'reported';
    return jumped || (state === 'closed' && facts.state === 'duplicate') ? [] : [{ state, name: names[state], words, at: reached ? at : null, reached, now: state === facts.state }];
  });
  const side = sideWords[facts.state];
  if (!side) return steps;
  const aside: ProgressStep = { state: facts.state, name: names[facts.state], words: side, at: timeOf(facts.state), reached: true, now: true };
  const afterTriage = steps.findIndex(({ state }) => state === 'triage') + 1;
  return [...steps.slice(0, afterTriage), aside, ...(facts.state === 'duplicate' ? [] : steps.slice(afterTriage))];
}

/** Why whoever holds the receipt may not add a photo; null when they may: in the states in which a reporter may. */
export function photoClosedWords(state: CaseState): string | null {
  const open: readonly CaseState[] = caseRules['case:add-photo'].states;
  if (open.includes(state)) return null;
  if (state === 'duplicate') return 'This report goes on under an earlier one, so photos are not taken here any more. If the mark is back, report it again.';
  return 'The case is closed, so photos are not taken any more. If the mark is back, report it again.';
}
