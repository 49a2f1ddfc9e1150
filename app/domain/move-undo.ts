import { z } from 'zod';
import { caseStates } from './case-state.ts';
import { triageCloseReasons } from './incident.ts';

/**
 * Taking back a move at once. A move is harmless when everything that it did can be put back as it was: only the case
 * and the draft of its finding changed, and nobody has been told yet, since mail about it still waits in the outbox.
 */

/** How long the page offers to take a move back. [s] Our own choosing. */
export const undoSeconds = 10;
/** What the way to the server may add to it. [s] */
export const undoGraceSeconds = 2;
/** How long mail about a harmless move waits: longer than both together, so that an undo finds it unsent. [s] */
export const mailHoldSeconds = 15;

const harmlessMoves: readonly string[] = [
  // Only who looks at the report changes; the clock of the first look starts from the report and runs on as before.
  'open-triage',
  // The question is on the page and in a letter that waits; an answer given meanwhile is a change, and then it stands.
  'return',
  // The answer stays in the log, and the question is open again.
  'answer',
  // Points to the main case, which itself does not change.
  'mark-duplicate',
  // Opens work that nobody has begun; the letter to the investigator waits.
  'accept',
  'straight-to-action',
  'pass-to-action',
  'back-to-investigation',
  // Hands over a draft that is not frozen; the letter to the reviewers waits, and a reviewer who opens it changes the log.
  'send-findings',
  // Everything that reopening cleared is kept in its line of the log.
  'reopen-investigation',
  'reopen-action',
];

/** Why the other moves stand as soon as they are made, as a sentence for the person who asks. */
const lastingMoves: Readonly<Record<string, string>> = {
  'undo-duplicate': 'This takes a duplicate back already. Mark it as a duplicate again instead: the main case is then looked at anew.',
  'close-at-triage': 'A case that was closed is reopened, with a reason.',
  'send-back': 'A copy of the finding was made for its author to work on; the finding is sent to review again instead.',
  sign: 'A signature is not taken back: the signed version is frozen.',
  'sign-no-action': 'A signature is not taken back: the signed version is frozen.',
  'close-no-action': 'It ends the work of several people; a case that was closed is reopened, with a reason.',
  close: 'It ends the work of several people; a case that was closed is reopened, with a reason.',
};

export const isHarmless = (moveId: string): boolean => harmlessMoves.includes(moveId);

/** Why a move is not undone; null for the harmless ones. A move that is not known is not harmless. */
export function whyLasting(moveId: string): string | null {
  return isHarmless(moveId) ? null : (lastingMoves[moveId] ?? 'This move is not undone.');
}

const instant = z.iso.datetime().transform((text) => new Date(text)).nullable();
const words = z.string().nullable();

/** Columns of the case as they stood before a harmless move, read back from its line of the log. */
export const stateBefore = z.object({
  state: z.enum(caseStates),
  question: words.optional(),
  answer: words.optional(),
  answerDueAt: instant.optional(),
  duplicateOfId: z.uuid().nullable().optional(),
  closedAt: instant.optional(),
  closeReason: z.enum(triageCloseReasons).nullable().optional(),
  noActionReason: words.optional(),
  reopenCount: z.number().int().optional(),
  reconstructionWaiver: words.optional(),
  evidenceWaiver: words.optional(),
}).strict();

/** What the line of a move says of the case after it. */
export const stateAfter = z.object({ state: z.enum(caseStates), moveId: z.string(), version: z.number().int() });

/** What the page offers after a harmless move. */
export interface UndoOffer {
  /** Number of the move's line in the log. */
  readonly sequence: number;
  readonly label: string;
  /** By the server's clock, when the page was made. */
  readonly leftMs: number;
}

/** Milliseconds for which the offer still stands. @param ageS Since the move, by the clock that stamped it. */
export const undoLeftMs = (ageS: number): number => Math.max(0, Math.round((undoSeconds - ageS) * 1_000));

/** "10 seconds left", "1 second left". */
export function undoLeftWords(leftMs: number): string {
  const seconds = Math.ceil(leftMs / 1_000);
  return `${seconds} ${seconds === 1 ? 'second' : 'seconds'} left`;
}
