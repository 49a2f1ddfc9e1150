import { eq, sql } from 'drizzle-orm';
import { afterAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { getRunComparison } from '#db/queries/run-comparison.server.ts';
import { logEntries, reconstructions } from '#db/schema/all.ts';
import { runReconstruction } from '#app/jobs/handlers/run-reconstruction.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { totalsWords } from '#app/domain/run-words.ts';
import { changesAlone } from '#app/services/reconstructions/changes-alone.server.ts';
import { repeatReconstruction } from '#app/services/reconstructions/repeat-reconstruction.server.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { createCase, createHouse, createReconstruction } from '#tests/support/factories.ts';
import { measuredCase, plainInput } from './stage.ts';

afterAll(stopQueue);

/** A wall in the east that hides the sun until it stands higher than a height, in both runs of an early morning. */
const behindWall = (elevationDeg: number): ReconstructionInput => ({
  ...plainInput,
  window: { startUtc: '2026-05-09T05:00:00.000Z', endUtc: '2026-05-09T07:00:00.000Z', clockSigmaS: 60 },
  skyline: { sigmaDeg: 0.25, points: [{ azimuthDeg: 0, elevationDeg }, { azimuthDeg: 180, elevationDeg }] },
});

async function twoRuns(first: ReconstructionInput, second: ReconstructionInput) {
  const ready = await measuredCase();
  for (const [index, input] of [first, second].entries()) {
    const result = reconstruct(input);
    await createReconstruction({ caseId: ready.caseId, number: index + 1, input, inputHash: hashOf(input), state: 'done', result, resultHash: hashOf(result), requestedById: ready.house.investigator.userId });
  }
  return ready;
}

describe('two runs side by side', () => {
  test('name the input that differs with unit and difference, and the minutes that changed with both reasons', async () => {
    const { house, caseNumber } = await twoRuns(behindWall(12), behindWall(18));
    const page = await getRunComparison(db, { actor: house.reviewer, caseNumber, a: 2, b: 1 });
    expect([page?.view?.a.number, page?.view?.b.number]).toEqual([1, 2]);
    expect(page?.view?.inputs.changed).toEqual([
      { group: 'Skyline', field: 'points 1, elevation', unit: '°', before: '12', after: '18', difference: '+6' },
      { group: 'Skyline', field: 'points 2, elevation', unit: '°', before: '12', after: '18', difference: '+6' },
    ]);
    // The sun climbs from 12° to 18° in these minutes, so nothing but "not sunlit" can be new.
    expect(page?.view?.stretches.length).toBeGreaterThan(0);
    for (const one of page?.view?.stretches ?? []) {
      expect([one.before.verdict, one.after.verdict]).toEqual(['cannot-tell', 'not-sunlit']);
      expect(one.after.reasonWords).toContain('skyline');
      expect(one.minutes).toBe((Date.parse(one.toUtc) - Date.parse(one.fromUtc)) / 60_000);
    }
    const changed = (page?.view?.stretches ?? []).reduce((sum, one) => sum + one.minutes, 0);
    expect(page?.view?.heading).toBe(`Two inputs changed; ${changed} of 120 minutes changed their answer`);
    const dark = page?.view?.results.find((one) => one.term === 'Not sunlit');
    expect(dark).toMatchObject({ unit: 'min', changed: true, difference: `+${changed}` });
  });

  test('of the same input say that not a byte differs', async () => {
    const { house, caseNumber } = await twoRuns(plainInput, plainInput);
    const page = await getRunComparison(db, { actor: house.investigator, caseNumber, a: null, b: null });
    expect([page?.a, page?.b]).toEqual([1, 2]);
    expect(page?.view).toMatchObject({ heading: 'Nothing that went in changed; no minute changed its answer', sameBytes: true, stretches: [] });
    expect(page?.view?.results.some((one) => one.changed)).toBe(false);
  });

  test('count minutes that only one window holds as not examined in the other', async () => {
    const later = { ...plainInput, window: { ...plainInput.window, endUtc: '2026-05-09T10:15:00.000Z' } };
    const { house, caseNumber } = await twoRuns(plainInput, later);
    const page = await getRunComparison(db, { actor: house.investigator, caseNumber, a: 1, b: 2 });
    expect(page?.view?.stretches).toMatchObject([{ minutes: 5, before: { verdict: 'not-examined' }, fromUtc: '2026-05-09T10:10:00.000Z' }]);
  });

  test('are not there for one run, nor for a run that is not done, nor for strangers', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    await createReconstruction({ caseId, number: 1, input: plainInput, state: 'running' });
    expect(await getRunComparison(db, { actor: house.investigator, caseNumber, a: 1, b: 2 })).toMatchObject({ runs: [], view: null });
    expect(await getRunComparison(db, { actor: (await createHouse()).investigator, caseNumber, a: 1, b: 2 })).toBeNull();
    const own = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId });
    await expect(getRunComparison(db, { actor: house.reporter, caseNumber: own.number, a: 1, b: 2 })).rejects.toMatchObject({ code: 'forbidden' });
  });
});

describe('each change by itself', () => {
  test('shows which one made the difference', async () => {
    // The seed changes nothing in the minutes; the height of the wall does.
    const later = { ...behindWall(18), seed: 8 };
    const { house, caseNumber } = await twoRuns(behindWall(12), later);
    const alone = await changesAlone({ actor: house.reviewer, caseNumber, a: 2, b: 1 });
    expect(alone?.map((one) => one.label)).toEqual(['Skyline, points', 'Seed']);
    expect(alone?.[0]?.words).toBe(totalsWords(reconstruct(later).totals));
    expect(alone?.[1]?.words).toBe(totalsWords(reconstruct(behindWall(12)).totals));
  });

  test('has nothing to add to a single change, and is not for those who may not run', async () => {
    const { house, caseNumber } = await twoRuns(plainInput, { ...plainInput, seed: 8 });
    expect(await changesAlone({ actor: house.investigator, caseNumber, a: 1, b: 2 })).toBeNull();
    await expect(changesAlone({ actor: house.manager, caseNumber, a: 1, b: 2 })).rejects.toMatchObject({ code: 'forbidden' });
  });
});

describe('running the same input again', () => {
  test('takes the frozen input, not the measurements of today, writes the log, and gives the same bytes', async () => {
    const frozen = { ...plainInput, place: { ...plainInput.place, elevationM: 77 } };
    const { house, caseId, caseNumber } = await twoRuns(frozen, plainInput);
    expect(await repeatReconstruction({ actor: house.reviewer, caseNumber, number: 1, note: 'Engine check' })).toEqual({ number: 3 });
    const [run] = await db.select().from(reconstructions).where(sql`${reconstructions.caseId} = ${caseId} and ${reconstructions.number} = 3`);
    expect(run).toMatchObject({ inputHash: hashOf(frozen), state: 'queued', note: 'Engine check' });
    const lines = await db.select().from(logEntries).where(eq(logEntries.caseId, caseId));
    expect(lines.at(-1)).toMatchObject({ event: 'reconstruction.repeated', summary: expect.stringContaining('Reconstruction 1 run again as 3') });
    await runReconstruction({ reconstructionId: run?.id ?? '' });
    expect((await getRunComparison(db, { actor: house.reviewer, caseNumber, a: 1, b: 3 }))?.view?.sameBytes).toBe(true);
  });

  test('is refused to a manager and in a closed case, and finds nothing for a stranger', async () => {
    const { house, caseNumber } = await twoRuns(plainInput, plainInput);
    await expect(repeatReconstruction({ actor: house.manager, caseNumber, number: 1, note: '' })).rejects.toMatchObject({ code: 'forbidden' });
    await expect(repeatReconstruction({ actor: house.investigator, caseNumber, number: 9, note: '' })).rejects.toMatchObject({ code: 'not-found' });
    await expect(repeatReconstruction({ actor: (await createHouse()).investigator, caseNumber, number: 1, note: '' })).rejects.toMatchObject({ code: 'not-found' });
  });

  test('says which field the engine of today cannot read', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    const old = { ...plainInput, sky: { climateClass: 'moonlit' } } as unknown as ReconstructionInput;
    await createReconstruction({ caseId, number: 1, input: old, state: 'failed', failure: 'Refused.' });
    await expect(repeatReconstruction({ actor: house.investigator, caseNumber, number: 1, note: '' })).rejects.toMatchObject({ code: 'invalid-state', needs: [expect.stringContaining('climateClass')] });
  });
});
