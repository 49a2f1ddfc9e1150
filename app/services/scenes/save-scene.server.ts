import { inTransaction } from '#db/client.server.ts';
import { casePlace } from '#db/queries/case-place.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { plainText } from '#app/domain/incident.ts';
import { localDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { stampMeasures } from '#app/domain/scene-form-fields.ts';
import type { Typed } from '#app/domain/scene-form.ts';
import { readSceneForm } from '#app/domain/scene-form.ts';
import { declinationAt } from './declination.server.ts';
import { lockScene, noteErrors, writeScene } from './write-scene.server.ts';

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
    const locked = await lockScene(tx, actor, request.caseNumber, request.baseVersion);
    const day = measuredOn(typed, locked.row.zone, now);
    const reading = readSceneForm(typed, declinationAt(await casePlace(tx, locked.row), day.at));
    const fieldErrors = { ...(reading.ok ? {} : reading.fieldErrors), ...noteErrors(request.note), ...day.errors };
    if (!reading.ok || Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'Some measurements cannot be saved as they stand.', { fieldErrors });
    const by = (typed['measuredBy'] ?? '').trim().slice(0, 120) || actor.displayName;
    const scene = stampMeasures(locked.scene, reading.scene, { by, on: day.on });
    return writeScene(tx, locked, { actor, scene, note: [plainText(500).parse(request.note), ...reading.bearingNotes].join(' ') });
  });
}

/** The day on which the values were taken; a day to come is refused. */
function measuredOn(typed: Typed, zone: string, now: Date): { readonly at: Date; readonly on: string; readonly errors: Record<string, string[]> } {
  const today = localDay(now, zone);
  const day = typed['measuredOn'] ?? '';
  if (!/^\d{4}-\d{2}-\d{2}$/u.test(day)) return { at: now, on: today, errors: {} };
  const errors: Record<string, string[]> = day > today ? { measuredOn: ['That day is still to come. Give the day on which it was measured.'] } : {};
  return { at: new Date(`${day}T12:00:00Z`), on: day, errors };
}
