import { and, eq, sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, sites } from '#db/schema/all.ts';
import { caseRules } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { opinionShownEvent } from './findings.server.ts';
import { heldBy, visibleTo } from './scope.server.ts';

const rule = caseRules['finding:review'];
const reviewedStates = sql.join(rule.states.map((state) => sql`${state}`), sql`, `);

/**
 * Whether this reader is to review the finding of the case and has not asked for its opinion yet, as a condition on
 * `cases` in a query that joins another table. While it holds, no conclusion of any version leaves the server, signed
 * earlier ones included. It is the SQL form of `finding:review` with `withAuthorship`; `tests/db/findings/hidden-conclusion.test.ts`
 * holds the two together.
 */
export function conclusionHidden(actor: Actor): SQL<boolean> {
  const latest = sql`(select f.id from findings f where f.case_id = ${cases.id} order by f.version desc limit 1)`;
  return sql<boolean>`(${cases.state} in (${reviewedStates}) and ${cases.organisationId} = ${actor.organisationId} and ${heldBy(actor, rule.roles, sql`false`)}
    and exists (select 1 from findings f where f.id = ${latest} and f.state = 'sent')
    and not exists (select 1 from findings f where f.case_id = ${cases.id} and f.author_id = ${actor.userId})
    and not exists (select 1 from log_entries l where l.event = ${opinionShownEvent} and l.subject_id = ${latest}::text and l.actor_id = ${actor.userId}))`;
}

/** The same of one case that the reader may see. */
export async function isConclusionHidden(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<boolean> {
  const [row] = await db
    .select({ hidden: conclusionHidden(params.actor) })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)));
  return row?.hidden ?? false;
}
