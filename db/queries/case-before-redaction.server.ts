import { and, asc, desc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm';
import type { DbOrTx } from '#db/client.server.ts';
import { caseNotes, correctiveActions, findings, hypotheses, injuries, involvements, logEntries, organisations, photos, reconstructions, scenes, sites, sunReturns, users } from '#db/schema/all.ts';
import type { ActionBeforeRedaction, CaseBeforeRedaction, FindingBeforeRedaction, ItemBeforeRedaction, PhotoBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { reliedWeather } from '#app/domain/relied-weather.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import type { CaseRow } from './case-subject.server.ts';
import { listEvidenceOfCase } from './evidence.server.ts';
import { findCase } from './case-subject.server.ts';
import { standingMoves } from './moves-in-log.server.ts';
import { namesInRecords } from './names-in-records.server.ts';
import { weatherOfCase } from './weather.server.ts';

const iso = (instant: Date | null): string | null => instant?.toISOString() ?? null;

export interface ReleaseSource {
  readonly caseId: string;
  readonly organisationId: string;
  readonly subject: CaseSubject;
  readonly source: CaseBeforeRedaction;
}

/**
 * A visible case with everything that redaction works on. For the services that prepare and check releases: nothing of it
 * goes to a page except to those who may prepare or approve.
 */
export async function readCaseBeforeRedaction(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number }): Promise<ReleaseSource | null> {
  const found = await findCase(db, params.actor, params.caseNumber);
  if (!found) return null;
  const { row, subject } = found;
  const run = await attachedRun(db, row.id);
  const signed = await signedFinding(db, row.id);
  return {
    caseId: row.id,
    organisationId: row.organisationId,
    subject,
    source: {
      ...caseFacts(row),
      ...(await placeOf(db, row)),
      hasDraftFinding: await hasDraft(db, row.id),
      notes: await notesOf(db, row.id),
      photos: await photosOf(db, row.id),
      scene: await sceneOf(db, row.id, run?.sceneVersion ?? null),
      reconstruction: run?.reconstruction ?? null,
      weather: run ? reliedWeather(run.reconstruction.input.sky.dniSeries, await weatherOfCase(db, row.id)) : null,
      hypotheses: await hypothesesOf(db, row.id),
      finding: signed,
      actions: await actionsOf(db, row.id),
      returnDays: await returnDaysOf(db, row.id),
      moves: await movesOf(db, row.id),
      people: await peopleOf(db, row.id),
      staff: await staffOf(db, row),
      items: await itemsOf(db, row.id),
      injuries: await db.select({ treatment: injuries.treatment }).from(injuries).where(eq(injuries.caseId, row.id)).orderBy(asc(injuries.createdAt), asc(injuries.id)),
    },
  };
}

function caseFacts(row: CaseRow) {
  return {
    caseNumber: row.number,
    zone: row.zone,
    position: row.latitudeDeg !== null && row.longitudeDeg !== null ? { latitudeDeg: row.latitudeDeg, longitudeDeg: row.longitudeDeg } : null,
    title: row.title,
    placeDetail: row.placeDetail,
    account: row.narrative,
    interimControl: row.interimControl ?? '',
    interimControlAt: iso(row.interimControlAt),
    eventType: row.eventType,
    anyoneHurt: row.anyoneHurt,
    foundAt: iso(row.foundAt),
    foundPrecision: row.foundPrecision,
    foundClockErrorS: row.foundClockErrorS,
    onsetEarliestAt: iso(row.onsetEarliestAt),
    onsetLatestAt: iso(row.onsetLatestAt),
    onsetBasis: row.onsetBasis,
    reportedAt: row.reportedAt.toISOString(),
    extent: row.extent,
    weatherSeen: row.weatherSeen,
    loss: row.lossEstimate !== null && row.lossCurrency !== null ? { amount: row.lossEstimate, currency: row.lossCurrency } : null,
    privilegedNote: row.privilegedNote,
    legalHoldReason: row.legalHoldReason,
    reporterId: row.reporterId,
  };
}

async function placeOf(db: DbOrTx, row: CaseRow) {
  const [place] = await db
    .select({
      organisationName: organisations.name,
      site: { name: sites.name, code: sites.code, address: sites.address, use: sites.use, latitudeDeg: sites.latitudeDeg, longitudeDeg: sites.longitudeDeg },
    })
    .from(sites)
    .innerJoin(organisations, eq(organisations.id, sites.organisationId))
    .where(eq(sites.id, row.siteId));
  if (!place) throw new Error(`The site of case ${row.number} is missing.`);
  return place;
}

async function attachedRun(db: DbOrTx, caseId: string) {
  const [run] = await db
    .select({ number: reconstructions.number, engineVersion: reconstructions.engineVersion, inputHash: reconstructions.inputHash, resultHash: reconstructions.resultHash, input: reconstructions.input, result: reconstructions.result, sceneVersion: reconstructions.sceneVersion })
    .from(reconstructions)
    .where(and(eq(reconstructions.caseId, caseId), eq(reconstructions.state, 'done'), isNotNull(reconstructions.attachedAt), isNull(reconstructions.supersededAt)))
    .orderBy(desc(reconstructions.number))
    .limit(1);
  if (!run?.result || !run.resultHash) return null;
  const { sceneVersion, result, resultHash, ...rest } = run;
  return { sceneVersion, reconstruction: { ...rest, result, resultHash } };
}

/** The measurements that the attached run was made from, or the newest where there is no run. */
async function sceneOf(db: DbOrTx, caseId: string, version: number | null) {
  const wanted = version === null ? eq(scenes.caseId, caseId) : and(eq(scenes.caseId, caseId), eq(scenes.version, version));
  const [row] = await db.select({ scene: scenes.scene }).from(scenes).where(wanted).orderBy(desc(scenes.version)).limit(1);
  return row?.scene ?? null;
}

async function signedFinding(db: DbOrTx, caseId: string): Promise<FindingBeforeRedaction | null> {
  const [row] = await db
    .select({
      version: findings.version,
      signedAt: findings.signedAt,
      opinion: findings.opinion,
      certainty: findings.certainty,
      classification: findings.classification,
      immediateCauses: findings.immediateCauses,
      underlyingCauses: findings.underlyingCauses,
      rootCauses: findings.rootCauses,
      limits: findings.limits,
      frozenHash: findings.frozenHash,
    })
    .from(findings)
    .where(and(eq(findings.caseId, caseId), eq(findings.state, 'signed')))
    .orderBy(desc(findings.version))
    .limit(1);
  if (!row?.signedAt || !row.frozenHash) return null;
  const { immediateCauses, underlyingCauses, rootCauses, signedAt, frozenHash, ...rest } = row;
  return { ...rest, frozenHash, signedAt: signedAt.toISOString(), causes: [immediateCauses, underlyingCauses, rootCauses].filter((text) => text.trim() !== '').join('\n') };
}

async function hasDraft(db: DbOrTx, caseId: string): Promise<boolean> {
  const rows = await db.select({ id: findings.id }).from(findings).where(and(eq(findings.caseId, caseId), inArray(findings.state, ['draft', 'sent', 'sent-back']))).limit(1);
  return rows.length > 0;
}

async function notesOf(db: DbOrTx, caseId: string) {
  const rows = await db
    .select({ id: caseNotes.id, at: caseNotes.createdAt, authorId: caseNotes.authorId, text: caseNotes.body })
    .from(caseNotes)
    .where(eq(caseNotes.caseId, caseId))
    .orderBy(asc(caseNotes.createdAt), asc(caseNotes.id));
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
}

async function photosOf(db: DbOrTx, caseId: string): Promise<PhotoBeforeRedaction[]> {
  const rows = await db
    .select({
      photoId: photos.id,
      label: photos.label,
      view: photos.view,
      caption: photos.caption,
      altText: photos.altText,
      masks: photos.masks,
      releasable: photos.releasable,
      exif: photos.exif,
      originalKey: photos.originalKey,
      sha256: photos.sha256,
    })
    .from(photos)
    .where(eq(photos.caseId, caseId))
    .orderBy(asc(photos.label), asc(photos.id));
  return rows.map(({ exif, label, ...row }) => ({
    ...row,
    label: label ?? 0,
    exifPlace: exif.latitudeDeg !== null && exif.longitudeDeg !== null ? { latitudeDeg: exif.latitudeDeg, longitudeDeg: exif.longitudeDeg } : null,
  }));
}

function hypothesesOf(db: DbOrTx, caseId: string) {
  return db
    .select({
      id: hypotheses.id,
      kind: hypotheses.kind,
      statement: hypotheses.statement,
      predicts: hypotheses.predicts,
      evidenceFor: hypotheses.evidenceFor,
      evidenceAgainst: hypotheses.evidenceAgainst,
      tests: hypotheses.tests,
      result: hypotheses.result,
    })
    .from(hypotheses)
    .where(eq(hypotheses.caseId, caseId))
    .orderBy(sql`${hypotheses.kind} <> 'focused-sunlight'`, asc(hypotheses.createdAt), asc(hypotheses.id));
}

async function actionsOf(db: DbOrTx, caseId: string): Promise<ActionBeforeRedaction[]> {
  const rows = await db
    .select({
      number: correctiveActions.number,
      title: correctiveActions.title,
      controlLevel: correctiveActions.controlLevel,
      interim: correctiveActions.interim,
      dueOn: correctiveActions.dueOn,
      state: correctiveActions.state,
      effect: correctiveActions.effectNote,
      doneAt: correctiveActions.doneAt,
      verifiedAt: correctiveActions.verifiedAt,
      effectAt: correctiveActions.effectAt,
      cost: correctiveActions.cost,
    })
    .from(correctiveActions)
    .where(eq(correctiveActions.caseId, caseId))
    .orderBy(asc(correctiveActions.number));
  return rows.map(({ cost, doneAt, verifiedAt, effectAt, ...row }) => ({ ...row, doneAt: iso(doneAt), verifiedAt: iso(verifiedAt), effectAt: iso(effectAt), hasCost: cost !== null }));
}

async function returnDaysOf(db: DbOrTx, caseId: string) {
  const rows = await db.select({ on: sunReturns.onDay, bestAt: sunReturns.bestAt, minutes: sunReturns.minutes }).from(sunReturns).where(eq(sunReturns.caseId, caseId)).orderBy(asc(sunReturns.onDay));
  return rows.map((row) => ({ ...row, bestAt: row.bestAt.toISOString() }));
}

/** States reached, from the log, where every move notes the state it led to. */
async function movesOf(db: DbOrTx, caseId: string) {
  const state = sql<CaseState>`${logEntries.after} ->> 'state'`;
  const rows = await db.select({ at: logEntries.at, state }).from(logEntries).where(standingMoves(caseId)).orderBy(asc(logEntries.at), asc(logEntries.sequence));
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
}

async function itemsOf(db: DbOrTx, caseId: string): Promise<ItemBeforeRedaction[]> {
  return (await listEvidenceOfCase(db, caseId)).map(({ item, custody, exams }) => ({
    label: item.label,
    kind: item.kind,
    custody: custody.map((record) => ({ role: record.holderRole, from: record.fromAt.toISOString(), to: iso(record.toAt) })),
    exams: exams.map((exam) => ({ kind: exam.kind, at: exam.performedAt.toISOString(), noticeGiven: exam.noticeAt !== null })),
  }));
}

async function peopleOf(db: DbOrTx, caseId: string) {
  const rows = await db
    .select({ name: involvements.name, email: involvements.email, phone: involvements.phone, ageBand: involvements.ageBand, guardianContact: involvements.guardianContact })
    .from(involvements)
    .where(eq(involvements.caseId, caseId))
    .orderBy(asc(involvements.createdAt), asc(involvements.id));
  return rows.map(({ ageBand, ...person }) => ({ ...person, isChild: ageBand === 'under-16' || ageBand === '16-17' }));
}

/** Everybody with an account in the organisation, those who have left too, whoever signed a note or a line of the log, and names typed into records. */
async function staffOf(db: DbOrTx, row: CaseRow) {
  const accounts = await db.select({ name: users.displayName, email: users.email }).from(users).where(eq(users.organisationId, row.organisationId)).orderBy(asc(users.displayName), asc(users.id));
  const writers = await db.selectDistinct({ name: caseNotes.authorName }).from(caseNotes).where(and(eq(caseNotes.caseId, row.id), isNotNull(caseNotes.authorId)));
  const actors = await db.selectDistinct({ name: logEntries.actorName }).from(logEntries).where(and(eq(logEntries.caseId, row.id), isNotNull(logEntries.actorId)));
  const known = new Set(accounts.map((person) => person.name));
  const typed = await namesInRecords(db, row.id);
  const others = [...new Set([...[...writers, ...actors].map((person) => person.name), ...typed])].filter((name) => !known.has(name)).sort();
  return [...accounts, ...others.map((name) => ({ name, email: null }))];
}
