import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { timelineSources } from '#app/domain/timeline.ts';
import { createdAt, id, instant } from './_columns.ts';
import { attachments } from './attachments.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

/** Events that somebody entered by hand from a log or a recording. A wrong one is withdrawn with a reason, not removed. */
export const timelineEvents = pgTable(
  'timeline_events',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    source: text({ enum: timelineSources }).notNull(),
    /** Which panel, which camera. */
    sourceName: text().notNull(),
    /** As the clock of the source showed it, taken for the clock time of the place. */
    readingAt: instant().notNull(),
    /** Reading minus true time. [s] */
    clockErrorS: integer().notNull().default(0),
    /** How the clock error is known, or that it is not. */
    clockErrorBasis: text().notNull(),
    what: text().notNull(),
    attachmentId: uuid().references(() => attachments.id, { onDelete: 'restrict' }),
    createdById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    withdrawnAt: instant(),
    withdrawnReason: text(),
    createdAt: createdAt(),
  },
  (table) => [
    index('timeline_events_case_id_idx').on(table.caseId),
    index('timeline_events_attachment_id_idx').on(table.attachmentId),
    index('timeline_events_created_by_id_idx').on(table.createdById),
    check('timeline_events_withdrawn', sql`(${table.withdrawnAt} is null) = (${table.withdrawnReason} is null)`),
  ],
);
