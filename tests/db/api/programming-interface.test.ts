import { eq, sql } from 'drizzle-orm';
import { afterAll, describe, expect, test } from 'vitest';
import { RouterContextProvider } from 'react-router';
import { z } from 'zod';
import { actorContext } from '#app/auth/actor-context.ts';
import { computationAnswerSchema, problemSchema, queuedAnswerSchema } from '#app/domain/api-contract.ts';
import { reconstructionResultSchema } from '#app/domain/reconstruction-result-schema.ts';
import type { Actor } from '#app/domain/roles.ts';
import { runComputation } from '#app/jobs/handlers/run-computation.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import * as clearSky from '#app/routes/api/clear-sky.ts';
import * as openapi from '#app/routes/api/openapi.ts';
import * as reconstruction from '#app/routes/api/reconstruction.ts';
import * as reconstructions from '#app/routes/api/reconstructions.ts';
import * as recurrence from '#app/routes/api/recurrence.ts';
import * as sun from '#app/routes/api/sun.ts';
import { makeApiToken, revokeToken } from '#app/services/people/api-tokens.server.ts';
import { db } from '#db/client.server.ts';
import { listApiTokens } from '#db/queries/api-tokens.server.ts';
import { apiTokens, logEntries, users } from '#db/schema/all.ts';
import rows from '#fixtures/reference/check-values.json';
import { createActor, createHouse, createOrganisation } from '#tests/support/factories.ts';
import { plainInput } from '#tests/db/reconstructions/stage.ts';

afterAll(stopQueue);

const origin = 'http://localhost:3000';

function args(path: string, actor: Actor | null, init?: RequestInit) {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  const url = new URL(path, origin);
  return { request: new Request(url, init), url, context, params: {}, pattern: url.pathname };
}
const post = (body: unknown): RequestInit => ({ method: 'POST', headers: { 'Content-Type': 'application/json' }, body: typeof body === 'string' ? body : JSON.stringify(body) });
const investigator = async () => (await createHouse()).investigator;

async function problemOf(response: Response) {
  expect(response.headers.get('Content-Type')).toBe('application/problem+json');
  const problem = problemSchema.parse(await response.json());
  expect(problem.status).toBe(response.status);
  return problem;
}

const paths = { lat: '39.742476', lon: '-105.1786', utc: '2003-10-17T12:30:30-07:00', elevationM: '1830.14', pressureHpa: '820', temperatureC: '11' };
const query = (changed: Record<string, string> = {}) => new URLSearchParams({ ...paths, ...changed }).toString();

describe('who may ask', () => {
  test('without a session every address answers 401 as problem details', async () => {
    const answers = await Promise.all([
      sun.loader(args(`/api/v1/sun?${query()}`, null)),
      clearSky.loader(args(`/api/v1/clear-sky?${query()}`, null)),
      reconstructions.action(args('/api/v1/reconstructions', null, post(plainInput))),
      recurrence.action(args('/api/v1/recurrence', null, post({}))),
      openapi.loader(args('/api/v1/openapi.json', null)),
      reconstruction.loader({ ...args('/api/v1/reconstructions/x', null), params: { computationId: 'x' } }),
    ]);
    expect(answers.map((answer) => answer.status)).toEqual([401, 401, 401, 401, 401, 401]);
    for (const answer of answers) expect((await problemOf(answer)).detail).toContain('Sign in');
  });

  test('a reader of case files is told that it is not theirs', async () => {
    const insurer = await createActor((await createOrganisation({ kind: 'insurer' })).id, 'insurer');
    const answer = await reconstructions.action(args('/api/v1/reconstructions', insurer, post(plainInput)));
    expect((await problemOf(answer)).status).toBe(403);
  });

  test('the thirty-first computation within a minute is refused, with when to try again', async () => {
    const actor = await investigator();
    const ask = () => recurrence.action(args('/api/v1/recurrence', actor, post('{')));
    const statuses: number[] = [];
    for (let count = 0; count < 30; count += 1) statuses.push((await ask()).status);
    expect(new Set(statuses)).toEqual(new Set([422]));
    const refused = await ask();
    expect(refused.headers.get('Retry-After')).toBe('60');
    expect((await problemOf(refused)).status).toBe(429);
  });
});

describe('GET /api/v1/sun', () => {
  const row = z.object({ source: z.string(), expected: z.object({ azimuth_deg_eastward_from_north: z.number(), elevation_deg: z.number(), elevation_no_refraction_deg: z.number() }) }).parse(rows.find((one) => one.id === 'spa-01'));

  test(`answers the worked example of ${row.source}`, async () => {
    const answer = await sun.loader(args(`/api/v1/sun?${query()}`, await investigator()));
    const body = z.object({ azimuthDeg: z.number(), apparentElevationDeg: z.number(), airlessElevationDeg: z.number() }).parse(await answer.json());
    expect(Math.abs(body.azimuthDeg - row.expected.azimuth_deg_eastward_from_north)).toBeLessThan(3e-4);
    expect(Math.abs(body.apparentElevationDeg - row.expected.elevation_deg)).toBeLessThan(3e-4);
    expect(Math.abs(body.airlessElevationDeg - row.expected.elevation_no_refraction_deg)).toBeLessThan(3e-4);
  });

  test.each([
    ['a latitude off the globe', { lat: '95' }, 'lat'],
    ['words for a number', { lon: 'west' }, 'lon'],
    ['an instant without an offset', { utc: '2003-10-17T12:30:30' }, 'utc'],
    ['a misspelt field', { elevation: '3' }, 'elevation'],
    ['an empty field', { lat: '' }, 'lat'],
  ])('%s is answered by 422 with the field named', async (_what, changed, field) => {
    const answer = await sun.loader(args(`/api/v1/sun?${query(changed)}`, await investigator()));
    const problem = await problemOf(answer);
    expect(problem.status).toBe(422);
    expect(problem.errors?.map((error) => error.field)).toEqual([field]);
  });

  test('a field given twice is not guessed at', async () => {
    const answer = await sun.loader(args(`/api/v1/sun?${query()}&lat=10`, await investigator()));
    expect((await problemOf(answer)).errors?.map((error) => error.field)).toEqual(['lat']);
  });

  test('a year out of range is named', async () => {
    const answer = await sun.loader(args(`/api/v1/sun?${query({ utc: '1776-07-04T12:00:00Z' })}`, await investigator()));
    expect((await problemOf(answer)).detail).toContain('1900');
  });

  test('another method is answered by 405', async () => {
    const answer = await sun.action();
    expect(answer.headers.get('Allow')).toBe('GET');
    expect((await problemOf(answer)).status).toBe(405);
  });
});

describe('GET /api/v1/clear-sky', () => {
  test('gives no irradiance at night, and a likely value under the bound by day', async () => {
    const actor = await investigator();
    const night = await clearSky.loader(args(`/api/v1/clear-sky?${query({ utc: '2003-10-17T07:00:00Z' })}`, actor));
    expect(await night.json()).toMatchObject({ dniWm2: null, boundDniWm2: null, airMass: null });
    const day = z.object({ dniWm2: z.number(), boundDniWm2: z.number(), extraterrestrialWm2: z.number() }).parse(await (await clearSky.loader(args(`/api/v1/clear-sky?${query({ climateClass: 'clean-dry-mountain' })}`, actor))).json());
    expect(day.dniWm2).toBeLessThan(day.boundDniWm2);
    expect(day.boundDniWm2).toBeLessThan(day.extraterrestrialWm2);
  });

  test('lists what it assumed, unverified values as such', async () => {
    const answer = await clearSky.loader(args(`/api/v1/clear-sky?${query()}`, await investigator()));
    const { assumptions } = z.object({ assumptions: z.array(z.object({ field: z.string(), source: z.object({ verified: z.boolean() }) })) }).parse(await answer.json());
    expect(assumptions).toContainEqual(expect.objectContaining({ field: 'aod500', source: expect.objectContaining({ verified: false }) }));
    expect(assumptions.map((one) => one.field)).not.toContain('pressureHpa');
  });
});

describe('POST /api/v1/reconstructions', () => {
  test('answers with what the engine gives here, in the shape that the contract states', async () => {
    const answer = await reconstructions.action(args('/api/v1/reconstructions', await investigator(), post(plainInput)));
    expect(answer.status).toBe(200);
    const body: unknown = await answer.json();
    expect(reconstructionResultSchema.safeParse(body).error).toBeUndefined();
    expect(JSON.stringify(body)).toBe(JSON.stringify(reconstruct(plainInput)));
  }, 60_000);

  test('input with faults is answered by 422 with every field', async () => {
    const bad = { ...plainInput, place: { ...plainInput.place, latitudeDeg: 123 }, seed: -1, colour: 'red' };
    const problem = await problemOf(await reconstructions.action(args('/api/v1/reconstructions', await investigator(), post(bad))));
    expect(problem.status).toBe(422);
    expect(problem.errors?.map((error) => error.field).sort()).toEqual(['colour', 'place.latitudeDeg', 'seed']);
  });

  test('fields that disagree are answered by the engine’s own sentence', async () => {
    const bad = { ...plainInput, window: { ...plainInput.window, endUtc: '2026-05-01T00:00:00Z' } };
    const problem = await problemOf(await reconstructions.action(args('/api/v1/reconstructions', await investigator(), post(bad))));
    expect(problem.status).toBe(422);
    expect(problem.detail).toContain('window.startUtc and window.endUtc disagree');
  }, 60_000);

  test('a body of another kind, of no JSON, or beyond the limit is refused before it is read on', async () => {
    const actor = await investigator();
    const form = await reconstructions.action(args('/api/v1/reconstructions', actor, { method: 'POST', body: new URLSearchParams({ seed: '1' }) }));
    expect((await problemOf(form)).status).toBe(415);
    const broken = await reconstructions.action(args('/api/v1/reconstructions', actor, post('{"place":')));
    expect((await problemOf(broken)).detail).toContain('not JSON');
    const long = await reconstructions.action(args('/api/v1/reconstructions', actor, post(`"${'x'.repeat(8_000_001)}"`)));
    expect((await problemOf(long)).status).toBe(413);
  });

  test('PUT is answered by 405', async () => {
    const answer = await reconstructions.action(args('/api/v1/reconstructions', await investigator(), { ...post({}), method: 'PUT' }));
    expect((await problemOf(answer)).status).toBe(405);
  });
});

describe('long reconstructions', () => {
  const ask = (actor: Actor, body: unknown, headers: Record<string, string> = { Prefer: 'respond-async' }) =>
    reconstructions.action(args('/api/v1/reconstructions', actor, { method: 'POST', headers: { 'Content-Type': 'application/json', ...headers }, body: JSON.stringify(body) }));
  const look = (actor: Actor, id: string) => reconstruction.loader({ ...args(`/api/v1/reconstructions/${id}`, actor), params: { computationId: id } });
  const queued = async (answer: Response) => {
    expect(answer.status).toBe(202);
    const body = queuedAnswerSchema.parse(await answer.json());
    expect(answer.headers.get('Location')).toBe(body.href);
    return body;
  };
  const stateOf = async (answer: Response) => computationAnswerSchema.parse(await answer.json());

  test('are answered by 202 with a link that gives state, progress and at last the result', async () => {
    const actor = await investigator();
    const { id, href } = await queued(await ask(actor, plainInput));
    expect(href).toBe(`/api/v1/reconstructions/${id}`);
    const waiting = await look(actor, id);
    expect(waiting.headers.get('Retry-After')).toBe('2');
    expect(await stateOf(waiting)).toMatchObject({ state: 'queued', result: null, failure: null });
    await runComputation({ computationId: id });
    const done = await stateOf(await look(actor, id));
    expect(done.state).toBe('done');
    expect(done.finishedUtc).not.toBeNull();
    expect(done.result?.grade).toEqual(reconstruct(plainInput).grade);
    // A second worker changes nothing.
    await runComputation({ computationId: id });
    expect((await stateOf(await look(actor, id))).finishedUtc).toBe(done.finishedUtc);
  }, 60_000);

  test('are known by their size: five million rays wait in the queue, a plain sun does not', async () => {
    const actor = await investigator();
    const optic = { kind: 'sphere', diameterM: 0.1, material: { name: 'crown-glass' } };
    await queued(await ask(actor, { ...plainInput, optic, rays: 5_000_000 }, {}));
    expect((await ask(actor, plainInput, {})).status).toBe(200);
  }, 60_000);

  test('sent again find the run that they began, with one job and one line in the log', async () => {
    const actor = await investigator();
    const first = await queued(await ask(actor, plainInput));
    const again = await queued(await ask(actor, plainInput));
    expect(again.id).toBe(first.id);
    expect((await db.execute(sql`select 1 from pgboss.job where name = 'run-computation' and data->>'computationId' = ${first.id}`)).length).toBe(1);
    expect((await db.select().from(logEntries).where(eq(logEntries.subjectId, first.id))).map((line) => line.event)).toEqual(['computation.requested']);
    expect((await queued(await ask(actor, { ...plainInput, seed: 8 }))).id).not.toBe(first.id);
  }, 60_000);

  test('belong to whoever asked; another person, and an address that is none, find nothing', async () => {
    const { id } = await queued(await ask(await investigator(), plainInput));
    const stranger = await investigator();
    expect((await problemOf(await look(stranger, id))).status).toBe(404);
    expect((await problemOf(await look(stranger, 'no-such-run'))).status).toBe(404);
  }, 60_000);

  test('that the engine refuses end with its sentence and may be asked for again', async () => {
    const actor = await investigator();
    const bad = { ...plainInput, window: { ...plainInput.window, endUtc: '2026-05-01T00:00:00Z' } };
    const { id } = await queued(await ask(actor, bad));
    await runComputation({ computationId: id });
    expect(await stateOf(await look(actor, id))).toMatchObject({ state: 'failed', failure: expect.stringContaining('window.startUtc and window.endUtc disagree') });
    expect((await queued(await ask(actor, bad))).id).toBe(id);
    expect((await stateOf(await look(actor, id))).state).toBe('queued');
  }, 60_000);
});

describe('keys for programs', () => {
  const withKey = (path: string, token: string, init: RequestInit = {}) => args(path, null, { ...init, headers: { ...Object.fromEntries(new Headers(init.headers)), Authorization: `Bearer ${token}` } });
  const sunBy = (token: string) => sun.loader(withKey(`/api/v1/sun?${query()}`, token));

  test('stand for the person who made them, within their scope', async () => {
    const actor = await investigator();
    const reading = await makeApiToken(actor, { name: 'weather board', scope: 'read', days: 30 });
    const computing = await makeApiToken(actor, { name: 'night batch', scope: 'compute', days: 30 });
    expect((await sunBy(reading)).status).toBe(200);
    const refused = await reconstructions.action(withKey('/api/v1/reconstructions', reading, post(plainInput)));
    expect(refused.headers.get('WWW-Authenticate')).toContain('insufficient_scope');
    expect((await problemOf(refused)).status).toBe(403);
    expect((await reconstructions.action(withKey('/api/v1/reconstructions', computing, post(plainInput)))).status).toBe(200);
  }, 60_000);

  test('are kept as a hash, noted when used, and logged when made and ended', async () => {
    const actor = await investigator();
    const token = await makeApiToken(actor, { name: 'weather board', scope: 'read', days: 30 });
    const [held] = await listApiTokens(db, actor.userId);
    expect(held).toMatchObject({ name: 'weather board', lastUsedAt: null });
    await sunBy(token);
    const [row] = await db.select().from(apiTokens).where(eq(apiTokens.userId, actor.userId));
    expect(JSON.stringify(row)).not.toContain(token);
    expect(row?.lastUsedAt).toBeInstanceOf(Date);
    await revokeToken(actor, held?.id ?? '');
    const after = await sunBy(token);
    expect(after.headers.get('WWW-Authenticate')).toContain('invalid_token');
    expect((await problemOf(after)).status).toBe(401);
    expect((await db.select().from(logEntries).where(eq(logEntries.subjectId, held?.id ?? ''))).map((line) => line.event)).toEqual(['account.token-made', 'account.token-ended']);
  });

  test('end at their time, with the account, and are nobody else’s to end', async () => {
    const actor = await investigator();
    const token = await makeApiToken(actor, { name: 'old', scope: 'read', days: 30 });
    const [held] = await listApiTokens(db, actor.userId);
    await expect(revokeToken(await investigator(), held?.id ?? '')).rejects.toMatchObject({ code: 'not-found' });
    await db.update(apiTokens).set({ expiresAt: new Date(Date.now() - 1000) }).where(eq(apiTokens.userId, actor.userId));
    expect((await sunBy(token)).status).toBe(401);
    await db.update(apiTokens).set({ expiresAt: new Date(Date.now() + 60_000) }).where(eq(apiTokens.userId, actor.userId));
    expect((await sunBy(token)).status).toBe(200);
    await db.update(users).set({ disabled: true }).where(eq(users.id, actor.userId));
    expect((await sunBy(token)).status).toBe(401);
  });

  test('a word that is no key is refused even beside a session', async () => {
    const both = args(`/api/v1/sun?${query()}`, await investigator(), { headers: { Authorization: 'Bearer nonsense' } });
    expect((await sun.loader(both)).status).toBe(401);
  });

  test('are not made for a reader of case files, nor beyond ten', async () => {
    const insurer = await createActor((await createOrganisation({ kind: 'insurer' })).id, 'insurer');
    await expect(makeApiToken(insurer, { name: 'x', scope: 'read', days: 30 })).rejects.toMatchObject({ code: 'forbidden' });
    const actor = await investigator();
    for (let count = 0; count < 10; count += 1) await makeApiToken(actor, { name: `key ${count}`, scope: 'read', days: 30 });
    await expect(makeApiToken(actor, { name: 'one more', scope: 'read', days: 30 })).rejects.toMatchObject({ code: 'invalid-state' });
  });
});

describe('POST /api/v1/recurrence', () => {
  const place = { latitudeDeg: 0, longitudeDeg: 0, elevationM: 0, heightAboveGroundM: 0, zone: 'UTC' };
  const year = { fromUtc: '2026-01-01T00:00:00Z', toUtc: '2027-01-01T00:00:00Z' };

  test('a sun in the zenith of the equator comes back at the equinoxes (Meeus, Astronomical Algorithms, chapter 27: 20 March and 23 September 2026)', async () => {
    const body = { place, ...year, sun: { azimuthDeg: 180, apparentElevationDeg: 90 }, toleranceDeg: 0.5 };
    const answer = await recurrence.action(args('/api/v1/recurrence', await investigator(), post(body)));
    const { bands } = z.object({ bands: z.array(z.object({ firstOn: z.string(), lastOn: z.string() })) }).parse(await answer.json());
    expect(bands).toHaveLength(2);
    expect(bands[0]?.firstOn.slice(0, 7)).toBe('2026-03');
    for (const [index, equinox] of ['2026-03-20', '2026-09-23'].entries()) {
      const band = bands[index];
      expect(band && band.firstOn <= equinox && band.lastOn >= equinox).toBe(true);
    }
  }, 60_000);

  test('a direction that no day of the year has is said to be out of reach', async () => {
    const body = { place: { ...place, latitudeDeg: 55 }, ...year, sun: { azimuthDeg: 0, apparentElevationDeg: 60 }, toleranceDeg: 0.5 };
    const answer = await recurrence.action(args('/api/v1/recurrence', await investigator(), post(body)));
    expect(await answer.json()).toMatchObject({ bands: [], requiredSun: { reachable: false } });
  }, 60_000);

  test('a span that ends before it begins is refused with both fields', async () => {
    const body = { place, fromUtc: year.toUtc, toUtc: year.fromUtc, sun: { azimuthDeg: 180, apparentElevationDeg: 45 }, toleranceDeg: 0.5 };
    const problem = await problemOf(await recurrence.action(args('/api/v1/recurrence', await investigator(), post(body))));
    expect(problem.detail).toContain('fromUtc and toUtc disagree');
  }, 60_000);

  test('with neither optic nor direction the fields of the optic are asked for', async () => {
    const problem = await problemOf(await recurrence.action(args('/api/v1/recurrence', await investigator(), post({ place, ...year }))));
    expect(problem.errors?.map((error) => error.field)).toEqual(['optic', 'mark']);
  });
});

describe('GET /api/v1/openapi.json', () => {
  const documentSchema = z.object({
    openapi: z.literal('3.1.0'),
    paths: z.record(z.string(), z.record(z.string(), z.object({ parameters: z.array(z.object({ name: z.string(), required: z.boolean(), schema: z.record(z.string(), z.unknown()) })).optional(), responses: z.record(z.string(), z.unknown()) }))),
  });

  test('names every address with its method, its fields and its refusals', async () => {
    const document = documentSchema.parse(await (await openapi.loader(args('/api/v1/openapi.json', await investigator()))).json());
    expect(Object.entries(document.paths).map(([path, methods]) => `${Object.keys(methods).join()} ${path}`)).toEqual([
      'get /api/v1/sun', 'get /api/v1/clear-sky', 'post /api/v1/reconstructions', 'get /api/v1/reconstructions/{computationId}', 'post /api/v1/recurrence',
    ]);
    const parameters = document.paths['/api/v1/sun']?.['get']?.parameters ?? [];
    expect(parameters.filter((one) => one.required).map((one) => one.name)).toEqual(['lat', 'lon', 'utc']);
    expect(parameters.find((one) => one.name === 'lat')?.schema).toMatchObject({ type: 'number', minimum: -90, maximum: 90 });
    expect(Object.keys(document.paths['/api/v1/recurrence']?.['post']?.responses ?? {})).toEqual(expect.arrayContaining(['200', '401', '403', '422', '429']));
  });
});
