import { db, inTransaction } from '#db/client.server.ts';
import { attachmentByHash, insertAttachment, lastAttachmentLabel } from '#db/queries/attachments.server.ts';
import { findCase, lockCase } from '#db/queries/case-subject.server.ts';
import { attachmentClassLabels, attachmentCode, attachmentContent, attachmentKindLabels, attachmentMaxBytes, attachmentRefusal, attachmentsPerCase } from '#app/domain/attachment.ts';
import type { AttachmentForm } from '#app/domain/attachment.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { showableFileName } from '#app/domain/photo.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

export interface AddAttachment {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly about: AttachmentForm;
  readonly file: { readonly name: string; readonly bytes: Uint8Array };
}

/**
 * Keeps a document with the case: judged by its content, stored before it is acknowledged, under a key that holds its
 * hash. The same bytes sent again give the same document.
 *
 * @throws DomainError `invalid-input` with a sentence that names the file; `forbidden`, `not-found`.
 */
export async function addAttachment({ actor, caseNumber, about, file }: AddAttachment): Promise<{ attachmentId: string; label: number }> {
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'attachment:add', found.subject);
  const { fileName, mime } = examine(file);
  const sha256 = sha256Hex(file.bytes);
  const objectKey = `attachments/${found.row.id}/${sha256}`;
  await putObject(objectKey, file.bytes, mime);
  return inTransaction(async (tx) => {
    const locked = await lockCase(tx, actor, caseNumber);
    if (!locked) throw notFound('The case');
    authorize(actor, 'attachment:add', locked.subject);
    const earlier = await attachmentByHash(tx, { caseId: locked.row.id, sha256 });
    if (earlier) return { attachmentId: earlier.id, label: earlier.label };
    const label = (await lastAttachmentLabel(tx, locked.row.id)) + 1;
    if (label > attachmentsPerCase) throw new DomainError('invalid-state', attachmentRefusal.tooMany);
    const attachmentId = await insertAttachment(tx, { caseId: locked.row.id, label, title: about.title, kind: about.kind, class: about.class, fileName, mime, bytes: file.bytes.byteLength, sha256, objectKey, uploadedById: actor.userId });
    await logLine(tx, actor, locked.row, {
      event: 'attachment.added',
      subject: 'attachments',
      subjectId: attachmentId,
      summary: `Document ${attachmentCode(label)} added: ${attachmentKindLabels[about.kind].toLowerCase()}, ${attachmentClassLabels[about.class].toLowerCase()}.`,
      after: { label, kind: about.kind, class: about.class, mime, bytes: file.bytes.byteLength, sha256 },
    });
    return { attachmentId, label };
  });
}

function examine(file: AddAttachment['file']) {
  const fileName = showableFileName(file.name);
  const refuse = (sentence: string) => new DomainError('invalid-input', 'The file was not taken.', { fieldErrors: { file: [sentence] } });
  if (file.bytes.byteLength === 0) throw refuse(attachmentRefusal.empty(fileName));
  if (file.bytes.byteLength > attachmentMaxBytes) throw refuse(attachmentRefusal.tooBig(fileName));
  const mime = attachmentContent(file.bytes, file.name);
  if (!mime) throw refuse(attachmentRefusal.otherKind(fileName));
  return { fileName, mime };
}
