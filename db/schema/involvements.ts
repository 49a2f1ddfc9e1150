import { integer, pgTable, text, uuid, index } from 'drizzle-orm/pg-core';
import { cases } from './cases.ts';
import { createdAt, id } from './_columns.ts';

export const involvementRoles = ['reporter', 'finder', 'injured', 'witness', 'occupant', 'owner', 'contractor', 'neighbour'] as const;
export const ageBands = ['adult', '16-17', 'under-16', 'unknown'] as const;

/** People of a case, apart from its text. Class personal; children carry no name. */
export const involvements = pgTable(
  'involvements',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    role: text({ enum: involvementRoles }).notNull(),
    name: text(),
    phone: text(),
    email: text(),
    relation: text(),
    ageBand: text({ enum: ageBands }).notNull().default('unknown'),
    guardianContact: text(),
    createdAt: createdAt(),
  },
  (table) => [index('involvements_case_id_idx').on(table.caseId)],
);

/** Class health: read only where `case:read-health` holds. */
export const injuries = pgTable(
  'injuries',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    involvementId: uuid().references(() => involvements.id, { onDelete: 'restrict' }),
    part: text(),
    kind: text({ enum: ['superficial-burn', 'partial-thickness-burn', 'full-thickness-burn', 'eye-symptoms', 'smoke-inhalation', 'fall', 'other'] }),
    treatment: text({ enum: ['none', 'first-aid', 'medical-treatment', 'emergency-department', 'in-patient', 'unknown'] }).notNull().default('unknown'),
    daysAway: integer(),
    restrictedDays: integer(),
    description: text().notNull().default(''),
    createdAt: createdAt(),
  },
  (table) => [index('injuries_case_id_idx').on(table.caseId), index('injuries_involvement_id_idx').on(table.involvementId)],
);
