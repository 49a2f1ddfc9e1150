import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { readMoveFacts } from '#db/queries/case-moves.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { stateSince, updateCase } from '#db/queries/cases.server.ts';
import type { CasePatch } from '#db/queries/cases.server.ts';
import type { MoveExtra } from '#app/domain/case-move.ts';
import { missingInput, moveEvent, needsOf } from '#app/domain/case-move.ts';
import type { CaseState, Move } from '#app/domain/case-state.ts';
import { caseStateLabels, findMove } from '#app/domain/case-state.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { applyFindingMove } from '#app/services/findings/finding-moves.server.ts';
import { refuseStaleVersion } from './case-version.server.ts';
import { effectOf, waiversOf } from './move-effects.server.ts';
import { mailMove } from './move-mails.server.ts';

export interface MoveRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Id of a row of `moves` in `case-state.ts`. */
  readonly moveId: string;
  /** Version of the case that the person was looking at. */
  readonly version: number;
  readonly reason: string;
  readonly extra?: MoveExtra;
}

export interface MoveOutcome {
  readonly state: CaseState;
  readonly version: number;
}

/**
 * Moves a case to another state: the only way in which a state changes after the report.
 *
 * Holds the case's row lock from the first read to the last write, so two people cannot both move it.
 *
 * @throws DomainError `not-found` when the case is not the actor's to see; `conflict` when it changed since the page was
 *   made; `forbidden` when the move is not theirs; `invalid-input` with a sentence per field; `invalid-state` with
 *   `needs` when something is missing.
 */
export async function moveCase(request: MoveRequest): Promise<MoveOutcome> {
  return inTransaction((tx) => moveInTransaction(tx, request));
}

async function moveInTransaction(tx: Transaction, request: MoveRequest): Promise<MoveOutcome> {
  const { actor, moveId, reason, extra = {} } = request;
  const found = await lockCase(tx, actor, request.caseNumber);
  if (!found) throw notFound('The case');
  const move = findMove(moveId);
  if (!move) throw new DomainError('invalid-input', 'This move is not known.');
  await refuseStaleVersion(tx, actor, found, request.version);
  authorize(actor, move.action, found.subject);
  if (found.row.state !== move.from) throw new DomainError('invalid-state', `The case is in "${caseStateLabels[found.row.state]}"; "${move.label}" starts from "${caseStateLabels[move.from]}".`);
  const now = new Date();
  const fieldErrors = missingInput(move, { reason, extra, now, since: await stateSince(tx, found.row) });
  if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'Something is still missing.', { fieldErrors });
  const withWaivers = { ...found.row, ...waiversOf(move, extra) };
  const needs = needsOf(move, await readMoveFacts(tx, withWaivers));
  if (needs.length > 0) throw new DomainError('invalid-state', `"${move.label}" is not ready yet.`, { needs });
  const effect = await effectOf(tx, { move, row: withWaivers, actor, reason, extra, now });
  await applyToFinding(tx, move, found.row, actor, reason);
  const patch = { ...waiversOf(move, extra), ...effect.patch, state: move.to };
  const moved = await updateCase(tx, found.row.id, patch);
  await logLine(tx, actor, moved, {
    event: moveEvent(move.id),
    subject: 'cases',
    subjectId: moved.id,
    summary: effect.summary,
    reason: reason.trim(),
    // Enough to put the case back as it was, and to see later what a move overwrote.
    before: columnsOf(found.row, patch),
    after: { state: move.to, moveId: move.id, version: moved.version },
  });
  await mailMove(tx, { move, row: moved, actor, reason });
  return { state: moved.state, version: moved.version };
}

async function applyToFinding(tx: Transaction, move: Move, row: CaseRow, actor: Actor, reason: string): Promise<void> {
  if (move.id === 'send-findings' || move.id === 'send-back' || move.id === 'sign' || move.id === 'sign-no-action') {
    await applyFindingMove(tx, { moveId: move.id === 'sign-no-action' ? 'sign' : move.id, caseId: row.id, actor, reason });
  }
}

/** The columns that a patch names, as they stand in a row. */
export function columnsOf(row: CaseRow, patch: CasePatch): Record<string, unknown> {
  return Object.fromEntries(Object.entries(row).filter(([column]) => column in patch));
}
