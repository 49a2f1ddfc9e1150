import { sql } from 'drizzle-orm';
import { check, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, updatedAt } from './_columns.ts';
import { users } from './people.ts';

/** Filters of the register that a person keeps under a name; nobody else sees them. */
export const savedViews = pgTable(
  'saved_views',
  {
    id: id(),
    userId: uuid().notNull().references(() => users.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    /** Query string of the register, with its question mark; empty for everything in the usual order. */
    search: text().notNull(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [
    uniqueIndex('saved_views_user_id_name_key').on(table.userId, sql`lower(${table.name})`),
    check('saved_views_name_given', sql`btrim(${table.name}) <> ''`),
    check('saved_views_search_short', sql`length(${table.search}) <= 600`),
  ],
);
