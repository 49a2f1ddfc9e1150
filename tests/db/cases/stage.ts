import { eq } from 'drizzle-orm';
import { db } from '#db/client.server.ts';
import { cases, logEntries, outbox } from '#db/schema/all.ts';
import { DomainError } from '#app/domain/errors.ts';

export type CaseRow = typeof cases.$inferSelect;
type OfCase = Pick<CaseRow, 'id'>;

/** The case as it is stored now. */
export async function stored({ id }: OfCase): Promise<CaseRow> {
  const [found] = await db.select().from(cases).where(eq(cases.id, id));
  if (!found) throw new Error('The case of the test is gone.');
  return found;
}

export const logOf = ({ id }: OfCase) => db.select().from(logEntries).where(eq(logEntries.caseId, id)).orderBy(logEntries.sequence);
export const mailOf = ({ id }: OfCase) => db.select().from(outbox).where(eq(outbox.caseId, id));

/** The refusal that some work ends in; fails where it is carried out. */
export async function refusal(work: Promise<unknown>): Promise<DomainError> {
  try {
    await work;
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error('It was done although it should have been refused.');
}
