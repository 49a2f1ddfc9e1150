import type { NeedView } from './case-view.ts';
import type { Move, MoveFacts } from './case-state.ts';
import { needsOf } from './case-move.ts';
import { eventTypeLabels, isEventType, isRisk, riskLabels } from './incident.ts';

interface Item {
  readonly label: (facts: MoveFacts) => string;
  readonly done: (facts: MoveFacts) => boolean;
}

const item = (label: string | ((facts: MoveFacts) => string), done: (facts: MoveFacts) => boolean): Item => ({ label: typeof label === 'string' ? () => label : label, done });
const named = (what: string, value: string | null) => (value ? `${what}: ${value}` : what);

/** What is ticked off as it is filled in; `tests/unit/domain/case-state.test.ts` holds it against the moves' own needs. */
const investigationItems: readonly Item[] = [
  item((facts) => named('Kind of event', isEventType(facts.eventType) ? eventTypeLabels[facts.eventType].toLowerCase() : null), (facts) => facts.eventType !== null),
  item('Whether the hazard is still there', (facts) => !!facts.hazardStillPresent),
  item('Interim control, if it is', (facts) => facts.hazardStillPresent !== 'yes' || !!facts.interimControl),
  item('Investigator', (facts) => facts.investigatorId !== null),
  item((facts) => named('Risk if nothing is done', isRisk(facts.risk) ? riskLabels[facts.risk].toLowerCase() : null), (facts) => facts.risk !== null),
];

const signedItem = item('The finding signed by a reviewer', (facts) => facts.finding?.state === 'signed');
const unsignedItem = item('The finding not signed yet', (facts) => facts.finding?.state !== 'signed');
const commentsItem = item((facts) => `Comments settled${facts.openReviewComments > 0 ? `, ${facts.openReviewComments} open` : ''}`, (facts) => facts.openReviewComments === 0);
const signItems: readonly Item[] = [unsignedItem, commentsItem];

const items: Readonly<Record<string, readonly Item[]>> = {
  accept: investigationItems,
  'reopen-investigation': investigationItems,
  'back-to-investigation': investigationItems,
  'straight-to-action': [
    item('An undesired circumstance, nothing worse', (facts) => facts.eventType === 'undesired-circumstance'),
    item('Nobody hurt', (facts) => facts.anyoneHurt === 'no'),
  ],
  'send-findings': [
    item('Onset window', (facts) => facts.onsetEarliestAt !== null && facts.onsetLatestAt !== null),
    item('Optic, or recorded as unknown', (facts) => facts.opticStated),
    item('A reconstruction attached, or why there is none', (facts) => facts.attachedReconstructions > 0 || !!facts.reconstructionWaiver),
    item('The focused-sunlight hypothesis', (facts) => facts.focusedHypotheses > 0),
    item((facts) => `Two alternatives examined, ${facts.alternativesExamined} so far`, (facts) => facts.alternativesExamined >= 2),
    item('A result or a reason for each of the four tests', (facts) => facts.untestedWithoutWhy === 0),
    item('A photo, or why there is no evidence list', (facts) => facts.photoCount > 0 || !!facts.evidenceWaiver),
    item('The opinion, in draft', (facts) => facts.finding !== null && facts.finding.state === 'draft' && facts.finding.opinion.trim() !== ''),
    item('The limits of the finding', (facts) => facts.finding === null || facts.finding.limits.trim() !== ''),
  ],
  'send-back': [unsignedItem, item('At least one comment on a field', (facts) => facts.openReviewComments > 0)],
  sign: signItems,
  'sign-no-action': signItems,
  'close-no-action': [
    signedItem,
    item('The reviewer says that no action is needed, and why', (facts) => facts.noActionReason !== null),
    commentsItem,
    item((facts) => `No action open${facts.actionsOpen > 0 ? `, ${facts.actionsOpen} still` : ''}`, (facts) => facts.actionsOpen === 0),
    item('The hazard gone, or not known to be there', (facts) => facts.hazardStillPresent !== 'yes'),
  ],
  'pass-to-action': [signedItem],
  close: [
    item('The finding signed', (facts) => facts.finding === null || facts.finding.state === 'signed'),
    item('Comments settled', (facts) => facts.openReviewComments === 0),
    item((facts) => `Actions verified or withdrawn${facts.actionsOpen > 0 ? `, ${facts.actionsOpen} open` : ''}`, (facts) => facts.actionsOpen === 0),
    item((facts) => `Shown effective, or waived${facts.actionsUnproven > 0 ? `, ${facts.actionsUnproven} not shown` : ''}`, (facts) => facts.actionsUnproven === 0 || !!facts.effectivenessWaiver),
    item('No action found not effective', (facts) => facts.actionsNotEffective === 0),
    item('The lesson for other sites', (facts) => !!facts.lesson),
    item('Word on reports to outside bodies', (facts) => !!facts.externalReports),
  ],
};

/** Everything a move needs, ticked or open. */
export function moveChecklist(move: Move, facts: MoveFacts): readonly NeedView[] {
  return (items[move.id] ?? []).map((one) => ({ done: one.done(facts), label: one.label(facts) }));
}

/** Needs that a person may fill in with the move itself, each with its field, so that they do not stand in its way beforehand. */
const filledWithMove: Readonly<Record<string, readonly (readonly [need: RegExp, field: string])[]>> = {
  close: [[/^Write the lesson/u, 'lesson'], [/^Say whether reports to outside bodies/u, 'externalReports'], [/^Every action is shown effective/u, 'effectivenessWaiver']],
  'send-findings': [[/^Attach at least one reconstruction/u, 'reconstructionWaiver'], [/^Add at least one photo/u, 'evidenceWaiver']],
};

/** The field of the move's own form beside which the sentence of a need belongs; null when it is mended elsewhere. */
export const fieldOfNeed = (moveId: string, sentence: string): string | null => filledWithMove[moveId]?.find(([need]) => need.test(sentence))?.[1] ?? null;

/** Whether nothing stands in the way that the move's own form could not fill in. */
export function isReady(move: Move, facts: MoveFacts): boolean {
  return needsOf(move, facts).every((need) => fieldOfNeed(move.id, need) !== null);
}
