import { eq, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { custodyRecords, evidenceExams, evidenceItems, evidenceNotices, plannedExams, scenes } from '#db/schema/all.ts';
import { personNamesIn } from '#app/domain/names-in-records.ts';

/** Names of people typed into the evidence and the measurements of a case, which may stand in its free text as well. */
export async function namesInRecords(db: DbOrTx, caseId: string): Promise<string[]> {
  const ofCase = eq(evidenceItems.caseId, caseId);
  const items = await db.select({ name: evidenceItems.collectedBy }).from(evidenceItems).where(ofCase);
  const custody = await db.select({ holder: custodyRecords.holderName, giver: custodyRecords.givenBy, receiver: custodyRecords.receivedBy }).from(custodyRecords).innerJoin(evidenceItems, eq(evidenceItems.id, custodyRecords.itemId)).where(ofCase);
  const exams = await db.select({ name: evidenceExams.performedBy, told: evidenceExams.noticeTo }).from(evidenceExams).innerJoin(evidenceItems, eq(evidenceItems.id, evidenceExams.itemId)).where(ofCase);
  const plans = await db.select({ name: plannedExams.performedBy }).from(plannedExams).innerJoin(evidenceItems, eq(evidenceItems.id, plannedExams.itemId)).where(ofCase);
  const notices = await db.select({ name: evidenceNotices.toWhom }).from(evidenceNotices).innerJoin(evidenceItems, eq(evidenceItems.id, evidenceNotices.itemId)).where(ofCase);
  const measured = await db.selectDistinct({ name: sql<string>`jsonb_path_query(${scenes.scene}, '$.*.*.by') #>> '{}'` }).from(scenes).where(eq(scenes.caseId, caseId));
  const typed = [...items, ...plans, ...notices, ...measured].map(({ name }) => name).concat(custody.flatMap(({ holder, giver, receiver }) => [holder, giver, receiver]), exams.flatMap(({ name, told }) => [name, told]));
  return [...new Set(typed.flatMap(personNamesIn))].sort();
}
