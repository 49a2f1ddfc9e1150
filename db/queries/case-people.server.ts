import { and, asc, eq, inArray, isNull, or } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, grants, involvements, users } from '#db/schema/all.ts';
import type { Role } from '#app/domain/roles.ts';

export interface Person {
  readonly userId: string;
  readonly displayName: string;
  readonly email: string;
}

/** People of the organisation who hold one of the roles for the site, by name. */
export function listRoleHolders(db: DbOrTx, params: { organisationId: string; siteId: string; roles: readonly Role[] }): Promise<Person[]> {
  return db
    .selectDistinct({ userId: users.id, displayName: users.displayName, email: users.email })
    .from(users)
    .innerJoin(grants, eq(grants.userId, users.id))
    .where(
      and(
        eq(users.organisationId, params.organisationId),
        eq(users.disabled, false),
        inArray(grants.role, [...params.roles]),
        or(isNull(grants.siteId), eq(grants.siteId, params.siteId)),
      ),
    )
    .orderBy(asc(users.displayName), asc(users.id));
}

/** Where to write to whoever reported the case: their account, or what a guest left; null when neither is known. */
export async function reporterAddress(db: DbOrTx, caseId: string): Promise<string | null> {
  const [account] = await db.select({ email: users.email, disabled: users.disabled }).from(cases).innerJoin(users, eq(users.id, cases.reporterId)).where(eq(cases.id, caseId));
  if (account) return account.disabled ? null : account.email;
  const [guest] = await db.select({ email: involvements.email }).from(involvements).where(and(eq(involvements.caseId, caseId), eq(involvements.role, 'reporter')));
  return guest?.email ?? null;
}

export async function getPerson(db: DbOrTx, userId: string): Promise<Person | null> {
  const [person] = await db.select({ userId: users.id, displayName: users.displayName, email: users.email }).from(users).where(and(eq(users.id, userId), eq(users.disabled, false)));
  return person ?? null;
}
