import type { DbOrTx } from '#db/client.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import type { Scene } from '#app/domain/scene.ts';
import { whyClosed } from '#app/domain/why-closed.ts';
import { casePlace } from './case-place.server.ts';
import type { CasePlace } from './case-place.server.ts';
import { findCase } from './case-subject.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { latestScene } from './scenes.server.ts';

/** What every page of the measurements of a case starts from. */
export interface MeasuredCase {
  readonly row: CaseRow;
  readonly place: CasePlace;
  readonly scene: Scene;
  /** 0 while nothing has been measured. */
  readonly version: number;
  readonly mayEdit: boolean;
  readonly whoEdits: string;
}

/** @throws DomainError `not-found`; `forbidden` to those who may not read measurements. */
export async function getMeasuredCase(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<MeasuredCase> {
  const found = await findCase(db, params.actor, params.caseNumber);
  if (!found) throw notFound(`Case ${params.caseNumber}`);
  if (!canOnCase(params.actor, 'reconstruction:read', found.subject)) throw new DomainError('forbidden', `The measurements are not open to you. ${whoCan('reconstruction:read')}`);
  const latest = await latestScene(db, found.row.id);
  return {
    row: found.row,
    place: await casePlace(db, found.row),
    scene: latest?.scene ?? sceneSchema.parse({}),
    version: latest?.version ?? 0,
    mayEdit: canOnCase(params.actor, 'case:edit-facts', found.subject),
    whoEdits: whyClosed(params.actor, 'case:edit-facts', found.subject),
  };
}
