import { and, eq, sql } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { createActor, createInvolvement, createOrganisation } from '#tests/support/factories.ts';
import { releaseCaseFile } from '#app/services/releases/approve-release.server.ts';
import { inspectRelease } from '#app/services/releases/check-release.server.ts';
import { basisOf, prepareRelease } from '#app/services/releases/prepare-release.server.ts';
import { getReleaseDesk } from '#app/services/releases/release-desk.server.ts';
import { withdrawRelease } from '#app/services/releases/withdraw-release.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { db } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import { cases, logEntries, outbox, photos, releases } from '#db/schema/all.ts';
import { inADay, mask, prepareAll, releaseAll, releaseStage, rowOf, shareAll } from './stage.ts';
import type { ReleaseStage } from './stage.ts';

let stage: ReleaseStage;
beforeEach(async () => {
  stage = await releaseStage();
});

const approve = (actor = stage.house.manager, number = 1) => releaseCaseFile({ actor, caseNumber: stage.caseNumber, number });
const events = async () => (await db.select({ event: logEntries.event }).from(logEntries).where(and(eq(logEntries.caseId, stage.caseId), eq(logEntries.subject, 'releases'))).orderBy(logEntries.sequence)).map((line) => line.event);
const mails = () => db.select().from(outbox).where(eq(outbox.caseId, stage.caseId));
const request = async (values: Partial<Parameters<typeof prepareRelease>[0]> = {}) => ({
  actor: stage.house.investigator,
  caseNumber: stage.caseNumber,
  audience: 'insurer' as const,
  recipientOrganisationId: stage.insurer.id,
  changeNote: 'First release',
  expires: { at: inADay() },
  decisions: await shareAll(stage),
  basis: null,
  ...values,
});

describe('preparing', () => {
  it('gives the next number of the case, stays in the house, and writes to nobody', async () => {
    expect(await prepareAll(stage)).toBe(1);
    expect(await prepareAll(stage)).toBe(2);
    expect(await rowOf(stage, 1)).toMatchObject({ state: 'prepared', approvedAt: null });
    expect(await events()).toEqual(['release.prepared', 'release.prepared']);
    expect(await mails()).toEqual([]);
  });

  it('is open to investigator, manager and privacy lead, and to nobody else', async () => {
    for (const actor of [stage.house.manager, stage.house.privacyLead]) await expect(prepareRelease(await request({ actor }))).resolves.toBeGreaterThan(0);
    for (const actor of [stage.house.reviewer, stage.house.reporter]) await expect(prepareRelease(await request({ actor }))).rejects.toMatchObject({ code: 'forbidden' });
    for (const actor of [stage.reader, stage.house.administrator, await createActor((await createOrganisation()).id, 'manager')]) {
      await expect(prepareRelease(await request({ actor }))).rejects.toMatchObject({ code: 'not-found' });
    }
  });

  it('is refused when the case changed after it was shown', async () => {
    const shown = await readCaseBeforeRedaction(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber });
    if (!shown) throw new Error('The case is missing.');
    const basis = basisOf(shown.source, 'insurer');
    await expect(prepareRelease(await request({ basis }))).resolves.toBe(1);
    await db.update(photos).set({ masks: [mask, { ...mask, leftShare: 0.6 }] }).where(eq(photos.id, stage.photoId));
    await expect(prepareRelease(await request({ basis }))).rejects.toMatchObject({ code: 'conflict' });
  });

  it('is refused for an organisation that is no insurer, and for the house itself', async () => {
    const operator = await createOrganisation();
    for (const recipientOrganisationId of [operator.id, stage.house.organisation.id]) await expect(prepareRelease(await request({ recipientOrganisationId }))).rejects.toMatchObject({ code: 'invalid-input' });
  });

  it.each([
    ['yesterday', -1, 'readers need time'],
    ['in three years', 1_100, 'two years at most'],
  ])('is refused with an end %s', async (_when, days, sentence) => {
    const on = new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);
    await expect(prepareRelease(await request({ expires: { on } }))).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { expiresOn: [expect.stringContaining(sentence)] } });
  });

  it('ends with the last minute of the day on the clock of the place', async () => {
    const day = new Date(Date.now() + 30 * 86_400_000).toISOString().slice(0, 10);
    await prepareRelease(await request({ expires: { on: day } }));
    const { expiresAt } = await rowOf(stage, 1);
    expect(new Intl.DateTimeFormat('sv-SE', { timeZone: 'Europe/London', dateStyle: 'short', timeStyle: 'short' }).format(expiresAt)).toBe(`${day} 23:59`);
  });

  it('is refused with a change note that names somebody', async () => {
    await expect(prepareRelease(await request({ changeNote: 'As Hollis asked' }))).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { changeNote: expect.anything() } });
  });

  it('holds back a photo whose stored original is not the one that came in', async () => {
    await putObject((await db.select({ key: photos.originalKey }).from(photos).where(eq(photos.id, stage.photoId)))[0]?.key ?? '', Buffer.from('other bytes'), 'image/jpeg');
    await expect(prepareRelease(await request())).rejects.toMatchObject({ code: 'conflict' });
  });

  it('begins the next release with the decisions of the last one', async () => {
    await prepareAll(stage);
    const desk = await getReleaseDesk({ actor: stage.house.investigator, caseNumber: stage.caseNumber, audience: 'insurer', now: new Date() });
    expect(desk.lines.every((line) => line.decision === 'share')).toBe(true);
    await db.update(cases).set({ title: 'Another title' }).where(eq(cases.id, stage.caseId));
    const later = await getReleaseDesk({ actor: stage.house.investigator, caseNumber: stage.caseNumber, audience: 'insurer', now: new Date() });
    expect(later.lines.filter((line) => line.decision === null).map((line) => line.label)).toEqual(['Title']);
  });
});

describe('the second person', () => {
  it('releases it: state, time, log, and a message to each reader without a word of the case', async () => {
    const { number, releaseId } = await releaseAll(stage);
    expect(await rowOf(stage, number)).toMatchObject({ state: 'released', approvedById: stage.house.manager.userId, approvedAt: expect.any(Date) });
    expect(await events()).toEqual(['release.prepared', 'release.released']);
    const sent = await mails();
    expect(sent.map((mail) => mail.toAddress)).toEqual([stage.reader.email]);
    expect(sent[0]?.subject).toBe(`Case ${stage.caseNumber}: release 1 is open to you`);
    expect(sent[0]?.bodyText).toContain(`/case-files/${releaseId}`);
    expect(`${sent[0]?.subject} ${sent[0]?.bodyText}`).not.toMatch(/Hollis|Ottilie|hand|curtain|band/iu);
  });

  it('is never the preparer, for the service and for the table alike', async () => {
    const number = await prepareRelease(await request({ actor: stage.house.manager }));
    await expect(approve(stage.house.manager, number)).rejects.toMatchObject({ code: 'forbidden' });
    const { id } = await rowOf(stage, number);
    await expect(db.update(releases).set({ state: 'released', approvedById: stage.house.manager.userId, approvedAt: sql`now()` }).where(eq(releases.id, id))).rejects.toMatchObject({ cause: { constraint_name: 'releases_second_person' } });
    await expect(approve(stage.house.privacyLead, number)).resolves.toBeUndefined();
  });

  it('is no investigator, reviewer, reporter or reader', async () => {
    await prepareAll(stage);
    for (const actor of [stage.house.investigator, stage.house.reviewer, stage.house.reporter, stage.reader]) await expect(approve(actor)).rejects.toThrow();
    expect(await rowOf(stage, 1)).toMatchObject({ state: 'prepared' });
  });

  it('releases once: a second try, and one after a withdrawal, are refused', async () => {
    const { number } = await releaseAll(stage);
    await expect(approve(stage.house.privacyLead, number)).rejects.toMatchObject({ code: 'invalid-state' });
    await prepareAll(stage);
    await withdrawRelease({ actor: stage.house.investigator, caseNumber: stage.caseNumber, number: 2, reason: 'Wrong reader chosen.' });
    await expect(approve(stage.house.manager, 2)).rejects.toMatchObject({ code: 'invalid-state' });
    expect(await mails()).toHaveLength(1);
  });

  it('cannot release when the case holds a name now that stands in the text', async () => {
    await prepareAll(stage);
    await createInvolvement({ caseId: stage.caseId, role: 'finder', name: 'Curtain Brownline' });
    const release = await rowOf(stage, 1);
    const { checks, passed } = await inspectRelease(db, { actor: stage.house.manager, caseNumber: stage.caseNumber, release });
    expect(passed).toBe(false);
    expect(checks.filter((check) => !check.passed).map((check) => check.id)).toEqual(['names']);
    await expect(approve()).rejects.toMatchObject({ code: 'invalid-state', needs: [expect.stringContaining('account')] });
  });

  it('cannot release when a file in the store is not the one of the manifest, or a photo may no longer leave', async () => {
    await prepareAll(stage);
    const release = await rowOf(stage, 1);
    await db.update(photos).set({ releasable: 'no' }).where(eq(photos.id, stage.photoId));
    await expect(approve()).rejects.toMatchObject({ needs: [expect.stringContaining('photo-01.jpg')] });
    await db.update(photos).set({ releasable: 'yes' }).where(eq(photos.id, stage.photoId));
    await putObject(release.files.find((file) => file.name === 'runs.csv')?.objectKey ?? '', Buffer.from('swapped'), 'text/csv');
    await expect(approve()).rejects.toMatchObject({ needs: [expect.stringContaining('runs.csv')] });
  });

  it('is told when the case has changed since', async () => {
    await prepareAll(stage);
    const inspect = async () => inspectRelease(db, { actor: stage.house.manager, caseNumber: stage.caseNumber, release: await rowOf(stage, 1) });
    expect((await inspect()).caseUnchanged).toBe(true);
    await db.update(cases).set({ lossEstimate: 2_000 }).where(eq(cases.id, stage.caseId));
    expect(await inspect()).toMatchObject({ passed: true, caseUnchanged: false });
  });
});

describe('a release', () => {
  it('is frozen: no part of it can be written again, nor can it be removed', async () => {
    const { number } = await releaseAll(stage);
    const { id } = await rowOf(stage, number);
    const changes = [{ changeNote: 'x' }, { files: [] }, { expiresAt: new Date('2030-01-01T00:00:00Z') }, { state: 'prepared' as const }, { releasedHash: 'x' }, { recipientOrganisationId: stage.house.organisation.id }];
    for (const change of changes) await expect(db.update(releases).set(change).where(eq(releases.id, id))).rejects.toThrow();
    await expect(db.delete(releases).where(eq(releases.id, id))).rejects.toThrow();
  });

  it('can be withdrawn with a reason, for good, and its readers are told without it', async () => {
    const { number } = await releaseAll(stage);
    await withdrawRelease({ actor: stage.house.manager, caseNumber: stage.caseNumber, number, reason: 'A name was overlooked in a picture.' });
    const row = await rowOf(stage, number);
    expect(row).toMatchObject({ state: 'withdrawn', withdrawnReason: 'A name was overlooked in a picture.' });
    const told = (await mails()).find((mail) => mail.subject.includes('withdrawn'));
    expect(told).toMatchObject({ toAddress: stage.reader.email });
    expect(told?.bodyText).not.toContain('overlooked');
    await expect(db.update(releases).set({ state: 'released', withdrawnAt: null, withdrawnReason: null }).where(eq(releases.id, row.id))).rejects.toThrow();
    await expect(withdrawRelease({ actor: stage.house.manager, caseNumber: stage.caseNumber, number, reason: 'Again, please.' })).rejects.toMatchObject({ code: 'invalid-state' });
  });
});
