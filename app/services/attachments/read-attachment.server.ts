import { db, inTransaction } from '#db/client.server.ts';
import { findAttachment, readableClasses, recordAttachmentCheck } from '#db/queries/attachments.server.ts';
import { caseSubject } from '#db/queries/case-subject.server.ts';
import { attachmentCode, attachmentExtensions } from '#app/domain/attachment.ts';
import type { AttachmentMime } from '#app/domain/attachment.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { logLine } from '#app/services/log-line.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

export interface AttachmentFile {
  readonly bytes: Uint8Array;
  readonly mime: AttachmentMime;
  /** Made from case and label; the name that the file came with is not sent. */
  readonly fileName: string;
}

const hashWords = { differs: 'its hash is no longer that of the file that came in', missing: 'it is missing from the store' } as const;

/**
 * The bytes of a document for somebody who may read its class, hashed again on every reading. A document of a class that
 * is not theirs is not found, so that not even its being there is told.
 *
 * @throws DomainError `not-found`, or `conflict` when the stored file is not what came in; the log then has a line.
 */
export async function readAttachment({ actor, attachmentId }: { readonly actor: Actor; readonly attachmentId: string }): Promise<AttachmentFile> {
  const found = await findAttachment(db, actor, attachmentId);
  if (!found) throw notFound('The document');
  const { attachment, case: row } = found;
  if (!readableClasses(actor, await caseSubject(db, actor, row)).includes(attachment.class)) throw notFound('The document');
  const bytes = await getObject(attachment.objectKey);
  const result = bytes === null ? 'missing' : sha256Hex(bytes) === attachment.sha256 ? 'same' : 'differs';
  await inTransaction(async (tx) => {
    await recordAttachmentCheck(tx, { attachmentId, result });
    await logLine(tx, actor, row, {
      event: result === 'same' ? 'attachment.read' : 'attachment.hash-differs',
      subject: 'attachments',
      subjectId: attachmentId,
      summary: result === 'same' ? `Document ${attachmentCode(attachment.label)} downloaded.` : `Document ${attachmentCode(attachment.label)} was refused: ${hashWords[result]}.`,
      after: { hashCheck: result },
    });
  });
  if (bytes === null || result !== 'same') throw new DomainError('conflict', `Document ${attachmentCode(attachment.label)} is not handed out: ${result === 'missing' ? hashWords.missing : hashWords.differs}. The log has a line about it; ask whoever added it for their own copy.`);
  return { bytes, mime: attachment.mime, fileName: `case-${row.number}-${attachmentCode(attachment.label)}.${attachmentExtensions[attachment.mime]}` };
}
