import type { CaseAction } from './permissions.ts';

/** States of a case, in the order of the work; `draft` lives on the reporter's device only. */
export const caseStates = [
  'reported',
  'triage',
  'returned',
  'investigation',
  'findings',
  'corrective-action',
  'closed',
  'duplicate',
] as const;
export type CaseState = (typeof caseStates)[number];

export const caseStateLabels: Record<CaseState, string> = {
  reported: 'Reported',
  triage: 'Triage',
  returned: 'Returned',
  investigation: 'Investigation',
  findings: 'Findings',
  'corrective-action': 'Corrective action',
  closed: 'Closed',
  duplicate: 'Duplicate',
};

/** Facts about a case that decide whether a move is ready; read under the lock that the move holds. */
export interface MoveFacts {
  readonly eventType: string | null;
  readonly hazardStillPresent: string | null;
  readonly interimControl: string | null;
  readonly investigatorId: string | null;
  readonly risk: string | null;
  readonly anyoneHurt: string | null;
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  readonly opticStated: boolean;
  readonly attachedReconstructions: number;
  readonly reconstructionWaiver: string | null;
  readonly alternativesExamined: number;
  readonly focusedHypotheses: number;
  readonly untestedWithoutWhy: number;
  readonly photoCount: number;
  readonly evidenceWaiver: string | null;
  readonly finding: { readonly authorId: string; readonly state: string; readonly limits: string; readonly opinion: string; readonly certainty: string } | null;
  readonly openReviewComments: number;
  readonly actionsOpen: number;
  readonly actionsUnproven: number;
  readonly actionsNotEffective: number;
  readonly effectivenessWaiver: string | null;
  /** Why the reviewer who signed sees nothing to be done; null where that was not said. */
  readonly noActionReason: string | null;
  readonly lesson: string | null;
  readonly externalReports: string | null;
  readonly closedAt: Date | null;
}

/** What the person typed with the move. */
export interface MoveInput {
  readonly reason: string;
  readonly mainCaseId?: string | undefined;
  readonly question?: string | undefined;
  readonly closeReason?: string | undefined;
}

export interface Move {
  readonly id: string;
  readonly from: CaseState;
  readonly to: CaseState;
  readonly label: string;
  readonly action: CaseAction;
  /** Sentences naming what is missing; empty when the move is ready. */
  readonly needs: (facts: MoveFacts) => readonly string[];
}

const nothing = () => [];
const need = (missing: boolean, sentence: string) => (missing ? [sentence] : []);

function investigationNeeds(facts: MoveFacts): string[] {
  return [
    ...need(!facts.eventType, 'Say what kind of event this is.'),
    ...need(!facts.hazardStillPresent, 'Say whether the hazard is still there.'),
    ...need(facts.hazardStillPresent === 'yes' && !facts.interimControl, 'The hazard is still there: record the interim control.'),
    ...need(!facts.investigatorId, 'Name the investigator.'),
    ...need(!facts.risk, 'State the risk if nothing is done.'),
  ];
}

function findingsNeeds(facts: MoveFacts): string[] {
  const finding = facts.finding;
  return [
    ...need(!facts.onsetEarliestAt || !facts.onsetLatestAt, 'Give the onset window: last seen sound, and latest possible onset.'),
    ...need(!facts.opticStated, 'Record the optic, or record it as unknown.'),
    ...need(
      facts.attachedReconstructions === 0 && !facts.reconstructionWaiver,
      'Attach at least one reconstruction, or say why there is none.',
    ),
    ...need(facts.focusedHypotheses === 0, 'Record the focused-sunlight hypothesis.'),
    ...need(facts.alternativesExamined < 2, `Examine at least two alternatives; ${facts.alternativesExamined} so far.`),
    ...need(
      facts.untestedWithoutWhy > 0,
      'Give each of the four tests a result, or say why it was not tested.',
    ),
    ...need(facts.photoCount === 0 && !facts.evidenceWaiver, 'Add at least one photo, or say why there is no evidence list.'),
    ...need(!finding || finding.state !== 'draft' || !finding.opinion.trim(), 'Write the opinion.'),
    ...need(!!finding && !finding.limits.trim(), 'State the limits of the finding.'),
  ];
}

/** A case that went straight from triage to action has no finding, and needs none to close. */
function correctiveNeeds(facts: MoveFacts): string[] {
  return [
    ...need(facts.finding !== null && facts.finding.state !== 'signed', 'A reviewer who is not the author signs the finding first.'),
    ...need(facts.openReviewComments > 0, 'Settle every open review comment.'),
  ];
}

function closeNeeds(facts: MoveFacts): string[] {
  return [
    ...need(facts.actionsOpen > 0, `Every action is verified or withdrawn; ${facts.actionsOpen} still open.`),
    ...need(
      facts.actionsUnproven > 0 && !facts.effectivenessWaiver,
      `Every action is shown effective when the sun is back, or waived with a reason; ${facts.actionsUnproven} not shown.`,
    ),
    ...need(facts.actionsNotEffective > 0, 'An action was found not effective: replace it, or send the case back to investigation.'),
    ...need(!facts.lesson, 'Write the lesson for other sites.'),
    ...need(!facts.externalReports, 'Say whether reports to outside bodies are done or not needed, after checking the local rule.'),
  ];
}

const signedNeeds = (facts: MoveFacts) => need(facts.finding?.state !== 'signed', 'A reviewer who is not the author signs the finding first.');
const unsignedNeeds = (facts: MoveFacts) => need(facts.finding?.state === 'signed', 'The finding is signed already; close the case, pass it to action, or reopen it later.');

function signNeeds(facts: MoveFacts): string[] {
  return [...unsignedNeeds(facts), ...need(facts.openReviewComments > 0, 'Settle every open review comment, or send back.')];
}

/** The reviewer has said with the signature that nothing is to be done; the site manager, another person, agrees. */
function noActionNeeds(facts: MoveFacts): string[] {
  return [
    ...signedNeeds(facts),
    ...need(facts.noActionReason === null, 'The reviewer says with the signature that no action is needed, and why.'),
    ...need(facts.openReviewComments > 0, 'Settle every open review comment.'),
    ...need(facts.actionsOpen > 0, `No action may be open; ${facts.actionsOpen} still open.`),
    ...need(facts.hazardStillPresent === 'yes', 'The hazard is still there: it needs an action, or a record that it is gone.'),
  ];
}

/** Every move between states: who decides is in `permissions.ts`, what it needs is here. */
export const moves: readonly Move[] = [
  { id: 'open-triage', from: 'reported', to: 'triage', label: 'Take a first look', action: 'case:triage', needs: nothing },
  { id: 'return', from: 'triage', to: 'returned', label: 'Return with one question', action: 'case:triage', needs: nothing },
  { id: 'answer', from: 'returned', to: 'triage', label: 'Answer the question', action: 'case:answer', needs: nothing },
  { id: 'mark-duplicate', from: 'triage', to: 'duplicate', label: 'Mark as duplicate', action: 'case:triage', needs: nothing },
  { id: 'undo-duplicate', from: 'duplicate', to: 'triage', label: 'Undo the duplicate', action: 'case:triage', needs: nothing },
  { id: 'accept', from: 'triage', to: 'investigation', label: 'Open the investigation', action: 'case:triage', needs: investigationNeeds },
  {
    id: 'straight-to-action',
    from: 'triage',
    to: 'corrective-action',
    label: 'Go straight to corrective action',
    action: 'case:triage',
    needs: (facts) => [
      ...need(facts.eventType !== 'undesired-circumstance', 'Only an undesired circumstance may skip the investigation.'),
      ...need(facts.anyoneHurt !== 'no', 'Nobody may have been hurt.'),
    ],
  },
  { id: 'close-at-triage', from: 'triage', to: 'closed', label: 'Close at triage', action: 'case:close-at-triage', needs: nothing },
  { id: 'send-findings', from: 'investigation', to: 'findings', label: 'Send the finding to review', action: 'finding:write', needs: findingsNeeds },
  {
    id: 'send-back',
    from: 'findings',
    to: 'investigation',
    label: 'Send back with comments',
    action: 'finding:review',
    needs: (facts) => [...unsignedNeeds(facts), ...need(facts.openReviewComments === 0, 'Write at least one comment on a field.')],
  },
  { id: 'sign', from: 'findings', to: 'corrective-action', label: 'Sign and pass to action', action: 'finding:review', needs: signNeeds },
  { id: 'sign-no-action', from: 'findings', to: 'findings', label: 'Sign: no action needed', action: 'finding:review', needs: signNeeds },
  { id: 'close-no-action', from: 'findings', to: 'closed', label: 'Close: no action needed', action: 'case:close-no-action', needs: noActionNeeds },
  { id: 'pass-to-action', from: 'findings', to: 'corrective-action', label: 'Pass to action after all', action: 'case:pass-to-action', needs: signedNeeds },
  { id: 'close', from: 'corrective-action', to: 'closed', label: 'Close the case', action: 'case:close', needs: (facts) => [...correctiveNeeds(facts), ...closeNeeds(facts)] },
  { id: 'back-to-investigation', from: 'corrective-action', to: 'investigation', label: 'Back to investigation', action: 'case:reinvestigate', needs: nothing },
  { id: 'reopen-investigation', from: 'closed', to: 'investigation', label: 'Reopen the investigation', action: 'case:reopen', needs: nothing },
  { id: 'reopen-action', from: 'closed', to: 'corrective-action', label: 'Reopen for action', action: 'case:reopen', needs: nothing },
];

export type MoveId = (typeof moves)[number]['id'];

export function movesFrom(state: CaseState): readonly Move[] {
  return moves.filter((move) => move.from === state);
}

export function findMove(id: string): Move | undefined {
  return moves.find((move) => move.id === id);
}
