import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { createdAt, id, instant } from './_columns.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

export const reconstructionStates = ['queued', 'running', 'done', 'failed'] as const;

/** One run of the engine. Input and result never change once written. */
export const reconstructions = pgTable(
  'reconstructions',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    number: integer().notNull(),
    state: text({ enum: reconstructionStates }).notNull().default('queued'),
    sceneVersion: integer(),
    input: jsonb().$type<ReconstructionInput>().notNull(),
    /** SHA-256 of the canonical JSON of the input. */
    inputHash: text().notNull(),
    engineVersion: text().notNull(),
    zoneRules: text().notNull().default(''),
    result: jsonb().$type<ReconstructionResult>(),
    resultHash: text(),
    progressDone: integer().notNull().default(0),
    progressTotal: integer().notNull().default(0),
    failure: text(),
    note: text().notNull().default(''),
    requestedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    attachedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    attachedAt: instant(),
    supersededAt: instant(),
    startedAt: instant(),
    finishedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('reconstructions_case_number_key').on(table.caseId, table.number),
    index('reconstructions_requested_by_id_idx').on(table.requestedById),
    index('reconstructions_attached_by_id_idx').on(table.attachedById),
    check('reconstructions_done_has_result', sql`${table.state} <> 'done' or (${table.result} is not null and ${table.resultHash} is not null)`),
  ],
);

/** Return days of the attached reconstruction, one row a day, so that lists can be ordered by them in SQL. */
export const sunReturns = pgTable(
  'sun_returns',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'cascade' }),
    reconstructionId: uuid().notNull().references(() => reconstructions.id, { onDelete: 'cascade' }),
    /** Local day of the place, ISO date. */
    onDay: text().notNull(),
    bestAt: instant().notNull(),
    fromAt: instant().notNull(),
    toAt: instant().notNull(),
    minutes: integer().notNull(),
  },
  (table) => [
    uniqueIndex('sun_returns_case_day_key').on(table.caseId, table.onDay),
    index('sun_returns_best_at_idx').on(table.bestAt),
    index('sun_returns_reconstruction_id_idx').on(table.reconstructionId),
  ],
);
