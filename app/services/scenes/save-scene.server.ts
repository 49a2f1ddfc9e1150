import { inTransaction } from '#db/client.server.ts';
import { casePlace } from '#db/queries/case-place.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertScene, latestScene } from '#db/queries/scenes.server.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { plainText } from '#app/domain/incident.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { Typed } from '#app/domain/scene-form.ts';
import { readSceneForm } from '#app/domain/scene-form.ts';
import { authorize } from '#app/services/authorize.ts';
import { declinationAt } from './declination.server.ts';

export interface SaveSceneRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Version of the scene that the form was filled from; 0 when there was none. */
  readonly baseVersion: number;
  readonly note: string;
  readonly typed: Typed;
  readonly now: Date;
}

/**
 * Stores the measurements of a form as a new version of the scene; earlier versions stay as they were.
 *
 * @returns The newest version, which is the old one when nothing changed.
 * @throws DomainError `invalid-input` with a sentence per field; `conflict` when somebody saved a version in between;
 *   `forbidden`, `not-found`.
 */
export async function saveScene(request: SaveSceneRequest): Promise<number> {
  return inTransaction(async (tx) => {
    const { actor, typed, now } = request;
    const found = await lockCase(tx, actor, request.caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'case:edit-facts', found.subject);
    const latest = await latestScene(tx, found.row.id);
    const version = latest?.version ?? 0;
    if (version !== request.baseVersion) throw new DomainError('conflict', `Version ${version} of the measurements was saved while this page was open. What you typed is kept; load the page again to see that version.`);
    const reading = readSceneForm(typed, declinationAt(await casePlace(tx, found.row), measuredOn(typed, now)));
    const note = plainText(500).safeParse(request.note);
    const fieldErrors = { ...(reading.ok ? {} : reading.fieldErrors), ...noteErrors(note) };
    if (!reading.ok || !note.success || note.data === '') throw new DomainError('invalid-input', 'Some measurements cannot be saved as they stand.', { fieldErrors });
    if (latest && canonicalJson(latest.scene) === canonicalJson(reading.scene)) return version;
    await insertScene(tx, { caseId: found.row.id, version: version + 1, scene: reading.scene, note: [note.data, ...reading.bearingNotes].join(' '), authorId: actor.userId });
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: 'scene.saved',
      subject: 'scenes',
      subjectId: `${found.row.id}:${version + 1}`,
      summary: `Measurements, version ${version + 1}.`,
      reason: [note.data, ...reading.bearingNotes].join(' '),
      ...(latest ? { before: { scene: latest.scene } } : {}),
      after: { scene: reading.scene },
    });
    return version + 1;
  });
}

function noteErrors(note: { success: boolean; data?: string }): Record<string, string[]> {
  if (!note.success) return { note: ['Keep the note under 500 characters.'] };
  return note.data === '' ? { note: ['Say in a few words what was measured or changed, and by whom.'] } : {};
}

function measuredOn(typed: Typed, now: Date): Date {
  const day = typed['measuredOn'] ?? '';
  return /^\d{4}-\d{2}-\d{2}$/u.test(day) ? new Date(`${day}T12:00:00Z`) : now;
}
