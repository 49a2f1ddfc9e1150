import { demoOrganisations, demoPassword, demoPeople, demoEmail } from '#fixtures/demo/people.ts';
import { demoSites } from '#fixtures/demo/sites.ts';
import { hashPassword } from '#app/auth/password.server.ts';
import type { Transaction } from '#db/client.server.ts';
import type { SceneSkyline } from '#app/domain/scene.ts';
import { grants, organisations, sites, users } from '#db/schema/all.ts';

export interface DemoSiteRow {
  readonly id: string;
  readonly code: string;
  readonly name: string;
  readonly zone: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly skyline: SceneSkyline | null;
}

export interface DemoPlaces {
  readonly organisationIds: ReadonlyMap<string, string>;
  readonly userIds: ReadonlyMap<string, string>;
  readonly userNames: ReadonlyMap<string, string>;
  readonly sites: ReadonlyMap<string, DemoSiteRow>;
}

/** Organisations, sites, people and their roles. All share one password, which is printed at the start. */
export async function seedPeopleAndSites(tx: Transaction): Promise<DemoPlaces> {
  const organisationRows = await tx.insert(organisations).values(demoOrganisations.map(({ name, kind }) => ({ name, kind }))).returning();
  const organisationIds = new Map(demoOrganisations.map((organisation) => [organisation.key as string, idByName(organisationRows, organisation.name)]));
  const operatorId = pick(organisationIds, 'tallowmere');

  const siteRows = await tx.insert(sites).values(demoSites.map((site) => ({ ...site, organisationId: operatorId }))).returning();
  const siteByCode = new Map(siteRows.map((row) => [row.code, row]));

  const passwordHash = await hashPassword(demoPassword);
  const userRows = await tx
    .insert(users)
    .values(demoPeople.map((person) => ({ organisationId: pick(organisationIds, person.organisation), email: demoEmail(person), displayName: person.name, passwordHash, units: person.units ?? 'metric' })))
    .returning();
  const userIds = new Map(demoPeople.map((person) => [person.key, idByEmail(userRows, demoEmail(person))]));
  await tx.insert(grants).values(
    demoPeople.flatMap((person) =>
      person.grants.map((grant) => ({ userId: pick(userIds, person.key), role: grant.role, siteId: grant.siteCode ? pick(siteByCode, grant.siteCode).id : null })),
    ),
  );
  return { organisationIds, userIds, userNames: new Map(demoPeople.map((person) => [person.key, person.name])), sites: siteByCode };
}

export function pick<Value>(map: ReadonlyMap<string, Value>, key: string): Value {
  const value = map.get(key);
  if (value === undefined) throw new Error(`The demonstration data name "${key}", which is not there.`);
  return value;
}

function idByName(rows: readonly { id: string; name: string }[], name: string): string {
  return pick(new Map(rows.map((row) => [row.name, row.id])), name);
}

function idByEmail(rows: readonly { id: string; email: string }[], email: string): string {
  return pick(new Map(rows.map((row) => [row.email, row.id])), email);
}
