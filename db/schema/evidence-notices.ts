import { index, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { noticeAnswers, noticeWays, partyRoles } from '#app/domain/evidence-notice.ts';
import { createdAt, id, instant } from './_columns.ts';
import { evidenceItems } from './evidence.ts';
import { users } from './people.ts';
import { plannedExams } from './planned-exams.ts';

/** A notice to another party about an item, or about one planned examination of it. Only ever added. */
export const evidenceNotices = pgTable(
  'evidence_notices',
  {
    id: id(),
    itemId: uuid().notNull().references(() => evidenceItems.id, { onDelete: 'restrict' }),
    planId: uuid().references(() => plannedExams.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    partyRole: text({ enum: partyRoles }).notNull(),
    /** Class personal. */
    toWhom: text().notNull(),
    way: text({ enum: noticeWays }).notNull(),
    sentAt: instant().notNull(),
    recordedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    index('evidence_notices_item_id_idx').on(table.itemId),
    index('evidence_notices_plan_id_idx').on(table.planId),
    index('evidence_notices_recorded_by_id_idx').on(table.recordedById),
  ],
);

/** What a party answered; the newest holds, and earlier ones stay. */
export const noticeReplies = pgTable(
  'notice_replies',
  {
    id: id(),
    noticeId: uuid().notNull().references(() => evidenceNotices.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    answer: text({ enum: noticeAnswers }).notNull(),
    note: text().notNull().default(''),
    answeredAt: instant().notNull(),
    recordedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    index('notice_replies_notice_id_idx').on(table.noticeId),
    index('notice_replies_recorded_by_id_idx').on(table.recordedById),
  ],
);
