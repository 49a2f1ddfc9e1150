import { sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import { cases, reconstructions, sunReturns } from '#db/schema/all.ts';
import type { CardResult } from '#app/domain/case-card.ts';
import type { WaitingAction } from '#app/domain/case-waiting.ts';
import type { Certainty } from '#app/domain/finding.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { SceneOpticKind } from '#app/domain/scene.ts';
import { conclusionHidden } from './hidden-conclusion.server.ts';

/**
 * Facts about a case as columns of a query on `cases`, each a subquery on it. The query must join another table, or the
 * names inside would not be qualified.
 */
export const latestOpticKind = sql<SceneOpticKind>`coalesce((select s.scene->'optic'->>'kind' from scenes s where s.case_id = ${cases.id} order by s.version desc limit 1), 'dont-know')`;

export const markBearingKnown = sql<boolean>`coalesce((select s.scene->'mark' ? 'bearingDeg' from scenes s where s.case_id = ${cases.id} order by s.version desc limit 1), false)`;

/** From optic to mark as last measured, in the frame that the scene states. */
export const markBearingDeg = sql<number | null>`(select (s.scene->'mark'->'bearingDeg'->>'value')::float8 from scenes s where s.case_id = ${cases.id} order by s.version desc limit 1)`;

/** Of the newest signed version; null while there is none, and while it is hidden from this reader. */
export const signedCertainty = (actor: Actor) =>
  sql<Certainty | null>`(case when ${conclusionHidden(actor)} then null else (select f.certainty from findings f where f.case_id = ${cases.id} and f.state = 'signed' order by f.version desc limit 1) end)`;

export const sunlightRuledOut = (actor: Actor) =>
  sql<boolean>`(${signedCertainty(actor)} is not null and exists (select 1 from hypotheses h where h.case_id = ${cases.id} and h.kind = 'focused-sunlight' and h.result = 'ruled-out'))`;

export const draftExists = sql<boolean>`exists (select 1 from findings f where f.case_id = ${cases.id} and f.state = 'draft')`;

export const openComments = sql<number>`(select count(*)::int from review_comments rc join findings f on f.id = rc.finding_id where f.case_id = ${cases.id} and rc.settled_at is null)`;

export const duplicateOfNumber = sql<number | null>`(select main.number from cases main where main.id = ${cases.duplicateOfId})`;

/** An instant as a parameter inside raw SQL, where the driver would not know its type. */
export const instantParameter = (at: Date): SQL => sql`${at.toISOString()}::timestamptz`;

/** Next time that the sun is back on the mark, from the attached run. A return under way counts until it ends. */
export const nextReturnAt = (now: Date) =>
  sql<Date | null>`(select min(sr.best_at) from sun_returns sr where sr.case_id = ${cases.id} and sr.to_at > ${instantParameter(now)})`.mapWith(sunReturns.bestAt);

/** Whether the attached run listed any return at all, past ones included. */
export const returnsListed = sql<boolean>`exists (select 1 from sun_returns sr where sr.case_id = ${cases.id})`;

/** At least one action was shown effective, and none is still to be done, verified, shown, or replaced. */
export const fixProven = sql<boolean>`(exists (select 1 from corrective_actions a where a.case_id = ${cases.id} and a.state = 'effective')
  and not exists (select 1 from corrective_actions a where a.case_id = ${cases.id} and a.state in ('open', 'in-progress', 'done', 'verified', 'not-effective')))`;

/** An action that is still to be finished and past its day, in the clock of the place. */
export const hasLateAction = (now: Date) =>
  sql<boolean>`exists (select 1 from corrective_actions a where a.case_id = ${cases.id} and a.state in ('open', 'in-progress', 'done') and a.due_on < (${instantParameter(now)} at time zone ${cases.zone})::date)`;

export const actionsInBrief = sql<readonly WaitingAction[]>`coalesce((select jsonb_agg(jsonb_build_object('title', a.title, 'state', a.state, 'dueOn', a.due_on, 'effectCheckOn', a.effect_check_on) order by a.due_on, a.number)
  from corrective_actions a where a.case_id = ${cases.id} and a.state <> 'withdrawn'), '[]'::jsonb)`;

const isAttached = sql`r.case_id = ${cases.id} and r.state = 'done' and r.attached_at is not null and r.superseded_at is null`;

/** Window and stretches of the attached run, without its minutes, which are many. */
export const attachedRun = sql<(CardResult & { readonly number: number }) | null>`(select jsonb_build_object('number', r.number, 'window', r.result->'window', 'runs', r.result->'runs', 'flux', '[]'::jsonb)
  from reconstructions r where ${isAttached} order by r.number desc limit 1)`;

/** The run that the case's header shows: the attached one, else the newest finished, with flux for sunlit minutes. */
export const headerRun = sql<(CardResult & { readonly number: number; readonly attached: boolean }) | null>`(select jsonb_build_object(
    'number', r.number, 'attached', r.attached_at is not null and r.superseded_at is null, 'window', r.result->'window', 'runs', r.result->'runs',
    'flux', coalesce((select jsonb_agg(jsonb_build_object('atUtc', m->'atUtc', 'kwm2', m->'fluxKwm2'))
      from jsonb_path_query(r.result, '$.minutes[*] ? (@.verdict == "sunlit" && @.fluxKwm2 != null)') m), '[]'::jsonb))
  from ${reconstructions} r where r.case_id = ${cases.id} and r.state = 'done' order by (r.attached_at is not null and r.superseded_at is null) desc, r.number desc limit 1)`;
