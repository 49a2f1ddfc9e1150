import { sql } from 'drizzle-orm';
import { check, doublePrecision, index, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { siteUses } from '#app/domain/incident.ts';
import type { SceneSkyline } from '#app/domain/scene.ts';
import { createdAt, id, updatedAt } from './_columns.ts';
import { organisations } from './people.ts';

export const sites = pgTable(
  'sites',
  {
    id: id(),
    organisationId: uuid().notNull().references(() => organisations.id, { onDelete: 'restrict' }),
    code: text().notNull(),
    name: text().notNull(),
    address: text().notNull().default(''),
    latitudeDeg: doublePrecision().notNull(),
    longitudeDeg: doublePrecision().notNull(),
    elevationM: doublePrecision().notNull().default(0),
    /** IANA zone name. */
    zone: text().notNull(),
    use: text({ enum: siteUses }).notNull().default('other'),
    jurisdiction: text({ enum: ['GB', 'US', 'EU', 'other'] }).notNull().default('other'),
    skyline: jsonb().$type<SceneSkyline>(),
    /** Unguessable word of the account-free report link; null closes the link. */
    guestCode: text(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [
    uniqueIndex('sites_code_key').on(table.organisationId, table.code),
    uniqueIndex('sites_guest_code_key').on(table.guestCode),
    index('sites_organisation_id_idx').on(table.organisationId),
    check('sites_latitude_range', sql`${table.latitudeDeg} between -90 and 90`),
    check('sites_longitude_range', sql`${table.longitudeDeg} between -180 and 180`),
  ],
);
