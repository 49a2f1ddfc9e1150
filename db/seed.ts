import { mkdir, writeFile } from 'node:fs/promises';
import { sql } from 'drizzle-orm';
import { roleLabels } from '#app/domain/roles.ts';
import { outdoorCases } from '#fixtures/demo/cases-outdoors.ts';
import { roomCases } from '#fixtures/demo/cases-rooms.ts';
import { thingCases } from '#fixtures/demo/cases-things.ts';
import { demoEmail, demoPassword, demoPeople } from '#fixtures/demo/people.ts';
import { closeDatabase, db, inTransaction } from './client.server.ts';
import { cases, organisations } from './schema/all.ts';
import { seedCase } from './seed/cases.ts';
import { seedPeopleAndSites } from './seed/people-and-sites.ts';
import { seedReleases } from './seed/releases.ts';
import { seedSitePlans } from './seed/site-plans.ts';

/** Numbers of real cases start above those of the demonstration. */
const firstFreeNumber = 201;

/** Fills an empty database with the demonstration; a database that holds an organisation is left alone. */
async function seed(): Promise<void> {
  const [held] = await db.select({ count: sql<number>`count(*)::int` }).from(organisations);
  const demoCases = [...roomCases, ...outdoorCases, ...thingCases];
  if ((held?.count ?? 0) > 0) {
    console.info('The database holds data already; nothing was added.');
    // Releases come after the rest; a seed that was cut short there is finished here.
    await seedReleases(demoCases);
    return;
  }
  const now = new Date();
  await inTransaction(async (tx) => {
    const places = await seedPeopleAndSites(tx);
    await seedSitePlans(tx, places);
    const ids = new Map<number, string>();
    for (const [index, demo] of demoCases.entries()) {
      ids.set(demo.number, await seedCase(tx, demo, places, ids, now));
      console.info(`Demonstration case ${index + 1} of ${demoCases.length}: ${demo.title}`);
    }
    await tx.execute(sql`select setval('case_numbers', greatest(${firstFreeNumber}, (select max(${cases.number}) from ${cases}) + 1), false)`);
  });
  await seedReleases(demoCases);
  await writeSignIns();
}

/** The sign-ins that `npm start` prints. */
async function writeSignIns(): Promise<void> {
  const shown = demoPeople.filter((person) => person.shown);
  const lines = shown.map((person) => `${demoEmail(person).padEnd(28)} ${person.grants.map((grant) => roleLabels[grant.role]).join(', ')}`);
  const folder = new URL('../.data/', import.meta.url);
  await mkdir(folder, { recursive: true });
  await writeFile(new URL('demo-sign-ins.txt', folder), `${lines.join('\n')}\nPassword for all: ${demoPassword}\n`);
}

try {
  await seed();
} finally {
  await closeDatabase();
}
