import { sql } from 'drizzle-orm';
import { check, doublePrecision, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { WeatherValue } from '#app/domain/weather.ts';
import { weatherKinds, weatherNatures } from '#app/domain/weather.ts';
import { createdAt, id, instant } from './_columns.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

/** One series of weather from one source. It is never changed; a wrong one is set aside, with a reason. */
export const weatherRecords = pgTable(
  'weather_records',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    /** Within the case, from 1. */
    number: integer().notNull(),
    kind: text({ enum: weatherKinds }).notNull(),
    nature: text({ enum: weatherNatures }).notNull(),
    sourceName: text().notNull(),
    station: text().notNull().default(''),
    stationDistanceKm: doublePrecision(),
    /** From the case to the station, true. */
    stationBearingDeg: doublePrecision(),
    intervalMin: integer().notNull(),
    licenceNote: text().notNull().default(''),
    /** SHA-256 of the file or answer as it came; null for values typed by hand. */
    fileSha256: text(),
    /** Which column was read as what, or which question was asked. */
    mapping: jsonb().$type<Readonly<Record<string, string>>>().notNull().default({}),
    values: jsonb().$type<readonly WeatherValue[]>().notNull(),
    valuesSha256: text().notNull(),
    createdById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
    setAsideAt: instant(),
    setAsideById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    setAsideReason: text(),
  },
  (table) => [
    uniqueIndex('weather_records_case_number_key').on(table.caseId, table.number),
    // A retry, or the same file again, finds the record that is there.
    uniqueIndex('weather_records_same_values_key').on(table.caseId, table.sourceName, table.valuesSha256).where(sql`${table.setAsideAt} is null`),
    index('weather_records_created_by_id_idx').on(table.createdById),
    index('weather_records_set_aside_by_id_idx').on(table.setAsideById),
    check('weather_records_interval_positive', sql`${table.intervalMin} > 0`),
    check('weather_records_set_aside_reason', sql`(${table.setAsideAt} is null) = (${table.setAsideReason} is null)`),
  ],
);
