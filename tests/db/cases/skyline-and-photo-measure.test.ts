import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { getReconstructionSource } from '#db/queries/reconstructions.server.ts';
import { logEntries, scenes, sites } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { draftInput } from '#app/domain/reconstruction-draft.ts';
import { loader as sheetLoader } from '#app/routes/cases/measurement-sheet.tsx';
import { action as measureAction, loader as measureLoader } from '#app/routes/cases/photo-measure.tsx';
import { loader as sceneLoader } from '#app/routes/cases/scene.tsx';
import { action as skylineAction, loader as skylineLoader } from '#app/routes/cases/skyline.tsx';
import { saveCaseSkyline, saveSiteSkyline, skylineBase } from '#app/services/scenes/save-skyline.server.ts';
import { contextFor, eventsAbout, refusal } from '#tests/db/auth/stage.ts';
import { createActor, createCase, createHouse, createPhoto, createScene, createSite } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});

const paste = 'bearing,elevation,plus minus,source,tree,what\n100,9,0.5,clinometer,,Grain House\n200,11,2,panorama,bare,Lime trees';
const newestOf = async (caseId: string) => (await db.select().from(scenes).where(eq(scenes.caseId, caseId))).sort((a, b) => b.version - a.version)[0];
const linesOf = (caseId: string) => db.select().from(logEntries).where(eq(logEntries.caseId, caseId)).orderBy(logEntries.sequence);

function args<Params extends Record<string, string>>(actor: Actor, params: Params, path: string, fields?: Readonly<Record<string, string>>) {
  const url = new URL(`http://scorchline.test${path}`);
  return { request: new Request(url, fields ? { method: 'POST', body: new URLSearchParams(fields) } : {}), params, context: contextFor(actor), url };
}
const statusOf = (thrown: unknown) => (thrown as { init?: { status: number } }).init?.status;

describe('the skyline of a case', () => {
  const save = (actor: Actor, caseNumber: number, baseVersion: number, typed: Record<string, string> = { paste }) => saveCaseSkyline({ actor, caseNumber, baseVersion, note: 'Clinometer from the shelf.', typed });

  test('becomes a new version of the measurements; nothing else of them changes', async () => {
    const row = await createCase('investigation', { site: house.site });
    await createScene({ caseId: row.id, scene: { optic: { kind: 'dish', diameterMm: { value: 1400, method: 'measured' } } } });
    expect(await save(house.investigator, row.number, 1)).toBe(2);
    const { scene } = (await newestOf(row.id)) ?? {};
    expect(scene?.optic.diameterMm?.value).toBe(1400);
    expect(scene?.skyline).toMatchObject({ plusMinusDeg: 2, points: [{ azimuthDeg: 100, name: 'Grain House' }, { azimuthDeg: 200, leaf: 'bare', source: 'panorama' }] });
    expect((await linesOf(row.id)).at(-1)).toMatchObject({ event: 'scene.saved', reason: 'Clinometer from the shelf.' });
  });

  test('taken away leaves that of the site to a run', async () => {
    const skyline = { points: [{ azimuthDeg: 90, elevationDeg: 3 }, { azimuthDeg: 270, elevationDeg: 4 }], plusMinusDeg: 1, source: 'drawing' as const };
    const site = await createSite({ organisationId: house.organisation.id, skyline });
    const row = await createCase('investigation', { site });
    await save(house.investigator, row.number, 0);
    await save(house.investigator, row.number, 1, {});
    const source = await getReconstructionSource(db, { actor: house.investigator, caseNumber: row.number });
    expect(source ? draftInput(source, new Date('2026-06-01T00:00:00Z')).input?.skyline?.points.map((point) => point.azimuthDeg) : null).toEqual([90, 270]);
  });

  test('is refused on an older version, without a note, and with a cell that cannot be read', async () => {
    const row = await createCase('investigation', { site: house.site });
    await save(house.investigator, row.number, 0);
    expect((await refusal(save(house.investigator, row.number, 0, { paste: '1,2\n3,4' }))).code).toBe('conflict');
    const path = `/cases/${row.number}/skyline`;
    const answer: unknown = await skylineAction({ ...args(house.investigator, { caseNumber: String(row.number) }, path, { baseVersion: '1', note: '', 'row.0.azimuthDeg': 'north', 'row.0.elevationDeg': '4' }), pattern: '/cases/:caseNumber/skyline' });
    expect(answer).toMatchObject({ data: { fieldErrors: { note: [expect.any(String)], 'row.0.azimuthDeg': [expect.any(String)] }, typed: { 'row.0.azimuthDeg': 'north' } }, init: { status: 400 } });
  });

  test.each(['reporter', 'reviewer', 'manager', 'privacyLead', 'administrator'] as const)('is not changed by the %s', async (who) => {
    const row = await createCase('investigation', { site: house.site });
    expect(['forbidden', 'not-found']).toContain((await refusal(save(house[who], row.number, 0))).code);
    expect(await newestOf(row.id)).toBeUndefined();
  });
});

describe('the skyline of a site', () => {
  const save = (actor: Actor, siteCode: string, base = 'none', typed: Record<string, string> = { paste }) => saveSiteSkyline({ actor, siteCode, base: base === 'none' ? skylineBase(null) : base, note: 'From the roof plan.', typed });

  test('is measured by an investigator, the manager or an administrator, logged once, and read by runs of its cases', async () => {
    for (const who of ['investigator', 'manager', 'administrator'] as const) {
      const site = await createSite({ organisationId: house.organisation.id });
      await save(house[who], site.code);
      const [row] = await db.select().from(sites).where(eq(sites.id, site.id));
      expect(row?.skyline?.points).toHaveLength(2);
      await save(house[who], site.code, skylineBase(row?.skyline ?? null));
      expect(await eventsAbout(site.id)).toEqual(['site.skyline-saved']);
    }
  });

  test('is not changed by others, nor by the manager of another site, nor from another house', async () => {
    const site = await createSite({ organisationId: house.organisation.id });
    const elsewhere = await createActor(house.organisation.id, { role: 'manager', siteId: house.site.id });
    for (const actor of [house.reporter, house.reviewer, house.privacyLead, elsewhere]) expect((await refusal(save(actor, site.code))).code).toBe('forbidden');
    expect((await refusal(save((await createHouse()).investigator, site.code))).code).toBe('not-found');
  });

  test('saved by somebody meanwhile is not overwritten unseen', async () => {
    const site = await createSite({ organisationId: house.organisation.id });
    const outcomes = await Promise.allSettled([save(house.manager, site.code), save(house.investigator, site.code, 'none', { paste: '1,2\n3,4' })]);
    expect(outcomes.map((outcome) => outcome.status).sort()).toEqual(['fulfilled', 'rejected']);
  });
});

describe('a mark measured on a photo', () => {
  const typed = { intent: 'use-photo', kind: 'rectangle', widthMm: '100', heightMm: '50', sizePlusMinusMm: '0.5', clickPx: '2', edgeBearingDeg: '90', edgePlusMinusDeg: '2', ax: '100', ay: '100', bx: '1100', by: '100', cx: '1100', cy: '600', dx: '100', dy: '600', px: '300', py: '300', qx: '700', qy: '300', rx: '500', ry: '280', sx: '500', sy: '330' };
  async function setting(state: 'investigation' | 'findings' = 'investigation') {
    const row = await createCase(state, { site: house.site });
    const photo = await createPhoto({ caseId: row.id, label: 3, state: 'ready', viewKey: 'views/x.jpg' });
    return { row, photo };
  }
  const post = (actor: Actor, caseNumber: number, photoId: string, fields: Record<string, string>) => measureAction({ ...args(actor, { caseNumber: String(caseNumber), photoId }, `/cases/${caseNumber}/photos/${photoId}/measure`, fields), pattern: '/cases/:caseNumber/photos/:photoId/measure' });

  test('is worked out again by the server: ten pixels a millimetre, 40 mm long to the east, 5 mm wide, with the points in the log', async () => {
    const { row, photo } = await setting();
    const answer = await post(house.investigator, row.number, photo.id, { ...typed, baseVersion: '0' });
    expect(answer).toBeInstanceOf(Response);
    const stored = await newestOf(row.id);
    expect(stored?.scene.mark).toMatchObject({ lengthMm: { value: 40, method: 'photo' }, widthMm: { value: 5, method: 'photo' }, trailHeadingDeg: { value: 90, method: 'photo' } });
    expect(stored?.scene.mark.lengthMm?.plusMinus).toBeGreaterThan(0);
    expect(stored?.note).toBe(`Mark measured on photo ${row.number}-3: rectangle 100 × 50 mm ±0.5 mm, clicks ±2 px.`);
    expect((await linesOf(row.id)).at(-1)?.after).toMatchObject({ photoId: photo.id, photoSha256: photo.sha256, clicks: { clickPx: 2 } });
  });

  test('with crossed corners, missing points or a photo of another case is refused and nothing is stored', async () => {
    const { row, photo } = await setting();
    const crossed: unknown = await post(house.investigator, row.number, photo.id, { ...typed, baseVersion: '0', bx: '1100', by: '600', cx: '1100', cy: '100' });
    expect(crossed).toMatchObject({ data: { fieldErrors: { ax: [expect.stringContaining('cross')] } } });
    const missing: unknown = await post(house.investigator, row.number, photo.id, { ...typed, baseVersion: '0', qx: '' });
    expect(missing).toMatchObject({ data: { fieldErrors: { qx: [expect.stringContaining('missing')] }, typed: { px: '300' } } });
    const other = await setting();
    expect(statusOf(await post(house.investigator, row.number, other.photo.id, { ...typed, baseVersion: '0' }).catch((thrown: unknown) => thrown))).toBe(404);
    expect(await newestOf(row.id)).toBeUndefined();
  });

  test('is read, not used, by the reviewer, and not changed while the finding is in review', async () => {
    const { row, photo } = await setting();
    const view = await measureLoader({ ...args(house.reviewer, { caseNumber: String(row.number), photoId: photo.id }, '/x'), pattern: '/cases/:caseNumber/photos/:photoId/measure' });
    expect(view).toMatchObject({ mayEdit: false, label: `${row.number}-3` });
    expect(await post(house.reviewer, row.number, photo.id, { ...typed, baseVersion: '0' })).toMatchObject({ init: { status: 403 } });
    const review = await setting('findings');
    expect(await post(house.investigator, review.row.number, review.photo.id, { ...typed, baseVersion: '0' })).toMatchObject({ init: { status: 403 } });
  });
});

describe('sheet, scene and skyline pages', () => {
  test('show what is measured to those who read measurements, and nothing to others', async () => {
    const row = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId });
    await createScene({ caseId: row.id, scene: { optic: { kind: 'dish', diameterMm: { value: 1400, plusMinus: 5, method: 'measured', by: 'A. Measurer', on: '2026-05-10' } } } });
    const params = { caseNumber: String(row.number) };
    const sheet = await sheetLoader({ ...args(house.manager, params, `/cases/${row.number}/measurements/sheet?paper=letter`), pattern: '/cases/:caseNumber/measurements/sheet' });
    expect(sheet.paper).toBe('letter');
    expect(sheet.code.url).toBe(`http://scorchline.test/cases/${row.number}/measurements`);
    expect(sheet.groups.flatMap((group) => group.rows).find((line) => line.label === 'Diameter')).toMatchObject({ value: '1400', plusMinus: '5', by: 'A. Measurer', on: '10 May 2026' });
    expect((await sceneLoader({ ...args(house.reviewer, params, '/x'), pattern: '/cases/:caseNumber/scene' })).mayEdit).toBe(false);
    expect((await skylineLoader({ ...args(house.reviewer, params, '/x'), pattern: '/cases/:caseNumber/skyline' })).rows).toEqual([]);
    for (const open of [() => sheetLoader({ ...args(house.reporter, params, '/x'), pattern: '/cases/:caseNumber/measurements/sheet' }), () => sceneLoader({ ...args(house.reporter, params, '/x'), pattern: '/cases/:caseNumber/scene' }), () => skylineLoader({ ...args(house.reporter, params, '/x'), pattern: '/cases/:caseNumber/skyline' })]) {
      expect(statusOf(await open().catch((thrown: unknown) => thrown))).toBe(403);
    }
  });
});
