import { bigserial, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, instant } from './_columns.ts';
import { cases } from './cases.ts';
import { organisations, users } from './people.ts';

/** Who did what, when and why. Rows are only ever added: a trigger refuses change and removal. */
export const logEntries = pgTable(
  'log_entries',
  {
    sequence: bigserial({ mode: 'number' }).primaryKey(),
    at: createdAt(),
    organisationId: uuid().references(() => organisations.id, { onDelete: 'restrict' }),
    caseId: uuid().references(() => cases.id, { onDelete: 'restrict' }),
    actorId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    /** Kept beside the id, so that the log still reads when a person has left. */
    actorName: text().notNull(),
    event: text().notNull(),
    /** The table and row that changed. */
    subject: text().notNull(),
    subjectId: text().notNull(),
    summary: text().notNull(),
    reason: text().notNull().default(''),
    before: jsonb().$type<Record<string, unknown>>(),
    after: jsonb().$type<Record<string, unknown>>(),
  },
  (table) => [
    index('log_entries_case_id_idx').on(table.caseId, table.sequence),
    index('log_entries_organisation_id_idx').on(table.organisationId, table.sequence),
    index('log_entries_actor_id_idx').on(table.actorId),
  ],
);

/** Mail to be sent: written in the transaction of the change that causes it, sent by the worker with retries. */
export const outbox = pgTable(
  'outbox',
  {
    id: id(),
    /** One message per event and recipient, however often the event is handled. */
    dedupeKey: text().notNull(),
    toAddress: text().notNull(),
    subject: text().notNull(),
    bodyText: text().notNull(),
    bodyHtml: text().notNull(),
    caseId: uuid().references(() => cases.id, { onDelete: 'restrict' }),
    state: text({ enum: ['waiting', 'sent', 'failed'] }).notNull().default('waiting'),
    attempts: integer().notNull().default(0),
    nextAttemptAt: instant().notNull().defaultNow(),
    lastError: text(),
    sentAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex('outbox_dedupe_key').on(table.dedupeKey), index('outbox_due_idx').on(table.state, table.nextAttemptAt), index('outbox_case_id_idx').on(table.caseId)],
);
