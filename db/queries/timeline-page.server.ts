import { asc, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { logEntries } from '#db/schema/all.ts';
import { listAttachments, readableClasses } from './attachments.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { findCase } from './case-subject.server.ts';
import { listEvidence } from './evidence.server.ts';
import { standingMoves } from './moves-in-log.server.ts';
import { listCasePhotos } from './photos.server.ts';
import { listTimelineEvents } from './timeline.server.ts';
import { standingWeather } from './weather.server.ts';
import { listWitnessAccounts } from './witness-accounts.server.ts';
import { attachmentCode } from '#app/domain/attachment.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { caseStateLabels } from '#app/domain/case-state.ts';
import { DomainError } from '#app/domain/errors.ts';
import { examKindLabels, holderRoleLabels, itemCode, itemLetter } from '#app/domain/evidence.ts';
import { foundMeansLabels, onsetBasisLabels, photoViewLabels } from '#app/domain/incident.ts';
import { formatClock } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import { whyClosed } from '#app/domain/why-closed.ts';
import type { Actor } from '#app/domain/roles.ts';
import { timelineHeading, timelineRows, timelineSourceLabels, trueTime } from '#app/domain/timeline.ts';
import type { Happening } from '#app/domain/timeline.ts';
import { withinSpan } from '#app/domain/weather.ts';
import { witnessNames } from '#app/domain/witness.ts';

interface Query {
  readonly actor: Actor;
  readonly caseNumber: number;
}

/** Everything of a case that has a time, from all sources, in the order of true time. Nobody is named in it. */
export async function listHappenings(db: DbOrTx, row: CaseRow, query: Query): Promise<Happening[]> {
  return [...caseHappenings(row), ...(await eventHappenings(db, query)), ...(await photoHappenings(db, query)), ...(await witnessHappenings(db, query)), ...(await weatherHappenings(db, row)), ...(await evidenceHappenings(db, query)), ...(await moveHappenings(db, row))];
}

const plain = { reading: null, clockErrorS: 0, basis: '', path: null } as const;

function caseHappenings(row: CaseRow): Happening[] {
  const basis = row.onsetBasis ? onsetBasisLabels[row.onsetBasis] : 'Not stated';
  const dayOnly = row.foundPrecision === 'date-only';
  const clocked = row.foundAt && !dayOnly && row.foundPrecision !== 'unknown';
  const found = row.foundByMeans ? `Found: ${foundMeansLabels[row.foundByMeans].toLowerCase()}` : 'Found, or alarm';
  return [
    ...(row.onsetEarliestAt ? [{ ...plain, key: 'onset-earliest', at: row.onsetEarliestAt, source: 'Facts', what: 'Earliest possible onset', basis }] : []),
    ...(row.onsetLatestAt ? [{ ...plain, key: 'onset-latest', at: row.onsetLatestAt, source: 'Facts', what: 'Latest possible onset', basis }] : []),
    ...(row.foundAt ? [{ ...plain, key: 'found', at: clocked ? trueTime(row.foundAt, row.foundClockErrorS) : row.foundAt, dayOnly: !clocked, source: 'Report', what: found, reading: clocked ? row.foundAt : null, clockErrorS: row.foundClockErrorS }] : []),
    { ...plain, key: 'reported', at: row.reportedAt, source: 'Log', what: 'Reported' },
    ...(row.interimControlAt ? [{ ...plain, key: 'interim', at: row.interimControlAt, source: 'Facts', what: 'Interim control in place' }] : []),
  ];
}

async function eventHappenings(db: DbOrTx, query: Query): Promise<Happening[]> {
  return (await listTimelineEvents(db, query)).map((event) => ({
    key: `event-${event.id}`,
    at: trueTime(event.readingAt, event.clockErrorS),
    source: `${timelineSourceLabels[event.source]}: ${event.sourceName}`,
    what: event.what,
    reading: event.readingAt,
    clockErrorS: event.clockErrorS,
    basis: event.clockErrorBasis,
    path: null,
    withdrawn: event.withdrawnReason,
    eventId: event.id,
  }));
}

async function photoHappenings(db: DbOrTx, query: Query): Promise<Happening[]> {
  return (await listCasePhotos(db, query)).flatMap((photo) =>
    photo.takenAt
      ? [{ ...plain, key: `photo-${photo.id}`, at: trueTime(photo.takenAt, photo.clockErrorS), source: `Photo ${photo.label}`, what: `Photo taken: ${photo.view ? photoViewLabels[photo.view].toLowerCase() : 'view not stated'}`, reading: photo.takenAt, clockErrorS: photo.clockErrorS, basis: 'clock of the camera', path: `/photos#photo-${photo.id}` }]
      : [],
  );
}

async function witnessHappenings(db: DbOrTx, query: Query): Promise<Happening[]> {
  const lines = await listWitnessAccounts(db, query);
  const names = witnessNames(lines.map(({ account }) => account.involvementId));
  return lines.flatMap(({ account }, index) => {
    const witness = names[index] ?? 'Witness';
    const path = `/witnesses#account-${account.label}`;
    return [
      ...(account.speaksOfAt ? [{ ...plain, key: `speaks-${account.id}`, at: account.speaksOfAt, source: witness, what: `The moment of which account ${account.label} speaks`, basis: 'as the witness gave it', path }] : []),
      { ...plain, key: `account-${account.id}`, at: account.takenAt, source: 'Witnesses', what: `Account ${account.label} taken`, path },
    ];
  });
}

/** Each weather record once: where its values begin to bear on the window, and until when. */
async function weatherHappenings(db: DbOrTx, row: CaseRow): Promise<Happening[]> {
  const { onsetEarliestAt, onsetLatestAt } = row;
  if (!onsetEarliestAt || !onsetLatestAt) return [];
  return (await standingWeather(db, row.id)).flatMap((record) => {
    const values = withinSpan(record.values, onsetEarliestAt.getTime(), onsetLatestAt.getTime());
    const [first] = values;
    const last = values.at(-1);
    if (!first || !last) return [];
    const distance = record.stationDistanceKm === null ? '' : `${record.stationDistanceKm} km away`;
    return [{ ...plain, key: `weather-${record.number}`, at: new Date(first.startUtc), source: [record.sourceName, record.station].filter(Boolean).join(', '), what: `Weather record ${record.number}: ${values.length} ${values.length === 1 ? 'value' : 'values'} in the window, to ${formatClock(new Date(last.endUtc), row.zone)}`, basis: distance, path: '/weather' }];
  });
}

async function evidenceHappenings(db: DbOrTx, query: Query): Promise<Happening[]> {
  return (await listEvidence(db, query)).flatMap(({ item, custody, exams }) => {
    const code = itemCode(query.caseNumber, item.label);
    const path = `/evidence/${itemLetter(item.label)}`;
    return [
      ...custody.map((record) => ({ ...plain, key: `custody-${record.id}`, at: record.fromAt, source: 'Custody', what: record.sequence === 1 ? `${code} collected` : `${code} passed to ${holderRoleLabels[record.holderRole].toLowerCase()}`, path })),
      ...exams.map((exam) => ({ ...plain, key: `exam-${exam.id}`, at: exam.performedAt, source: 'Examination', what: `${code}: ${examKindLabels[exam.kind].toLowerCase()}`, path })),
    ];
  });
}

/** States reached, from the log, where every move notes the state it led to. */
async function moveHappenings(db: DbOrTx, row: CaseRow): Promise<Happening[]> {
  const state = sql<CaseState>`${logEntries.after} ->> 'state'`;
  const rows = await db.select({ sequence: logEntries.sequence, at: logEntries.at, state }).from(logEntries).where(standingMoves(row.id)).orderBy(asc(logEntries.sequence));
  return rows.filter((move) => move.state !== 'reported' && move.state in caseStateLabels).map((move) => ({ ...plain, key: `move-${move.sequence}`, at: move.at, source: 'Log', what: `State: ${caseStateLabels[move.state].toLowerCase()}`, path: '/log' }));
}

/** The timeline page; null when the case is not theirs to see. @throws DomainError `forbidden` */
export async function getTimelinePage(db: DbOrTx, query: Query) {
  const found = await findCase(db, query.actor, query.caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  if (!canOnCase(query.actor, 'timeline:read', subject)) throw new DomainError('forbidden', `The timeline is not open to you. ${whoCan('timeline:read')}`);
  const happenings = await listHappenings(db, row, query);
  const documents = await listAttachments(db, { ...query, classes: readableClasses(query.actor, subject) });
  return {
    caseNumber: query.caseNumber,
    zone: row.zone,
    heading: timelineHeading(happenings),
    rows: timelineRows(happenings, row.zone),
    documents: documents.map((document) => ({ id: document.id, words: `${attachmentCode(document.label)} ${document.title}` })),
    mayWrite: canOnCase(query.actor, 'timeline:write', subject),
    whoWrites: whyClosed(query.actor, 'timeline:write', subject),
  };
}
