import { randomInt, randomUUID } from 'node:crypto';
import type { DemoCase } from '#fixtures/demo/demo-case.ts';
import type { Transaction } from '#db/client.server.ts';
import { caseNotes, cases, injuries, involvements, logEntries, scenes } from '#db/schema/all.ts';
import { seedActions, seedFinding } from './finding-and-actions.ts';
import { seedEvidence } from './evidence.ts';
import { moment } from './moment.ts';
import { pick } from './people-and-sites.ts';
import type { DemoPlaces } from './people-and-sites.ts';
import { seedPhotos } from './photos.ts';
import { seedRun } from './runs.ts';
import { seedWeather } from './weather.ts';

const letters = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789';
const draw = (count: number) => Array.from({ length: count }, () => letters[randomInt(letters.length)]).join('');
const hourMs = 3_600_000;

/** One demonstration case with everything that hangs from it. `knownCaseIds` holds those seeded before. */
export async function seedCase(tx: Transaction, demo: DemoCase, places: DemoPlaces, knownCaseIds: ReadonlyMap<number, string>, now: Date): Promise<string> {
  const site = pick(places.sites, demo.siteCode);
  const at = (local: string) => moment(local, site.zone);
  const reportedAt = at(demo.reportedLocal);
  const investigatorId = demo.investigator ? pick(places.userIds, demo.investigator) : null;
  const reporterId = demo.reporter === 'guest' ? null : pick(places.userIds, demo.reporter);
  const clientId = randomUUID();
  const [row] = await tx
    .insert(cases)
    .values({
      number: demo.number,
      clientId,
      receipt: `${draw(2)}-${draw(4)}-${draw(2)}`,
      organisationId: pick(places.organisationIds, 'tallowmere'),
      siteId: site.id,
      state: demo.state,
      title: demo.title,
      narrative: demo.narrative,
      placeDetail: demo.placeDetail,
      latitudeDeg: site.latitudeDeg,
      longitudeDeg: site.longitudeDeg,
      accuracyM: 25,
      zone: site.zone,
      sighting: demo.sighting,
      eventType: demo.eventType,
      anyoneHurt: demo.anyoneHurt,
      hazardStillPresent: demo.hazardStillPresent,
      foundAt: demo.found.local ? at(demo.found.local) : null,
      foundPrecision: demo.found.precision,
      foundByMeans: demo.found.means,
      foundClockErrorS: demo.found.clockErrorS ?? 0,
      onsetEarliestAt: demo.onset ? at(demo.onset.earliest) : null,
      onsetLatestAt: demo.onset ? at(demo.onset.latest) : null,
      onsetBasis: demo.onset?.basis ?? null,
      extent: demo.extent ?? null,
      weatherSeen: demo.weatherSeen ?? null,
      interimControl: demo.interimControl?.words ?? null,
      interimControlAt: demo.interimControl ? reportedAt : null,
      interimControlEnds: demo.interimControl?.ends ?? null,
      lossEstimate: demo.loss?.amount ?? null,
      lossCurrency: demo.loss?.currency ?? null,
      risk: demo.risk ?? null,
      riskBasis: demo.riskBasis ?? null,
      reporterId,
      guestReport: demo.reporter === 'guest',
      assignedToId: investigatorId,
      duplicateOfId: demo.duplicateOf ? (knownCaseIds.get(demo.duplicateOf) ?? null) : null,
      reopenCount: demo.reopenCount ?? 0,
      closeReason: demo.closed?.reason ?? null,
      question: demo.question ?? null,
      answerDueAt: demo.question ? new Date(reportedAt.getTime() + 5 * 24 * hourMs) : null,
      lesson: demo.closed?.lesson ?? null,
      externalReports: demo.closed ? 'Checked against the local rule: not needed.' : null,
      reportedAt,
      closedAt: demo.closed ? at(demo.closed.local) : null,
      createdAt: reportedAt,
    })
    .returning({ id: cases.id });
  if (!row) throw new Error(`Case ${demo.number} was not stored.`);
  const caseId = row.id;
  if (demo.scene) await tx.insert(scenes).values({ caseId, version: 1, scene: demo.scene, authorId: investigatorId, note: 'Measured on site', createdAt: new Date(reportedAt.getTime() + 26 * hourMs) });
  await seedPeopleOfCase(tx, demo, caseId, site.zone, places);
  if (demo.photoKey !== null) await seedPhotos(tx, { photoKey: demo.photoKey, caseId, clientId, zone: site.zone, uploadedById: reporterId, releasable: demo.released !== undefined });
  const runAt = new Date(reportedAt.getTime() + 50 * hourMs);
  if (demo.runs && investigatorId) {
    await seedRun(tx, demo, { caseId, site, weather: await seedWeather(tx, demo, { caseId, investigatorId, at: new Date(reportedAt.getTime() + 40 * hourMs) }), investigatorId, at: runAt, recurrenceTo: new Date(now.getTime() + 400 * 24 * hourMs) });
  }
  await seedEvidence(tx, demo.number, { caseId, zone: site.zone, places });
  await seedFinding(tx, demo, { caseId, zone: site.zone, places });
  await seedActions(tx, demo, { caseId, zone: site.zone, places });
  await seedLog(tx, demo, { caseId, reporterId, investigatorId, reportedAt, runAt, zone: site.zone, places });
  return caseId;
}

async function seedPeopleOfCase(tx: Transaction, demo: DemoCase, caseId: string, zone: string, places: DemoPlaces): Promise<void> {
  let injuredId: string | null = null;
  for (const person of demo.people ?? []) {
    const [row] = await tx
      .insert(involvements)
      .values({ caseId, role: person.role, name: person.name ?? null, phone: person.phone ?? null, ageBand: person.ageBand ?? 'unknown', relation: person.relation ?? null })
      .returning({ id: involvements.id });
    if (person.role === 'injured') injuredId = row?.id ?? null;
  }
  if (demo.injury) await tx.insert(injuries).values({ caseId, involvementId: injuredId, ...demo.injury });
  for (const note of demo.notes ?? []) {
    await tx.insert(caseNotes).values({ caseId, authorId: pick(places.userIds, note.by), authorName: pick(places.userNames, note.by), body: note.body, createdAt: moment(note.local, zone) });
  }
}

interface LogTarget {
  readonly caseId: string;
  readonly reporterId: string | null;
  readonly investigatorId: string | null;
  readonly reportedAt: Date;
  readonly runAt: Date;
  readonly zone: string;
  readonly places: DemoPlaces;
}

/** The story of the case as log lines, at the times at which it is said to have happened. */
async function seedLog(tx: Transaction, demo: DemoCase, target: LogTarget): Promise<void> {
  const { places, zone } = target;
  const organisationId = pick(places.organisationIds, 'tallowmere');
  const name = (key: string) => pick(places.userNames, key);
  const id = (key: string) => pick(places.userIds, key);
  const later = (hours: number) => new Date(target.reportedAt.getTime() + hours * hourMs);
  const lines: { at: Date; actorId: string | null; actorName: string; event: string; summary: string; state?: string; reason?: string }[] = [];
  lines.push({ at: target.reportedAt, actorId: target.reporterId, actorName: demo.reporter === 'guest' ? 'Guest' : name(demo.reporter), event: 'case.reported', summary: 'Reported', state: 'reported' });
  const triager = demo.investigator ?? 'ruta';
  if (demo.state !== 'reported') lines.push({ at: later(0.5), actorId: id(triager), actorName: name(triager), event: 'case.open-triage', summary: 'First look', state: 'triage' });
  if (demo.state === 'returned') lines.push({ at: later(1), actorId: id(triager), actorName: name(triager), event: 'case.return', summary: 'Returned with one question', state: 'returned', reason: demo.question ?? '' });
  if (demo.state === 'duplicate') lines.push({ at: later(1), actorId: id(triager), actorName: name(triager), event: 'case.mark-duplicate', summary: `Duplicate of case ${demo.duplicateOf}`, state: 'duplicate', reason: 'Same corner, same quarter of an hour; both accounts kept.' });
  if (demo.investigator) {
    lines.push({ at: later(2), actorId: id(demo.investigator), actorName: name(demo.investigator), event: 'case.accept', summary: 'Investigation opened', state: 'investigation' });
    if (demo.runs) lines.push({ at: target.runAt, actorId: id(demo.investigator), actorName: name(demo.investigator), event: 'reconstruction.attached', summary: 'Reconstruction 1 run and attached' });
  }
  if (demo.finding?.sentLocal) lines.push({ at: moment(demo.finding.sentLocal, zone), actorId: id(demo.finding.author), actorName: name(demo.finding.author), event: 'case.send-findings', summary: 'Finding sent to review, version 1', state: 'findings' });
  if (demo.finding?.signedLocal && demo.finding.reviewer) lines.push({ at: moment(demo.finding.signedLocal, zone), actorId: id(demo.finding.reviewer), actorName: name(demo.finding.reviewer), event: 'case.sign', summary: 'Finding signed, version 1', state: 'corrective-action' });
  for (const [index, action] of (demo.actions ?? []).entries()) {
    if (action.doneLocal) lines.push({ at: moment(action.doneLocal, zone), actorId: id(action.owner), actorName: name(action.owner), event: 'action.mark-done', summary: `Action ${index + 1} marked done` });
    if (action.verifiedLocal) lines.push({ at: moment(action.verifiedLocal, zone), actorId: id(action.verifier), actorName: name(action.verifier), event: 'action.verify', summary: `Action ${index + 1} verified` });
    if (action.effect) lines.push({ at: moment(action.effect.local, zone), actorId: id(action.verifier), actorName: name(action.verifier), event: 'action.record-effective', summary: `Action ${index + 1} shown effective`, reason: action.effect.note });
  }
  if (demo.closed) lines.push({ at: moment(demo.closed.local, zone), actorId: id('joss'), actorName: name('joss'), event: 'case.close', summary: 'Closed', state: 'closed', reason: demo.closed.lesson ?? 'Recorded only.' });
  lines.sort((a, b) => a.at.getTime() - b.at.getTime());
  await tx.insert(logEntries).values(
    lines.map(({ state, reason, ...line }) => ({ ...line, organisationId, caseId: target.caseId, subject: 'cases', subjectId: target.caseId, reason: reason ?? '', ...(state ? { after: { state } } : {}) })),
  );
}
