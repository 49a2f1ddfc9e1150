import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { db } from '#db/client.server.ts';
import { getCaseAccount } from '#db/queries/case-account.server.ts';
import { injuries, involvements, logEntries } from '#db/schema/all.ts';
import type { House } from '#tests/support/factories.ts';
import { createHouse } from '#tests/support/factories.ts';
import { caseOf, person, reportAt } from './stage.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

const hurt = { anyoneHurt: 'yes', hurtAgeBand: 'under-16', hurtRelation: 'pupil', injuryKind: 'superficial-burn', injuryPart: 'left hand', injuryTreatment: 'first-aid', seenByOthers: 'yes', witnessRelation: 'contractor' };

async function sent(typed: Readonly<Record<string, string>>) {
  const clientId = randomUUID();
  const { caseNumber } = await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site, typed) });
  const row = await caseOf(clientId);
  return { caseId: row?.id ?? '', caseNumber, row };
}

describe('a report about a hurt person', () => {
  test('keeps the person and the injury apart from the story, without a name', async () => {
    const { caseId, row } = await sent({ ...hurt, narrative: 'Bright patch by the door.' });
    const people = await db.select().from(involvements).where(eq(involvements.caseId, caseId));
    expect(people.map(({ role, ageBand, relation, name }) => ({ role, ageBand, relation, name })).sort((a, b) => a.role.localeCompare(b.role))).toEqual([
      { role: 'injured', ageBand: 'under-16', relation: 'pupil', name: null },
      { role: 'witness', ageBand: 'unknown', relation: 'contractor', name: null },
    ]);
    const [injury] = await db.select().from(injuries).where(eq(injuries.caseId, caseId));
    expect(injury).toMatchObject({ kind: 'superficial-burn', part: 'left hand', treatment: 'first-aid', involvementId: people.find(({ role }) => role === 'injured')?.id });
    expect(JSON.stringify(row)).not.toMatch(/left hand|superficial/u);
  });

  test('has a log line that says that health fields came, not what they say', async () => {
    const { caseId } = await sent(hurt);
    const lines = await db.select({ event: logEntries.event, summary: logEntries.summary, after: logEntries.after }).from(logEntries).where(eq(logEntries.caseId, caseId));
    expect(lines.map(({ event }) => event).sort()).toEqual(['case.injury-added', 'case.reported']);
    expect(JSON.stringify(lines)).not.toMatch(/left hand|superficial|first-aid/u);
  });

  test('shows the injury to an investigator and the privacy lead, and to nobody else', async () => {
    const { caseNumber } = await sent(hurt);
    const seenBy = async (actor: House['reporter']) => JSON.stringify(await getCaseAccount(db, { actor, caseNumber })).includes('left hand');
    expect(await seenBy(house.investigator)).toBe(true);
    expect(await seenBy(house.privacyLead)).toBe(true);
    for (const actor of [house.reporter, house.reviewer, house.manager]) expect(await seenBy(actor)).toBe(false);
  });

  test('that turns out to hurt nobody stores no person and no injury, whatever was filled in before', async () => {
    const { caseId } = await sent({ ...hurt, anyoneHurt: 'no', seenByOthers: 'no' });
    expect(await db.select().from(involvements).where(eq(involvements.caseId, caseId))).toEqual([]);
    expect(await db.select().from(injuries).where(eq(injuries.caseId, caseId))).toEqual([]);
  });
});

test('a near miss is short: what is only about marks is not taken over', async () => {
  const { row } = await sent({ sighting: 'bright-patch', lastSoundLocal: '2026-05-09T09:00', targetMaterial: 'timber', foundByMeans: 'smell', seenByOthers: 'yes', hazardStillPresent: 'yes' });
  expect(row).toMatchObject({ sighting: 'bright-patch', onsetEarliestAt: null, foundByMeans: null, hazardStillPresent: 'yes' });
});
