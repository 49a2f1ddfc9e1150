import { inTransaction } from '#db/client.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertLogEntry } from '#db/queries/log.server.ts';
import { insertWeather, markSetAside } from '#db/queries/weather.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { plainText } from '#app/domain/incident.ts';
import type { Actor } from '#app/domain/roles.ts';
import { intervalOf, meansWords, mostWeatherValues } from '#app/domain/weather.ts';
import type { WeatherKind, WeatherSource, WeatherValue } from '#app/domain/weather.ts';
import { authorize } from '#app/services/authorize.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

export interface WeatherAddition {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly kind: WeatherKind;
  readonly source: WeatherSource;
  readonly values: readonly WeatherValue[];
  readonly fileSha256: string | null;
  /** Which column was read as what. */
  readonly mapping: Readonly<Record<string, string>>;
}

const kindWords: Record<WeatherKind, string> = { hand: 'typed by hand', file: 'from a file', archive: 'from the archive' };

/**
 * Adds a series of weather to a case. The same values of the same source a second time change nothing, so that a retry
 * never makes two.
 *
 * @returns false when they are there already.
 * @throws DomainError `not-found`, `forbidden`, `invalid-input`.
 */
export function addWeather({ actor, caseNumber, kind, source, values, fileSha256, mapping }: WeatherAddition): Promise<boolean> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'case:edit-facts', found.subject);
    if (values.length === 0) throw new DomainError('invalid-input', 'There is no value to keep.');
    if (values.length > mostWeatherValues) throw new DomainError('invalid-input', `At most ${mostWeatherValues} values are kept in one record. Cut the file to the days around the onset window.`);
    const sorted = values.toSorted((a, b) => a.startUtc.localeCompare(b.startUtc));
    const intervalMin = intervalOf(sorted);
    const record = await insertWeather(tx, { caseId: found.row.id, kind, ...source, intervalMin, fileSha256, mapping, values: sorted, valuesSha256: hashOf(sorted), createdById: actor.userId });
    if (!record) return false;
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: 'weather.added',
      subject: 'weather_records',
      subjectId: record.id,
      summary: `Weather record ${record.number} added, ${kindWords[kind]}: ${sorted.length} values, ${meansWords(intervalMin)}.`,
      after: { sourceName: source.sourceName, nature: source.nature, values: sorted.length, ...(fileSha256 ? { fileSha256 } : {}) },
    });
    return true;
  });
}

/** Takes a record out of use, with a reason; it stays readable, and runs that went by it stay as they were. */
export function setWeatherAside(request: { actor: Actor; caseNumber: number; number: number; reason: string }): Promise<void> {
  return inTransaction(async (tx) => {
    const { actor, caseNumber, number } = request;
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'case:edit-facts', found.subject);
    const reason = plainText(300).safeParse(request.reason);
    if (!reason.success || reason.data === '') throw new DomainError('invalid-input', 'The record still stands.', { fieldErrors: { reason: ['Say in a few words why it is not to be used, under 300 characters.'] } });
    if (!(await markSetAside(tx, { caseId: found.row.id, number, byId: actor.userId, reason: reason.data }))) throw new DomainError('invalid-state', 'That record is set aside already. Load the page again.');
    await insertLogEntry(tx, {
      actorId: actor.userId,
      actorName: actor.displayName,
      organisationId: found.row.organisationId,
      caseId: found.row.id,
      event: 'weather.set-aside',
      subject: 'weather_records',
      subjectId: `${found.row.id}:${number}`,
      summary: `Weather record ${number} set aside.`,
      reason: reason.data,
    });
  });
}
