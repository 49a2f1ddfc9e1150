import { and, eq, inArray, ne, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, sites } from '#db/schema/all.ts';
import type { SimilarCaseView, WaitingCaseView } from '#app/domain/case-view.ts';
import { firstLookView } from '#app/domain/first-look.ts';
import { offsetM } from '#app/domain/ground.ts';
import { formatDay, localDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { alikeBearingDeg, likeness } from '#app/domain/similar-cases.ts';
import type { Likeness } from '#app/domain/similar-cases.ts';
import { latestOpticKind, markBearingDeg } from './case-expressions.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { registerRow } from './register-view.server.ts';
import { isHurt, listRegisterFacts } from './register.server.ts';
import { visibleTo } from './scope.server.ts';

const mostSimilar = 6;
const mostCandidates = 60;

/** What is compared, as columns. */
function likenessColumns(day: string) {
  return {
    siteId: cases.siteId,
    latitudeDeg: cases.latitudeDeg,
    longitudeDeg: cases.longitudeDeg,
    opticKind: latestOpticKind,
    markBearingDeg,
    day: sql<string>`(coalesce(${cases.foundAt}, ${cases.reportedAt}) at time zone ${cases.zone})::date::text`,
    listsDay: sql<boolean>`exists (select 1 from sun_returns sr where sr.case_id = ${cases.id} and right(sr.on_day::text, 5) = ${day.slice(5)})`,
  };
}
type LikenessRow = { readonly latitudeDeg: number | null; readonly longitudeDeg: number | null } & Omit<Likeness, 'position'>;

const asLikeness = ({ latitudeDeg, longitudeDeg, ...rest }: LikenessRow): Likeness => ({ ...rest, position: latitudeDeg === null || longitudeDeg === null ? null : { latitudeDeg, longitudeDeg } });

/** Cases of the same place, kind of optic or bearing, those that share most first; only ones that the actor may see. */
export async function listSimilarCases(db: DbOrTx, params: { actor: Actor; row: CaseRow; now: Date }): Promise<SimilarCaseView[]> {
  const { actor, row, now } = params;
  const day = localDay(row.foundAt ?? row.reportedAt, row.zone);
  const [own] = await db.select(likenessColumns(day)).from(cases).innerJoin(sites, eq(sites.id, cases.siteId)).where(and(visibleTo(actor), eq(cases.id, row.id)));
  if (!own) return [];
  const here = asLikeness(own);
  const sameOptic = here.opticKind === 'dont-know' ? sql`false` : sql`(${latestOpticKind} = ${here.opticKind})`;
  const sameBearing = here.markBearingDeg === null ? sql`false` : sql`(abs(mod((${markBearingDeg} - ${here.markBearingDeg} + 540)::numeric, 360) - 180) <= ${alikeBearingDeg})`;
  const candidates = await db
    .select({ id: cases.id, number: cases.number, ...likenessColumns(day) })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(actor), ne(cases.id, row.id), sql`(${cases.siteId} = ${row.siteId} or ${sameOptic} or coalesce(${sameBearing}, false))`))
    .orderBy(sql`(${cases.siteId} = ${row.siteId}) desc, ${cases.number} desc`)
    .limit(mostCandidates);
  const found = candidates
    .map((one) => ({ one, reasons: likeness(here, asLikeness(one)), sameSite: one.siteId === row.siteId }))
    .filter(({ reasons }) => reasons.length > 0)
    .toSorted((a, b) => b.reasons.length + Number(b.sameSite) - (a.reasons.length + Number(a.sameSite)) || b.one.number - a.one.number)
    .slice(0, mostSimilar);
  if (found.length === 0) return [];
  const facts = await listRegisterFacts(db, { actor, caseIds: found.map(({ one }) => one.id), now });
  return found.flatMap(({ one, reasons, sameSite }) => {
    const fact = facts.find((candidate) => candidate.id === one.id);
    if (!fact) return [];
    const there = asLikeness(one).position;
    const off = sameSite && here.position && there ? offsetM(here.position, there) : null;
    return [{ row: registerRow(fact, now, { fromHour: 4, toHour: 22 }), reasons, offM: off, consequence: fact.potentialConsequence, likelihood: fact.likelihood }];
  });
}

const longestQueue = 30;

/** Reports that wait for a look or an answer: hazard still there first, then by time. */
export async function listWaitingCases(db: DbOrTx, params: { actor: Actor; now: Date }): Promise<WaitingCaseView[]> {
  const rows = await db
    .select({ number: cases.number, title: cases.title, siteName: sites.name, state: cases.state, hazard: cases.hazardStillPresent, reportedAt: cases.reportedAt, answerDueAt: cases.answerDueAt, zone: cases.zone, hurt: sql<boolean>`${isHurt(params.actor)}` })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(params.actor), inArray(cases.state, ['reported', 'triage', 'returned'])))
    .orderBy(sql`case when ${cases.state} = 'returned' then 2 when ${cases.hazardStillPresent} = 'yes' then 0 else 1 end`, sql`coalesce(${cases.answerDueAt}, ${cases.reportedAt})`, cases.number)
    .limit(longestQueue);
  return rows
    .map((row): WaitingCaseView => {
      const firstLook = row.state === 'reported' ? firstLookView({ reportedAt: row.reportedAt, zone: row.zone, urgent: row.hazard === 'yes' || row.hurt }, params.now) : null;
      return {
        number: row.number,
        title: row.title,
        place: row.siteName,
        state: row.state,
        group: row.state === 'returned' ? 'reporter' : row.hazard === 'yes' || row.hurt ? 'hazard' : 'first-look',
        firstLook,
        clockWords: row.state === 'returned' ? (row.answerDueAt ? `answer due ${formatDay(row.answerDueAt, row.zone)}` : 'answer wanted') : (firstLook?.words ?? `looked at, waiting ${waitedWords(row.reportedAt, params.now)}`),
      };
    })
    .toSorted((a, b) => (a.firstLook?.dueUtc ?? '9').localeCompare(b.firstLook?.dueUtc ?? '9'));
}

/** "40 min", "3 h", "2 days". */
function waitedWords(since: Date, now: Date): string {
  const minutes = Math.max(0, Math.round((now.getTime() - since.getTime()) / 60_000));
  if (minutes < 90) return `${minutes} min`;
  return minutes < 2_880 ? `${Math.round(minutes / 60)} h` : `${Math.round(minutes / 1_440)} days`;
}
