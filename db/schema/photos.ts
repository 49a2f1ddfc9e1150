import { sql } from 'drizzle-orm';
import { bigint, boolean, check, index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { photoViews } from '#app/domain/incident.ts';
import type { PhotoExif, PhotoExifAnswer, PhotoMask } from '#app/domain/photo.ts';
import type { PhotoMark } from '#app/domain/photo-marks.ts';
import { createdAt, id, instant } from './_columns.ts';
import { cases } from './cases.ts';
import { users } from './people.ts';

export type { PhotoExif, PhotoExifAnswer, PhotoMask } from '#app/domain/photo.ts';

export const photos = pgTable(
  'photos',
  {
    id: id(),
    /** The report under way that the photo came with; stays after the case exists. */
    reportClientId: uuid().notNull(),
    /** Null until the report is sent. */
    caseId: uuid().references(() => cases.id, { onDelete: 'restrict' }),
    label: integer(),
    fileName: text().notNull(),
    mime: text().notNull(),
    bytes: bigint({ mode: 'number' }).notNull(),
    sha256: text().notNull(),
    widthPx: integer().notNull(),
    heightPx: integer().notNull(),
    originalKey: text().notNull(),
    viewKey: text(),
    thumbnailKey: text(),
    state: text({ enum: ['stored', 'ready', 'failed'] }).notNull().default('stored'),
    exif: jsonb().$type<PhotoExif>().notNull(),
    exifAnswer: jsonb().$type<PhotoExifAnswer>().notNull(),
    /** Place in the order that the reporter gave; null: as it came. */
    position: integer(),
    /** The device made it smaller before sending, as the person asked: the original here is not the camera's own file. */
    madeSmaller: boolean().notNull().default(false),
    view: text({ enum: photoViews }),
    caption: text().notNull().default(''),
    altText: text().notNull().default(''),
    takenAt: instant(),
    clockErrorS: integer().notNull().default(0),
    masks: jsonb().$type<readonly PhotoMask[]>().notNull().default([]),
    /** Drawn over a copy by a person; the original and the view copy are not touched. */
    marks: jsonb().$type<readonly PhotoMark[]>().notNull().default([]),
    /** Last time the stored original was hashed again, and how it compared with the hash at intake. */
    hashCheckedAt: instant(),
    hashCheck: text({ enum: ['same', 'differs', 'missing'] }),
    releasable: text({ enum: ['undecided', 'yes', 'no'] }).notNull().default('undecided'),
    uploadedById: uuid().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('photos_report_sha256_key').on(table.reportClientId, table.sha256),
    uniqueIndex('photos_case_label_key').on(table.caseId, table.label),
    index('photos_case_id_idx').on(table.caseId),
    index('photos_uploaded_by_id_idx').on(table.uploadedById),
    check('photos_label_with_case', sql`(${table.caseId} is null) = (${table.label} is null)`),
    check('photos_sha256_hex', sql`${table.sha256} ~ '^[0-9a-f]{64}$'`),
  ],
);
