import { sql } from 'drizzle-orm';
import { bigint, check, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { attachmentClasses, attachmentKinds, attachmentMimes } from '#app/domain/attachment.ts';
import { createdAt, id, instant } from './_columns.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

/** Documents of a case. The bytes lie in the object store under a key that holds their hash; rows are never removed. */
export const attachments = pgTable(
  'attachments',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    label: integer().notNull(),
    title: text().notNull(),
    kind: text({ enum: attachmentKinds }).notNull(),
    class: text({ enum: attachmentClasses }).notNull(),
    fileName: text().notNull(),
    mime: text({ enum: attachmentMimes }).notNull(),
    bytes: bigint({ mode: 'number' }).notNull(),
    sha256: text().notNull(),
    objectKey: text().notNull(),
    /** Last time the stored file was hashed again, and how it compared with the hash at intake. */
    hashCheckedAt: instant(),
    hashCheck: text({ enum: ['same', 'differs', 'missing'] }),
    uploadedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('attachments_case_label_key').on(table.caseId, table.label),
    uniqueIndex('attachments_case_sha256_key').on(table.caseId, table.sha256),
    index('attachments_uploaded_by_id_idx').on(table.uploadedById),
    check('attachments_sha256_hex', sql`${table.sha256} ~ '^[0-9a-f]{64}$'`),
  ],
);
