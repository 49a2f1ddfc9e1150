import { and, eq, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { cases, sites } from '#db/schema/all.ts';
import type { CardCase } from '#app/domain/case-card.ts';
import { wholeCard } from '#app/domain/case-card.ts';
import type { CaseHeaderView, CaseTab } from '#app/domain/case-view.ts';
import { eventNote, noReturnWords, returnView, stateNote } from '#app/domain/case-words.ts';
import { onsetBasisLabels } from '#app/domain/incident.ts';
import { formatClock, formatDay } from '#app/domain/local-time.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { duplicateOfNumber, headerRun, nextReturnAt, returnsListed, signedCertainty, sunlightRuledOut } from './case-expressions.server.ts';
import { caseSubject } from './case-subject.server.ts';
import { stateSince } from './cases.server.ts';
import { undoOffer } from './moves-in-log.server.ts';
import { visibleTo } from './scope.server.ts';

const counted = (table: string) => sql<number>`(select count(*)::int from ${sql.identifier(table)} t where t.case_id = ${cases.id})`;

async function readHeader(db: DbOrTx, params: { actor: Actor; caseNumber: number; now: Date }) {
  const [row] = await db
    .select({
      case: cases,
      siteName: sites.name,
      siteCode: sites.code,
      siteLatitudeDeg: sites.latitudeDeg,
      siteLongitudeDeg: sites.longitudeDeg,
      siteElevationM: sites.elevationM,
      duplicateOfNumber,
      signedCertainty: signedCertainty(params.actor),
      sunlightRuledOut: sunlightRuledOut(params.actor),
      returnsListed,
      nextReturnAt: nextReturnAt(params.now),
      run: headerRun,
      photoCount: counted('photos'),
      runCount: counted('reconstructions'),
      evidenceCount: counted('evidence_items'),
      accountCount: counted('witness_accounts'),
      hypothesisCount: counted('hypotheses'),
      findingVersion: sql<number | null>`(select max(f.version) from findings f where f.case_id = ${cases.id})`,
      actionCount: counted('corrective_actions'),
      releaseCount: counted('releases'),
    })
    .from(cases)
    .innerJoin(sites, eq(sites.id, cases.siteId))
    .where(and(visibleTo(params.actor), eq(cases.number, params.caseNumber)));
  return row ?? null;
}
type HeaderFacts = NonNullable<Awaited<ReturnType<typeof readHeader>>>;

/** Head of a case, with the tabs that this person may open; null when the case is not theirs to see. */
export async function getCaseHeader(db: DbOrTx, params: { actor: Actor; caseNumber: number; now: Date }): Promise<CaseHeaderView | null> {
  const facts = await readHeader(db, params);
  if (!facts) return null;
  const { case: row, run } = facts;
  const subject = await caseSubject(db, params.actor, row);
  const mayReadHealth = canOnCase(params.actor, 'case:read-health', subject);
  const mayReadRuns = canOnCase(params.actor, 'reconstruction:read', subject);
  const since = await stateSince(db, row);
  const live = row.state !== 'closed' && row.state !== 'duplicate' && !facts.sunlightRuledOut;
  return {
    number: row.number,
    title: row.title,
    subtitle: subtitle(facts, mayReadHealth),
    siteName: facts.siteName,
    siteCode: facts.siteCode,
    zone: row.zone,
    state: row.state,
    stateNote: [`since ${formatDay(since, row.zone)}`, stateNote({ ...facts, eventType: null, reopenCount: row.reopenCount, mayReadHealth })].filter(Boolean).join(', '),
    duplicateOf: facts.duplicateOfNumber,
    legalHold: row.legalHold,
    version: row.version,
    nextReturn: live ? returnView(facts.nextReturnAt, row.zone, params.now) : null,
    returnWords: noReturnWords({ state: row.state, duplicateOfNumber: facts.duplicateOfNumber, attachedRun: run?.attached ?? false, returnsListed: facts.returnsListed, sunlightRuledOut: facts.sunlightRuledOut }),
    card: wholeCard(cardCase(facts), run, cardWords(row)),
    cardNote: cardNote(run, mayReadRuns),
    reconstructionNumber: mayReadRuns ? (run?.number ?? null) : null,
    tabs: tabsFor(facts, params.actor, subject),
    undo: await undoOffer(db, params.actor, row),
  };
}

function cardNote(run: HeaderFacts['run'], mayReadRuns: boolean): string {
  if (!run) return 'Daylight only; no reconstruction yet.';
  if (!mayReadRuns) return 'From a reconstruction by the team.';
  return run.attached ? `Reconstruction ${run.number}, attached to the case.` : `Reconstruction ${run.number}, the newest; not attached.`;
}

function subtitle({ case: row, siteName }: HeaderFacts, mayReadHealth: boolean): string {
  const place = [siteName, row.placeDetail.split('\n')[0]].filter(Boolean).join(', ');
  const event = eventNote(row.eventType, mayReadHealth);
  const hurt = !mayReadHealth ? '' : row.anyoneHurt === 'yes' ? ' Somebody was hurt.' : row.anyoneHurt === 'no' ? ' No one hurt.' : ' Not known whether anyone was hurt.';
  return `${place}.${event ? ` ${event.charAt(0).toUpperCase()}${event.slice(1)}.` : ''}${hurt}`;
}

/** When the mark was found, true time: the clock error of its source is taken off. Null for a bare day. */
export function correctedFoundAt(row: Pick<HeaderFacts['case'], 'foundAt' | 'foundPrecision' | 'foundClockErrorS'>): Date | null {
  if (!row.foundAt || row.foundPrecision === 'date-only' || row.foundPrecision === 'unknown') return null;
  return new Date(row.foundAt.getTime() - row.foundClockErrorS * 1_000);
}

function cardCase({ case: row, siteLatitudeDeg, siteLongitudeDeg, siteElevationM }: HeaderFacts): CardCase {
  return {
    zone: row.zone,
    latitudeDeg: row.latitudeDeg ?? siteLatitudeDeg,
    longitudeDeg: row.longitudeDeg ?? siteLongitudeDeg,
    elevationM: siteElevationM,
    onsetEarliestAt: row.onsetEarliestAt,
    onsetLatestAt: row.onsetLatestAt,
    foundAt: correctedFoundAt(row),
    reportedAt: row.foundAt ?? row.reportedAt,
  };
}

/** Words at both ends of the card's window: when last seen sound, and the raw clock reading beside the corrected one. */
function cardWords(row: HeaderFacts['case']): { start: string[]; end: string[] } {
  const basis = row.onsetBasis ? onsetBasisLabels[row.onsetBasis].toLowerCase() : 'earliest';
  const start = row.onsetEarliestAt ? [`${formatClock(row.onsetEarliestAt, row.zone)}`, basis] : [];
  const found = correctedFoundAt(row);
  if (!found || !row.foundAt) return { start, end: [] };
  const error = Math.round(row.foundClockErrorS / 60);
  const raw = error === 0 ? 'as reported' : `${formatClock(row.foundAt, row.zone)} ${error > 0 ? 'less' : 'plus'} ${Math.abs(error)} min clock error`;
  return { start, end: [`${formatClock(found, row.zone)} found,`, raw] };
}

function tabsFor(facts: HeaderFacts, actor: Actor, subject: CaseSubject): CaseTab[] {
  const may = (action: Parameters<typeof canOnCase>[1]) => canOnCase(actor, action, subject);
  const tab = (key: string, label: string, shown: boolean, count: number | string | null = null): CaseTab[] =>
    shown ? [{ key, label, path: key === 'account' ? '' : `/${key}`, count: count === null ? null : String(count) }] : [];
  return [
    ...tab('account', 'Account', true),
    ...tab('triage', may('case:triage') ? 'First look' : 'Facts and risk', may('case:triage') || may('case:edit-facts') || may('case:assign')),
    ...tab('measurements', 'Measurements', may('reconstruction:read')),
    ...tab('photos', 'Photos', true, facts.photoCount),
    ...tab('reconstructions', 'Reconstructions', may('reconstruction:read'), facts.runCount),
    ...tab('evidence', 'Evidence', may('evidence:read'), facts.evidenceCount),
    ...tab('witnesses', 'Witnesses', may('witness:read'), facts.accountCount),
    ...tab('timeline', 'Timeline', may('timeline:read')),
    ...tab('hypotheses', 'Hypotheses', may('hypothesis:read'), facts.hypothesisCount),
    ...tab('findings', facts.findingVersion === null ? 'Findings' : 'Findings, version', may('finding:read-draft') || may('finding:read-signed'), facts.findingVersion ?? 0),
    ...tab('report', 'Report', may('finding:read-signed')),
    ...tab('actions', 'Actions', may('action:read'), facts.actionCount),
    ...tab('releases', 'Releases', may('release:prepare'), facts.releaseCount),
    ...tab('log', 'Log', may('log:read')),
  ];
}
