import { and, asc, eq, inArray } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { users } from '#db/schema/all.ts';
import type { Person } from './case-people.server.ts';

const columns = { userId: users.id, email: users.email, displayName: users.displayName };

/** Enabled people of one organisation by id; ids of others, or of people who have left, give nothing. */
export function listRecipients(db: DbOrTx, params: { readonly organisationId: string; readonly userIds: readonly string[] }): Promise<Person[]> {
  if (params.userIds.length === 0) return Promise.resolve([]);
  return db
    .select(columns)
    .from(users)
    .where(and(eq(users.organisationId, params.organisationId), eq(users.disabled, false), inArray(users.id, [...params.userIds])));
}

/** Names to choose from: everybody of the organisation who has not left. */
export function listColleagues(db: DbOrTx, organisationId: string): Promise<{ userId: string; displayName: string }[]> {
  return db
    .select({ userId: users.id, displayName: users.displayName })
    .from(users)
    .where(and(eq(users.organisationId, organisationId), eq(users.disabled, false)))
    .orderBy(asc(users.displayName), asc(users.id));
}
