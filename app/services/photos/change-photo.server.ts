import { inTransaction } from '#db/client.server.ts';
import type { Transaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { getPhotoOfCase, updatePhoto } from '#db/queries/photos.server.ts';
import type { PhotoChange, PhotoRow } from '#db/queries/photos.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import type { CaseAction } from '#app/domain/permissions.ts';
import type { PhotoForm, PhotoMask } from '#app/domain/photo.ts';
import { exifInstant, masksPerPhoto } from '#app/domain/photo.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

/** Changes to one photo; a new mask comes read, since its fields are those of another form. */
export type PhotoChangeRequest = Exclude<PhotoForm, { intent: 'check-hashes' | 'add-mask' }> | { readonly intent: 'add-mask'; readonly photoId: string; readonly mask: PhotoMask };

const neededFor: Record<PhotoChangeRequest['intent'], CaseAction> = {
  describe: 'case:add-photo',
  'answer-offer': 'case:add-photo',
  'add-mask': 'release:prepare',
  'remove-mask': 'release:prepare',
  'set-releasable': 'release:prepare',
};

interface Change {
  readonly event: string;
  readonly summary: string;
  readonly change: PhotoChange;
}

/**
 * Describes a photo, answers what its file offers, or says what of it may leave the house. The original is never touched.
 * Writes a log line with what stood before.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-state` when the file offers nothing of the kind.
 */
export async function changePhoto(params: { actor: Actor; caseNumber: number; request: PhotoChangeRequest }): Promise<void> {
  const { actor, caseNumber, request } = params;
  await inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, neededFor[request.intent], found.subject);
    const photo = await getPhotoOfCase(tx, { caseId: found.row.id, photoId: request.photoId });
    if (!photo) throw notFound('The photo');
    await write(tx, actor, found.row, photo, changeFor(request, photo, found.row));
  });
}

async function write(tx: Transaction, actor: Actor, caseRow: CaseRow, photo: PhotoRow, { event, summary, change }: Change): Promise<void> {
  await updatePhoto(tx, photo.id, change);
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: caseRow.organisationId,
    caseId: caseRow.id,
    event,
    subject: 'photos',
    subjectId: photo.id,
    summary,
    before: Object.fromEntries(Object.entries(photo).filter(([name]) => name in change)),
    after: { ...change },
  });
}

function changeFor(request: PhotoChangeRequest, photo: PhotoRow, caseRow: CaseRow): Change {
  const name = `Photo ${photo.label}`;
  switch (request.intent) {
    case 'describe': {
      const { view, caption, altText, clockErrorS } = request;
      return { event: 'photo.described', summary: `${name} described.`, change: { view, caption, altText, clockErrorS } };
    }
    case 'answer-offer':
      return answeredOffer(request, photo, caseRow);
    case 'add-mask': {
      if (photo.masks.length >= masksPerPhoto) throw new DomainError('invalid-state', `A photo holds at most ${masksPerPhoto} boxes. Remove one, or make one larger.`);
      return { event: 'photo.mask-added', summary: `${name}: a box to be hidden in releases was added.`, change: { masks: [...photo.masks, request.mask] } };
    }
    case 'remove-mask': {
      if (!photo.masks[request.mask]) throw notFound('The box');
      return { event: 'photo.mask-removed', summary: `${name}: a box to be hidden was removed.`, change: { masks: photo.masks.filter((_, index) => index !== request.mask) } };
    }
    case 'set-releasable': {
      const words = { undecided: 'undecided whether it may leave', yes: 'may leave with releases', no: 'stays in the house' } as const;
      return { event: 'photo.releasable-set', summary: `${name}: ${words[request.releasable]}.`, change: { releasable: request.releasable } };
    }
  }
}

function answeredOffer({ offer, answer }: Extract<PhotoChangeRequest, { intent: 'answer-offer' }>, photo: PhotoRow, caseRow: CaseRow): Change {
  const name = `Photo ${photo.label}`;
  const exifAnswer = { ...photo.exifAnswer, [offer]: answer, answeredAt: new Date().toISOString() };
  if (offer === 'place') {
    if (photo.exif.latitudeDeg === null && photo.exif.directionDeg === null) throw new DomainError('invalid-state', 'This file says nothing of a place or direction.');
    return { event: 'photo.offer-answered', summary: `${name}: place and direction of the file ${answer}.`, change: { exifAnswer } };
  }
  const instant = exifInstant(photo.exif, caseRow.zone);
  if (!instant) throw new DomainError('invalid-state', 'This file says nothing usable of its time.');
  if (answer === 'declined') {
    // A time that came from the file goes with the answer; one that a person gave would stay.
    const fromFile = photo.takenAt?.getTime() === instant.getTime();
    return { event: 'photo.offer-answered', summary: `${name}: time of the file declined.`, change: { exifAnswer, ...(fromFile ? { takenAt: null } : {}) } };
  }
  return { event: 'photo.offer-answered', summary: `${name}: time of the file accepted, ${formatDayClock(instant, caseRow.zone)}.`, change: { exifAnswer, takenAt: instant } };
}
