import { reconstructionInput } from './reconstruction-input.ts';
import type { SceneSite, SceneTimes } from './reconstruction-input.ts';
import { sceneSchema } from './scene.ts';
import type { Scene } from './scene.ts';
import type { WeatherSeries } from './weather.ts';

/** What is recorded of a case, as far as a reconstruction needs it. */
export interface DraftSource {
  readonly caseNumber: number;
  readonly scene: Scene | null;
  readonly site: SceneSite;
  readonly times: SceneTimes;
  readonly weather?: readonly WeatherSeries[];
}

/** The calendar of return runs from the onset to thirteen months from now, and is cut at five years. */
const dayMs = 86_400_000;
const calendarAheadMs = 400 * dayMs;
const longestCalendarMs = 5 * 365 * dayMs;

/** The engine's input for a case as it stands now, with the origin of each value and what is missing. */
export function draftInput(source: DraftSource, now: Date) {
  const from = source.times.onsetEarliestAt ?? source.times.onsetLatestAt ?? source.times.foundAt ?? now;
  const to = Math.min(now.getTime() + calendarAheadMs, from.getTime() + longestCalendarMs);
  return reconstructionInput({
    scene: source.scene ?? sceneSchema.parse({}),
    site: source.site,
    times: source.times,
    weather: source.weather,
    seed: source.caseNumber,
    // Whole days, so that two requests on one day ask for the same and hash alike.
    recurrenceToUtc: new Date(Math.floor(to / dayMs) * dayMs).toISOString(),
  });
}
