import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, users, weatherRecords } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { StoredWeather } from '#app/domain/relied-weather.ts';
import type { WeatherSeries } from '#app/domain/weather.ts';
import { visibleTo } from './scope.server.ts';

export type WeatherRow = typeof weatherRecords.$inferSelect;
export type NewWeather = Omit<typeof weatherRecords.$inferInsert, 'number' | 'id' | 'createdAt'>;

/** Records of a case, oldest first, those set aside among them. */
export async function listWeather(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<(WeatherRow & { readonly addedBy: string })[]> {
  const rows = await db
    .select({ record: weatherRecords, addedBy: users.displayName })
    .from(weatherRecords)
    .innerJoin(cases, eq(cases.id, weatherRecords.caseId))
    .innerJoin(users, eq(users.id, weatherRecords.createdById))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(asc(weatherRecords.number));
  return rows.map((row) => ({ ...row.record, addedBy: row.addedBy }));
}

const seriesColumns = {
  number: weatherRecords.number,
  kind: weatherRecords.kind,
  nature: weatherRecords.nature,
  sourceName: weatherRecords.sourceName,
  station: weatherRecords.station,
  stationDistanceKm: weatherRecords.stationDistanceKm,
  intervalMin: weatherRecords.intervalMin,
  values: weatherRecords.values,
} as const;

/** What a run may go by: the records of a case that stand; the caller has already found the case. */
export function standingWeather(db: DbOrTx, caseId: string): Promise<WeatherSeries[]> {
  return db
    .select(seriesColumns)
    .from(weatherRecords)
    .where(and(eq(weatherRecords.caseId, caseId), isNull(weatherRecords.setAsideAt)))
    .orderBy(asc(weatherRecords.number));
}

/** Every record of a case, those set aside among them: a run may have gone by one of them. The caller has already found the case. */
export function weatherOfCase(db: DbOrTx, caseId: string): Promise<StoredWeather[]> {
  return db
    .select({ ...seriesColumns, stationBearingDeg: weatherRecords.stationBearingDeg, setAsideAt: weatherRecords.setAsideAt })
    .from(weatherRecords)
    .where(eq(weatherRecords.caseId, caseId))
    .orderBy(asc(weatherRecords.number));
}

/** Stores a record under the next number of its case; null when the same values of the same source stand already. */
export async function insertWeather(tx: Transaction, record: NewWeather): Promise<{ id: string; number: number } | null> {
  const [row] = await tx
    .insert(weatherRecords)
    .values({ ...record, number: sql`(select coalesce(max(${weatherRecords.number}), 0) + 1 from ${weatherRecords} where ${weatherRecords.caseId} = ${record.caseId})` })
    .onConflictDoNothing()
    .returning({ id: weatherRecords.id, number: weatherRecords.number });
  return row ?? null;
}

/** False when there is no such record, or it is set aside already. */
export async function markSetAside(tx: Transaction, params: { caseId: string; number: number; byId: string; reason: string }): Promise<boolean> {
  const rows = await tx
    .update(weatherRecords)
    .set({ setAsideAt: sql`now()`, setAsideById: params.byId, setAsideReason: params.reason })
    .where(and(eq(weatherRecords.caseId, params.caseId), eq(weatherRecords.number, params.number), isNull(weatherRecords.setAsideAt)))
    .returning({ id: weatherRecords.id });
  return rows.length > 0;
}
