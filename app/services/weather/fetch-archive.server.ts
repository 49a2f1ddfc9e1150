import { db } from '#db/client.server.ts';
import { casePlace } from '#db/queries/case-place.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { weatherWindow } from '#app/domain/weather-window.ts';
import { keptAroundWindowMs, withinSpan } from '#app/domain/weather.ts';
import { env } from '#app/env.server.ts';
import { authorize } from '#app/services/authorize.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { addWeather } from './add-weather.server.ts';
import { ArchiveError, askArchive } from './archive-client.server.ts';

/** Sentence shown where no archive is set up. */
export const archiveOffSentence = 'No weather archive is set up on this server. Whoever runs it can name one in WEATHER_API_URL; until then, import a station file or type the values.';

/**
 * Fetches the hours around the onset window from the archive and keeps them as a record.
 *
 * @returns false when the same values are there already.
 * @throws DomainError `invalid-state` when no archive is set up, no window is known, or the archive does not answer.
 */
export async function fetchArchive(request: { actor: Actor; caseNumber: number }): Promise<boolean> {
  const { actor, caseNumber } = request;
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  authorize(actor, 'case:edit-facts', found.subject);
  if (!env.WEATHER_API_URL) throw new DomainError('invalid-state', archiveOffSentence);
  const window = weatherWindow(found.row);
  if (!window) throw new DomainError('invalid-state', 'Give the time at which the mark was found, or the onset window, first: the archive is asked for the hours around it.');
  const place = await casePlace(db, found.row);
  const [fromMs, toMs] = [window.from.getTime() - keptAroundWindowMs, window.to.getTime() + keptAroundWindowMs];
  const day = (ms: number) => new Date(ms).toISOString().slice(0, 10);
  try {
    const answer = await askArchive({ latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, firstOn: day(fromMs), lastOn: day(toMs) }, { url: env.WEATHER_API_URL });
    const values = withinSpan(answer.values, fromMs, toMs);
    if (values.length === 0) throw new DomainError('invalid-state', 'The archive has no values for these days. Recent days come with some days of delay.');
    const source = { sourceName: new URL(env.WEATHER_API_URL).host, station: 'grid cell of the archive', stationDistanceKm: null, stationBearingDeg: null, licenceNote: env.WEATHER_API_LICENCE, nature: 'archive' } as const;
    return await addWeather({ actor, caseNumber, kind: 'archive', source, values, fileSha256: sha256Hex(Buffer.from(answer.text)), mapping: { question: new URL(answer.address).search.replace(/&?apikey=[^&]*/u, '') } });
  } catch (error) {
    if (error instanceof ArchiveError) throw new DomainError('invalid-state', error.message);
    throw error;
  }
}
