import type { DbOrTx } from '#db/client.server.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { weatherView } from '#app/domain/weather-view.ts';
import type { WeatherView } from '#app/domain/weather-view.ts';
import { weatherWindow } from '#app/domain/weather-window.ts';
import { getMeasuredCase } from './measure-pages.server.ts';
import { listWeather } from './weather.server.ts';

export interface WeatherPage extends WeatherView {
  readonly caseNumber: number;
  readonly zone: string;
  readonly mayEdit: boolean;
  readonly whoEdits: string;
  readonly windowWords: string | null;
}

/** Records of a case and the trace of the one that a run goes by. @throws DomainError `not-found`, `forbidden` */
export async function getWeatherPage(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<WeatherPage> {
  const { row, place, scene, mayEdit, whoEdits } = await getMeasuredCase(db, params);
  const records = await listWeather(db, params);
  const window = weatherWindow(row);
  return {
    ...weatherView({ records, window, place: { ...place, climateClass: scene.air.climateClass }, sceneDni: scene.air.dni ?? null }),
    caseNumber: params.caseNumber,
    zone: row.zone,
    mayEdit,
    whoEdits,
    windowWords: window ? `${formatDayClock(window.from, row.zone)} to ${formatDayClock(window.to, row.zone)}` : null,
  };
}
