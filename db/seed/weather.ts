import type { DemoCase } from '#fixtures/demo/demo-case.ts';
import type { Transaction } from '#db/client.server.ts';
import { weatherRecords } from '#db/schema/all.ts';
import { intervalOf } from '#app/domain/weather.ts';
import type { WeatherSeries } from '#app/domain/weather.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

/** The weather of a demonstration case, typed by its investigator; what a run may go by. */
export async function seedWeather(tx: Transaction, demo: DemoCase, target: { readonly caseId: string; readonly investigatorId: string; readonly at: Date }): Promise<WeatherSeries[]> {
  if (!demo.weather) return [];
  const record = { ...demo.weather, number: 1, kind: 'hand', intervalMin: intervalOf(demo.weather.values) } as const;
  await tx.insert(weatherRecords).values({ ...record, caseId: target.caseId, valuesSha256: hashOf(record.values), createdById: target.investigatorId, createdAt: target.at });
  return [record];
}
