import { eq } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { sites } from '#db/schema/all.ts';
import type { SceneSkyline } from '#app/domain/scene.ts';
import type { CaseRow } from './case-subject.server.ts';

export interface CasePlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly zone: string;
  readonly skyline: SceneSkyline | null;
}

/** Where a case is: its own pin, else its site. */
export async function casePlace(db: DbOrTx, row: Pick<CaseRow, 'siteId' | 'latitudeDeg' | 'longitudeDeg' | 'zone' | 'number'>): Promise<CasePlace> {
  const [site] = await db.select({ latitudeDeg: sites.latitudeDeg, longitudeDeg: sites.longitudeDeg, elevationM: sites.elevationM, skyline: sites.skyline }).from(sites).where(eq(sites.id, row.siteId));
  if (!site) throw new Error(`The site of case ${row.number} is missing.`);
  return { ...site, latitudeDeg: row.latitudeDeg ?? site.latitudeDeg, longitudeDeg: row.longitudeDeg ?? site.longitudeDeg, zone: row.zone };
}
