import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { roles } from '#app/domain/roles.ts';
import { createdAt, id, instant, updatedAt } from './_columns.ts';
import { sites } from './sites.ts';

export const organisations = pgTable('organisations', {
  id: id(),
  name: text().notNull().unique(),
  kind: text({ enum: ['operator', 'insurer'] }).notNull(),
  createdAt: createdAt(),
});

export const users = pgTable(
  'users',
  {
    id: id(),
    organisationId: uuid().notNull().references(() => organisations.id, { onDelete: 'restrict' }),
    /** Lower case; the form folds it. */
    email: text().notNull(),
    displayName: text().notNull(),
    passwordHash: text(),
    units: text({ enum: ['metric', 'us'] }).notNull().default('metric'),
    disabled: boolean().notNull().default(false),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [uniqueIndex('users_email_key').on(table.email), index('users_organisation_id_idx').on(table.organisationId), check('users_email_folded', sql`${table.email} = lower(${table.email})`)],
);

export const grants = pgTable(
  'grants',
  {
    id: id(),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
    role: text({ enum: roles }).notNull(),
    siteId: uuid().references(() => sites.id, { onDelete: 'cascade' }),
    createdAt: createdAt(),
  },
  (table) => [
    index('grants_user_id_idx').on(table.userId),
    index('grants_site_id_idx').on(table.siteId),
    uniqueIndex('grants_once').on(table.userId, table.role, sql`coalesce(${table.siteId}, '00000000-0000-0000-0000-000000000000'::uuid)`),
  ],
);

/** lucia writes this table through its adapter; the adapter fixes the types of the first three columns. */
export const sessions = pgTable(
  'sessions',
  {
    id: text().primaryKey(),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
    expiresAt: instant().notNull(),
    createdAt: createdAt(),
  },
  (table) => [index('sessions_user_id_idx').on(table.userId)],
);

/** One-time links sent by e-mail. Only the SHA-256 of the token is kept. */
export const mailedTokens = pgTable(
  'mailed_tokens',
  {
    tokenHash: text().primaryKey(),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
    purpose: text({ enum: ['invitation', 'password-reset'] }).notNull(),
    expiresAt: instant().notNull(),
    usedAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [index('mailed_tokens_user_id_idx').on(table.userId)],
);

/** Counters of a fixed window per key, shared by all web processes. */
export const rateLimits = pgTable('rate_limits', {
  key: text().primaryKey(),
  windowStartedAt: instant().notNull(),
  hits: integer().notNull(),
});
