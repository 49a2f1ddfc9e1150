import { and, eq } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { grants, users } from '#db/schema/all.ts';
import type { Actor } from '#app/domain/roles.ts';

/** The signed-in person with their grants; null when the account is gone or switched off. */
export async function getActor(db: DbOrTx, userId: string): Promise<Actor | null> {
  const rows = await db
    .select({
      userId: users.id,
      organisationId: users.organisationId,
      displayName: users.displayName,
      email: users.email,
      units: users.units,
      role: grants.role,
      siteId: grants.siteId,
    })
    .from(users)
    .leftJoin(grants, eq(grants.userId, users.id))
    .where(and(eq(users.id, userId), eq(users.disabled, false)));
  const first = rows[0];
  if (!first) return null;
  return {
    userId: first.userId,
    organisationId: first.organisationId,
    displayName: first.displayName,
    email: first.email,
    units: first.units,
    grants: rows.flatMap((row) => (row.role ? [{ role: row.role, siteId: row.siteId }] : [])),
  };
}
