import { and, desc, eq, ilike, inArray, or, sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, correctiveActions, sites } from '#db/schema/all.ts';
import type { RegisterFilter } from '#app/domain/register-filter.ts';
import { pageSize } from '#app/domain/register-filter.ts';
import { caseRules } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { holdsRoleAnywhere } from '#app/domain/roles.ts';
import {
  actionsInBrief, attachedRun, draftExists, duplicateOfNumber, fixProven, hasLateAction, instantParameter, latestOpticKind, markBearingKnown, nextReturnAt, openComments, returnsListed, signedCertainty, sunlightRuledOut,
} from './case-expressions.server.ts';
import { heldBy, visibleTo } from './scope.server.ts';

export interface RegisterQuery {
  readonly actor: Actor;
  readonly filter: RegisterFilter;
  readonly now: Date;
}

/** Sites at which the actor may read health fields, as a condition on `cases`; their own reports always. */
function healthVisible(actor: Actor): SQL {
  return heldBy(actor, caseRules['case:read-health'].roles, eq(cases.reporterId, actor.userId));
}

const actionsVisible = (actor: Actor): SQL => heldBy(actor, caseRules['action:read'].roles, sql`false`);

/** Whether the filter for injuries is offered at all. */
export const mayFilterInjury = (actor: Actor): boolean => holdsRoleAnywhere(actor, caseRules['case:read-health'].roles);
/** Whether the filter for late actions is offered at all. */
export const mayFilterLate = (actor: Actor): boolean => holdsRoleAnywhere(actor, caseRules['action:read'].roles);

const awaitsLook = sql`${cases.state} in ('reported', 'triage', 'returned')`;
const isOpen = sql`${cases.state} not in ('closed', 'duplicate')`;

function isMine(actor: Actor): SQL {
  return sql`(${cases.assignedToId} = ${actor.userId} or ${cases.reporterId} = ${actor.userId} or exists (
    select 1 from ${correctiveActions} where ${correctiveActions.caseId} = ${cases.id} and (${correctiveActions.ownerId} = ${actor.userId} or ${correctiveActions.verifierId} = ${actor.userId})))`;
}

/** Somebody was hurt, to those who may know. */
export const isHurt = (actor: Actor): SQL => sql`(${cases.anyoneHurt} = 'yes' and ${healthVisible(actor)})`;
const isLate = (actor: Actor, now: Date): SQL => sql`(${hasLateAction(now)} and ${actionsVisible(actor)})`;

function viewCondition({ actor, filter, now }: RegisterQuery): SQL | undefined {
  switch (filter.view) {
    case 'open':
      return isOpen;
    case 'first-look':
      return awaitsLook;
    case 'late':
      return isLate(actor, now);
    case 'injury':
      return isHurt(actor);
    case 'mine':
      return isMine(actor);
    case 'all':
      return undefined;
  }
}

/** Text as typed, with the signs that LIKE reads made plain. */
const likeText = (text: string) => `%${text.replace(/[\\%_]/gu, (sign) => `\\${sign}`)}%`;

function textCondition(text: string): SQL | undefined {
  if (text === '') return undefined;
  const pattern = likeText(text);
  const number = /^#?(\d{1,9})$/u.exec(text)?.[1];
  return or(ilike(cases.title, pattern), ilike(cases.placeDetail, pattern), ilike(sites.name, pattern), ilike(cases.narrative, pattern), ilike(cases.receipt, pattern), number ? eq(cases.number, Number(number)) : undefined);
}

/** What is hidden from a reader is not found by it either. */
function resultCondition(actor: Actor, result: RegisterFilter['result']): SQL | undefined {
  if (result === null) return undefined;
  if (result === 'none') return sql`${signedCertainty(actor)} is null`;
  if (result === 'ruled-out') return sunlightRuledOut(actor);
  return sql`${signedCertainty(actor)} = ${result} and not ${sunlightRuledOut(actor)}`;
}

function conditions(query: RegisterQuery): SQL | undefined {
  const { actor, filter, now } = query;
  const next = nextReturnAt(now);
  return and(
    visibleTo(actor),
    viewCondition(query),
    filter.state ? eq(cases.state, filter.state) : undefined,
    filter.optic ? sql`${latestOpticKind} = ${filter.optic}` : undefined,
    resultCondition(actor, filter.result),
    filter.within ? sql`${next} <= ${instantParameter(now)} + make_interval(days => ${filter.within}::int)` : undefined,
    textCondition(filter.q),
  );
}

/** 1 sun returns before the fix is proven, 2 new, 3 settled or no fixed return. */
function groupOf(now: Date) {
  return sql<number>`case when ${isOpen} and ${nextReturnAt(now)} is not null and not ${fixProven} then 1 when ${cases.state} in ('reported', 'triage', 'returned') then 2 else 3 end`;
}

function orderOf({ actor, filter, now }: RegisterQuery): SQL[] {
  const lastly = desc(cases.number);
  // The clock of a hazard or an injury is the shortest; what waits for its reporter comes last.
  if (filter.view === 'first-look' && filter.sort === 'return') return [sql`case when ${cases.state} = 'returned' then 2 when ${cases.hazardStillPresent} = 'yes' or ${isHurt(actor)} then 0 else 1 end`, sql`${cases.reportedAt} asc`, lastly];
  if (filter.sort === 'newest') return [desc(cases.reportedAt), lastly];
  if (filter.sort === 'oldest') return [sql`${cases.reportedAt} asc`, lastly];
  if (filter.sort === 'risk') return [sql`array_position(array['severe', 'high', 'medium', 'low'], ${cases.risk}) asc nulls last`, lastly];
  const group = groupOf(now);
  return [sql`${group} asc`, sql`case when ${group} = 1 then ${nextReturnAt(now)} end asc nulls last`, sql`case when ${group} = 2 then ${cases.reportedAt} end asc nulls last`, lastly];
}

/** Columns of a row, as facts. */
function registerColumns(actor: Actor, now: Date) {
  return {
    id: cases.id,
    number: cases.number,
    title: cases.title,
    placeDetail: cases.placeDetail,
    siteId: cases.siteId,
    organisationId: cases.organisationId,
    siteName: sites.name,
    siteElevationM: sites.elevationM,
    latitudeDeg: sql<number>`coalesce(${cases.latitudeDeg}, ${sites.latitudeDeg})`,
    longitudeDeg: sql<number>`coalesce(${cases.longitudeDeg}, ${sites.longitudeDeg})`,
    zone: cases.zone,
    state: cases.state,
    eventType: cases.eventType,
    potentialConsequence: cases.potentialConsequence,
    likelihood: cases.likelihood,
    reopenCount: cases.reopenCount,
    closeReason: cases.closeReason,
    answerDueAt: cases.answerDueAt,
    foundAt: cases.foundAt,
    foundPrecision: cases.foundPrecision,
    foundClockErrorS: cases.foundClockErrorS,
    onsetEarliestAt: cases.onsetEarliestAt,
    onsetLatestAt: cases.onsetLatestAt,
    reportedAt: cases.reportedAt,
    group: groupOf(now),
    opticKind: latestOpticKind,
    markBearingKnown,
    signedCertainty: signedCertainty(actor),
    sunlightRuledOut: sunlightRuledOut(actor),
    returnsListed,
    draftExists,
    openComments,
    noActionSaid: sql<boolean>`(${cases.noActionReason} is not null)`,
    hazardStillPresent: cases.hazardStillPresent,
    hurt: sql<boolean>`${isHurt(actor)}`,
    duplicateOfNumber,
    nextReturnAt: nextReturnAt(now),
    run: attachedRun,
    actions: actionsInBrief,
    actionsVisible: sql<boolean>`${actionsVisible(actor)}`,
    healthVisible: sql<boolean>`${healthVisible(actor)}`,
  };
}

/** One page of the register: raw facts of each case, in order. */
export function listRegisterRows(db: DbOrTx, query: RegisterQuery) {
  return db
    .select(registerColumns(query.actor, query.now))
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(conditions(query))
    .orderBy(...orderOf(query))
    .limit(pageSize)
    .offset((query.filter.page - 1) * pageSize);
}

/** The same facts of some cases, those that the actor may see, in no order. */
export function listRegisterFacts(db: DbOrTx, params: { actor: Actor; caseIds: readonly string[]; now: Date }) {
  return db
    .select(registerColumns(params.actor, params.now))
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(params.actor), inArray(cases.id, [...params.caseIds])));
}
export type RegisterFacts = Awaited<ReturnType<typeof listRegisterRows>>[number];

/** How many cases the filter leaves, by group. */
export async function countRegisterGroups(db: DbOrTx, query: RegisterQuery): Promise<{ group: number; count: number }[]> {
  const group = groupOf(query.now);
  return db
    .select({ group: sql<number>`counted.grouped`.mapWith(Number), count: sql<number>`count(*)`.mapWith(Number) })
    .from(sql`(${db.select({ grouped: sql`${group}`.as('grouped') }).from(cases).innerJoin(sites, eq(sites.id, cases.siteId)).where(conditions(query))}) counted`)
    .groupBy(sql`counted.grouped`);
}

/** Counts beside the words of the filter line, over everything that the actor may see. */
export async function countRegisterViews(db: DbOrTx, actor: Actor, now: Date): Promise<{ all: number; open: number; 'first-look': number; late: number; injury: number; mine: number }> {
  const where = (condition: SQL) => sql<number>`count(*) filter (where ${condition})`.mapWith(Number);
  const [row] = await db
    .select({ all: where(sql`true`), open: where(isOpen), 'first-look': where(awaitsLook), late: where(isLate(actor, now)), injury: where(isHurt(actor)), mine: where(isMine(actor)) })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(visibleTo(actor));
  return row ?? { all: 0, open: 0, 'first-look': 0, late: 0, injury: 0, mine: 0 };
}
