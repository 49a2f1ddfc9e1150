import { csvText } from './csv.ts';
import type { CsvValue } from './csv.ts';
import { formatDayClock } from './local-time.ts';
import type { ReliedWeather } from './relied-weather.ts';
import type { Treatment } from './release-policy.ts';
import type { RedactedText, ReleasedCase } from './released-case.ts';
import { meansWords, weatherQuantities } from './weather.ts';

type ReleasedWeather = NonNullable<ReleasedCase['weather']>;

/**
 * Bearing and exact distance of a known station give the place, so the bearing stays in the house and the distance is
 * rounded. A reader who may not know the place is not told which station it was.
 *
 * @param source Name of the source as decided on.
 */
export function releasedWeather(weather: ReliedWeather | null, how: Treatment, source: RedactedText): ReleasedWeather | null {
  if (!weather || how === 'removed') return null;
  const { number: record, nature, distanceKm, basis, intervalMin, setAside, values } = weather;
  return {
    number: record,
    nature,
    source: how === 'shown' ? source : [{ withheld: 'exact-place' as const }],
    distanceKm: distanceKm === null ? null : Math.max(1, Math.round(distanceKm)),
    basis,
    intervalMin,
    setAside,
    values: [...values],
  };
}

/** Every value as a row of a file for a spreadsheet; null where the release holds no weather. */
export function weatherCsv({ weather, zone }: Pick<ReleasedCase, 'weather' | 'zone'>): string | null {
  if (!weather) return null;
  const local = (utc: string) => formatDayClock(new Date(utc), zone);
  return csvText(
    ['from (UTC)', 'to (UTC)', `from (${zone})`, `to (${zone})`, 'kind of value', 'direct as used (W/m²)', ...weatherQuantities.map(({ label, unit }) => `${label.toLowerCase()} (${unit})`)],
    weather.values.map((value): CsvValue[] => [value.startUtc, value.endUtc, local(value.startUtc), local(value.endUtc), meansWords(weather.intervalMin), value.usedWm2, ...weatherQuantities.map(({ key }) => value[key] ?? null)]),
  );
}
