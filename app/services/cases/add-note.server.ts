import { inTransaction } from '#db/client.server.ts';
import { insertCaseNote } from '#db/queries/case-notes.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { plainText } from '#app/domain/incident.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

const noteText = plainText(4_000);

/**
 * Adds a note to the account. The account itself is never changed.
 *
 * @throws DomainError `invalid-input` for an empty or overlong note; `forbidden`, `not-found`.
 */
export async function addNote(request: { actor: Actor; caseNumber: number; body: string }): Promise<void> {
  const refuse = (sentence: string) => new DomainError('invalid-input', sentence, { fieldErrors: { body: [sentence] } });
  const text = noteText.safeParse(request.body);
  if (!text.success) throw refuse(text.error.issues[0]?.message ?? 'The note cannot be read.');
  if (text.data === '') throw refuse('Write the note first.');
  await inTransaction(async (tx) => {
    const { actor } = request;
    const found = await lockCase(tx, actor, request.caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'case:add-note', found.subject);
    const noteId = await insertCaseNote(tx, { caseId: found.row.id, authorId: actor.userId, authorName: actor.displayName, body: text.data });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: 'case.note-added',
      subject: 'case_notes',
      subjectId: noteId,
      summary: 'Note added to the account.',
    });
  });
}
