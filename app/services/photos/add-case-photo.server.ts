import { db } from '#db/client.server.ts';
import { findCase, lockCase } from '#db/queries/case-subject.server.ts';
import { notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import type { IncomingFile } from '#app/storage/photo-intake.server.ts';
import type { PhotoOutcome } from './store-photo.server.ts';
import { storePhoto } from './store-photo.server.ts';

/**
 * Adds a photo to a case that is not closed: by an investigator, or by the person who reported it.
 *
 * @throws DomainError `not-found`, or `forbidden` with who may.
 */
export async function addCasePhoto(params: { actor: Actor; caseNumber: number; file: IncomingFile }): Promise<PhotoOutcome> {
  const { actor, caseNumber, file } = params;
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'case:add-photo', found.subject);
  return storePhoto({ file, clientId: found.row.clientId, uploader: actor }, async (tx) => {
    // The case may have closed while the file was on its way.
    const locked = await lockCase(tx, actor, caseNumber);
    if (!locked) throw notFound('The case');
    authorize(actor, 'case:add-photo', locked.subject);
    return { caseId: locked.row.id, organisationId: locked.row.organisationId };
  });
}
