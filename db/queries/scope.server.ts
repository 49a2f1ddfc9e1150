import { and, eq, exists, inArray, or, sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import { cases, correctiveActions, releases } from '#db/schema/all.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { caseRules } from '#app/domain/permissions.ts';

/**
 * Cases that the actor may read, as a condition on `cases`. Every query that reads a case, or anything that hangs from
 * one, joins `cases` and adds this. It is the SQL form of the rule `case:read`; `tests/db/queries/scope.test.ts`
 * holds the two together.
 */
export function visibleTo(actor: Actor): SQL {
  const readers: readonly Role[] = caseRules['case:read'].roles;
  const readingGrants = actor.grants.filter((grant) => readers.includes(grant.role));
  const everywhere = readingGrants.some((grant) => grant.siteId === null);
  const siteIds = readingGrants.flatMap((grant) => (grant.siteId ? [grant.siteId] : []));
  const ownAction = exists(
    sql`(select 1 from ${correctiveActions} where ${correctiveActions.caseId} = ${cases.id} and (${correctiveActions.ownerId} = ${actor.userId} or ${correctiveActions.verifierId} = ${actor.userId}))`,
  );
  const ways = [
    eq(cases.reporterId, actor.userId),
    ownAction,
    ...(everywhere ? [sql`true`] : siteIds.length > 0 ? [inArray(cases.siteId, siteIds)] : []),
  ];
  return and(eq(cases.organisationId, actor.organisationId), or(...ways)) ?? sql`false`;
}

/** Cases at whose site the actor holds one of the roles, or that `own` admits, as a condition on `cases`. */
export function heldBy(actor: Actor, roles: readonly Role[], own: SQL): SQL {
  const held = actor.grants.filter((grant) => roles.includes(grant.role));
  if (held.some((grant) => grant.siteId === null)) return sql`true`;
  const siteIds = held.flatMap((grant) => (grant.siteId ? [grant.siteId] : []));
  return (siteIds.length > 0 ? or(own, inArray(cases.siteId, siteIds)) : own) ?? sql`false`;
}

/** Releases that a reader of another organisation may open: addressed to it, released, and not expired. */
export function releasedTo(actor: Actor): SQL {
  if (!actor.grants.some((grant) => grant.role === 'insurer')) return sql`false`;
  return (
    and(
      eq(releases.recipientOrganisationId, actor.organisationId),
      eq(releases.state, 'released'),
      sql`${releases.expiresAt} > now()`,
    ) ?? sql`false`
  );
}
