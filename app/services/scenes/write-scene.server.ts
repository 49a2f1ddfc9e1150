import type { Transaction } from '#db/client.server.ts';
import type { CaseRow } from '#db/queries/case-subject.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertScene, latestScene } from '#db/queries/scenes.server.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { plainText } from '#app/domain/incident.ts';
import { withReporterFacts } from '#app/domain/reporter-facts.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { Scene } from '#app/domain/scene.ts';
import { authorize } from '#app/services/authorize.ts';

export interface LockedScene {
  readonly row: CaseRow;
  readonly version: number;
  readonly scene: Scene | null;
}

/**
 * The newest scene of a case under the lock of the case, for somebody who may change it.
 *
 * @param baseVersion Version that the page was filled from; 0 when there was none.
 * @throws DomainError `not-found`, `forbidden`, or `conflict` when somebody saved a version in between.
 */
export async function lockScene(tx: Transaction, actor: Actor, caseNumber: number, baseVersion: number): Promise<LockedScene> {
  const found = await lockCase(tx, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'case:edit-facts', found.subject);
  const latest = await latestScene(tx, found.row.id);
  const version = latest?.version ?? 0;
  if (version !== baseVersion) throw new DomainError('conflict', `Version ${version} of the measurements was saved while this page was open. What you typed is kept; load the page again to see that version.`);
  return { row: found.row, version, scene: latest?.scene ?? null };
}

/** What is wrong with the note of a version, by field; empty when it can be kept. */
export function noteErrors(note: string): Record<string, string[]> {
  const read = plainText(500).safeParse(note);
  if (!read.success) return { note: ['Keep the note under 500 characters.'] };
  return read.data === '' ? { note: ['Say in a few words what was measured or changed, and by whom.'] } : {};
}

export interface NewScene {
  readonly actor: Actor;
  readonly scene: Scene;
  readonly note: string;
  /** More for the log: what the numbers were read from. */
  readonly evidence?: Record<string, unknown>;
}

/** Stores the next version with its log line; nothing is stored when nothing changed. Returns the newest version. */
export async function writeScene(tx: Transaction, locked: LockedScene, { actor, scene: measured, note, evidence = {} }: NewScene): Promise<number> {
  const { row, version } = locked;
  const scene = withReporterFacts(measured, locked.scene);
  if (locked.scene && canonicalJson(locked.scene) === canonicalJson(scene)) return version;
  await insertScene(tx, { caseId: row.id, version: version + 1, scene, note, authorId: actor.userId });
  await insertLogEntry(tx, {
    actorId: actor.userId,
    actorName: actor.displayName,
    organisationId: row.organisationId,
    caseId: row.id,
    event: 'scene.saved',
    subject: 'scenes',
    subjectId: `${row.id}:${version + 1}`,
    summary: `Measurements, version ${version + 1}.`,
    reason: note,
    ...(locked.scene ? { before: { scene: locked.scene } } : {}),
    after: { scene, ...evidence },
  });
  return version + 1;
}
