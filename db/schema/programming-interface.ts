import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { tokenScopes } from '#app/domain/api-token.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { createdAt, id, instant } from './_columns.ts';
import { users } from './people.ts';
import { reconstructionStates } from './reconstructions.ts';

/** Keys with which a program acts for a person. The word itself is shown once; only its SHA-256 is kept. */
export const apiTokens = pgTable(
  'api_tokens',
  {
    id: id(),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
    tokenHash: text().notNull(),
    name: text().notNull(),
    scope: text({ enum: tokenScopes }).notNull(),
    expiresAt: instant().notNull(),
    lastUsedAt: instant(),
    revokedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex('api_tokens_token_hash_key').on(table.tokenHash), index('api_tokens_user_id_idx').on(table.userId)],
);

/** Long runs of the engine asked for through the programming interface: they belong to whoever asked, and to no case. */
export const apiComputations = pgTable(
  'api_computations',
  {
    id: id(),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
    state: text({ enum: reconstructionStates }).notNull().default('queued'),
    input: jsonb().$type<ReconstructionInput>().notNull(),
    /** SHA-256 of the canonical JSON of the input. */
    inputHash: text().notNull(),
    engineVersion: text().notNull(),
    result: jsonb().$type<ReconstructionResult>(),
    progressDone: integer().notNull().default(0),
    progressTotal: integer().notNull().default(0),
    failure: text(),
    startedAt: instant(),
    finishedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    // A request sent again finds the run that it began.
    uniqueIndex('api_computations_once').on(table.userId, table.inputHash, table.engineVersion),
    index('api_computations_created_at_idx').on(table.createdAt),
    check('api_computations_done_has_result', sql`${table.state} <> 'done' or ${table.result} is not null`),
  ],
);
