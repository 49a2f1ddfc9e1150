import { desc, eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db } from '#db/client.server.ts';
import { listSavedViews } from '#db/queries/saved-views.server.ts';
import { logEntries } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';
import { mostSavedViews, savedViewForm } from '#app/domain/saved-view.ts';
import { changeSavedViews } from '#app/services/saved-views/change-saved-views.server.ts';
import { createHouse } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

let house: House;
beforeEach(async () => {
  house = await createHouse();
});

const change = (actor: Actor, typed: Record<string, string>) => changeSavedViews({ actor, change: savedViewForm.parse(typed) });
const keep = (actor: Actor, name: string, search = '?view=mine&sort=risk') => change(actor, { intent: 'save-view', name, search });

describe('saved views of the register', () => {
  test('are kept per person, listed by name, with a line in the log that does not tell the name', async () => {
    await keep(house.investigator, 'Mine, by risk');
    await keep(house.investigator, 'All open', '?view=open');
    await keep(house.manager, 'Late ones', '?view=late');
    expect((await listSavedViews(db, house.investigator)).map(({ name, search }) => [name, search])).toEqual([['All open', '?view=open'], ['Mine, by risk', '?view=mine&sort=risk']]);
    const [line] = await db.select().from(logEntries).where(eq(logEntries.actorId, house.manager.userId)).orderBy(desc(logEntries.sequence)).limit(1);
    expect(line).toMatchObject({ event: 'saved-view.made', caseId: null, organisationId: house.organisation.id });
    expect(JSON.stringify(line)).not.toContain('Late ones');
  });

  test('keep only what the register can mean, and no page', async () => {
    await keep(house.reporter, 'Odd', '?view=everything&state=triage&page=4&next=https://example.test/');
    expect((await listSavedViews(db, house.reporter))[0]?.search).toBe('?state=triage');
  });

  test('are renamed and deleted by their owner alone', async () => {
    await keep(house.investigator, 'Mine');
    const [view] = await listSavedViews(db, house.investigator);
    const id = view?.id ?? '';
    await expect(change(house.manager, { intent: 'rename-view', id, name: 'Stolen' })).rejects.toMatchObject({ code: 'not-found' });
    await expect(change(house.manager, { intent: 'delete-view', id })).rejects.toMatchObject({ code: 'not-found' });
    await change(house.investigator, { intent: 'rename-view', id, name: 'Ours' });
    expect((await listSavedViews(db, house.investigator))[0]?.name).toBe('Ours');
    await change(house.investigator, { intent: 'delete-view', id });
    expect(await listSavedViews(db, house.investigator)).toEqual([]);
    const lines = await db.select({ event: logEntries.event }).from(logEntries).where(eq(logEntries.subjectId, id)).orderBy(logEntries.sequence);
    expect(lines.map((line) => line.event)).toEqual(['saved-view.made', 'saved-view.renamed', 'saved-view.deleted']);
  });

  test('bear each name once for one person, whatever its capitals, and as often as there are people', async () => {
    await keep(house.investigator, 'Mine');
    await keep(house.manager, 'Mine');
    await expect(keep(house.investigator, 'MINE')).rejects.toMatchObject({ code: 'invalid-input', fieldErrors: { name: [expect.stringContaining('choose another name')] } });
    const [view] = await listSavedViews(db, house.investigator);
    await change(house.investigator, { intent: 'rename-view', id: view?.id ?? '', name: 'mine' });
    expect((await listSavedViews(db, house.investigator))[0]?.name).toBe('mine');
  });

  test('need a name, and are no more than a screen holds', async () => {
    expect(savedViewForm.safeParse({ intent: 'save-view', name: '  ', search: '' }).success).toBe(false);
    for (let index = 0; index < mostSavedViews; index++) await keep(house.investigator, `View ${index}`);
    await expect(keep(house.investigator, 'One more')).rejects.toMatchObject({ fieldErrors: { name: [expect.stringContaining('delete one first')] } });
  });
});
