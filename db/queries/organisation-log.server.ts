import { and, desc, eq, ilike, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, logEntries } from '#db/schema/all.ts';

export interface OrganisationLogQuery {
  readonly organisationId: string;
  readonly event?: string | undefined;
  readonly person?: string | undefined;
  readonly caseNumber?: number | undefined;
  /** Number of the line after which to go on. */
  readonly before?: number | undefined;
  readonly limit: number;
}

const containing = (text: string) => `%${text.replace(/[\\%_]/gu, '\\$&')}%`;

/** Log of an organisation, newest first. Without `withContent` only the event and the case number are given. */
export async function listOrganisationLog(db: DbOrTx, query: OrganisationLogQuery & { withContent: boolean }) {
  const rows = await db
    .select({ sequence: logEntries.sequence, at: logEntries.at, actorName: logEntries.actorName, event: logEntries.event, summary: logEntries.summary, reason: logEntries.reason, caseNumber: cases.number })
    .from(logEntries)
    .leftJoin(cases, eq(cases.id, logEntries.caseId))
    .where(
      and(
        eq(logEntries.organisationId, query.organisationId),
        query.event ? ilike(logEntries.event, containing(query.event)) : undefined,
        query.person ? ilike(logEntries.actorName, containing(query.person)) : undefined,
        query.caseNumber ? eq(cases.number, query.caseNumber) : undefined,
        // Imported lines can be older than lines written before them, so time comes first and the number breaks ties.
        query.before ? sql`(${logEntries.at}, ${logEntries.sequence}) < (select at, sequence from log_entries where sequence = ${query.before})` : undefined,
      ),
    )
    .orderBy(desc(logEntries.at), desc(logEntries.sequence))
    .limit(query.limit);
  return rows.map((row) => (query.withContent || row.caseNumber === null ? row : { ...row, summary: '', reason: '' }));
}
