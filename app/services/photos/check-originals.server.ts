import { db, inTransaction } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { listCasePhotos, recordHashCheck } from '#db/queries/photos.server.ts';
import { notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { compareWithIntake } from './read-photo.server.ts';

export interface OriginalsCheck {
  readonly same: number;
  readonly differing: readonly number[];
}

/** Hashes every original of the case again and holds it against the value taken at intake; one log line for all. */
export async function checkOriginals(params: { actor: Actor; caseNumber: number }): Promise<OriginalsCheck> {
  const { actor, caseNumber } = params;
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'photo:read-original', found.subject);
  const checked: { photoId: string; label: number; result: 'same' | 'differs' | 'missing' }[] = [];
  for (const photo of await listCasePhotos(db, params)) {
    const { result } = await compareWithIntake(photo);
    checked.push({ photoId: photo.id, label: photo.label ?? 0, result });
  }
  const differing = checked.filter(({ result }) => result !== 'same').map(({ label }) => label);
  const same = checked.length - differing.length;
  await inTransaction(async (tx) => {
    for (const { photoId, result } of checked) await recordHashCheck(tx, { photoId, result });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: differing.length > 0 ? 'photo.hash-differs' : 'photo.hashes-checked',
      subject: 'cases',
      subjectId: found.row.id,
      summary: differing.length > 0 ? `Originals checked: ${same} same as at intake, not so photo ${differing.join(', ')}.` : `Originals checked: all ${same} same as at intake.`,
      after: { same, differing },
    });
  });
  return { same, differing };
}
