import { eq, sql } from 'drizzle-orm';
import { afterAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { logEntries, reconstructions, sunReturns } from '#db/schema/all.ts';
import { reconstructionResultSchema } from '#app/domain/reconstruction-result-schema.ts';
import { runReconstruction } from '#app/jobs/handlers/run-reconstruction.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { attachReconstruction } from '#app/services/reconstructions/attach-reconstruction.server.ts';
import { requestReconstruction } from '#app/services/reconstructions/request-reconstruction.server.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { createActor, createCase, createHouse, createReconstruction } from '#tests/support/factories.ts';
import { measuredCase, plainInput } from './stage.ts';

afterAll(stopQueue);

const runOf = async (caseId: string, number: number) => {
  const [row] = await db.select().from(reconstructions).where(sql`${reconstructions.caseId} = ${caseId} and ${reconstructions.number} = ${number}`);
  if (!row) throw new Error(`There is no run ${number}.`);
  return row;
};
const jobs = async (runId: string) => (await db.execute(sql`select 1 from pgboss.job where name = 'run-reconstruction' and data->>'reconstructionId' = ${runId}`)).length;

describe('asking for a run', () => {
  test('freezes the input with its hash, numbers it within the case, queues one job and writes the log', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    expect(await requestReconstruction({ actor: house.investigator, caseNumber, note: 'First run' })).toEqual({ number: 1 });
    expect(await requestReconstruction({ actor: house.reviewer, caseNumber, note: '' })).toEqual({ number: 2 });
    const run = await runOf(caseId, 1);
    expect(run).toMatchObject({ state: 'queued', sceneVersion: 1, inputHash: hashOf(run.input), requestedById: house.investigator.userId, note: 'First run' });
    expect(run.input.seed).toBe(caseNumber);
    expect(await jobs(run.id)).toBe(1);
    const lines = await db.select({ event: logEntries.event }).from(logEntries).where(eq(logEntries.caseId, caseId));
    expect(lines.map((line) => line.event)).toEqual(['reconstruction.requested', 'reconstruction.requested']);
  });

  test('is refused to a manager, who is told who may, and in a closed case', async () => {
    const { house, caseNumber } = await measuredCase();
    await expect(requestReconstruction({ actor: house.manager, caseNumber, note: '' })).rejects.toMatchObject({ code: 'forbidden', message: expect.stringContaining('an investigator or a technical reviewer') });
    const closed = await createCase('closed', { site: house.site });
    await expect(requestReconstruction({ actor: house.investigator, caseNumber: closed.number, note: '' })).rejects.toMatchObject({ code: 'forbidden' });
  });

  test('in a case of another organisation it finds nothing', async () => {
    const { caseNumber } = await measuredCase();
    const stranger = (await createHouse()).investigator;
    await expect(requestReconstruction({ actor: stranger, caseNumber, note: '' })).rejects.toMatchObject({ code: 'not-found' });
  });

  test('without any time it says what is needed and stores nothing', async () => {
    const house = await createHouse();
    const row = await createCase('investigation', { site: house.site, foundAt: null, foundPrecision: 'unknown', onsetEarliestAt: null, onsetLatestAt: null });
    await expect(requestReconstruction({ actor: house.investigator, caseNumber: row.number, note: '' })).rejects.toMatchObject({ code: 'invalid-state', needs: expect.arrayContaining([expect.stringContaining('Give the time')]) });
    expect(await db.$count(reconstructions, eq(reconstructions.caseId, row.id))).toBe(0);
  });
});

describe('computing a run', () => {
  test('in a thread gives the bytes that the engine gives here, and a second call changes nothing', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    await requestReconstruction({ actor: house.investigator, caseNumber, note: '' });
    const { id } = await runOf(caseId, 1);
    await runReconstruction({ reconstructionId: id });
    const first = await runOf(caseId, 1);
    expect(first).toMatchObject({ state: 'done', zoneRules: process.versions.tz, failure: null });
    expect(first.resultHash).toBe(hashOf(reconstruct(first.input)));
    expect(first.resultHash).toBe(hashOf(first.result));
    expect(reconstructionResultSchema.safeParse(first.result).error).toBeUndefined();
    await runReconstruction({ reconstructionId: id });
    expect(await runOf(caseId, 1)).toEqual(first);
  }, 60_000);

  test('that was interrupted is taken up again', async () => {
    const { caseId } = await measuredCase();
    const { id } = await createReconstruction({ caseId, number: 1, input: plainInput, state: 'running', startedAt: new Date() });
    await runReconstruction({ reconstructionId: id });
    expect(await runOf(caseId, 1)).toMatchObject({ state: 'done' });
  }, 60_000);

  test('with input that the engine refuses ends with its sentence and is not tried again', async () => {
    const { caseId } = await measuredCase();
    const { id } = await createReconstruction({ caseId, number: 1, input: { ...plainInput, place: { ...plainInput.place, latitudeDeg: 123 } } });
    await expect(runReconstruction({ reconstructionId: id })).resolves.toBeUndefined();
    const run = await runOf(caseId, 1);
    expect(run).toMatchObject({ state: 'failed', result: null });
    expect(run.failure).toMatch(/latitudeDeg is 123/u);
  }, 60_000);

  test('that is gone is no error', async () => {
    await expect(runReconstruction({ reconstructionId: '00000000-0000-4000-8000-000000000000' })).resolves.toBeUndefined();
  });
});

describe('a finished run', () => {
  test('keeps its input and its result, whoever writes', async () => {
    const { caseId } = await measuredCase();
    const result = reconstruct(plainInput);
    const { id } = await createReconstruction({ caseId, number: 1, input: plainInput, state: 'done', result });
    const change = (values: Partial<typeof reconstructions.$inferInsert>) => db.update(reconstructions).set(values).where(eq(reconstructions.id, id));
    const refused = { cause: { message: 'a reconstruction keeps its input and its result' } };
    await expect(change({ input: { ...plainInput, seed: 8 } })).rejects.toMatchObject(refused);
    await expect(change({ result: { ...result, warnings: ['changed'] } })).rejects.toMatchObject(refused);
    await expect(change({ resultHash: 'f'.repeat(64) })).rejects.toMatchObject(refused);
    await expect(change({ state: 'queued' })).rejects.toMatchObject(refused);
  });

  test('is attached with its days of return, and the one attached before is kept as superseded', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    const day = (on: string) => ({ on, bestUtc: `${on}T10:05:00.000Z`, fromUtc: `${on}T10:00:00.000Z`, toUtc: `${on}T10:09:00.000Z`, minutes: 10, separationDeg: 0.1 });
    const band = (on: string) => ({ firstOn: on, lastOn: on, days: [day(on)], bestUtc: `${on}T10:05:00.000Z`, minutes: 10 });
    const plain = reconstruct(plainInput);
    await createReconstruction({ caseId, number: 1, input: plainInput, state: 'done', result: { ...plain, recurrence: [band('2026-08-03'), band('2026-08-04')] } });
    await createReconstruction({ caseId, number: 2, input: plainInput, state: 'done', result: { ...plain, recurrence: [band('2026-08-05')] } });
    await attachReconstruction({ actor: house.investigator, caseNumber, number: 1, reason: '' });
    expect(await returnsOf(caseId)).toEqual(['2026-08-03', '2026-08-04']);
    await attachReconstruction({ actor: house.investigator, caseNumber, number: 2, reason: 'Bearing corrected' });
    expect(await returnsOf(caseId)).toEqual(['2026-08-05']);
    expect((await runOf(caseId, 1)).supersededAt).not.toBeNull();
    expect(await runOf(caseId, 2)).toMatchObject({ supersededAt: null, attachedById: house.investigator.userId });
    const [line] = await db.select().from(logEntries).where(sql`${logEntries.caseId} = ${caseId} and ${logEntries.event} = 'reconstruction.attached' and ${logEntries.reason} <> ''`);
    expect(line).toMatchObject({ reason: 'Bearing corrected', actorId: house.investigator.userId });
  });

  test('is attached only when it is done, and only by an investigator', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    await createReconstruction({ caseId, number: 1, input: plainInput });
    await expect(attachReconstruction({ actor: house.investigator, caseNumber, number: 1, reason: '' })).rejects.toMatchObject({ code: 'invalid-state' });
    const reviewer = await createActor(house.organisation.id, 'reviewer');
    await expect(attachReconstruction({ actor: reviewer, caseNumber, number: 1, reason: '' })).rejects.toMatchObject({ code: 'forbidden' });
  });
});

const returnsOf = async (caseId: string) =>
  (await db.select({ onDay: sunReturns.onDay }).from(sunReturns).where(eq(sunReturns.caseId, caseId)).orderBy(sunReturns.onDay)).map((row) => row.onDay);
