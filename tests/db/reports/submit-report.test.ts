import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { receiptPattern } from '#app/domain/incident.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { db } from '#db/client.server.ts';
import { cases, involvements, logEntries, outbox, photos, scenes } from '#db/schema/all.ts';
import type { House } from '#tests/support/factories.ts';
import { createActor, createHouse, createPhoto } from '#tests/support/factories.ts';
import { caseOf, person, reportAt } from './stage.ts';

let house: House;
let guest: ReportHolder;

beforeAll(async () => {
  house = await createHouse();
  guest = { kind: 'guest', site: house.site };
});
afterAll(stopQueue);

const mailFor = async (caseId: string) => db.select().from(outbox).where(eq(outbox.caseId, caseId));

describe('a report becomes one case', () => {
  test('with state reported, a receipt, a first scene and a log line', async () => {
    const clientId = randomUUID();
    const receipt = await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site, { opticKind: 'curved-building-face', 'optic-curved-building-face-radiusOfCurvatureM': '42' }) });
    const row = await caseOf(clientId);
    expect(row).toMatchObject({ state: 'reported', receipt: receipt.receipt, number: receipt.caseNumber, reporterId: house.reporter.userId, guestReport: false, zone: 'Europe/London' });
    expect(receipt.receipt).toMatch(receiptPattern);
    const [scene] = await db.select().from(scenes).where(eq(scenes.caseId, row?.id ?? ''));
    expect(scene).toMatchObject({ version: 1, authorId: house.reporter.userId, scene: { optic: { kind: 'curved-building-face', radiusOfCurvatureM: { value: 42 } } } });
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, row?.id ?? ''));
    expect(lines).toMatchObject([{ event: 'case.reported', actorId: house.reporter.userId, after: { state: 'reported' } }]);
  });

  test('whose title holds no name of the reporter or of a contact', async () => {
    const clientId = randomUUID();
    await submitReport({ holder: guest, clientId, report: reportAt(house.site, { placeDetail: "Weir's room, east window", contactName: 'Tomas Weir' }) });
    const row = await caseOf(clientId);
    expect(row?.title).toBe(`Mark or scorch, ${house.site.name}`);
    expect(row?.placeDetail).toBe("Weir's room, east window");
  });

  test('keeps the contact of a guest apart from the case', async () => {
    const clientId = randomUUID();
    await submitReport({ holder: guest, clientId, report: reportAt(house.site, { contactEmail: 'Guest@Example.Test', anyoneHurt: 'yes', hurtAgeBand: 'under-16' }) });
    const row = await caseOf(clientId);
    const people = await db.select().from(involvements).where(eq(involvements.caseId, row?.id ?? ''));
    expect(people.map(({ role, email, name, ageBand }) => ({ role, email, name, ageBand }))).toEqual([
      { role: 'reporter', email: 'guest@example.test', name: null, ageBand: 'unknown' },
      { role: 'injured', email: null, name: null, ageBand: 'under-16' },
    ]);
    expect(JSON.stringify(row)).not.toContain('example.test');
  });
});

describe('sending twice', () => {
  test('gives the first receipt and writes nothing', async () => {
    const clientId = randomUUID();
    const submission = { holder: person(house.reporter), clientId, report: reportAt(house.site) };
    const first = await submitReport(submission);
    const second = await submitReport({ ...submission, report: reportAt(house.site, { narrative: 'Typed differently the second time' }) });
    expect(second).toEqual({ ...first, repeated: true });
    const row = await caseOf(clientId);
    expect(row?.narrative).toBe('');
    expect(await db.select().from(logEntries).where(eq(logEntries.caseId, row?.id ?? ''))).toHaveLength(1);
  });

  test('at the same moment makes one case with one log line and one mail', async () => {
    const clientId = randomUUID();
    await createPhoto({ reportClientId: clientId });
    const submission = { holder: person(house.reporter), clientId, report: reportAt(house.site) };
    const receipts = await Promise.all(Array.from({ length: 6 }, () => submitReport(submission)));
    expect(new Set(receipts.map(({ receipt }) => receipt)).size).toBe(1);
    expect(receipts.filter(({ repeated }) => !repeated)).toHaveLength(1);
    const rows = await db.select().from(cases).where(eq(cases.clientId, clientId));
    expect(rows).toHaveLength(1);
    expect(await db.select().from(logEntries).where(eq(logEntries.caseId, rows[0]?.id ?? ''))).toHaveLength(1);
    expect(await mailFor(rows[0]?.id ?? '')).toHaveLength(1);
    expect(await db.select({ label: photos.label }).from(photos).where(eq(photos.reportClientId, clientId))).toEqual([{ label: 1 }]);
  });

  test.each(['another person', 'a guest'])('by %s is refused, and leaves the case alone', async (who) => {
    const clientId = randomUUID();
    await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) });
    const other = who === 'a guest' ? guest : person(await createActor(house.organisation.id, 'reporter'));
    await expect(submitReport({ holder: other, clientId, report: reportAt(house.site) })).rejects.toMatchObject({ code: 'forbidden' });
    expect((await caseOf(clientId))?.reporterId).toBe(house.reporter.userId);
  });

  test('by a guest through the same link gives the receipt', async () => {
    const clientId = randomUUID();
    const first = await submitReport({ holder: guest, clientId, report: reportAt(house.site) });
    expect(await submitReport({ holder: guest, clientId, report: reportAt(house.site) })).toEqual({ ...first, repeated: true });
  });
});

describe('photos of the report', () => {
  test('are labelled in the order they came; those another person brought stay behind', async () => {
    const clientId = randomUUID();
    const at = (minute: number) => ({ reportClientId: clientId, createdAt: new Date(Date.UTC(2026, 4, 9, 14, minute)) });
    const second = await createPhoto({ ...at(2), uploadedById: house.reporter.userId });
    const first = await createPhoto(at(1));
    const foreign = await createPhoto({ ...at(0), uploadedById: house.manager.userId });
    await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) });
    const rows = await db.select({ id: photos.id, label: photos.label }).from(photos).where(eq(photos.reportClientId, clientId));
    expect(new Map(rows.map(({ id, label }) => [id, label]))).toEqual(new Map([[first.id, 1], [second.id, 2], [foreign.id, null]]));
  });
});

describe('mail', () => {
  test('goes to the reporter with the receipt and nothing that was reported', async () => {
    const clientId = randomUUID();
    const { receipt } = await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site, { narrative: 'Brown band' }) });
    const mails = await mailFor((await caseOf(clientId))?.id ?? '');
    expect(mails).toHaveLength(1);
    expect(mails[0]).toMatchObject({ toAddress: house.reporter.email, subject: `Report ${receipt} received` });
    expect(mails[0]?.bodyText).not.toMatch(/Brown band|hatch 2/u);
  });

  test.each([
    ['the hazard is still there', { hazardStillPresent: 'yes' }, ['investigator', 'manager']],
    ['somebody was hurt', { anyoneHurt: 'yes' }, ['investigator', 'manager', 'privacyLead']],
    ['a child was hurt', { anyoneHurt: 'yes', hurtAgeBand: 'under-16' }, ['investigator', 'manager', 'privacyLead']],
  ] as const)('alerts those who must know when %s, with no health word in the subject or body', async (_when, typed, roles) => {
    const clientId = randomUUID();
    await submitReport({ holder: guest, clientId, report: reportAt(house.site, typed) });
    const mails = await mailFor((await caseOf(clientId))?.id ?? '');
    expect(mails.map(({ toAddress }) => toAddress).sort()).toEqual(roles.map((role) => house[role].email).sort());
    for (const mail of mails) expect(`${mail.subject} ${mail.bodyText}`).not.toMatch(/hurt|injur|burn|hospital|child|under 16/iu);
  });

  test('alerts nobody when nobody was hurt and the hazard is gone', async () => {
    const clientId = randomUUID();
    await submitReport({ holder: guest, clientId, report: reportAt(house.site, { hazardStillPresent: 'no' }) });
    expect(await mailFor((await caseOf(clientId))?.id ?? '')).toEqual([]);
  });
});

test.each([
  ['a person', () => person(house.reporter)],
  ['a guest', () => guest],
] as const)('%s cannot report for a site of somebody else', async (_who, holder) => {
  const other = await createHouse();
  await expect(submitReport({ holder: holder(), clientId: randomUUID(), report: reportAt(other.site) })).rejects.toMatchObject({ code: 'forbidden' });
});

test('somebody whose roles do not report is refused', async () => {
  const insurer = await createActor(house.organisation.id, 'insurer');
  await expect(submitReport({ holder: person(insurer), clientId: randomUUID(), report: reportAt(house.site) })).rejects.toMatchObject({ code: 'forbidden' });
});

test('a failure on the way leaves no case, no photo label and no mail', async () => {
  const clientId = randomUUID();
  await createPhoto({ reportClientId: clientId });
  const report = reportAt(house.site);
  const broken = { ...report, site: { ...report.site, id: randomUUID() } };
  await expect(submitReport({ holder: person(house.reporter), clientId, report: broken })).rejects.toThrow();
  expect(await caseOf(clientId)).toBeUndefined();
  expect(await db.select({ caseId: photos.caseId }).from(photos).where(eq(photos.reportClientId, clientId))).toEqual([{ caseId: null }]);
});
