import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { partyRoles } from '#app/domain/evidence-notice.ts';
import { planOutcomes } from '#app/domain/planned-exam.ts';
import { createdAt, id, instant } from './_columns.ts';
import { attachments } from './attachments.ts';
import { evidenceExams, evidenceItems } from './evidence.ts';
import { users } from './people.ts';

/** An examination that may alter an item, from the plan until it is made or cancelled. What is to be done, and by whom, stays as planned. */
export const plannedExams = pgTable(
  'planned_exams',
  {
    id: id(),
    itemId: uuid().notNull().references(() => evidenceItems.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    method: text().notNull(),
    performedBy: text().notNull(),
    plannedAt: instant().notNull(),
    /** Days from the last notice to the examination, set for this one. [days] */
    waitingDays: integer().notNull(),
    tellRoles: text({ enum: partyRoles }).array().notNull(),
    protocolAttachmentId: uuid().references(() => attachments.id, { onDelete: 'restrict' }),
    revision: integer().notNull().default(1),
    /** Null while it stands. */
    outcome: text({ enum: planOutcomes }),
    cancelReason: text().notNull().default(''),
    examId: uuid().unique().references(() => evidenceExams.id, { onDelete: 'restrict' }),
    settledAt: instant(),
    settledById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    plannedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    index('planned_exams_item_id_idx').on(table.itemId),
    index('planned_exams_protocol_attachment_id_idx').on(table.protocolAttachmentId),
    index('planned_exams_settled_by_id_idx').on(table.settledById),
    index('planned_exams_planned_by_id_idx').on(table.plannedById),
    check('planned_exams_waiting', sql`${table.waitingDays} between 0 and 365`),
    check('planned_exams_tells', sql`cardinality(${table.tellRoles}) > 0`),
    check('planned_exams_settled', sql`(${table.outcome} is null) = (${table.settledAt} is null) and (${table.outcome} is null) = (${table.settledById} is null)`),
    check('planned_exams_made', sql`(${table.outcome} is not distinct from 'made') = (${table.examId} is not null)`),
    check('planned_exams_cancelled_why', sql`(${table.outcome} is not distinct from 'cancelled') = (${table.cancelReason} <> '')`),
  ],
);
