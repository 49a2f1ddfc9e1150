import type { DbOrTx } from '#db/client.server.ts';
import type { CardCase } from '#app/domain/case-card.ts';
import { dayCard, needsWholeDay } from '#app/domain/case-card.ts';
import type { RegisterGroup, RegisterRowView, RegisterView } from '#app/domain/case-view.ts';
import { firstLookHeading, registerGroups, registerHeading } from '#app/domain/case-view.ts';
import { waitsFor } from '#app/domain/case-waiting.ts';
import { noReturnWords, returnView, stateNote, windowWords } from '#app/domain/case-words.ts';
import { firstLookView } from '#app/domain/first-look.ts';
import { sunAzimuthDeg } from '#app/domain/sun-now.ts';
import { localDay } from '#app/domain/local-time.ts';
import { caseRules } from '#app/domain/permissions.ts';
import { holdsRoleAnywhere } from '#app/domain/roles.ts';
import type { RegisterFacts, RegisterQuery } from './register.server.ts';
import { countRegisterGroups, countRegisterViews, listRegisterRows, mayFilterInjury, mayFilterLate } from './register.server.ts';

/** The register as its page shows it. */
export async function getRegister(db: DbOrTx, query: RegisterQuery): Promise<RegisterView> {
  const [facts, groups, counts] = await Promise.all([listRegisterRows(db, query), countRegisterGroups(db, query), countRegisterViews(db, query.actor, query.now)]);
  const groupCounts = { 'before-fix': 0, new: 0, settled: 0 };
  for (const { group, count } of groups) groupCounts[groupName(group)] = count;
  const total = groups.reduce((sum, { count }) => sum + count, 0);
  const wide = facts.some((one) => needsWholeDay(cardCase(one), one.run));
  const span = wide ? { fromHour: 0, toHour: 24 } : { fromHour: 4, toHour: 22 };
  const ownOnly = !holdsRoleAnywhere(query.actor, caseRules['case:read'].roles);
  const rows = facts.map((one) => registerRow(one, query.now, span));
  const late = rows.filter((row) => row.firstLook?.late).length;
  return {
    heading: query.filter.view === 'first-look' ? firstLookHeading(total, late) : registerHeading(groupCounts['before-fix'], total, ownOnly, counts.open),
    rows,
    total,
    groupCounts,
    counts: { ...counts, late: mayFilterLate(query.actor) ? counts.late : null, injury: mayFilterInjury(query.actor) ? counts.injury : null },
    span,
  };
}

const groupName = (group: number): RegisterGroup => registerGroups[group - 1] ?? 'settled';

function correctedFound(facts: Pick<RegisterFacts, 'foundAt' | 'foundPrecision' | 'foundClockErrorS'>): Date | null {
  if (!facts.foundAt || facts.foundPrecision === 'date-only' || facts.foundPrecision === 'unknown') return null;
  return new Date(facts.foundAt.getTime() - facts.foundClockErrorS * 1_000);
}

function cardCase(facts: RegisterFacts): CardCase {
  return {
    zone: facts.zone,
    latitudeDeg: facts.latitudeDeg,
    longitudeDeg: facts.longitudeDeg,
    elevationM: facts.siteElevationM,
    onsetEarliestAt: facts.onsetEarliestAt,
    onsetLatestAt: facts.onsetLatestAt,
    foundAt: correctedFound(facts),
    reportedAt: facts.foundAt ?? facts.reportedAt,
  };
}

/** One case as a row of a list. */
export function registerRow(facts: RegisterFacts, now: Date, span: RegisterView['span']): RegisterRowView {
  const { zone, state } = facts;
  const window = windowWords(facts.onsetEarliestAt, facts.onsetLatestAt, correctedFound(facts), zone);
  const firstLook = state === 'reported' ? firstLookView({ reportedAt: facts.reportedAt, zone, urgent: facts.hazardStillPresent === 'yes' || facts.hurt }, now) : null;
  const relevant = state !== 'closed' && state !== 'duplicate' && !facts.sunlightRuledOut;
  return {
    number: facts.number,
    group: groupName(facts.group),
    opticKind: facts.opticKind,
    title: facts.title,
    place: facts.placeDetail ? `${facts.siteName}, ${firstWords(facts.placeDetail)}` : facts.siteName,
    windowDay: window.day,
    windowHours: window.hours,
    card: dayCard(cardCase(facts), facts.run, span),
    state,
    stateNote: [stateNote({ ...facts, mayReadHealth: facts.healthVisible }), firstLook ? `first look ${firstLook.words}` : ''].filter(Boolean).join(', '),
    nextReturn: relevant ? returnView(facts.nextReturnAt, zone, now) : null,
    returnWords: noReturnWords({ state, duplicateOfNumber: facts.duplicateOfNumber, attachedRun: facts.run !== null, returnsListed: facts.returnsListed, sunlightRuledOut: facts.sunlightRuledOut }),
    firstLook,
    waitsFor: waitsFor({
      ...facts,
      today: localDay(now, zone),
      opticKnown: facts.opticKind !== 'dont-know',
      attachedRun: facts.run !== null,
      actions: facts.actionsVisible ? facts.actions : null,
    }),
    position: { latitudeDeg: rounded(facts.latitudeDeg), longitudeDeg: rounded(facts.longitudeDeg) },
    sunAzimuthDeg: azimuthInBurn(facts),
  };
}

function azimuthInBurn(facts: RegisterFacts): number | null {
  const sunlit = (facts.run?.runs ?? []).filter((run) => run.verdict === 'sunlit').sort((a, b) => b.minutes - a.minutes)[0];
  if (!sunlit) return null;
  const middle = new Date((Date.parse(sunlit.fromUtc) + Date.parse(sunlit.toUtc)) / 2);
  return Math.round(sunAzimuthDeg(middle, { latitudeDeg: facts.latitudeDeg, longitudeDeg: facts.longitudeDeg, elevationM: facts.siteElevationM }));
}

/** Places on the map are shown to two decimals, about a kilometre. */
const rounded = (degrees: number) => Math.round(degrees * 100) / 100;

function firstWords(text: string): string {
  const line = text.split('\n')[0] ?? '';
  return line.length > 48 ? `${line.slice(0, 47).trimEnd()}…` : line;
}
