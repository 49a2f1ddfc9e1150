import { z } from 'zod';
import type { WeatherValue } from '#app/domain/weather.ts';

/**
 * Client of an hourly weather archive. The answer is the JSON that open weather archives give: `hourly.time` as unix
 * seconds at the end of each hour, and one array a quantity beside it, with nulls where nothing is known.
 */
export interface ArchiveOptions {
  /** Address without a query; the parameters are added. */
  readonly url: string;
  readonly timeoutMs?: number;
  /** Pauses before the second and third try. [ms] */
  readonly pausesMs?: readonly number[];
  readonly fetch?: typeof fetch;
}
export interface ArchiveQuestion {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  /** UTC days, YYYY-MM-DD, both included. */
  readonly firstOn: string;
  readonly lastOn: string;
}

/** Why there is no answer, as a sentence for the person who asked. */
export class ArchiveError extends Error {
  override readonly name = 'ArchiveError';
}

const series = z.array(z.number().nullable());
const answerSchema = z.object({
  hourly: z.object({
    time: z.array(z.number().int()).max(1_000),
    direct_normal_irradiance: series.optional(),
    shortwave_radiation: series.optional(),
    sunshine_duration: series.optional(),
    cloud_cover: series.optional(),
    temperature_2m: series.optional(),
    surface_pressure: series.optional(),
    wind_speed_10m: series.optional(),
  }),
});
type Hourly = z.infer<typeof answerSchema>['hourly'];

const hourMs = 3_600_000;
const biggestAnswerBytes = 2_000_000;
const asked = ['direct_normal_irradiance', 'shortwave_radiation', 'sunshine_duration', 'cloud_cover', 'temperature_2m', 'surface_pressure', 'wind_speed_10m'];

/** Hour means over [start, end) of what the archive holds. The place is rounded to 0.01°, finer than any archive. */
export function archiveAddress(url: string, question: ArchiveQuestion): string {
  const address = new URL(url);
  const parameters = { latitude: question.latitudeDeg.toFixed(2), longitude: question.longitudeDeg.toFixed(2), start_date: question.firstOn, end_date: question.lastOn, hourly: asked.join(','), timeformat: 'unixtime', timezone: 'GMT', wind_speed_unit: 'ms' };
  for (const [name, value] of Object.entries(parameters)) address.searchParams.set(name, value);
  return address.toString();
}

function valuesOf(hourly: Hourly): WeatherValue[] {
  return hourly.time.flatMap((second, index) => {
    const at = (values: readonly (number | null)[] | undefined, factor = 1): number | undefined => {
      const value = values?.[index];
      return value === null || value === undefined ? undefined : Math.round(value * factor * 100) / 100;
    };
    const read = Object.entries({
      directWm2: at(hourly.direct_normal_irradiance),
      globalWm2: at(hourly.shortwave_radiation),
      sunshineMin: at(hourly.sunshine_duration, 1 / 60),
      cloudOktas: at(hourly.cloud_cover, 0.08),
      temperatureC: at(hourly.temperature_2m),
      pressureHpa: at(hourly.surface_pressure),
      windMs: at(hourly.wind_speed_10m),
    }).filter(([, value]) => value !== undefined);
    if (read.length === 0) return [];
    const endMs = second * 1_000;
    return [{ startUtc: new Date(endMs - hourMs).toISOString(), endUtc: new Date(endMs).toISOString(), ...Object.fromEntries(read) }];
  });
}

async function askOnce(address: string, { timeoutMs = 8_000, fetch: ask = fetch }: ArchiveOptions): Promise<{ readonly values: WeatherValue[]; readonly text: string } | 'again'> {
  let response: Response;
  let text: string;
  try {
    response = await ask(address, { headers: { Accept: 'application/json' }, redirect: 'error', signal: AbortSignal.timeout(timeoutMs) });
    text = await response.text();
  } catch {
    // No connection, or no answer in time: both are worth another try.
    return 'again';
  }
  if (response.status === 429 || response.status >= 500) return 'again';
  if (!response.ok) throw new ArchiveError(`The archive refused the question (${response.status}). Its address or key may need care; ask whoever runs this server.`);
  if (text.length > biggestAnswerBytes) throw new ArchiveError('The archive sent far more than was asked for, so its answer was not read.');
  const answer = answerSchema.safeParse(readJson(text));
  if (!answer.success) throw new ArchiveError('The archive answered in a form that is not known here, so nothing was taken from it.');
  return { values: valuesOf(answer.data.hourly), text };
}

function readJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    // Not JSON: the schema then refuses it with a sentence.
    return null;
  }
}

const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

/** Answers of this process, so that a page loaded again asks nobody. Old days do not change. */
const keptAnswers = new Map<string, { readonly values: WeatherValue[]; readonly text: string }>();
const mostKept = 50;

/**
 * Asks the archive, three times at most.
 *
 * @throws ArchiveError with a sentence, when there is no usable answer.
 */
export async function askArchive(question: ArchiveQuestion, options: ArchiveOptions): Promise<{ readonly values: readonly WeatherValue[]; readonly text: string; readonly address: string }> {
  const address = archiveAddress(options.url, question);
  const kept = keptAnswers.get(address);
  if (kept) return { ...kept, address };
  for (const waitMs of [0, ...(options.pausesMs ?? [400, 1_500])]) {
    if (waitMs > 0) await pause(waitMs);
    const answer = await askOnce(address, options);
    if (answer === 'again') continue;
    if (keptAnswers.size >= mostKept) keptAnswers.delete(keptAnswers.keys().next().value ?? '');
    if (answer.values.length > 0) keptAnswers.set(address, answer);
    return { ...answer, address };
  }
  throw new ArchiveError('The archive did not answer. Nothing was changed; try again in a few minutes, or import a file.');
}
