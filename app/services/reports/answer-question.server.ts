import { inTransaction } from '#db/client.server.ts';
import { updateCase } from '#db/queries/cases.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { lockCaseByReceipt } from '#db/queries/reports.server.ts';
import { moveEvent } from '#app/domain/case-move.ts';
import { findMove } from '#app/domain/case-state.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';

export interface QuestionAnswer {
  /** Whoever holds the receipt may answer: that is how a guest does it. */
  readonly receipt: string;
  readonly answer: string;
  /** Signed in, or null for a guest. */
  readonly actor: Actor | null;
}

/**
 * Stores the answer to the one question a returned report carries, and puts the report back to triage. A repeated sending
 * of the same answer changes nothing.
 *
 * @throws DomainError `not-found` for an unknown receipt, `invalid-input` for no answer, `invalid-state` when no
 *   question is open.
 */
export async function answerQuestion({ receipt, answer, actor }: QuestionAnswer): Promise<void> {
  const words = answer.trim();
  await inTransaction(async (tx) => {
    const row = await lockCaseByReceipt(tx, receipt);
    if (!row) throw notFound('The report');
    if (row.state === 'triage' && words !== '' && row.answer === words) return;
    const move = findMove('answer');
    if (!move || row.state !== move.from) throw new DomainError('invalid-state', 'No question is open on this report any more. Nothing was changed.');
    if (words === '') throw new DomainError('invalid-input', 'The answer is empty.', { fieldErrors: { answer: ['Choose an answer, or write one. “Don\'t know” is an answer too.'] } });
    await updateCase(tx, row.id, { answer: words, state: move.to });
    const own = actor !== null && actor.userId === row.reporterId;
    await insertLogEntry(tx, {
      actorId: own ? actor.userId : null,
      actorName: own ? actor.displayName : 'Holder of the receipt',
      organisationId: row.organisationId,
      caseId: row.id,
      event: moveEvent(move.id),
      subject: 'cases',
      subjectId: row.id,
      summary: own ? 'The reporter answered the question.' : 'The question was answered by whoever holds the receipt.',
      before: { state: move.from },
      after: { state: move.to },
    });
  });
}
