import type { DemoCase } from '#fixtures/demo/demo-case.ts';
import type { Transaction } from '#db/client.server.ts';
import { reconstructions, sunReturns } from '#db/schema/all.ts';
import { localDay } from '#app/domain/local-time.ts';
import type { WeatherSeries } from '#app/domain/weather.ts';
import { reconstructionInput } from '#app/domain/reconstruction-input.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { moment } from './moment.ts';
import type { DemoSiteRow } from './people-and-sites.ts';

/** Computes the reconstruction of a demonstration case with the engine, here and now, and attaches it. */
export async function seedRun(tx: Transaction, demo: DemoCase, target: { caseId: string; site: DemoSiteRow; investigatorId: string; at: Date; recurrenceTo: Date; weather: readonly WeatherSeries[] }): Promise<string | null> {
  if (!demo.scene) return null;
  const { site } = target;
  const request = reconstructionInput({
    scene: demo.scene,
    site,
    times: {
      onsetEarliestAt: demo.onset ? moment(demo.onset.earliest, site.zone) : null,
      onsetLatestAt: demo.onset ? moment(demo.onset.latest, site.zone) : null,
      foundAt: demo.found.local ? moment(demo.found.local, site.zone) : null,
      foundClockErrorS: demo.found.clockErrorS ?? 0,
      foundPrecision: demo.found.precision,
    },
    weather: target.weather,
    seed: demo.number,
    recurrenceToUtc: target.recurrenceTo.toISOString(),
  });
  if (!request.input) throw new Error(`Case ${demo.number}: ${request.missing.join(' ')}`);
  const result = reconstruct(request.input);
  const [row] = await tx
    .insert(reconstructions)
    .values({
      caseId: target.caseId,
      number: 1,
      state: 'done',
      sceneVersion: 1,
      input: request.input,
      inputHash: hashOf(request.input),
      engineVersion,
      zoneRules: process.versions.tz ?? '',
      result,
      resultHash: hashOf(result),
      progressDone: result.window.minutes,
      progressTotal: result.window.minutes,
      requestedById: target.investigatorId,
      attachedById: target.investigatorId,
      attachedAt: target.at,
      startedAt: target.at,
      finishedAt: target.at,
      createdAt: target.at,
    })
    .returning({ id: reconstructions.id });
  if (!row) throw new Error('The reconstruction was not stored.');
  const days = result.recurrence.flatMap((band) => band.days);
  if (days.length > 0) {
    await tx.insert(sunReturns).values(
      days.map((day) => ({ caseId: target.caseId, reconstructionId: row.id, onDay: day.on || localDay(new Date(day.bestUtc), site.zone), bestAt: new Date(day.bestUtc), fromAt: new Date(day.fromUtc), toAt: new Date(day.toUtc), minutes: day.minutes })),
    );
  }
  return row.id;
}
