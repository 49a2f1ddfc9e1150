import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { KnownPoint } from '#app/domain/site-plan.ts';
import { createdAt, id, instant, updatedAt } from './_columns.ts';
import { users } from './people.ts';
import { sites } from './sites.ts';

/** Drawings of a site that are laid over the map. The pixels of the known points are those of the stored picture. */
export const sitePlans = pgTable(
  'site_plans',
  {
    id: id(),
    siteId: uuid().notNull().references(() => sites.id, { onDelete: 'cascade' }),
    /** Area or level that it shows: "Roof", "Floor 4". */
    name: text().notNull(),
    /** The file as it came. */
    originalKey: text().notNull(),
    sha256: text().notNull(),
    /** The copy that is shown: upright, without data of the file's own. */
    pictureKey: text().notNull(),
    widthPx: integer().notNull(),
    heightPx: integer().notNull(),
    /** Empty until the drawing is placed; two at least once it is. */
    points: jsonb().$type<readonly KnownPoint[]>().notNull().default([]),
    createdById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    /** Taken from the maps; the row and the file stay, since reports may have been made on it. */
    removedAt: instant(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [
    index('site_plans_site_id_idx').on(table.siteId),
    index('site_plans_created_by_id_idx').on(table.createdById),
    check('site_plans_points', sql`jsonb_array_length(${table.points}) <> 1`),
    check('site_plans_sha256_hex', sql`${table.sha256} ~ '^[0-9a-f]{64}$'`),
  ],
);
