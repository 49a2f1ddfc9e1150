import { attachmentCode, attachmentKindLabels } from './attachment.ts';
import type { AttachmentClass, AttachmentKind } from './attachment.ts';
import type { CaseBeforeRedaction } from './case-before-redaction.ts';
import { actionStateLabels, controlLevelLabels } from './corrective-action.ts';
import { custodyLine } from './evidence-view.ts';
import type { ItemFacts } from './evidence-view.ts';
import type { Certainty, Classification } from './finding.ts';
import { certaintyLabels, classificationLabels } from './finding.ts';
import { hypothesisKindLabels, hypothesisResultLabels, testLabels, testNames, testResultLabels } from './hypothesis.ts';
import { eventTypeLabels, extentLabels, onsetBasisLabels, photoViewLabels, weatherSeenLabels } from './incident.ts';
import { formatDayClock, formatIsoDay } from './local-time.ts';
import { releasedMeasurements } from './released-measurements.ts';
import { authorNames } from './released-parts.ts';
import { reportedItem } from './reported-item.ts';
import type { ReportedFinding, ReportedHypothesis, ReportedRun, ReportSource, ReportTerm } from './report-source.ts';
import { timelineRows, trueTime } from './timeline.ts';
import type { Happening } from './timeline.ts';
import { witnessNames } from './witness.ts';

/** A version of the finding as the report needs it. */
export interface ReportFinding {
  readonly version: number;
  readonly state: 'draft' | 'sent' | 'sent-back' | 'signed';
  readonly opinion: string;
  readonly certainty: Certainty;
  readonly classification: Classification;
  readonly immediateCauses: string;
  readonly underlyingCauses: string;
  readonly rootCauses: string;
  readonly limits: string;
  readonly author: string;
  readonly reviewer: string | null;
  readonly signedAt: Date | null;
  readonly frozenHash: string | null;
}

export interface InHouseParts {
  readonly source: CaseBeforeRedaction;
  readonly finding: ReportFinding | null;
  /** False while a reviewer has not asked for the author's opinion. */
  readonly opinionShown: boolean;
  readonly run: ReportedRun | null;
  readonly happenings: readonly Happening[];
  readonly accounts: readonly { readonly label: number; readonly involvementId: string; readonly takenAt: Date; readonly language: string; readonly words: string; readonly readBack: boolean; readonly signedAttachmentId: string | null }[];
  readonly items: readonly ItemFacts[];
  readonly documents: readonly { readonly label: number; readonly title: string; readonly kind: AttachmentKind; readonly class: AttachmentClass; readonly sha256: string }[];
  readonly photos: readonly { readonly label: number | null; readonly takenAt: Date | null; readonly clockErrorS: number; readonly sha256: string; readonly caption: string; readonly view: keyof typeof photoViewLabels | null }[];
  /** When the report was put together. */
  readonly at: Date;
}

/** Everything of a case that its own report says. Witnesses and holders stand in it by letter and part, never by name. */
export function inHouseReport(parts: InHouseParts): ReportSource {
  const { source, finding, run, at } = parts;
  const { zone, caseNumber } = source;
  return {
    caseNumber,
    title: source.title,
    subtitle: [source.site.name, source.placeDetail.split('\n')[0]].filter(Boolean).join(', '),
    zone,
    dateUtc: (finding?.signedAt ?? at).toISOString(),
    running: finding ? `Case ${caseNumber}, finding version ${finding.version}` : `Case ${caseNumber}, no finding yet`,
    foot: [run ? `run ${run.number}, engine ${run.engineVersion}, input ${run.inputHash?.slice(0, 12) ?? ''}` : '', finding?.frozenHash ? `signed SHA-256 ${finding.frozenHash}` : ''].filter(Boolean).join(' · '),
    standing: standingOf(parts),
    scope: scopeOf(source, finding),
    people: peopleOf(source, finding),
    documents: parts.documents.filter((one) => one.class !== 'legal').map((one) => ({ code: attachmentCode(one.label), title: one.class === 'personal' ? 'a personal document, kept apart' : one.title, kind: attachmentKindLabels[one.kind], sha256: one.sha256 })),
    scene: sceneOf(source),
    account: source.account,
    notes: source.notes.map((note, index) => ({ by: `${authorNames(source)[index] ?? ''}, ${formatDayClock(new Date(note.at), zone)}`, text: note.text })),
    chronology: timelineRows(parts.happenings.filter((one) => !one.withdrawn), zone).map(({ day, trueTime: when, reading, correction, what, source: from, basis }) => ({ day, trueTime: when, reading, correction, what, source: [from, basis].filter(Boolean).join('; ') })),
    accounts: accountsOf(parts),
    evidence: parts.items.map((one) => reportedItem(one, caseNumber, zone, at)),
    custodyLines: parts.items.map((one) => custodyLine(one, caseNumber)),
    measurements: releasedMeasurements(source.scene),
    run,
    returns: source.returnDays,
    hypotheses: source.hypotheses.map((one) => hypothesisOf(one, parts.opinionShown)),
    finding: finding && parts.opinionShown ? findingOf(finding, zone) : null,
    actions: source.actions.map((action) => ({ number: action.number, title: action.title, level: controlLevelLabels[action.controlLevel], due: formatIsoDay(action.dueOn), state: actionStateLabels[action.state] })),
    photos: parts.photos.map((photo) => ({ label: `${caseNumber}-${photo.label ?? 0}`, view: photo.view ? photoViewLabels[photo.view] : 'not stated', caption: photo.caption, taken: photo.takenAt ? formatDayClock(trueTime(photo.takenAt, photo.clockErrorS), zone) : 'not stated', sha256: photo.sha256 })),
  };
}

function standingOf({ finding, opinionShown }: InHouseParts): string | null {
  if (!finding) return 'No finding has been written yet. What follows are records and computations, not an opinion.';
  if (finding.state === 'signed') return null;
  if (!opinionShown) return 'The opinion of the author and the results of the hypotheses are left out until the reviewer asks for them.';
  return 'Not yet reviewed. An author’s opinion before technical review is a draft.';
}

function scopeOf(source: CaseBeforeRedaction, finding: ReportFinding | null): ReportTerm[] {
  const window = source.onsetEarliestAt && source.onsetLatestAt ? `between ${formatDayClock(new Date(source.onsetEarliestAt), source.zone)} and ${formatDayClock(new Date(source.onsetLatestAt), source.zone)}` : 'in a window that is not stated yet';
  return [
    { term: 'Asked by', value: source.organisationName },
    { term: 'Question put', value: `Could focused sunlight have made this mark ${window}, and what else could?` },
    { term: 'Kind of event', value: source.eventType ? eventTypeLabels[source.eventType] : 'Not stated' },
    { term: 'State of the finding', value: finding ? (finding.state === 'signed' ? `version ${finding.version}, signed` : `version ${finding.version}, not signed`) : 'none' },
    { term: 'For whom', value: 'For those who work on the case. A file for others is a release, with names and places taken out.' },
  ];
}

function peopleOf(source: CaseBeforeRedaction, finding: ReportFinding | null): ReportTerm[] {
  if (!finding) return [{ term: 'Author', value: 'none yet' }];
  return [
    { term: 'Author', value: finding.author },
    { term: 'Technical reviewer', value: finding.reviewer ?? 'none yet', ...(finding.signedAt ? { note: `signed ${formatDayClock(finding.signedAt, source.zone)}` } : {}) },
    { term: 'Qualifications', value: 'Not held in the register. The author states them when the report is given in evidence.' },
  ];
}

function sceneOf(source: CaseBeforeRedaction): ReportTerm[] {
  return [
    { term: 'Site', value: source.site.name },
    { term: 'Place', value: source.placeDetail || 'not stated' },
    { term: 'Window', value: source.onsetBasis ? `basis: ${onsetBasisLabels[source.onsetBasis].toLowerCase()}` : 'basis not stated' },
    { term: 'Extent', value: source.extent ? extentLabels[source.extent] : 'Not stated' },
    { term: 'Sky, as seen', value: source.weatherSeen ? weatherSeenLabels[source.weatherSeen] : 'Not stated' },
    { term: 'Interim control', value: source.interimControl || 'none recorded' },
  ];
}

function accountsOf({ accounts, source }: InHouseParts): ReportSource['accounts'] {
  const names = witnessNames(accounts.map((account) => account.involvementId));
  return accounts.map((account, index) => ({
    heading: `Account ${account.label}: ${names[index] ?? ''}`,
    meta: `Taken ${formatDayClock(account.takenAt, source.zone)}, in ${account.language}; ${account.readBack ? 'read back' : 'not read back'}; ${account.signedAttachmentId ? 'signed copy kept' : 'no signed copy'}.`,
    words: account.words,
  }));
}

function hypothesisOf(one: CaseBeforeRedaction['hypotheses'][number], shown: boolean): ReportedHypothesis {
  return {
    heading: hypothesisKindLabels[one.kind],
    result: shown ? hypothesisResultLabels[one.result] : null,
    statement: one.statement,
    predicts: one.predicts,
    evidenceFor: one.evidenceFor,
    evidenceAgainst: one.evidenceAgainst,
    tests: shown ? testNames.map((name) => ({ label: testLabels[name], result: testResultLabels[one.tests[name].result], why: one.tests[name].why })) : [],
  };
}

function findingOf(finding: ReportFinding, zone: string): ReportedFinding {
  const cause = (term: string, value: string) => ({ term, value: value.trim() === '' ? 'not stated' : value });
  return {
    version: finding.version,
    by: finding.signedAt ? `Version ${finding.version}, by ${finding.author}, signed by ${finding.reviewer ?? 'a reviewer'} ${formatDayClock(finding.signedAt, zone)}.` : `Version ${finding.version}, by ${finding.author}, not signed.`,
    opinion: finding.opinion,
    certainty: certaintyLabels[finding.certainty],
    classification: classificationLabels[finding.classification],
    causes: [cause('Immediate causes', finding.immediateCauses), cause('Underlying causes', finding.underlyingCauses), cause('Root causes', finding.rootCauses)],
    limits: finding.limits,
    frozenHash: finding.frozenHash,
  };
}
