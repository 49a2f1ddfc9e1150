import { sql } from 'drizzle-orm';
import { check, foreignKey, index, integer, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { disposals, evidenceKinds, examKinds, holderRoles } from '#app/domain/evidence.ts';
import { createdAt, id, instant } from './_columns.ts';
import { attachments } from './attachments.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

export const evidenceItems = pgTable(
  'evidence_items',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    /** Made by the form; sending it again finds the first item. */
    clientId: uuid().notNull().unique(),
    /** 1 is A: the first item of case 118 is 118-A. */
    label: integer().notNull(),
    kind: text({ enum: evidenceKinds }).notNull(),
    description: text().notNull(),
    fromWhere: text().notNull(),
    collectedBy: text().notNull(),
    collectedAt: instant().notNull(),
    sealNumber: text().notNull().default(''),
    disposal: text({ enum: disposals }).notNull().default('undecided'),
    disposalReason: text().notNull().default(''),
    createdById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('evidence_items_case_label_key').on(table.caseId, table.label),
    index('evidence_items_created_by_id_idx').on(table.createdById),
    check('evidence_items_label', sql`${table.label} > 0`),
    check('evidence_items_disposal_reason', sql`${table.disposal} = 'undecided' or ${table.disposalReason} <> ''`),
  ],
);

/**
 * Who held an item from when to when. A record starts at the very instant at which the one before it ended: the foreign
 * key to the record before says so, so neither a gap nor an overlap can be written. At most one record of an item is open
 * by the partial index, and at least one by a trigger that looks when the transaction ends.
 */
export const custodyRecords = pgTable(
  'custody_records',
  {
    id: id(),
    itemId: uuid().notNull().references(() => evidenceItems.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    sequence: integer().notNull(),
    /** Null for the first. */
    previousSequence: integer(),
    holderRole: text({ enum: holderRoles }).notNull(),
    /** Class personal. */
    holderName: text().notNull(),
    /** Where it is kept: room, shelf, firm. */
    place: text().notNull().default(''),
    purpose: text().notNull(),
    /** Condition of item and seal as it was taken over. */
    condition: text().notNull(),
    fromAt: instant().notNull(),
    toAt: instant(),
    /** Names as signed at the hand-over that began this record. Class personal. */
    givenBy: text().notNull().default(''),
    receivedBy: text().notNull(),
    /** The taker's own account, when they signed on it; null when whoever recorded it typed the signature. */
    receiverId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    recordedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    unique('custody_records_item_sequence_key').on(table.itemId, table.sequence),
    unique('custody_records_item_sequence_end_key').on(table.itemId, table.sequence, table.toAt),
    uniqueIndex('custody_records_one_open').on(table.itemId).where(sql`${table.toAt} is null`),
    foreignKey({ name: 'custody_records_no_gap', columns: [table.itemId, table.previousSequence, table.fromAt], foreignColumns: [table.itemId, table.sequence, table.toAt] }),
    index('custody_records_recorded_by_id_idx').on(table.recordedById),
    index('custody_records_receiver_id_idx').on(table.receiverId),
    check('custody_records_order', sql`${table.toAt} is null or ${table.toAt} > ${table.fromAt}`),
    check('custody_records_chain', sql`case when ${table.sequence} = 1 then ${table.previousSequence} is null else ${table.previousSequence} is not null and ${table.previousSequence} = ${table.sequence} - 1 end`),
    check('custody_records_given', sql`${table.sequence} = 1 or ${table.givenBy} <> ''`),
  ],
);

export const evidenceExams = pgTable(
  'evidence_exams',
  {
    id: id(),
    itemId: uuid().notNull().references(() => evidenceItems.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    kind: text({ enum: examKinds }).notNull(),
    method: text().notNull(),
    result: text().notNull(),
    performedBy: text().notNull(),
    performedAt: instant().notNull(),
    /** Parties by role. */
    noticeTo: text().notNull().default(''),
    noticeAt: instant(),
    protocolAttachmentId: uuid().references(() => attachments.id, { onDelete: 'restrict' }),
    /** Why it was made although something spoke against it, such as a party that objected. */
    wentAheadReason: text().notNull().default(''),
    recordedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    index('evidence_exams_item_id_idx').on(table.itemId),
    index('evidence_exams_protocol_attachment_id_idx').on(table.protocolAttachmentId),
    index('evidence_exams_recorded_by_id_idx').on(table.recordedById),
    check(
      'evidence_exams_may_alter_needs',
      sql`${table.kind} <> 'may-alter' or (${table.noticeTo} <> '' and ${table.noticeAt} is not null and ${table.noticeAt} < ${table.performedAt} and ${table.protocolAttachmentId} is not null)`,
    ),
  ],
);
