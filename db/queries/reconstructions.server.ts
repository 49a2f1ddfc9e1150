import { and, desc, eq, isNotNull, ne, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, reconstructions, scenes, sites, sunReturns, users } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { Scene, SceneSkyline } from '#app/domain/scene.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import type { WeatherSeries } from '#app/domain/weather.ts';
import { visibleTo } from './scope.server.ts';
import { standingWeather } from './weather.server.ts';

export interface ReconstructionSource {
  readonly caseId: string;
  readonly caseNumber: number;
  readonly sceneVersion: number | null;
  readonly scene: Scene | null;
  readonly site: { readonly latitudeDeg: number; readonly longitudeDeg: number; readonly elevationM: number; readonly zone: string; readonly skyline: SceneSkyline | null };
  readonly times: { readonly onsetEarliestAt: Date | null; readonly onsetLatestAt: Date | null; readonly foundAt: Date | null; readonly foundClockErrorS: number; readonly foundPrecision: string };
  readonly weather: readonly WeatherSeries[];
}

/** What a reconstruction of the case is made from: the newest scene, the place and the times. */
export async function getReconstructionSource(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<ReconstructionSource | null> {
  const [row] = await db
    .select({ row: cases, site: sites })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)));
  if (!row) return null;
  const [scene] = await db.select({ version: scenes.version, scene: scenes.scene }).from(scenes).where(eq(scenes.caseId, row.row.id)).orderBy(desc(scenes.version)).limit(1);
  const { onsetEarliestAt, onsetLatestAt, foundAt, foundClockErrorS, foundPrecision } = row.row;
  return {
    caseId: row.row.id,
    caseNumber: row.row.number,
    sceneVersion: scene?.version ?? null,
    scene: scene?.scene ?? null,
    site: {
      latitudeDeg: row.row.latitudeDeg ?? row.site.latitudeDeg,
      longitudeDeg: row.row.longitudeDeg ?? row.site.longitudeDeg,
      elevationM: row.site.elevationM,
      zone: row.row.zone,
      skyline: row.site.skyline,
    },
    times: { onsetEarliestAt, onsetLatestAt, foundAt, foundClockErrorS, foundPrecision },
    weather: await standingWeather(db, row.row.id),
  };
}

export interface NewReconstruction {
  readonly caseId: string;
  readonly sceneVersion: number | null;
  readonly input: ReconstructionInput;
  readonly inputHash: string;
  readonly engineVersion: string;
  readonly requestedById: string;
  readonly note: string;
}

/** Stores a queued run under the next number of its case; the caller holds the lock on the case. */
export async function insertReconstruction(tx: Transaction, run: NewReconstruction): Promise<{ id: string; number: number }> {
  const [row] = await tx
    .insert(reconstructions)
    .values({ ...run, number: sql`(select coalesce(max(${reconstructions.number}), 0) + 1 from ${reconstructions} where ${reconstructions.caseId} = ${run.caseId})` })
    .returning({ id: reconstructions.id, number: reconstructions.number });
  if (!row) throw new Error('The reconstruction was not stored.');
  return row;
}

const lineColumns = {
  id: reconstructions.id,
  number: reconstructions.number,
  state: reconstructions.state,
  sceneVersion: reconstructions.sceneVersion,
  inputHash: reconstructions.inputHash,
  engineVersion: reconstructions.engineVersion,
  progressDone: reconstructions.progressDone,
  progressTotal: reconstructions.progressTotal,
  failure: reconstructions.failure,
  note: reconstructions.note,
  attachedAt: reconstructions.attachedAt,
  supersededAt: reconstructions.supersededAt,
  createdAt: reconstructions.createdAt,
  finishedAt: reconstructions.finishedAt,
  requestedBy: users.displayName,
} as const;

/** Runs of one case, newest first, without their input and result. */
export function listReconstructions(db: DbOrTx, params: { actor: Actor; caseNumber: number }) {
  return db
    .select({
      ...lineColumns,
      totals: sql<ReconstructionResult['totals'] | null>`${reconstructions.result} -> 'totals'`,
      grade: sql<ReconstructionResult['grade'] | null>`${reconstructions.result} -> 'grade'`,
      window: sql<{ readonly startUtc: string; readonly endUtc: string }>`coalesce(${reconstructions.result} -> 'window', ${reconstructions.input} -> 'window')`,
    })
    .from(reconstructions)
    .innerJoin(cases, eq(cases.id, reconstructions.caseId))
    .leftJoin(users, eq(users.id, reconstructions.requestedById))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)))
    .orderBy(desc(reconstructions.number));
}
export type ReconstructionLine = Awaited<ReturnType<typeof listReconstructions>>[number];

/** One run, whole; null when it is not there or the case is not the actor's to see. */
export async function getReconstruction(db: DbOrTx, params: { actor: Actor; caseNumber: number; number: number }) {
  const [row] = await db
    .select({ ...lineColumns, input: reconstructions.input, result: reconstructions.result, resultHash: reconstructions.resultHash, zoneRules: reconstructions.zoneRules, zone: cases.zone, caseId: cases.id, runCount: sql<number>`(select count(*)::int from reconstructions other where other.case_id = ${cases.id})` })
    .from(reconstructions)
    .innerJoin(cases, eq(cases.id, reconstructions.caseId))
    .leftJoin(users, eq(users.id, reconstructions.requestedById))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber), eq(reconstructions.number, params.number)));
  return row ?? null;
}
export type ReconstructionWhole = NonNullable<Awaited<ReturnType<typeof getReconstruction>>>;

/** Takes a run for this worker; null when it is finished, or gone. Called again after a crash, it takes it once more. */
export async function claimReconstruction(db: DbOrTx, reconstructionId: string): Promise<{ input: ReconstructionInput } | null> {
  const [row] = await db
    .update(reconstructions)
    .set({ state: 'running', startedAt: sql`now()`, failure: null })
    .where(and(eq(reconstructions.id, reconstructionId), ne(reconstructions.state, 'done')))
    .returning({ input: reconstructions.input });
  return row ?? null;
}

export async function updateProgress(db: DbOrTx, reconstructionId: string, done: number, total: number): Promise<void> {
  await db.update(reconstructions).set({ progressDone: done, progressTotal: total }).where(and(eq(reconstructions.id, reconstructionId), eq(reconstructions.state, 'running')));
}

/** Writes the result once; a second writer finds the run done and changes nothing. */
export async function storeResult(db: DbOrTx, reconstructionId: string, values: { result: ReconstructionResult; resultHash: string; zoneRules: string }): Promise<void> {
  await db
    .update(reconstructions)
    .set({ ...values, state: 'done', finishedAt: sql`now()`, progressDone: values.result.window.minutes, progressTotal: values.result.window.minutes })
    .where(and(eq(reconstructions.id, reconstructionId), ne(reconstructions.state, 'done')));
}

export async function storeFailure(db: DbOrTx, reconstructionId: string, failure: string): Promise<void> {
  await db.update(reconstructions).set({ state: 'failed', failure, finishedAt: sql`now()` }).where(and(eq(reconstructions.id, reconstructionId), ne(reconstructions.state, 'done')));
}

/** The finished run under its number, for attaching; the caller holds the lock on the case. */
export async function getFinishedRun(tx: Transaction, caseId: string, number: number): Promise<{ id: string; number: number; result: ReconstructionResult } | null> {
  const [row] = await tx
    .select({ id: reconstructions.id, number: reconstructions.number, result: reconstructions.result })
    .from(reconstructions)
    .where(and(eq(reconstructions.caseId, caseId), eq(reconstructions.number, number), eq(reconstructions.state, 'done')));
  return row?.result ? { ...row, result: row.result } : null;
}

/** Makes one run the attached one; the one before is kept and marked as superseded. */
export async function markAttached(tx: Transaction, caseId: string, reconstructionId: string, actorId: string): Promise<void> {
  await tx
    .update(reconstructions)
    .set({ supersededAt: sql`now()` })
    .where(and(eq(reconstructions.caseId, caseId), isNotNull(reconstructions.attachedAt), ne(reconstructions.id, reconstructionId), sql`${reconstructions.supersededAt} is null`));
  await tx.update(reconstructions).set({ attachedAt: sql`now()`, attachedById: actorId, supersededAt: null }).where(eq(reconstructions.id, reconstructionId));
}

/** Replaces the days of return by those of the attached run. */
export async function replaceSunReturns(tx: Transaction, caseId: string, reconstructionId: string, result: ReconstructionResult): Promise<void> {
  await tx.delete(sunReturns).where(eq(sunReturns.caseId, caseId));
  const days = result.recurrence.flatMap((band) => band.days);
  if (days.length === 0) return;
  await tx.insert(sunReturns).values(
    days.map((day) => ({ caseId, reconstructionId, onDay: day.on, bestAt: new Date(day.bestUtc), fromAt: new Date(day.fromUtc), toAt: new Date(day.toUtc), minutes: day.minutes })),
  );
}
