import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { certainties, classifications, findingStates, reviewFields } from '#app/domain/finding.ts';
import { hypothesisKinds, hypothesisResults } from '#app/domain/hypothesis.ts';
import type { FourTests } from '#app/domain/hypothesis.ts';
import { createdAt, id, instant, updatedAt } from './_columns.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

export const hypotheses = pgTable(
  'hypotheses',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    kind: text({ enum: hypothesisKinds }).notNull(),
    statement: text().notNull(),
    predicts: text().notNull().default(''),
    evidenceFor: text().notNull().default(''),
    evidenceAgainst: text().notNull().default(''),
    tests: jsonb().$type<FourTests>().notNull(),
    result: text({ enum: hypothesisResults }).notNull().default('not-tested'),
    testedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [index('hypotheses_case_id_idx').on(table.caseId), index('hypotheses_tested_by_id_idx').on(table.testedById)],
);

export const findings = pgTable(
  'findings',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    version: integer().notNull(),
    state: text({ enum: findingStates }).notNull().default('draft'),
    opinion: text().notNull().default(''),
    selectedHypothesisId: uuid().references(() => hypotheses.id, { onDelete: 'restrict' }),
    certainty: text({ enum: certainties }).notNull().default('undetermined'),
    classification: text({ enum: classifications }).notNull().default('not-classified'),
    immediateCauses: text().notNull().default(''),
    underlyingCauses: text().notNull().default(''),
    rootCauses: text().notNull().default(''),
    limits: text().notNull().default(''),
    authorId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    sentAt: instant(),
    reviewerId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    reviewedAt: instant(),
    signedAt: instant(),
    /** What was signed, whole, with the SHA-256 of its canonical JSON. */
    frozen: jsonb().$type<Record<string, unknown>>(),
    frozenHash: text(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [
    uniqueIndex('findings_case_version_key').on(table.caseId, table.version),
    index('findings_author_id_idx').on(table.authorId),
    index('findings_reviewer_id_idx').on(table.reviewerId),
    index('findings_selected_hypothesis_id_idx').on(table.selectedHypothesisId),
    check('findings_reviewer_not_author', sql`${table.reviewerId} is null or ${table.reviewerId} <> ${table.authorId}`),
    check('findings_signed_frozen', sql`${table.state} <> 'signed' or (${table.signedAt} is not null and ${table.frozenHash} is not null)`),
  ],
);

export const reviewComments = pgTable(
  'review_comments',
  {
    id: id(),
    findingId: uuid().notNull().references(() => findings.id, { onDelete: 'restrict' }),
    field: text({ enum: reviewFields }).notNull(),
    body: text().notNull(),
    authorId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    settledAt: instant(),
    settledById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    index('review_comments_finding_id_idx').on(table.findingId),
    index('review_comments_author_id_idx').on(table.authorId),
    index('review_comments_settled_by_id_idx').on(table.settledById),
  ],
);
