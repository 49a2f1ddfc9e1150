import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { audiences } from '#app/domain/release-policy.ts';
import type { LineDecision } from '#app/domain/redaction.ts';
import type { ReleasedCase, WithheldCounts } from '#app/domain/released-case.ts';
import { createdAt, id, instant } from './_columns.ts';
import { cases } from './cases.ts';
import { organisations, users } from './people.ts';

/** One file of a release: its object key, what was done to it, and the hash of the bytes that leave. */
export interface ReleaseFile {
  readonly name: string;
  readonly change: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly objectKey: string;
  readonly mime: string;
}

export const releases = pgTable(
  'releases',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    number: integer().notNull(),
    audience: text({ enum: audiences }).notNull().default('insurer'),
    recipientOrganisationId: uuid().notNull().references(() => organisations.id, { onDelete: 'restrict' }),
    state: text({ enum: ['prepared', 'released', 'withdrawn'] }).notNull().default('prepared'),
    changeNote: text().notNull().default(''),
    /** The redacted case, whole. Written once, read by the insurer; nothing else of the case is joined to it. */
    released: jsonb().$type<ReleasedCase>().notNull(),
    withheld: jsonb().$type<WithheldCounts>().notNull(),
    files: jsonb().$type<readonly ReleaseFile[]>().notNull().default([]),
    releasedHash: text().notNull(),
    /** What the preparer decided for each line and photo, by key; none of the text. */
    decisions: jsonb().$type<Readonly<Record<string, LineDecision>>>().notNull().default({}),
    preparedById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    approvedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    approvedAt: instant(),
    expiresAt: instant().notNull(),
    withdrawnAt: instant(),
    withdrawnReason: text(),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('releases_case_number_key').on(table.caseId, table.number),
    index('releases_recipient_organisation_id_idx').on(table.recipientOrganisationId),
    index('releases_prepared_by_id_idx').on(table.preparedById),
    index('releases_approved_by_id_idx').on(table.approvedById),
    check('releases_second_person', sql`${table.approvedById} is null or ${table.approvedById} <> ${table.preparedById}`),
    check('releases_released_approved', sql`${table.state} <> 'released' or ${table.approvedAt} is not null`),
    check('releases_withdrawn_reason', sql`(${table.state} = 'withdrawn') = (${table.withdrawnReason} is not null and ${table.withdrawnAt} is not null)`),
  ],
);

/** Each opening by a reader. */
export const releaseOpenings = pgTable(
  'release_openings',
  {
    id: id(),
    releaseId: uuid().notNull().references(() => releases.id, { onDelete: 'restrict' }),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [index('release_openings_release_id_idx').on(table.releaseId), index('release_openings_user_id_idx').on(table.userId)],
);
