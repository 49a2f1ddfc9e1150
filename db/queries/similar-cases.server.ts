import { and, eq, inArray, ne, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, sites } from '#db/schema/all.ts';
import type { SimilarCaseView, WaitingCaseView } from '#app/domain/case-view.ts';
import { formatDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { latestOpticKind } from './case-expressions.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { registerRow } from './register-view.server.ts';
import { listRegisterFacts } from './register.server.ts';
import { visibleTo } from './scope.server.ts';

const mostSimilar = 6;
/** Sun days are alike within this many days of the year. */
const sameSeasonDays = 30;

/** Cases at the same site or with the same kind of optic, and those of the same season first; only ones that the actor may see. */
export async function listSimilarCases(db: DbOrTx, params: { actor: Actor; row: CaseRow; opticKind: string; now: Date }): Promise<SimilarCaseView[]> {
  const { actor, row, opticKind, now } = params;
  const sameSite = sql<boolean>`(${cases.siteId} = ${row.siteId})`;
  const sameOptic = opticKind === 'dont-know' ? sql<boolean>`false` : sql<boolean>`(${latestOpticKind} = ${opticKind})`;
  const seen = (row.foundAt ?? row.reportedAt).toISOString();
  const daysApart = sql`abs(extract(doy from coalesce(${cases.foundAt}, ${cases.reportedAt})) - extract(doy from ${seen}::timestamptz))`;
  const sameSeason = sql<boolean>`(least(${daysApart}, 365 - ${daysApart}) <= ${sameSeasonDays})`;
  const shared = sql`(${sameSite}::int * 2 + ${sameOptic}::int * 2 + ${sameSeason}::int)`;
  const found = await db
    .select({ id: cases.id, sameSite, sameOptic, sameSeason, number: cases.number })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(actor), ne(cases.id, row.id), sql`(${sameSite} or ${sameOptic})`))
    .orderBy(sql`${shared} desc`, sql`${cases.number} desc`)
    .limit(mostSimilar);
  if (found.length === 0) return [];
  const facts = await listRegisterFacts(db, { actor, caseIds: found.map((one) => one.id), now });
  return found.flatMap((one) => {
    const fact = facts.find((candidate) => candidate.id === one.id);
    if (!fact) return [];
    const reasons = [one.sameSite ? 'same site' : '', one.sameOptic ? 'same kind of optic' : '', one.sameSeason ? 'same time of year' : ''].filter(Boolean);
    return [{ row: registerRow(fact, now, { fromHour: 4, toHour: 22 }), reasons, consequence: fact.potentialConsequence, likelihood: fact.likelihood }];
  });
}

const longestQueue = 30;

/** Reports that wait for a look or an answer: hazard still there first, then by time. */
export async function listWaitingCases(db: DbOrTx, params: { actor: Actor; now: Date }): Promise<WaitingCaseView[]> {
  const rows = await db
    .select({ number: cases.number, title: cases.title, siteName: sites.name, state: cases.state, hazard: cases.hazardStillPresent, reportedAt: cases.reportedAt, answerDueAt: cases.answerDueAt, zone: cases.zone })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(params.actor), inArray(cases.state, ['reported', 'triage', 'returned'])))
    .orderBy(sql`case when ${cases.state} = 'returned' then 2 when ${cases.hazardStillPresent} = 'yes' then 0 else 1 end`, sql`coalesce(${cases.answerDueAt}, ${cases.reportedAt})`, cases.number)
    .limit(longestQueue);
  return rows.map((row) => ({
    number: row.number,
    title: row.title,
    place: row.siteName,
    state: row.state,
    group: row.state === 'returned' ? 'reporter' : row.hazard === 'yes' ? 'hazard' : 'first-look',
    clockWords: row.state === 'returned' ? (row.answerDueAt ? `answer due ${formatDay(row.answerDueAt, row.zone)}` : 'answer wanted') : `waiting ${waitedWords(row.reportedAt, params.now)}`,
  }));
}

/** "40 min", "3 h", "2 days". */
function waitedWords(since: Date, now: Date): string {
  const minutes = Math.max(0, Math.round((now.getTime() - since.getTime()) / 60_000));
  if (minutes < 90) return `${minutes} min`;
  return minutes < 2_880 ? `${Math.round(minutes / 60)} h` : `${Math.round(minutes / 1_440)} days`;
}
