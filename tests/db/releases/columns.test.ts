import { eq, getTableColumns, getTableName } from 'drizzle-orm';
import type { PgTable } from 'drizzle-orm/pg-core';
import { describe, expect, it } from 'vitest';
import { prepareRelease } from '#app/services/releases/prepare-release.server.ts';
import { db } from '#db/client.server.ts';
import { attachments, caseNotes, cases, correctiveActions, custodyOffers, custodyRecords, evidenceExams, evidenceItems, evidenceNotices, findings, hypotheses, injuries, involvements, noticeReplies, photos, plannedExams, reconstructions, scenes, sites, sunReturns, timelineEvents, weatherRecords, witnessAccounts } from '#db/schema/all.ts';
import { bytesOf, inADay, releaseStage, shareAll } from './stage.ts';

/**
 * What becomes of every column that hangs on a case. `released`: its value leaves as it is. `redacted`: its text leaves
 * line by line, cut. `reduced`: something coarser leaves. `withheld`: nothing does. A column that is in no list fails the
 * test, so that whoever adds one decides here.
 */
type Fate = 'released' | 'redacted' | 'reduced' | 'withheld';

const columns: Readonly<Record<string, { readonly table: PgTable; readonly fates: Readonly<Record<Fate, string>> }>> = {
  cases: {
    table: cases,
    fates: {
      released: 'number zone onsetEarliestAt onsetLatestAt onsetBasis extent weatherSeen foundPrecision foundClockErrorS reportedAt interimControlAt lossEstimate lossCurrency',
      redacted: 'title narrative placeDetail interimControl',
      reduced: 'foundAt eventType anyoneHurt closedAt',
      withheld:
        'id clientId receipt organisationId siteId state latitudeDeg longitudeDeg accuracyM sighting hazardStillPresent foundByMeans interimControlEnds fireServiceAttended potentialConsequence likelihood riskBasis risk ' +
        'privilegedNote legalHold legalHoldReason reporterId guestReport assignedToId duplicateOfId reopenCount closeReason question answer answerDueAt reconstructionWaiver evidenceWaiver effectivenessWaiver noActionReason lesson externalReports version createdAt updatedAt',
    },
  },
  involvements: { table: involvements, fates: { released: '', redacted: '', reduced: '', withheld: 'id caseId role name phone email relation ageBand guardianContact createdAt' } },
  injuries: { table: injuries, fates: { released: '', redacted: '', reduced: 'treatment', withheld: 'id caseId involvementId part kind daysAway restrictedDays description createdAt' } },
  photos: {
    table: photos,
    fates: {
      released: 'view',
      redacted: 'caption altText',
      reduced: 'label masks originalKey sha256 releasable',
      withheld: 'id reportClientId caseId fileName mime bytes widthPx heightPx viewKey thumbnailKey state exif exifAnswer takenAt clockErrorS position madeSmaller marks hashCheckedAt hashCheck uploadedById createdAt',
    },
  },
  case_notes: { table: caseNotes, fates: { released: 'createdAt', redacted: 'body', reduced: 'authorId', withheld: 'id caseId authorName' } },
  scenes: { table: scenes, fates: { released: '', redacted: '', reduced: 'scene', withheld: 'id caseId version note authorId createdAt' } },
  reconstructions: {
    table: reconstructions,
    fates: {
      released: 'number inputHash engineVersion resultHash',
      redacted: '',
      reduced: 'input result',
      withheld: 'id caseId state sceneVersion zoneRules progressDone progressTotal failure note requestedById attachedById attachedAt supersededAt startedAt finishedAt createdAt',
    },
  },
  sun_returns: { table: sunReturns, fates: { released: 'onDay bestAt minutes', redacted: '', reduced: '', withheld: 'id caseId reconstructionId fromAt toAt' } },
  hypotheses: { table: hypotheses, fates: { released: 'kind result', redacted: 'statement predicts evidenceFor evidenceAgainst tests', reduced: '', withheld: 'id caseId testedById createdAt updatedAt' } },
  findings: {
    table: findings,
    fates: {
      released: 'version certainty classification signedAt frozenHash',
      redacted: 'opinion immediateCauses underlyingCauses rootCauses limits',
      reduced: 'state',
      withheld: 'id caseId selectedHypothesisId authorId sentAt reviewerId reviewedAt frozen createdAt updatedAt',
    },
  },
  corrective_actions: {
    table: correctiveActions,
    fates: {
      released: 'number controlLevel interim dueOn state doneAt verifiedAt effectAt',
      redacted: 'title effectNote',
      reduced: 'cost',
      withheld: 'id caseId why ownerId verifierId risk costCurrency proof doneById verifiedById verificationNote effectCheckOn effectById withdrawnReason version createdById createdAt updatedAt',
    },
  },
  attachments: { table: attachments, fates: { released: '', redacted: '', reduced: '', withheld: 'id caseId label title kind class fileName mime bytes sha256 objectKey hashCheckedAt hashCheck uploadedById createdAt' } },
  evidence_items: { table: evidenceItems, fates: { released: 'label kind', redacted: '', reduced: '', withheld: 'id caseId clientId description fromWhere collectedBy collectedAt sealNumber disposal disposalReason createdById createdAt' } },
  custody_records: { table: custodyRecords, fates: { released: 'holderRole fromAt toAt', redacted: '', reduced: '', withheld: 'id itemId clientId sequence previousSequence holderName place purpose condition givenBy receivedBy receiverId recordedById createdAt' } },
  custody_offers: { table: custodyOffers, fates: { released: '', redacted: '', reduced: '', withheld: 'id itemId clientId sequence receiverId holderRole place purpose condition givenBy offeredById answer answerReason answeredAt createdAt' } },
  evidence_exams: { table: evidenceExams, fates: { released: 'kind performedAt', redacted: '', reduced: 'noticeAt', withheld: 'id itemId clientId method result performedBy noticeTo protocolAttachmentId wentAheadReason recordedById createdAt' } },
  planned_exams: { table: plannedExams, fates: { released: '', redacted: '', reduced: '', withheld: 'id itemId clientId method performedBy plannedAt waitingDays tellRoles protocolAttachmentId revision outcome cancelReason examId settledAt settledById plannedById createdAt' } },
  evidence_notices: { table: evidenceNotices, fates: { released: '', redacted: '', reduced: '', withheld: 'id itemId planId clientId partyRole toWhom way sentAt recordedById createdAt' } },
  notice_replies: { table: noticeReplies, fates: { released: '', redacted: '', reduced: '', withheld: 'id noticeId clientId answer note answeredAt recordedById createdAt' } },
  witness_accounts: { table: witnessAccounts, fates: { released: '', redacted: '', reduced: '', withheld: 'id caseId clientId label involvementId takenById takenAt language words readBack speaksOfAt signedAttachmentId createdAt' } },
  timeline_events: { table: timelineEvents, fates: { released: '', redacted: '', reduced: '', withheld: 'id caseId clientId source sourceName readingAt clockErrorS clockErrorBasis what attachmentId createdById withdrawnAt withdrawnReason createdAt' } },
  weather_records: { table: weatherRecords, fates: { released: 'number nature intervalMin', redacted: 'sourceName station', reduced: 'stationDistanceKm values setAsideAt', withheld: 'id caseId kind stationBearingDeg licenceNote fileSha256 mapping valuesSha256 createdById createdAt setAsideById setAsideReason' } },
  sites: { table: sites, fates: { released: 'name use', redacted: '', reduced: '', withheld: 'id organisationId code address latitudeDeg longitudeDeg elevationM zone jurisdiction skyline guestCode createdAt updatedAt' } },
};

const wordsOf = (list: string): string[] => list.split(' ').filter(Boolean);
const everyCase = Object.values(columns).map(({ table, fates }) => ({ name: getTableName(table), table, fates }));

describe('columns', () => {
  it.each(everyCase)('of $name are each in exactly one list', ({ table, fates }) => {
    const listed = Object.values(fates).flatMap(wordsOf);
    expect(listed.toSorted()).toEqual(Object.keys(getTableColumns(table)).toSorted());
  });
});

/** Columns of plain text whose value a test may set to anything. */
function plainText(table: PgTable, names: readonly string[]): string[] {
  const all = getTableColumns(table);
  return names.filter((name) => {
    const column = all[name];
    return column?.getSQLType() === 'text' && !column.enumValues && !['receipt', 'zone', 'sha256', 'originalKey', 'inputHash', 'resultHash', 'frozenHash', 'engineVersion', 'onDay', 'lossCurrency'].includes(name);
  });
}

describe('text in every column', () => {
  it('leaves where the list says so, and nowhere else', async () => {
    const stage = await releaseStage();
    // Only a record that was set aside may bear a reason for it.
    await db.update(weatherRecords).set({ setAsideAt: new Date(), setAsideReason: 'replaced below' }).where(eq(weatherRecords.caseId, stage.caseId));
    const withheld: string[] = [];
    const leaving: string[] = [];
    let count = 0;
    for (const { name, table, fates } of everyCase) {
      const mark = (column: string) => `${name} ${column} marker${(count += 1)}qx`;
      const kept = plainText(table, wordsOf(fates.withheld)).map((column) => [column, mark(column)] as const);
      const out = plainText(table, [...wordsOf(fates.redacted), ...wordsOf(fates.released)]).map((column) => [column, mark(column)] as const);
      if (kept.length + out.length === 0) continue;
      // Signed findings, finished runs, custody, plans, notices and accounts refuse to be written again; the stage's own text stands for theirs.
      if (['findings', 'reconstructions', 'custody_records', 'custody_offers', 'evidence_exams', 'planned_exams', 'evidence_notices', 'notice_replies', 'witness_accounts'].includes(name)) continue;
      const id = getTableColumns(table)['caseId'];
      const own = name === 'sites' ? eq(sites.id, stage.house.site.id) : id ? eq(id, stage.caseId) : eq(cases.id, stage.caseId);
      await db.update(table).set(Object.fromEntries([...kept, ...out])).where(own);
      withheld.push(...kept.map(([, text]) => text));
      leaving.push(...out.map(([, text]) => text));
    }
    expect(withheld.length).toBeGreaterThan(25);
    expect(leaving.length).toBeGreaterThan(8);
    const number = await prepareRelease({ actor: stage.house.investigator, caseNumber: stage.caseNumber, audience: 'insurer', recipientOrganisationId: stage.insurer.id, changeNote: 'First release', expires: { at: inADay() }, decisions: await shareAll(stage), basis: null });
    const { text } = await bytesOf(stage, number);
    const tail = (marker: string) => marker.split(' ').at(-1) ?? marker;
    expect(withheld.filter((marker) => text.includes(tail(marker)))).toEqual([]);
    expect(leaving.filter((marker) => !text.includes(tail(marker)))).toEqual([]);
  });
});
