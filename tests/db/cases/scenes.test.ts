import { asc, eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { logEntries, scenes } from '#db/schema/all.ts';
import type { cases } from '#db/schema/all.ts';
import { DomainError } from '#app/domain/errors.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import { sceneToFields } from '#app/domain/scene-form-fields.ts';
import type { Actor } from '#app/domain/roles.ts';
import { saveScene } from '#app/services/scenes/save-scene.server.ts';
import { createActor, createCase, createHouse, createScene } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

const now = new Date('2026-02-03T12:00:00Z');
const empty = sceneToFields(sceneSchema.parse({}));
const dish = { ...empty, 'optic.kind': 'dish', 'optic.diameterMm': '1.4 m', 'optic.diameterMm.method': 'measured' };
let house: House;
beforeAll(async () => {
  house = await createHouse();
});

type CaseRow = typeof cases.$inferSelect;
const versionsOf = (row: CaseRow) => db.select().from(scenes).where(eq(scenes.caseId, row.id)).orderBy(asc(scenes.version));
const save = (actor: Actor, row: CaseRow, baseVersion: number, typed: Record<string, string> = dish, note = 'Measured on the roof.') => saveScene({ actor, caseNumber: row.number, baseVersion, note, typed, now });
async function refusal(work: Promise<unknown>): Promise<DomainError> {
  const error: unknown = await work.then(() => null, (caught: unknown) => caught);
  if (error instanceof DomainError) return error;
  throw new Error(`Not refused: ${String(error)}`);
}

describe('saving the measurements', () => {
  test('makes a new version beside the old one, with who and why in the log', async () => {
    const row = await createCase('investigation', { site: house.site });
    await createScene({ caseId: row.id });
    expect(await save(house.investigator, row, 1)).toBe(2);
    const [first, second] = await versionsOf(row);
    expect(first?.scene.optic.kind).toBe('dont-know');
    expect(second).toMatchObject({ version: 2, authorId: house.investigator.userId, note: 'Measured on the roof.' });
    expect(second?.scene.optic.diameterMm).toEqual({ value: 1400, method: 'measured', by: house.investigator.displayName, on: '2026-02-03' });
    const [line] = await db.select().from(logEntries).where(eq(logEntries.caseId, row.id));
    expect(line).toMatchObject({ event: 'scene.saved', summary: 'Measurements, version 2.', reason: 'Measured on the roof.' });
  });

  test('makes no version when nothing changed', async () => {
    const row = await createCase('investigation', { site: house.site });
    await save(house.investigator, row, 0);
    expect(await save(house.investigator, row, 1)).toBe(1);
    expect(await versionsOf(row)).toHaveLength(1);
  });

  test('is refused on an older version, and only one of two at once gets through', async () => {
    const row = await createCase('investigation', { site: house.site });
    const outcomes = await Promise.allSettled([save(house.investigator, row, 0), save(house.investigator, row, 0, { ...dish, 'optic.kind': 'bottle' })]);
    expect(outcomes.map((outcome) => outcome.status).sort()).toEqual(['fulfilled', 'rejected']);
    expect((await refusal(save(house.investigator, row, 0))).code).toBe('conflict');
  });

  test('needs a note, and names every field that cannot be read', async () => {
    const row = await createCase('investigation', { site: house.site });
    const error = await refusal(save(house.investigator, row, 0, { ...dish, 'optic.diameterMm': 'wide', 'skyline.points': 'here 3' }, ' '));
    expect(Object.keys(error.fieldErrors).sort()).toEqual(['note', 'optic.diameterMm', 'skyline.points']);
    expect(await versionsOf(row)).toEqual([]);
  });

  test('keeps the compass reading and the declination of the place and day in the note', async () => {
    const row = await createCase('investigation', { site: house.site });
    await save(house.investigator, row, 0, { ...dish, 'mark.bearingDeg': '100', 'mark.bearingDeg.method': 'measured', 'mark.bearingDeg.north': 'magnetic', measuredOn: '2026-02-01' });
    const [version] = await versionsOf(row);
    expect(version?.note).toMatch(/^Measured on the roof\. Bearing, optic to mark: 100° magnetic, declination [+-]\d\.\d°, WMM-2025, 2026-02-01, is [\d.]+° true\.$/u);
  });

  test.each(['reporter', 'reviewer', 'manager', 'privacyLead', 'administrator'] as const)('is closed to the %s', async (who) => {
    const row = await createCase('investigation', { site: house.site, reporterId: house.reporter.userId });
    expect(['forbidden', 'not-found']).toContain((await refusal(save(house[who], row, 0))).code);
  });

  test('is closed while the finding is with the reviewer and after closing, so that what was signed stays', async () => {
    for (const state of ['reported', 'findings', 'closed', 'duplicate'] as const) {
      expect((await refusal(save(house.investigator, await createCase(state, { site: house.site }), 0))).code).toBe('forbidden');
    }
  });

  test('is closed to an investigator of another house', async () => {
    const stranger = await createActor((await createHouse()).organisation.id, 'investigator');
    expect((await refusal(save(stranger, await createCase('investigation', { site: house.site }), 0))).code).toBe('not-found');
  });
});
