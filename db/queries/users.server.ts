import { and, asc, count, eq, inArray, isNotNull, isNull, notInArray, or, sql } from 'drizzle-orm';
import type { DbOrTx, Transaction } from '#db/client.server.ts';
import { cases, correctiveActions, grants, organisations, sites, users } from '#db/schema/all.ts';
import type { Role } from '#app/domain/roles.ts';

export interface Account {
  readonly id: string;
  readonly organisationId: string;
  readonly email: string;
  readonly displayName: string;
  readonly passwordHash: string | null;
  readonly disabled: boolean;
}

const accountColumns = {
  id: users.id,
  organisationId: users.organisationId,
  email: users.email,
  displayName: users.displayName,
  passwordHash: users.passwordHash,
  disabled: users.disabled,
};

export async function getAccountByEmail(db: DbOrTx, email: string): Promise<Account | null> {
  const [row] = await db.select(accountColumns).from(users).where(eq(users.email, email));
  return row ?? null;
}

export async function getAccount(db: DbOrTx, userId: string): Promise<Account | null> {
  const [row] = await db.select(accountColumns).from(users).where(eq(users.id, userId));
  return row ?? null;
}

/** Holds a person's row until the transaction ends, so that two requests of theirs cannot both pass a limit. */
export async function lockUser(tx: Transaction, userId: string): Promise<void> {
  await tx.select({ id: users.id }).from(users).where(eq(users.id, userId)).for('update');
}

export async function updatePassword(db: DbOrTx, userId: string, passwordHash: string): Promise<void> {
  await db.update(users).set({ passwordHash }).where(eq(users.id, userId));
}

export async function updateUnits(db: DbOrTx, userId: string, units: 'metric' | 'us'): Promise<void> {
  await db.update(users).set({ units }).where(eq(users.id, userId));
}

/** Inserts a person without a password; null when the address is taken. */
export async function insertPerson(tx: Transaction, person: { organisationId: string; email: string; displayName: string }): Promise<string | null> {
  const [row] = await tx.insert(users).values(person).onConflictDoNothing({ target: users.email }).returning({ id: users.id });
  return row?.id ?? null;
}

/** False when the person holds exactly this already. */
export async function insertGrant(tx: Transaction, grant: { userId: string; role: Role; siteId: string | null }): Promise<boolean> {
  const rows = await tx.insert(grants).values(grant).onConflictDoNothing().returning({ id: grants.id });
  return rows.length > 0;
}

export interface PersonRow {
  readonly userId: string;
  readonly displayName: string;
  readonly email: string;
  readonly disabled: boolean;
  readonly hasPassword: boolean;
  readonly grants: readonly { readonly grantId: string; readonly role: Role; readonly siteName: string | null }[];
}

/** People of one organisation, by name, with what they may do. */
export async function listPeople(db: DbOrTx, organisationId: string): Promise<PersonRow[]> {
  const rows = await db
    .select({
      userId: users.id,
      displayName: users.displayName,
      email: users.email,
      disabled: users.disabled,
      hasPassword: sql<boolean>`${users.passwordHash} is not null`,
      grantId: grants.id,
      role: grants.role,
      siteName: sites.name,
    })
    .from(users)
    .leftJoin(grants, eq(grants.userId, users.id))
    .leftJoin(sites, eq(sites.id, grants.siteId))
    .where(eq(users.organisationId, organisationId))
    .orderBy(asc(users.displayName), asc(users.id), asc(grants.role));
  const people = new Map<string, PersonRow & { grants: { grantId: string; role: Role; siteName: string | null }[] }>();
  for (const { grantId, role, siteName, ...person } of rows) {
    const known = people.get(person.userId) ?? { ...person, grants: [] };
    if (grantId && role) known.grants.push({ grantId, role, siteName });
    people.set(person.userId, known);
  }
  return [...people.values()];
}

/** The grant, if it belongs to a person of the organisation. */
export async function getGrant(tx: Transaction, organisationId: string, grantId: string) {
  const [row] = await tx
    .select({ grantId: grants.id, userId: grants.userId, role: grants.role, siteId: grants.siteId, displayName: users.displayName })
    .from(grants)
    .innerJoin(users, eq(users.id, grants.userId))
    .where(and(eq(grants.id, grantId), eq(users.organisationId, organisationId)));
  return row ?? null;
}

export async function deleteGrant(tx: Transaction, grantId: string): Promise<void> {
  await tx.delete(grants).where(eq(grants.id, grantId));
}

export async function updateDisabled(tx: Transaction, userId: string, disabled: boolean): Promise<void> {
  await tx.update(users).set({ disabled }).where(eq(users.id, userId));
}

/** Administrators who can sign in, locked, so that two removals at once cannot leave none. */
export async function lockAdministrators(tx: Transaction, organisationId: string): Promise<string[]> {
  const rows = await tx
    .select({ userId: grants.userId })
    .from(grants)
    .innerJoin(users, eq(users.id, grants.userId))
    .where(and(eq(users.organisationId, organisationId), eq(users.disabled, false), isNotNull(users.passwordHash), eq(grants.role, 'administrator')))
    .for('update');
  return [...new Set(rows.map((row) => row.userId))];
}

export interface Leaver {
  readonly displayName: string;
  readonly openCases: number;
  readonly openActions: number;
}

/** People whose account is switched off and who still hold open cases or actions, by name. Counts only. */
export async function listLeavers(db: DbOrTx, organisationId: string): Promise<Leaver[]> {
  const heldCases = db
    .select({ userId: cases.assignedToId, count: count().as('open_cases') })
    .from(cases)
    .where(notInArray(cases.state, ['closed', 'duplicate']))
    .groupBy(cases.assignedToId)
    .as('held_cases');
  const heldActions = db
    .select({ userId: correctiveActions.ownerId, count: count().as('open_actions') })
    .from(correctiveActions)
    .where(inArray(correctiveActions.state, ['open', 'in-progress']))
    .groupBy(correctiveActions.ownerId)
    .as('held_actions');
  const rows = await db
    .select({ displayName: users.displayName, openCases: heldCases.count, openActions: heldActions.count })
    .from(users)
    .leftJoin(heldCases, eq(heldCases.userId, users.id))
    .leftJoin(heldActions, eq(heldActions.userId, users.id))
    .where(and(eq(users.organisationId, organisationId), eq(users.disabled, true), or(isNotNull(heldCases.count), isNotNull(heldActions.count))))
    .orderBy(asc(users.displayName));
  return rows.map((row) => ({ displayName: row.displayName, openCases: row.openCases ?? 0, openActions: row.openActions ?? 0 }));
}

/** Who holds a role for a site, by role and name; roles for every site are included. Accounts that are switched off are left out. */
export function listPeopleOfSite(db: DbOrTx, params: { organisationId: string; siteId: string }) {
  return db
    .select({ role: grants.role, displayName: users.displayName, siteId: grants.siteId })
    .from(grants)
    .innerJoin(users, eq(users.id, grants.userId))
    .where(and(eq(users.organisationId, params.organisationId), eq(users.disabled, false), or(isNull(grants.siteId), eq(grants.siteId, params.siteId))))
    .orderBy(asc(users.displayName));
}

export async function getOrganisationName(db: DbOrTx, organisationId: string): Promise<string> {
  const [row] = await db.select({ name: organisations.name }).from(organisations).where(eq(organisations.id, organisationId));
  return row?.name ?? '';
}
