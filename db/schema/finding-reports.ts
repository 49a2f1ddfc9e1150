import { sql } from 'drizzle-orm';
import { bigint, check, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { ReportDocument } from '#app/domain/report-document.ts';
import { createdAt, id, instant } from './_columns.ts';
import { findings } from './findings.ts';

/** The report of a signed finding, put together once when it was signed, and the printed file made from it. */
export const findingReports = pgTable(
  'finding_reports',
  {
    id: id(),
    findingId: uuid().notNull().unique().references(() => findings.id, { onDelete: 'restrict' }),
    document: jsonb().$type<ReportDocument>().notNull(),
    /** SHA-256 of the canonical JSON of the document. */
    documentHash: text().notNull(),
    /** Null until the file was made for the first time; from then on those bytes are handed out. */
    pdfKey: text(),
    pdfSha256: text(),
    pdfBytes: bigint({ mode: 'number' }),
    pdfMadeAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    check('finding_reports_document_hash_hex', sql`${table.documentHash} ~ '^[0-9a-f]{64}$'`),
    check('finding_reports_pdf_whole', sql`(${table.pdfKey} is null) = (${table.pdfSha256} is null) and (${table.pdfKey} is null) = (${table.pdfBytes} is null)`),
  ],
);
