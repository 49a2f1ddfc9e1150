import { and, asc, count, eq, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { correctiveActions, involvements, logEntries, photos, releases, users } from '#db/schema/all.ts';
import { caseFactList, whatIsLacking, windowWarnings } from '#app/domain/case-account.ts';
import { wholeCard } from '#app/domain/case-card.ts';
import { asksReason } from '#app/domain/case-move.ts';
import type { Move, MoveFacts } from '#app/domain/case-state.ts';
import { movesFrom } from '#app/domain/case-state.ts';
import type { CaseAccountView, CaseMovesView, InjuryView, LackView, LogLineView, MovePlace, PersonView, PhotoStripView } from '#app/domain/case-view.ts';
import { photoViewLabels } from '#app/domain/incident.ts';
import { injuryKindLabels, treatmentLabels } from '#app/domain/injury.ts';
import { formatDay, formatDayClock } from '#app/domain/local-time.ts';
import { isReady, moveChecklist } from '#app/domain/move-checklist.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { canOnCase, caseRules, whoCan } from '#app/domain/permissions.ts';
import type { Actor } from '#app/domain/roles.ts';
import { holdsRole } from '#app/domain/roles.ts';
import type { Scene } from '#app/domain/scene.ts';
import { correctedFoundAt } from './case-header.server.ts';
import type { CasePlace } from './case-place.server.ts';
import { casePlace } from './case-place.server.ts';
import { readMoveFacts } from './case-moves.server.ts';
import { listCaseNotes } from './case-notes.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { findCase } from './case-subject.server.ts';
import { listInjuries } from './injuries.server.ts';
import type { LogLine } from './log.server.ts';
import { listCaseLog } from './log.server.ts';
import { latestScene } from './scenes.server.ts';

const latestLogLines = 6;
const stripLength = 4;

/** The account tab of a case, cut to what this person may read; null when the case is not theirs to see. */
export async function getCaseAccount(db: DbOrTx, params: { actor: Actor; caseNumber: number }): Promise<CaseAccountView | null> {
  const { actor, caseNumber } = params;
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  const scene = await latestScene(db, row.id);
  const facts = await readMoveFacts(db, row);
  const mayReadLog = canOnCase(actor, 'log:read', subject);
  const log = mayReadLog ? await listCaseLog(db, { actor, caseNumber, limit: latestLogLines }) : null;
  const place = await casePlace(db, row);
  return {
    narrative: row.narrative,
    sentWords: `${row.guestReport ? 'Sent without an account' : 'Sent'} ${formatDayClock(row.reportedAt, row.zone)}, receipt ${row.receipt}. A note may be added; the text is not changed.`,
    question: row.question ? { question: row.question, answer: row.answer, dueWords: row.answerDueAt ? formatDay(row.answerDueAt, row.zone) : '' } : null,
    notes: (await listCaseNotes(db, params)).map((note) => ({ id: note.id, meta: `${note.authorName}, ${formatDayClock(note.at, row.zone)}`, body: note.body })),
    mayAddNote: canOnCase(actor, 'case:add-note', subject),
    facts: caseFactList({ ...row, correctedFoundAt: correctedFoundAt(row), scene: scene?.scene ?? null, investigatorName: await nameOf(db, row.assignedToId) }),
    warnings: windowWarnings({ ...row, daylightInWindow: hasDaylight(row, place) }),
    ...(await photoStrip(db, row)),
    people: await peopleOf(db, actor, row, subject),
    injuries: mayReadInjuries(actor, row, subject) ? (await listInjuries(db, params)).map(injuryView) : null,
    lacks: canOnCase(actor, 'reconstruction:read', subject) ? await lacksOf(db, row, facts, scene?.scene ?? null) : null,
    moves: mayReadLog ? movesOf(actor, subject, facts) : { ...movesOf(actor, subject, facts), closed: [] },
    log: log?.map((line) => logLineView(line, row.zone)) ?? null,
    logCount: mayReadLog ? await countLog(db, row.id) : 0,
  };
}

export function logLineView(line: LogLine, zone: string): LogLineView {
  return { sequence: line.sequence, atWords: formatDayClock(line.at, zone), actorName: line.actorName, summary: line.summary, reason: line.reason };
}

async function countLog(db: DbOrTx, caseId: string): Promise<number> {
  const [row] = await db.select({ lines: count() }).from(logEntries).where(eq(logEntries.caseId, caseId));
  return row?.lines ?? 0;
}

async function nameOf(db: DbOrTx, userId: string | null): Promise<string | null> {
  if (!userId) return null;
  const [person] = await db.select({ displayName: users.displayName }).from(users).where(eq(users.id, userId));
  return person?.displayName ?? null;
}

function hasDaylight(row: CaseRow, place: CasePlace): boolean {
  if (!row.onsetEarliestAt || !row.onsetLatestAt) return true;
  const card = wholeCard({ ...place, ...row, latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, foundAt: null }, null, { start: [], end: [] });
  return card.runs.length > 0;
}

async function photoStrip(db: DbOrTx, row: CaseRow): Promise<{ photos: PhotoStripView[]; photoCount: number }> {
  const rows = await db.select({ id: photos.id, label: photos.label, view: photos.view, caption: photos.caption, altText: photos.altText, state: photos.state }).from(photos).where(eq(photos.caseId, row.id)).orderBy(asc(photos.label));
  const strip = rows.slice(0, stripLength).map((photo) => {
    const view = photo.view ? photoViewLabels[photo.view] : '';
    const label = `${row.number}-${photo.label}`;
    return { id: photo.id, label: [label, view].filter(Boolean).join(' '), caption: photo.caption, altText: photo.altText || photo.caption || `Photo ${label}`, ready: photo.state === 'ready' };
  });
  return { photos: strip, photoCount: rows.length };
}

const roleWords: Record<(typeof involvements.$inferSelect)['role'], string> = {
  reporter: 'Reporter', finder: 'Finder', injured: 'Injured person', witness: 'Witness', occupant: 'Occupant', owner: 'Owner', contractor: 'Contractor', neighbour: 'Neighbour',
};
const ageWords = { adult: '', '16-17': '16 or 17 years', 'under-16': 'under 16', unknown: '' } as const;

/** Reporters see what they said of themselves; children are named to those who may read health fields only. */
async function peopleOf(db: DbOrTx, actor: Actor, row: CaseRow, subject: CaseSubject): Promise<PersonView[] | null> {
  if (!canOnCase(actor, 'case:read-personal', subject)) return null;
  const byRole = holdsRole(actor, caseRules['case:read-personal'].roles, row.siteId);
  const mayKnowChildren = holdsRole(actor, caseRules['case:read-health'].roles, row.siteId);
  const rows = await db.select().from(involvements).where(and(eq(involvements.caseId, row.id), byRole ? undefined : eq(involvements.role, 'reporter'))).orderBy(asc(involvements.createdAt), asc(involvements.id));
  return rows.map((person) => {
    const hidden = (person.ageBand === 'under-16' || person.ageBand === '16-17') && !mayKnowChildren;
    return {
      id: person.id,
      role: roleWords[person.role],
      name: hidden ? null : (person.name ?? 'no name given'),
      withheld: hidden ? ('child' as const) : null,
      contact: hidden ? '' : [person.phone, person.email].filter(Boolean).join(', '),
      note: hidden ? '' : [person.relation, ageWords[person.ageBand], mayKnowChildren && person.guardianContact ? `guardian: ${person.guardianContact}` : ''].filter(Boolean).join(', '),
    };
  });
}

/** Reporting a case does not open what others wrote about an injury. */
function mayReadInjuries(actor: Actor, row: CaseRow, subject: CaseSubject): boolean {
  return canOnCase(actor, 'case:read-health', subject) && holdsRole(actor, caseRules['case:read-health'].roles, row.siteId);
}

function injuryView(injury: Awaited<ReturnType<typeof listInjuries>>[number]): InjuryView {
  const kind = injury.kind ? injuryKindLabels[injury.kind] : 'Kind not known';
  const days = [injury.daysAway === null ? '' : `${injury.daysAway} days away`, injury.restrictedDays === null ? '' : `${injury.restrictedDays} days restricted`];
  return {
    id: injury.id,
    part: injury.part ?? '',
    kind: injury.kind ?? '',
    treatment: injury.treatment,
    daysAway: injury.daysAway === null ? '' : String(injury.daysAway),
    restrictedDays: injury.restrictedDays === null ? '' : String(injury.restrictedDays),
    description: injury.description,
    words: [kind, injury.part, treatmentLabels[injury.treatment].toLowerCase(), ...days].filter(Boolean).join(', '),
  };
}

async function lacksOf(db: DbOrTx, row: CaseRow, facts: MoveFacts, scene: Scene | null): Promise<LackView[]> {
  const [actions] = await db
    .select({ all: count(), planned: sql<number>`count(*) filter (where ${correctiveActions.effectCheckOn} is not null or ${correctiveActions.state} = 'effective')`.mapWith(Number) })
    .from(correctiveActions)
    .where(and(eq(correctiveActions.caseId, row.id), sql`${correctiveActions.state} <> 'withdrawn'`));
  const [released] = await db.select({ made: count() }).from(releases).where(eq(releases.caseId, row.id));
  const [decided] = await db.select({ photos: count() }).from(photos).where(and(eq(photos.caseId, row.id), sql`${photos.releasable} <> 'undecided'`));
  const place = await casePlace(db, row);
  return whatIsLacking({
    ...row,
    scene,
    facts,
    siteSkyline: place.skyline !== null,
    actionCount: actions?.all ?? 0,
    effectChecksPlanned: actions?.planned ?? 0,
    signed: facts.finding?.state === 'signed',
    releases: released?.made ?? 0,
    photosDecided: decided?.photos ?? 0,
  });
}

const places: Readonly<Record<string, MovePlace>> = { triage: 'triage', reported: 'triage', findings: 'findings' };
/** What follows a signature is the manager's, who has no form on the page of the finding. */
const managersMoves: readonly string[] = ['close-no-action', 'pass-to-action'];
/** The finding is sent from its own page, where it is written; duplicates are undone where they were marked. */
const placeOfMove = (moveId: string, from: string): MovePlace => (moveId === 'send-findings' ? 'findings' : managersMoves.includes(moveId) ? 'here' : (places[from] ?? 'here'));

/** The way onward stands first, ways back and aside after it. */
const weight = (move: Move) => (onward.includes(move.id) ? 0 : 1);
const onward: readonly string[] = ['open-triage', 'accept', 'answer', 'send-findings', 'sign', 'close'];

/** Moves from the present state: those open to this person with what they need, and the others with who can. */
export function movesOf(actor: Actor, subject: CaseSubject, facts: MoveFacts): CaseMovesView {
  const all = [...movesFrom(subject.state)].sort((a, b) => weight(a) - weight(b));
  const mine = all.filter((move) => canOnCase(actor, move.action, subject));
  return {
    open: mine.map((move) => ({ id: move.id, label: move.label, ready: isReady(move, facts), needs: moveChecklist(move, facts), place: placeOfMove(move.id, move.from), asksReason: asksReason(move.id) })),
    closed: all.filter((move) => !mine.includes(move)).map((move) => ({ id: move.id, label: move.label, whoCan: whoCan(move.action) })),
  };
}
