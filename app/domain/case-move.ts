import type { CaseState, Move, MoveFacts } from './case-state.ts';
import { findMove } from './case-state.ts';
import { triageCloseReasons } from './incident.ts';

/** What a person adds to a move, beyond the reason. Only the fields that the move asks for are read. */
export interface MoveExtra {
  /** Return: the one question, and until when an answer is waited for. */
  readonly question?: string | undefined;
  readonly answerDueAt?: Date | undefined;
  readonly answer?: string | undefined;
  readonly mainCaseNumber?: number | undefined;
  readonly closeReason?: string | undefined;
  readonly lesson?: string | undefined;
  readonly externalReports?: string | undefined;
  readonly effectivenessWaiver?: string | undefined;
  readonly reconstructionWaiver?: string | undefined;
  readonly evidenceWaiver?: string | undefined;
}

export type FieldSentences = Readonly<Record<string, readonly string[]>>;

/** Moves that nobody may make without saying why. */
const reasonNeeded: readonly string[] = ['mark-duplicate', 'straight-to-action', 'close-at-triage', 'sign-no-action', 'close-no-action', 'pass-to-action', 'back-to-investigation', 'reopen-investigation', 'reopen-action'];

/** Days within which a duplicate is undone without a reason. */
export const duplicateUndoDays = 30;

export interface MoveTyped {
  readonly reason: string;
  readonly extra: MoveExtra;
  readonly now: Date;
  /** When the case reached its present state. */
  readonly since: Date;
}

/** Fields that still have to be filled in for this move, each with its sentence; empty when none. */
export function missingInput(move: Move, typed: MoveTyped): FieldSentences {
  const sentences: Record<string, string[]> = {};
  const ask = (field: string, missing: boolean, sentence: string) => {
    if (missing) sentences[field] = [...(sentences[field] ?? []), sentence];
  };
  const { extra, now } = typed;
  ask('reason', !typed.reason.trim() && isReasonNeeded(move, typed), reasonSentence(move));
  if (move.id === 'return') {
    ask('question', !extra.question?.trim(), 'Write the one question that the reporter should answer.');
    ask('answerDueAt', !extra.answerDueAt, 'Say until when you wait for the answer.');
    ask('answerDueAt', extra.answerDueAt !== undefined && extra.answerDueAt <= now, 'The answer is due in the past; choose a later day.');
  }
  if (move.id === 'answer') ask('answer', !extra.answer?.trim(), 'Write the answer, or that no answer came.');
  if (move.id === 'mark-duplicate') ask('mainCaseNumber', !extra.mainCaseNumber, 'Give the number of the main case.');
  if (move.id === 'close-at-triage') ask('closeReason', !isTriageCloseReason(extra.closeReason), 'Choose why the case closes here.');
  return sentences;
}

function isReasonNeeded(move: Move, { now, since }: MoveTyped): boolean {
  if (move.id === 'undo-duplicate') return now.getTime() - since.getTime() > duplicateUndoDays * 86_400_000;
  return reasonNeeded.includes(move.id);
}

function reasonSentence(move: Move): string {
  if (move.id === 'undo-duplicate') return `After ${duplicateUndoDays} days a duplicate is undone only with a reason.`;
  return 'Say why, in a sentence that the next person can check.';
}

type TriageCloseReason = (typeof triageCloseReasons)[number];

export function isTriageCloseReason(value: string | undefined): value is TriageCloseReason {
  const known: readonly string[] = triageCloseReasons;
  return value !== undefined && known.includes(value);
}

/** Needs of a move, with those that the table itself holds for cases under investigation. */
export function needsOf(move: Move, facts: MoveFacts): readonly string[] {
  const own = move.needs(facts);
  const entersInvestigation = move.to === 'investigation' && move.id !== 'accept' && move.id !== 'send-back';
  const entry = entersInvestigation ? (findMove('accept')?.needs(facts) ?? []) : [];
  return [...own, ...entry];
}

/** Past-tense name of each move in the log. */
const moveEvents: Readonly<Record<string, string>> = {
  'open-triage': 'case.first-looked',
  return: 'case.returned',
  answer: 'case.answered',
  'mark-duplicate': 'case.marked-duplicate',
  'undo-duplicate': 'case.duplicate-undone',
  accept: 'case.investigation-opened',
  'straight-to-action': 'case.passed-to-action',
  'close-at-triage': 'case.closed-at-triage',
  'send-findings': 'case.findings-sent',
  'send-back': 'case.findings-sent-back',
  sign: 'case.findings-signed',
  'sign-no-action': 'case.findings-signed-no-action',
  'close-no-action': 'case.closed-no-action',
  'pass-to-action': 'case.passed-to-action',
  close: 'case.closed',
  'back-to-investigation': 'case.investigation-resumed',
  'reopen-investigation': 'case.reopened',
  'reopen-action': 'case.reopened',
};

export const moveEvent = (moveId: string): string => moveEvents[moveId] ?? 'case.moved';

const workingStates: readonly CaseState[] = ['reported', 'triage', 'returned', 'investigation', 'findings', 'corrective-action'];
/** Neither closed nor pointing at another case. */
export const isOpenCase = (state: CaseState): boolean => workingStates.includes(state);

/** Whether the form of this move asks for a reason before it can be sent; an old duplicate is checked on the way in. */
export const asksReason = (moveId: string): boolean => reasonNeeded.includes(moveId);
