import { and, desc, eq } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, scenes, users } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { Scene } from '#app/domain/scene.ts';
import { visibleTo } from './scope.server.ts';

/** Newest version of the measured scene; the caller has already found the case. */
export async function latestScene(db: DbOrTx, caseId: string): Promise<{ version: number; scene: Scene } | null> {
  const [row] = await db.select({ version: scenes.version, scene: scenes.scene }).from(scenes).where(eq(scenes.caseId, caseId)).orderBy(desc(scenes.version)).limit(1);
  return row ?? null;
}

export async function insertScene(tx: Transaction, values: { caseId: string; version: number; scene: Scene; note: string; authorId: string | null }): Promise<void> {
  await tx.insert(scenes).values(values);
}

export interface SceneVersionLine {
  readonly version: number;
  readonly createdAt: Date;
  readonly note: string;
  readonly authorName: string | null;
}

/** Versions of the scene, newest first. */
export function listSceneVersions(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<SceneVersionLine[]> {
  return db
    .select({ version: scenes.version, createdAt: scenes.createdAt, note: scenes.note, authorName: users.displayName })
    .from(scenes)
    .innerJoin(cases, eq(cases.id, scenes.caseId))
    .leftJoin(users, eq(users.id, scenes.authorId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(desc(scenes.version));
}
