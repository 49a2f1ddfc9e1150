import { readFileSync } from 'node:fs';
import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { getReconstructionSource } from '#db/queries/reconstructions.server.ts';
import { logEntries, weatherRecords } from '#db/schema/all.ts';
import { draftInput } from '#app/domain/reconstruction-draft.ts';
import type { Actor } from '#app/domain/roles.ts';
import { action, loader } from '#app/routes/cases/weather.tsx';
import { addWeather } from '#app/services/weather/add-weather.server.ts';
import { contextFor } from '#tests/db/auth/stage.ts';
import { createActor, createCase, createHouse } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});

const file = (name: string) => readFileSync(new URL(`../../../fixtures/weather/${name}`, import.meta.url), 'utf8');
/** A window of the hour that the station file holds. */
const alamosaHour = { onsetEarliestAt: new Date('2016-01-01T17:00:00Z'), onsetLatestAt: new Date('2016-01-01T18:00:00Z'), foundAt: new Date('2016-01-01T18:00:00Z') };
const newCase = (state: 'investigation' | 'findings' | 'closed' = 'investigation') => createCase(state, { site: house.site, reporterId: house.reporter.userId, ...alamosaHour });

function args(actor: Actor, caseNumber: number, request: Request) {
  return { request, params: { caseNumber: String(caseNumber) }, context: contextFor(actor), url: new URL(request.url), pattern: '/cases/:caseNumber/weather' };
}
const look = (actor: Actor, caseNumber: number) => loader(args(actor, caseNumber, new Request(`http://scorchline.test/cases/${caseNumber}/weather`)));

interface Answer {
  readonly status: number;
  readonly location: string | null;
  readonly body: { readonly formErrors?: readonly string[]; readonly fieldErrors?: Record<string, string[]>; readonly stage?: { readonly dryRun: { readonly kept: number; readonly problemCount: number } | null; readonly typed: Record<string, string>; readonly look: { readonly format: string } } };
}
async function post(actor: Actor, caseNumber: number, fields: Readonly<Record<string, string>>, upload?: File): Promise<Answer> {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  if (upload) form.append('file', upload);
  const body = upload ? form : new URLSearchParams(fields);
  const answer: unknown = await action(args(actor, caseNumber, new Request(`http://scorchline.test/cases/${caseNumber}/weather`, { method: 'POST', body }))).catch((thrown: unknown) => thrown);
  if (answer instanceof Error) throw answer;
  if (answer instanceof Response) return { status: answer.status, location: answer.headers.get('location'), body: {} };
  if (typeof answer === 'object' && answer !== null && 'data' in answer) {
    const { data, init } = answer as { data: Answer['body']; init?: ResponseInit };
    return { status: init?.status ?? 200, location: null, body: data };
  }
  return { status: 200, location: null, body: answer as Answer['body'] };
}
const recordsOf = (caseId: string) => db.select().from(weatherRecords).where(eq(weatherRecords.caseId, caseId)).orderBy(weatherRecords.number);
const hand = { intent: 'add-hand', sourceName: 'Bulletin', station: 'Airfield', nature: 'station', stationDistanceKm: '31', stationBearingDeg: '200', licenceNote: '', handDay: '2016-01-01', 'hand.0.start': '17:10', 'hand.0.end': '17:20', 'hand.0.directWm2': '640', 'hand.0.cloudOktas': '2' };

describe('values typed by hand', () => {
  test('become a record with its log line; a retry adds nothing and says so', async () => {
    const row = await newCase();
    expect(await post(house.investigator, row.number, hand)).toMatchObject({ status: 303, location: `/cases/${row.number}/weather` });
    expect((await post(house.investigator, row.number, hand)).location).toContain('again=yes');
    const [record, ...others] = await recordsOf(row.id);
    expect(others).toEqual([]);
    expect(record).toMatchObject({ number: 1, kind: 'hand', stationDistanceKm: 31, intervalMin: 10, values: [{ startUtc: '2016-01-01T17:10:00.000Z', endUtc: '2016-01-01T17:20:00.000Z', directWm2: 640, cloudOktas: 2 }] });
    const [line] = await db.select().from(logEntries).where(eq(logEntries.caseId, row.id));
    expect(line).toMatchObject({ event: 'weather.added', actorId: house.investigator.userId });
    const page = await look(house.investigator, row.number);
    expect(page.heading).toContain('record 1');
    expect(page.choiceCaution).toContain('cannot prove a clear gap');
  });

  test('are refused beside their fields, and nothing is stored', async () => {
    const row = await newCase();
    const answer = await post(house.investigator, row.number, { ...hand, sourceName: '', nature: '', 'hand.0.directWm2': '9000' });
    expect(answer.status).toBe(400);
    expect(Object.keys(answer.body.fieldErrors ?? {}).sort()).toEqual(['hand.0.directWm2', 'nature', 'sourceName']);
    expect(await recordsOf(row.id)).toEqual([]);
  });
});

describe('a station file', () => {
  const surfrad = new File([file('surfrad-alamosa-2016-01-01-17h.dat')], 'station.dat', { type: 'text/plain' });

  test('is looked at without storing anything, then kept around the window with its hash, and goes into the input of a run', async () => {
    const row = await newCase();
    const seen = await post(house.investigator, row.number, { intent: 'look-at-file' }, surfrad);
    expect(seen.body.stage).toMatchObject({ look: { format: 'surfrad' }, dryRun: { kept: 60, problemCount: 0 } });
    expect(await recordsOf(row.id)).toEqual([]);
    expect(await post(house.investigator, row.number, { ...seen.body.stage?.typed, intent: 'import-file', stationDistanceKm: '2' })).toMatchObject({ status: 303 });
    const [record] = await recordsOf(row.id);
    expect(record).toMatchObject({ kind: 'file', nature: 'station', intervalMin: 1, mapping: { format: 'surfrad' } });
    expect(record?.fileSha256).toMatch(/^[0-9a-f]{64}$/u);
    const source = await getReconstructionSource(db, { actor: house.investigator, caseNumber: row.number });
    const input = source ? draftInput(source, new Date('2016-02-01T00:00:00Z')).input : null;
    expect(input?.sky.dniSeries).toMatchObject({ basis: 'measured', stationDistanceKm: 2 });
    expect(input?.sky.dniSeries?.values).toHaveLength(60);
  });

  test('with columns asks which is which, and names lines that it leaves out', async () => {
    const row = await newCase();
    const table = new File(['time,dni\n2016-01-01 17:00,500\n2016-01-01 17:10,bright\n2016-01-01 17:20,480\n'], 'a.csv');
    const seen = await post(house.investigator, row.number, { intent: 'look-at-file' }, table);
    expect(seen.body.stage).toMatchObject({ look: { format: 'table' }, dryRun: null, typed: { directWm2: '1', dateColumn: '0' } });
    const early = await post(house.investigator, row.number, { ...seen.body.stage?.typed, intent: 'try-file' });
    expect(Object.keys(early.body.fieldErrors ?? {}).sort()).toEqual(['clock', 'stamp']);
    const settled = { ...seen.body.stage?.typed, clock: 'utc', stamp: 'start', intervalMin: '10' };
    expect((await post(house.investigator, row.number, { ...settled, intent: 'try-file' })).body.stage?.dryRun).toMatchObject({ kept: 2, problemCount: 1 });
    const unnamed = await post(house.investigator, row.number, { ...settled, intent: 'import-file' });
    expect(Object.keys(unnamed.body.fieldErrors ?? {}).sort()).toEqual(['nature', 'sourceName']);
    expect(unnamed.body.stage?.typed['text']).toContain('bright');
    expect(await recordsOf(row.id)).toEqual([]);
    expect((await post(house.investigator, row.number, { ...settled, intent: 'import-file', sourceName: 'Own roof', nature: 'station' })).status).toBe(303);
    expect((await recordsOf(row.id))[0]?.values).toHaveLength(2);
  });

  test('of other days is refused with the days that it holds', async () => {
    const row = await newCase();
    const answer = await post(house.investigator, row.number, { intent: 'import-file', text: 'time,dni\n2020-01-01 17:00,500\n', directWm2: '1', dateColumn: '0', clock: 'utc', stamp: 'start', sourceName: 'x', nature: 'station' });
    expect(answer.body.formErrors?.[0]).toContain('The file begins on 1 Jan 2020');
  });

  test('that is empty or no text is refused', async () => {
    const row = await newCase();
    expect((await post(house.investigator, row.number, { intent: 'look-at-file' }, new File([], 'a.csv'))).body.fieldErrors?.['file']?.[0]).toContain('Choose a file');
    expect((await post(house.investigator, row.number, { intent: 'look-at-file' }, new File([new Uint8Array([80, 75, 0, 0, 1])], 'a.xlsx'))).body.fieldErrors?.['file']?.[0]).toContain('no text file');
  });
});

describe('a record', () => {
  test('is set aside with a reason, once, and a run then leaves it alone; the values may be added again', async () => {
    const row = await newCase();
    await post(house.investigator, row.number, hand);
    expect((await post(house.investigator, row.number, { intent: 'set-aside', number: '1', reason: ' ' })).body.fieldErrors?.['reason']).toHaveLength(1);
    expect((await post(house.investigator, row.number, { intent: 'set-aside', number: '1', reason: 'Wrong day.' })).status).toBe(303);
    expect((await post(house.investigator, row.number, { intent: 'set-aside', number: '1', reason: 'Wrong day.' })).status).toBe(409);
    const page = await look(house.reviewer, row.number);
    expect(page.records[0]).toMatchObject({ chosen: false, setAside: expect.stringContaining('Wrong day.') });
    const source = await getReconstructionSource(db, { actor: house.investigator, caseNumber: row.number });
    expect(source?.weather).toEqual([]);
    expect((await post(house.investigator, row.number, hand)).location).toBe(`/cases/${row.number}/weather`);
    expect((await recordsOf(row.id)).map(({ number }) => number)).toEqual([1, 2]);
  });

  test('of two senders at once is kept once', async () => {
    const row = await newCase();
    const addition = { actor: house.investigator, caseNumber: row.number, kind: 'hand', source: { sourceName: 'Own', station: '', stationDistanceKm: null, stationBearingDeg: null, licenceNote: '', nature: 'station' }, values: [{ startUtc: '2016-01-01T17:00:00.000Z', endUtc: '2016-01-01T17:10:00.000Z', directWm2: 1 }], fileSha256: null, mapping: {} } as const;
    expect((await Promise.all([addWeather(addition), addWeather(addition)])).sort()).toEqual([false, true]);
  });
});

describe('who', () => {
  test.each(['reporter', 'administrator'] as const)('the %s does not read the weather of a case', async (who) => {
    const row = await newCase();
    const answer: unknown = await look(house[who], row.number).catch((thrown: unknown) => thrown);
    expect(answer).toMatchObject({ init: { status: expect.toSatisfy((status: number) => status === 403 || status === 404) } });
  });
  test.each(['reviewer', 'manager', 'privacyLead'] as const)('the %s reads it and does not add', async (who) => {
    const row = await newCase();
    expect((await look(house[who], row.number)).mayEdit).toBe(false);
    expect((await post(house[who], row.number, hand)).status).toBe(403);
    expect((await post(house[who], row.number, { intent: 'fetch-archive' })).status).toBe(403);
    expect(await recordsOf(row.id)).toEqual([]);
  });
  test('nobody adds while the finding is with the reviewer, or after closing', async () => {
    for (const state of ['findings', 'closed'] as const) expect((await post(house.investigator, (await newCase(state)).number, hand)).status).toBe(403);
  });
  test('an investigator of another house sees nothing', async () => {
    const stranger = await createActor((await createHouse()).organisation.id, 'investigator');
    expect(await look(stranger, (await newCase()).number).catch((thrown: unknown) => thrown)).toMatchObject({ init: { status: 404 } });
  });
  test('without an archive the page says so, and asking for it is refused with the same sentence', async () => {
    const row = await newCase();
    const page = await look(house.investigator, row.number);
    expect(page.archive).toBeNull();
    const answer = await post(house.investigator, row.number, { intent: 'fetch-archive' });
    expect(answer).toMatchObject({ status: 409 });
    expect(answer.body.formErrors?.[0]).toBe(page.archiveOff);
  });
});
