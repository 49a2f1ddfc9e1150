import { sql } from 'drizzle-orm';
import { bigint, boolean, check, date, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { actionStates, controlLevels } from '#app/domain/corrective-action.ts';
import { risks } from '#app/domain/incident.ts';
import { createdAt, id, instant, updatedAt } from './_columns.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

export const correctiveActions = pgTable(
  'corrective_actions',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    number: integer().notNull(),
    title: text().notNull(),
    why: text().notNull().default(''),
    controlLevel: text({ enum: controlLevels }).notNull(),
    interim: boolean().notNull().default(false),
    ownerId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    verifierId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    dueOn: date({ mode: 'string' }).notNull(),
    risk: text({ enum: risks }).notNull().default('medium'),
    cost: bigint({ mode: 'number' }),
    costCurrency: text(),
    state: text({ enum: actionStates }).notNull().default('open'),
    proof: text().notNull().default(''),
    doneAt: instant(),
    /** Who marked it done; this person may not verify it either. */
    doneById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    verifiedAt: instant(),
    verifiedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    verificationNote: text().notNull().default(''),
    effectCheckOn: date({ mode: 'string' }),
    effectNote: text().notNull().default(''),
    effectAt: instant(),
    effectById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    withdrawnReason: text(),
    version: integer().notNull().default(1),
    createdById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [
    uniqueIndex('corrective_actions_case_number_key').on(table.caseId, table.number),
    index('corrective_actions_owner_id_idx').on(table.ownerId),
    index('corrective_actions_verifier_id_idx').on(table.verifierId),
    index('corrective_actions_done_by_id_idx').on(table.doneById),
    index('corrective_actions_verified_by_id_idx').on(table.verifiedById),
    index('corrective_actions_effect_by_id_idx').on(table.effectById),
    index('corrective_actions_created_by_id_idx').on(table.createdById),
    index('corrective_actions_due_on_idx').on(table.dueOn),
    check('corrective_actions_verifier_not_owner', sql`${table.verifierId} <> ${table.ownerId}`),
    check('corrective_actions_verified_by_other', sql`${table.verifiedById} is null or ${table.verifiedById} <> ${table.ownerId}`),
    check('corrective_actions_verified_by_not_doer', sql`${table.verifiedById} is null or ${table.doneById} is null or ${table.verifiedById} <> ${table.doneById}`),
    check('corrective_actions_done_has_proof', sql`${table.state} not in ('done', 'verified', 'effective', 'not-effective') or ${table.doneAt} is not null`),
    check('corrective_actions_withdrawn_reason', sql`${table.state} <> 'withdrawn' or ${table.withdrawnReason} is not null`),
  ],
);

/** Files that prove an action: a photo or a document. */
export const actionProofs = pgTable(
  'action_proofs',
  {
    id: id(),
    correctiveActionId: uuid().notNull().references(() => correctiveActions.id, { onDelete: 'restrict' }),
    fileName: text().notNull(),
    mime: text().notNull(),
    bytes: bigint({ mode: 'number' }).notNull(),
    sha256: text().notNull(),
    objectKey: text().notNull(),
    uploadedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('action_proofs_action_sha256_key').on(table.correctiveActionId, table.sha256),
    index('action_proofs_uploaded_by_id_idx').on(table.uploadedById),
  ],
);
