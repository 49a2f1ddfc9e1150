import { eq } from 'drizzle-orm';
import { expect, it } from 'vitest';
import { roomCases } from '#fixtures/demo/cases-rooms.ts';
import { thingCases } from '#fixtures/demo/cases-things.ts';
import { demoEmail, demoPeople } from '#fixtures/demo/people.ts';
import { createCase, createOrganisation, createSite, createUser } from '#tests/support/factories.ts';
import { prepareRelease } from '#app/services/releases/prepare-release.server.ts';
import { withdrawRelease } from '#app/services/releases/withdraw-release.server.ts';
import { db } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import { cases, releases } from '#db/schema/all.ts';
import { seedReleases } from '#db/seed/releases.ts';

const demo = roomCases.filter((one) => one.released);
const states = async () => (await db.select({ state: releases.state }).from(releases)).map((release) => release.state);

it('releases of the demonstration are made once, and finished when the seed was cut short', async () => {
  await seedReleases(demo);
  expect(await states(), 'a database without the people of the demonstration is left alone').toEqual([]);

  const operator = await createOrganisation({ name: 'Tallowmere Estates' });
  const insurer = await createOrganisation({ name: 'Harrowmere Mutual', kind: 'insurer' });
  const person = (key: string) => {
    const found = demoPeople.find((one) => one.key === key);
    if (!found) throw new Error(`"${key}" is not among the people.`);
    return createUser({ organisationId: operator.id, email: demoEmail(found), displayName: found.name, grants: found.grants.map((grant) => grant.role) });
  };
  const maren = await person('maren');
  const joss = await person('joss');
  const site = await createSite({ organisationId: operator.id });
  for (const { number } of demo) await createCase('closed', { site, number });

  await seedReleases(demo);
  expect(await states()).toEqual(demo.map(() => 'released'));
  await seedReleases(demo);
  expect(await db.$count(releases), 'a second run adds nothing').toBe(demo.length);
  expect(await db.$count(releases, eq(releases.recipientOrganisationId, insurer.id))).toBe(demo.length);

  const later = thingCases.filter((one) => one.released);
  const [cut] = later;
  const investigator = await getActor(db, maren.id);
  if (!cut || !investigator) throw new Error('The demonstration has no released case.');
  await createCase('closed', { site, number: cut.number });
  await prepareRelease({ actor: investigator, caseNumber: cut.number, audience: 'insurer', recipientOrganisationId: insurer.id, changeNote: 'First release', expires: { at: new Date('2099-01-01T00:00:00Z') }, decisions: {}, basis: null });
  await seedReleases([cut]);
  expect(await states(), 'one that was only prepared is released').toEqual([...demo, cut].map(() => 'released'));

  const [first] = demo;
  const manager = await getActor(db, joss.id);
  if (!first || !manager) throw new Error('The demonstration has no released case.');
  await withdrawRelease({ actor: manager, caseNumber: first.number, number: 1, reason: 'To see that it stays so.' });
  await seedReleases(demo);
  const [row] = await db.select({ id: cases.id }).from(cases).where(eq(cases.number, first.number));
  expect(await db.$count(releases, eq(releases.caseId, row?.id ?? '')), 'what people withdrew does not come back').toBe(1);
});
