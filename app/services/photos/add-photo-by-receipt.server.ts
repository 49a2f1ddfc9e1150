import { db } from '#db/client.server.ts';
import { findCaseByReceipt, lockCaseByReceipt } from '#db/queries/reports.server.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { PhotoView } from '#app/domain/incident.ts';
import { noDetails } from '#app/domain/photo-details.ts';
import { photoClosedWords } from '#app/domain/report-progress.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { IncomingFile } from '#app/storage/photo-intake.server.ts';
import type { PhotoOutcome } from './store-photo.server.ts';
import { storePhoto } from './store-photo.server.ts';

export interface PhotoByReceipt {
  /** Whoever holds the receipt may add photos: that is how a guest does it. */
  readonly receipt: string;
  /** Signed in, or null for a guest. */
  readonly actor: Actor | null;
  readonly file: IncomingFile;
  /** Null when it was not said. */
  readonly view: PhotoView | null;
}

/**
 * Adds a photo to the case behind a receipt; the same bytes sent again give the same photo. It is kept under the
 * reporter's name only when they are signed in themselves.
 *
 * @throws DomainError `not-found` for an unknown receipt, `invalid-state` when the case takes no photos any more.
 */
export async function addPhotoByReceipt({ receipt, actor, file, view }: PhotoByReceipt): Promise<PhotoOutcome> {
  const found = await findCaseByReceipt(db, receipt);
  if (!found) throw notFound('The report');
  requireOpen(found.state);
  const own = actor !== null && actor.userId === found.reporterId;
  const uploader = own ? actor : { userId: null, displayName: 'Holder of the receipt' };
  return storePhoto({ file, clientId: found.clientId, uploader, details: { ...noDetails, view } }, async (tx) => {
    // The case may have closed while the file was on its way.
    const locked = await lockCaseByReceipt(tx, receipt);
    if (!locked) throw notFound('The report');
    requireOpen(locked.state);
    return { caseId: locked.id, organisationId: locked.organisationId };
  });
}

function requireOpen(state: CaseState): void {
  const closed = photoClosedWords(state);
  if (closed) throw new DomainError('invalid-state', closed);
}
