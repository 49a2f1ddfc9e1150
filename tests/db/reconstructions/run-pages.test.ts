import { describe, expect, test } from 'vitest';
import { RouterContextProvider } from 'react-router';
import { z } from 'zod';
import { db } from '#db/client.server.ts';
import { getRunPage, getRunsPage } from '#db/queries/reconstruction-page.server.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { figureIds } from '#app/domain/run-figures.ts';
import * as route from '#app/routes/cases/reconstruction.tsx';
import * as figureRoute from '#app/routes/resources/run-figure.ts';
import { hashOf } from '#app/storage/sha256.server.ts';
import { createCase, createHouse, createReconstruction } from '#tests/support/factories.ts';
import { measuredCase, plainInput } from './stage.ts';

const now = new Date('2026-06-01T08:00:00Z');

/** Two hours about sunrise behind a building whose name a spreadsheet would take for a formula. */
const skylineInput: ReconstructionInput = {
  ...plainInput,
  window: { startUtc: '2026-05-09T03:30:00.000Z', endUtc: '2026-05-09T05:30:00.000Z', clockSigmaS: 60 },
  skyline: { sigmaDeg: 0.5, points: [{ azimuthDeg: 65, elevationDeg: 12, name: '=HYPERLINK("Grain House")' }, { azimuthDeg: 200, elevationDeg: 12 }] },
};

/** A ball with a mark, computed with few rays, so that every figure has numbers. */
const quickBall: ReconstructionInput = {
  ...plainInput,
  optic: { kind: 'sphere', diameterM: 0.12, material: { name: 'acrylic' } },
  mark: { bearingDeg: 330, bearingSigmaDeg: 3, elevationDeg: -45, elevationSigmaDeg: 3, distanceM: 0.091, distanceSigmaM: 0.002, lengthMm: 12, widthMm: 4 },
  target: { materialId: 'wool-felt' },
  rays: 1_000,
  samples: 64,
  recurrenceToUtc: '2026-12-01T00:00:00.000Z',
};

async function finishedRun(input: ReconstructionInput = plainInput) {
  const ready = await measuredCase();
  const result = reconstruct(input);
  await createReconstruction({ caseId: ready.caseId, number: 1, input, inputHash: hashOf(input), state: 'done', result, resultHash: hashOf(result), requestedById: ready.house.investigator.userId });
  return { ...ready, result };
}

async function takeAway(actor: Actor, caseNumber: number, format: string): Promise<Response> {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  const path = `/cases/${caseNumber}/reconstructions/1`;
  const url = new URL(`http://localhost:3000${path}?format=${format}`);
  const [middleware] = route.middleware;
  if (!middleware) throw new Error('The route has no middleware.');
  const answer = await middleware({ request: new Request(url), url, context, params: { caseNumber: String(caseNumber), number: '1' }, pattern: '/cases/:caseNumber/reconstructions/:number' }, () => Promise.resolve(new Response('the page')));
  if (!(answer instanceof Response)) throw new Error('No answer was given.');
  return answer;
}

async function figureFile(actor: Actor, caseNumber: number, fileName: string): Promise<Response> {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  const url = new URL(`http://localhost:3000/cases/${caseNumber}/reconstructions/1/figures/${fileName}`);
  return figureRoute.loader({ request: new Request(url), url, context, params: { caseNumber: String(caseNumber), number: '1', fileName }, pattern: '/cases/:caseNumber/reconstructions/:number/figures/:fileName' });
}

describe('the list of runs', () => {
  test('shows who asked, window and totals, and what a new run would go by', async () => {
    const { house, caseNumber } = await finishedRun();
    const page = await getRunsPage(db, { actor: house.investigator, caseNumber, now });
    expect(page?.runs).toMatchObject([{ number: 1, state: 'done', askedBy: house.investigator.displayName, windowWords: '9 May 2026, 11:00 to 11:10', standing: 'not attached', totals: { sunlit: 0, notSunlit: 0, cannotTell: 10 } }]);
    expect(page).toMatchObject({ ready: true, refusal: null, pending: false, sceneVersion: 1 });
    expect(page?.origins.find((one) => one.field === 'Diameter')).toMatchObject({ value: '120 ±0.5 mm', origin: 'measured' });
    expect(page?.missing.join(' ')).toContain('skyline');
  });

  test('is not open to the reporter of the case, who may read the case itself', async () => {
    const house = await createHouse();
    const row = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId });
    await expect(getRunsPage(db, { actor: house.reporter, caseNumber: row.number, now })).rejects.toMatchObject({ code: 'forbidden' });
    expect(await getRunsPage(db, { actor: (await createHouse()).investigator, caseNumber: row.number, now })).toBeNull();
  });

  test('says why nothing can be run: the role, or the state of the case', async () => {
    const house = await createHouse();
    const closed = await createCase('closed', { site: house.site });
    expect((await getRunsPage(db, { actor: house.manager, caseNumber: closed.number, now }))?.refusal).toContain('Open to an investigator');
    expect((await getRunsPage(db, { actor: house.investigator, caseNumber: closed.number, now }))?.refusal).toContain('closed');
  });

  test('asks again while a run is under way', async () => {
    const { house, caseId, caseNumber } = await measuredCase();
    await createReconstruction({ caseId, number: 1, input: plainInput, state: 'running', progressDone: 3, progressTotal: 10 });
    const page = await getRunsPage(db, { actor: house.investigator, caseNumber, now });
    expect(page).toMatchObject({ pending: true, runs: [{ progress: { done: 3, total: 10 } }] });
  });
});

describe('one run', () => {
  test('draws every minute of a window within a day, night included', async () => {
    const { house, caseNumber } = await finishedRun({ ...plainInput, window: { ...plainInput.window, startUtc: '2026-05-09T02:00:00.000Z', endUtc: '2026-05-09T05:00:00.000Z' } });
    const page = await getRunPage(db, { actor: house.reviewer, caseNumber, number: 1, now });
    expect(page?.view?.scrubs).toBe(true);
    expect(page?.view?.minutes).toHaveLength(180);
    expect(page?.view?.minutes[0]?.apparentElevationDeg).toBeLessThan(-5);
    expect(page).toMatchObject({ attachRefusal: expect.stringContaining('investigator'), refusal: null });
  });

  test('names what stands before the sun', async () => {
    const { house, caseNumber } = await finishedRun(skylineInput);
    const page = await getRunPage(db, { actor: house.investigator, caseNumber, number: 1, now });
    expect(page?.view?.card.runs.map((run) => run.reasonWords)).toContain('behind =HYPERLINK("Grain House")');
  });

  test('tells what differs from the run before, in inputs and in sunlit minutes', async () => {
    const { house, caseId, caseNumber, result } = await finishedRun();
    const input = { ...plainInput, place: { ...plainInput.place, elevationM: 90 } };
    await createReconstruction({ caseId, number: 2, input, state: 'done', result: { ...result, totals: { sunlit: 4, notSunlit: 0, cannotTell: 6 } } });
    const page = await getRunPage(db, { actor: house.investigator, caseNumber, number: 2, now });
    expect(page?.changes).toEqual({ since: 1, inputs: [{ term: 'Height', value: '60 m to 90 m' }], sunlit: '0 to 4 min' });
    expect((await getRunPage(db, { actor: house.investigator, caseNumber, number: 1, now }))?.changes).toBeNull();
  });

  test('that does not exist is not found', async () => {
    const { house, caseNumber } = await finishedRun();
    expect(await getRunPage(db, { actor: house.investigator, caseNumber, number: 2, now })).toBeNull();
  });
});

describe('taking a run away', () => {
  test('the minutes leave as CSV, one row a minute, and no cell is taken for a formula', async () => {
    const { house, caseNumber } = await finishedRun(skylineInput);
    const answer = await figureFile(house.investigator, caseNumber, 'minutes.csv');
    expect(answer.headers.get('Content-Disposition')).toBe(`attachment; filename="case-${caseNumber}-run-1-minutes.csv"`);
    const lines = (await answer.text()).trimEnd().split('\r\n');
    expect(lines).toHaveLength(121);
    expect(lines[0]).toContain('azimuth_deg,apparent_elevation_deg,result,reason');
    expect(lines.slice(1).every((line) => !/(?:^|,)"?[=+@]/u.test(line))).toBe(true);
    expect(lines.some((line) => line.includes('"behind =HYPERLINK(""Grain House"")"'))).toBe(true);
  });

  test('the JSON holds input and result to the byte, so that both hashes can be worked out again', async () => {
    const { house, caseNumber } = await finishedRun();
    const answer = await takeAway(house.investigator, caseNumber, 'json');
    const body = z.object({ input: z.unknown(), result: z.unknown(), inputHash: z.string(), resultHash: z.string() }).parse(await answer.json());
    expect(hashOf(body.input)).toBe(body.inputHash);
    expect(hashOf(body.result)).toBe(body.resultHash);
  });

  test.each(figureIds)('the numbers of %s leave with a head and as many cells in each row', async (id) => {
    const { house, caseNumber } = await finishedRun(quickBall);
    const text = await (await figureFile(house.manager, caseNumber, `${id}.csv`)).text();
    const lines = text.replace(/^\uFEFF/u, '').trimEnd().split('\r\n');
    expect(lines.length).toBeGreaterThan(1);
    const cells = (line: string) => line.replace(/"(?:[^"]|"")*"/gu, 'x').split(',').length;
    for (const line of lines) expect(cells(line)).toBe(cells(lines[0] ?? ''));
  });

  test('a figure that is not one, a stranger and a reporter get nothing', async () => {
    const { house, caseNumber } = await finishedRun();
    await expect(figureFile(house.investigator, caseNumber, 'secrets.csv')).rejects.toMatchObject({ init: { status: 404 } });
    await expect(figureFile(house.investigator, caseNumber, 'minutes.json')).rejects.toMatchObject({ init: { status: 404 } });
    await expect(figureFile((await createHouse()).investigator, caseNumber, 'minutes.csv')).rejects.toMatchObject({ init: { status: 404 } });
    await expect(figureFile(house.reporter, caseNumber, 'minutes.csv')).rejects.toMatchObject({ init: { status: expect.any(Number) } });
  });

  test('another format is the page, and a stranger gets nothing', async () => {
    const { house, caseNumber } = await finishedRun();
    expect(await (await takeAway(house.investigator, caseNumber, 'pdf')).text()).toBe('the page');
    await expect(takeAway((await createHouse()).investigator, caseNumber, 'json')).rejects.toMatchObject({ init: { status: 404 } });
  });
});
