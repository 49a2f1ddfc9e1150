import { and, asc, eq, gt, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { sunReturns } from '#db/schema/all.ts';
import { todayCard } from '#app/domain/case-card.ts';
import type { SunOnItView, TriageView } from '#app/domain/case-view.ts';
import { formatClock, formatDay, formatDayClock, localDay, toLocalInput } from '#app/domain/local-time.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { canOnCase, caseRules } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { holdsRole } from '#app/domain/roles.ts';
import type { Scene } from '#app/domain/scene.ts';
import { sunNow } from '#app/domain/sun-now.ts';
import { getCaseAccount } from './case-account.server.ts';
import { listRoleHolders } from './case-people.server.ts';
import { casePlace } from './case-place.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { findCase } from './case-subject.server.ts';
import { latestScene } from './scenes.server.ts';
import { listSimilarCases, listWaitingCases } from './similar-cases.server.ts';

/** Whether the first-look page is this person's: to decide on a report, or to keep its facts. */
export function mayOpenTriage(actor: Actor, subject: CaseSubject): boolean {
  return canOnCase(actor, 'case:triage', subject) || canOnCase(actor, 'case:edit-facts', subject) || canOnCase(actor, 'case:assign', subject);
}

/** Everything for deciding on a report in one screen; null when the case is not theirs to see. */
export async function getTriage(db: DbOrTx, params: { actor: Actor; caseNumber: number; now: Date }): Promise<{ view: TriageView; subject: CaseSubject } | null> {
  const { actor, now } = params;
  const found = await findCase(db, actor, params.caseNumber);
  const account = await getCaseAccount(db, params);
  if (!found || !account) return null;
  const { row, subject } = found;
  const scene = await latestScene(db, row.id);
  const mayAssign = canOnCase(actor, 'case:assign', subject);
  const investigators = mayAssign ? await listRoleHolders(db, { organisationId: row.organisationId, siteId: row.siteId, roles: ['investigator'] }) : null;
  const mayReadHealth = holdsRole(actor, caseRules['case:read-health'].roles, row.siteId);
  const view: TriageView = {
    nowUtc: now.toISOString(),
    version: row.version,
    state: row.state,
    hazard: hazardLine(row),
    account: { narrative: account.narrative, sentWords: account.sentWords, question: account.question },
    photos: account.photos,
    photoCount: account.photoCount,
    facts: factFields(row),
    mayEdit: canOnCase(actor, 'case:edit-facts', subject),
    investigators: investigators?.map((person) => ({ userId: person.userId, name: person.displayName })) ?? null,
    investigatorId: row.assignedToId ?? '',
    warnings: account.warnings,
    where: await whereView(db, row, scene?.scene ?? null, now),
    sun: await sunOnIt(db, row, scene?.scene ?? null, now),
    similar: await listSimilarCases(db, { actor, row, now }),
    waiting: await listWaitingCases(db, { actor, now }),
    moves: account.moves,
    proposedAnswerDay: localDay(new Date(now.getTime() + 3 * 86_400_000), row.zone),
    hurtWords: mayReadHealth && row.anyoneHurt === 'yes' ? 'Somebody was hurt. Keep details in the injury box of the account. Rules on reporting injuries to outside bodies differ by place and have short clocks: check the current rule today.' : null,
  };
  return { view, subject };
}

function hazardLine(row: CaseRow): TriageView['hazard'] {
  const control = row.interimControl ? `${row.interimControl}${row.interimControlAt ? `, since ${formatDayClock(row.interimControlAt, row.zone)}` : ''}.` : 'No interim control is recorded.';
  const answers = { yes: 'yes', no: 'no', 'dont-know': "don't know" } as const;
  return { answer: answers[row.hazardStillPresent], words: row.hazardStillPresent === 'no' && !row.interimControl ? '' : control };
}

function factFields(row: CaseRow): Record<string, string> {
  const local = (at: Date | null) => (at ? toLocalInput(at, row.zone) : '');
  return {
    title: row.title,
    eventType: row.eventType ?? '',
    hazardStillPresent: row.hazardStillPresent,
    interimControl: row.interimControl ?? '',
    interimControlEnds: row.interimControlEnds ?? '',
    onsetEarliest: local(row.onsetEarliestAt),
    onsetLatest: local(row.onsetLatestAt),
    onsetBasis: row.onsetBasis ?? '',
    extent: row.extent ?? '',
    weatherSeen: row.weatherSeen ?? '',
    foundByMeans: row.foundByMeans ?? '',
    clockErrorMin: row.foundClockErrorS === 0 ? '' : String(row.foundClockErrorS / 60),
    potentialConsequence: row.potentialConsequence ?? '',
    likelihood: row.likelihood ?? '',
    risk: row.risk ?? '',
    riskBasis: row.riskBasis ?? '',
  };
}

async function whereView(db: DbOrTx, row: CaseRow, scene: Scene | null, now: Date): Promise<TriageView['where']> {
  const place = await casePlace(db, row);
  const { azimuthDeg, elevationDeg } = sunNow(now, place);
  const own = row.latitudeDeg !== null && row.longitudeDeg !== null;
  return {
    placeWords: `${place.latitudeDeg.toFixed(2)}, ${place.longitudeDeg.toFixed(2)}; ${own ? 'pin of the report' : 'the site, no pin in the report'}`,
    accuracyM: own ? row.accuracyM : null,
    sun: { azimuthDeg, elevationDeg },
    markBearingDeg: scene?.mark.bearingDeg?.value ?? null,
  };
}

/** From the attached run's list of returns where there is one; else daylight, which says only that the sun is up. */
async function sunOnIt(db: DbOrTx, row: CaseRow, scene: Scene | null, now: Date): Promise<SunOnItView> {
  const place = await casePlace(db, row);
  const sky = sunNow(now, place);
  const returns = await db.select().from(sunReturns).where(and(eq(sunReturns.caseId, row.id), gt(sunReturns.toAt, now))).orderBy(asc(sunReturns.fromAt)).limit(2);
  const [listed] = await db.select({ any: sql<number>`count(*)::int` }).from(sunReturns).where(eq(sunReturns.caseId, row.id));
  const [next] = returns;
  const today = next && localDay(next.fromAt, row.zone) === localDay(now, row.zone) ? next : null;
  const measured = scene !== null && scene.optic.kind !== 'dont-know' && scene.mark.bearingDeg !== undefined && scene.mark.elevationDeg !== undefined && scene.mark.distanceMm !== undefined;
  return {
    words: onItWords(row, { next: next ?? null, hasRun: (listed?.any ?? 0) > 0, measured, now }),
    skyWords: sky.words,
    card: { ...todayCard({ ...place, now, sunlit: today ? { fromAt: today.fromAt, toAt: today.toAt } : null, decided: (listed?.any ?? 0) > 0 }), cursorUtc: now.toISOString() },
    basis: (listed?.any ?? 0) > 0 ? 'from the attached reconstruction' : 'daylight at the place; the optic or the mark is not reconstructed yet',
    mayWorkOut: measured && (listed?.any ?? 0) === 0,
  };
}

function onItWords(row: CaseRow, facts: { next: { fromAt: Date; toAt: Date; bestAt: Date } | null; hasRun: boolean; measured: boolean; now: Date }): string {
  const { next, now, hasRun, measured } = facts;
  if (!hasRun) return measured ? 'Not known until the minutes are worked out.' : 'Not known: the optic, and the direction from it to the mark, are still to be measured.';
  if (!next) return 'The returns that were listed have passed; run the reconstruction again.';
  if (next.fromAt <= now) return `On it now, until about ${formatClock(next.toAt, row.zone)}, if the sky is clear.`;
  const when = localDay(next.fromAt, row.zone) === localDay(now, row.zone) ? 'today' : formatDay(next.fromAt, row.zone);
  return `Not on it now. Next: ${when}, ${formatClock(next.fromAt, row.zone)} to ${formatClock(next.toAt, row.zone)}, if the sky is clear.`;
}
