import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { lastChange, updateCase } from '#db/queries/cases.server.ts';
import { listFindingRows, markFindingUnsent } from '#db/queries/findings.server.ts';
import { findMoveLine } from '#db/queries/moves-in-log.server.ts';
import { removeUnsentMail } from '#db/queries/outbox.server.ts';
import { findMove } from '#app/domain/case-state.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import { stateAfter, stateBefore, undoGraceSeconds, undoSeconds, whyLasting } from '#app/domain/move-undo.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { columnsOf } from './move-case.server.ts';
import { moveMailKey } from './move-mails.server.ts';

export interface UndoRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Number of the move's line in the log. */
  readonly sequence: number;
}

export interface UndoOutcome {
  readonly state: CaseState;
  readonly moveId: string;
}

/**
 * Takes back a harmless move of the same person: puts every column that it changed back as it was, takes its unsent mail
 * out of the outbox, and adds a line of its own to the log. The version of the case goes up, not back, so that a page
 * opened between the two cannot be sent as if nothing had happened.
 *
 * @throws DomainError `not-found`; `invalid-input` when the line is no move; `forbidden` when another person made it;
 *   `invalid-state` when the move lasts, is undone already, or its seconds are over; `conflict` when the case changed since.
 */
export async function undoMove(request: UndoRequest): Promise<UndoOutcome> {
  return inTransaction((tx) => undoInTransaction(tx, request));
}

async function undoInTransaction(tx: Transaction, { actor, caseNumber, sequence }: UndoRequest): Promise<UndoOutcome> {
  const found = await lockCase(tx, actor, caseNumber);
  if (!found) throw notFound('The case');
  const { row } = found;
  const line = await findMoveLine(tx, { caseId: row.id, sequence });
  const made = stateAfter.safeParse(line?.after);
  const move = made.success ? findMove(made.data.moveId) : undefined;
  if (!line || !made.success || !move) throw new DomainError('invalid-input', 'This is not a move of the case that could be undone.');
  if (line.actorId !== actor.userId) throw new DomainError('forbidden', 'A move is undone by the person who made it, and by nobody else.');
  authorize(actor, move.action, { ...found.subject, state: move.from });
  const lasting = whyLasting(move.id);
  if (lasting) throw new DomainError('invalid-state', `"${move.label}" stands. ${lasting}`);
  if (line.undone) throw new DomainError('invalid-state', `"${move.label}" is undone already; nothing more was changed.`);
  await refuseIfChanged(tx, actor, found, { sequence, version: made.data.version, label: move.label });
  if (line.ageS > undoSeconds + undoGraceSeconds) {
    throw new DomainError('invalid-state', `"${move.label}" stands: a move is undone within ${undoSeconds} seconds, and those are over. Mail that it causes goes out now. What can be done from here is listed under "Moves open to you" on the account.`);
  }
  if (move.id === 'send-findings') await unsendFinding(tx, row.id);
  const before = stateBefore.parse(line.before);
  const restored = await updateCase(tx, row.id, before);
  const sent = await removeUnsentMail(tx, `${moveMailKey(move.id, row.id, made.data.version)}:`);
  if (sent > 0) throw new DomainError('invalid-state', `"${move.label}" stands: mail about it has gone out.`);
  await logLine(tx, actor, row, {
    event: 'case.move-undone',
    subject: 'cases',
    subjectId: row.id,
    summary: `Undone within ${undoSeconds} seconds: ${move.label.toLowerCase()}.`,
    before: columnsOf(row, before),
    // No state in it: for every clock that is read from the log, the case never left the one it is in again.
    after: { undoes: sequence, version: restored.version },
  });
  return { state: restored.state, moveId: move.id };
}

/** Untouched means both: the case's own columns, and everything about it that the log tells of. */
async function refuseIfChanged(tx: Transaction, actor: Actor, { row, subject }: { row: CaseRow; subject: CaseSubject }, move: { sequence: number; version: number; label: string }): Promise<void> {
  const last = await lastChange(tx, row.id);
  if (row.version === move.version && last?.sequence === move.sequence) return;
  const who = last && canOnCase(actor, 'log:read', subject) ? ` ${last.actorName}, ${formatDayClock(last.at, row.zone)}: ${last.summary}` : '';
  throw new DomainError('conflict', `"${move.label}" stands, since the case was changed after it.${who}`);
}

async function unsendFinding(tx: Transaction, caseId: string): Promise<void> {
  const [latest] = await listFindingRows(tx, caseId);
  if (latest) await markFindingUnsent(tx, latest.id);
}
