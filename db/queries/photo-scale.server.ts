import { and, desc, eq, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, logEntries, photos } from '#db/schema/all.ts';
import type { PhotoClicks } from '#app/domain/photo-measure.ts';
import type { ScaledPhoto } from '#app/domain/photo-trail.ts';
import type { Actor } from '#app/domain/roles.ts';
import { visibleTo } from './scope.server.ts';

/** The photo on which the mark was measured last, with the points that give its plane; null where none was. */
export async function getScaledPhoto(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<ScaledPhoto | null> {
  const [row] = await db
    .select({ photoId: photos.id, label: photos.label, altText: photos.altText, clicks: sql<PhotoClicks>`${logEntries.after} -> 'clicks'` })
    .from(logEntries)
    .innerJoin(cases, eq(cases.id, logEntries.caseId))
    .innerJoin(photos, and(eq(photos.caseId, cases.id), sql`${photos.id}::text = ${logEntries.after} ->> 'photoId'`, eq(photos.state, 'ready')))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), sql`${logEntries.after} ? 'clicks'`))
    .orderBy(desc(logEntries.sequence))
    .limit(1);
  return row ? { ...row, label: `${params.caseNumber}-${row.label ?? ''}` } : null;
}
