import { boolean, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, instant } from './_columns.ts';
import { attachments } from './attachments.ts';
import { cases } from './cases.ts';
import { involvements } from './involvements.ts';
import { users } from './people.ts';

/** What a witness said, in their own words. The person is a row of `involvements`; the words never change once taken. */
export const witnessAccounts = pgTable(
  'witness_accounts',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    /** Order of taking. The same person keeps one letter over all their accounts. */
    label: integer().notNull(),
    involvementId: uuid().notNull().references(() => involvements.id, { onDelete: 'restrict' }),
    takenById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    takenAt: instant().notNull(),
    /** As the person named it, such as "Danish" or "Danish, through an interpreter". */
    language: text().notNull(),
    words: text().notNull(),
    readBack: boolean().notNull(),
    /** The moment that the account speaks of, where it names one. */
    speaksOfAt: instant(),
    signedAttachmentId: uuid().references(() => attachments.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('witness_accounts_case_label_key').on(table.caseId, table.label),
    index('witness_accounts_involvement_id_idx').on(table.involvementId),
    index('witness_accounts_taken_by_id_idx').on(table.takenById),
    index('witness_accounts_signed_attachment_id_idx').on(table.signedAttachmentId),
  ],
);
