import { actionStateLabels, controlLevelLabels } from './corrective-action.ts';
import { evidenceKindLabels } from './evidence.ts';
import { certaintyLabels, classificationLabels } from './finding.ts';
import { hypothesisKindLabels, hypothesisResultLabels, testLabels, testNames, testResultLabels } from './hypothesis.ts';
import { extentLabels, onsetBasisLabels, photoViewLabels, weatherSeenLabels } from './incident.ts';
import { formatClock, formatDay, formatDayClock, formatIsoDay } from './local-time.ts';
import { releasedItems } from './release-document.ts';
import { audienceLabels } from './release-policy.ts';
import type { Audience } from './release-policy.ts';
import type { RedactedText, ReleasedCase, WithheldCounts } from './released-case.ts';
import { releasedEventLabels, withheldClasses, withheldLabels } from './released-case.ts';
import type { ReportSource, ReportTerm } from './report-source.ts';
import { noDrawing } from './run-drawing.ts';
import type { WeatherPart } from './weather-part.ts';

export interface ReleasedReport {
  readonly released: ReleasedCase;
  readonly withheld: WithheldCounts;
  readonly audience: Audience;
  /** SHA-256 of the released case. */
  readonly releasedHash: string;
}

/** The words of a redacted text for print: what was taken out is named by its class and shows nothing of its length. */
export const printedText = (text: RedactedText): string => text.map((piece) => ('text' in piece ? piece.text : `[withheld: ${withheldLabels[piece.withheld]}]`)).join('');

/** The report of a released case, made from the released case alone: it holds nothing that the reader does not get as data. */
export function releasedReport({ released, withheld, audience, releasedHash }: ReleasedReport): ReportSource {
  const { zone, finding, reconstruction } = released;
  const title = printedText(released.title);
  return {
    caseNumber: released.caseNumber,
    title: title === '' ? `Case ${released.caseNumber}` : title,
    subtitle: [released.siteName ?? 'a place that is not named', releasedEventLabels[released.eventType].toLowerCase()].join(', '),
    zone,
    // The latest moment that the released case tells of: the file says nothing of when it was made.
    dateUtc: latestOf(released),
    running: `Case ${released.caseNumber}, redacted file`,
    foot: `released case SHA-256 ${releasedHash}`,
    standing: `A redacted file for ${audienceLabels[audience].toLowerCase()}. ${withheldWords(withheld)}`,
    scope: [
      { term: 'For', value: audienceLabels[audience] },
      { term: 'Kind of event', value: releasedEventLabels[released.eventType] },
      { term: 'Injury', value: released.injury },
      ...(released.loss ? [{ term: 'Loss, as estimated', value: `${released.loss.amount.toLocaleString('en-GB')} ${released.loss.currency}` }] : []),
      { term: 'Finding', value: finding ? `version ${finding.version}, signed ${formatDay(new Date(finding.signedAt), zone)}` : 'none signed yet' },
    ],
    people: [{ term: 'Author', value: 'an investigator of the operator' }, { term: 'Technical reviewer', value: finding ? 'another person of the operator, who signed' : 'none yet' }],
    documents: [],
    scene: sceneOf(released),
    account: printedText(released.account),
    notes: released.notes.map((note) => ({ by: `${note.by}, ${formatDayClock(new Date(note.at), zone)}`, text: printedText(note.text) })),
    chronology: released.chronology.map((row) => ({ day: formatDay(new Date(row.at), zone), trueTime: formatClock(new Date(row.at), zone), reading: '', correction: '', what: row.what, source: '' })),
    accounts: [],
    evidence: releasedItems(released).map((item) => ({
      code: item.code,
      description: item.kind,
      inBrief: true,
      kind: '',
      seal: '',
      fromWhere: '',
      custody: item.custody.map((record) => ({ ...record, purpose: '', condition: '' })),
      exams: item.exams.map((exam) => ({ when: exam.when, kind: exam.kind, method: '', result: '', notice: exam.notice })),
      planned: [],
      notices: [],
    })),
    custodyLines: (released.evidence ?? []).filter((item) => item.custody.length > 0).map((item) => ({
      code: item.code,
      description: evidenceKindLabels[item.kind],
      seal: '',
      holders: item.custody.map((record) => ({ role: record.role, from: new Date(record.from), to: record.to ? new Date(record.to) : null })),
      exams: item.exams.map((exam) => ({ kind: exam.kind, at: new Date(exam.at) })),
      planned: [],
    })),
    measurements: released.measurements,
    run: reconstruction && { number: reconstruction.number, engineVersion: reconstruction.engineVersion, zoneRules: '', inputHash: reconstruction.inputHash, resultHash: reconstruction.resultHash, result: reconstruction.result, drawing: reconstruction.drawing ?? noDrawing, weather: weatherOf(released) },
    returns: released.returnDays,
    hypotheses: released.hypotheses.map((one) => ({
      heading: hypothesisKindLabels[one.kind],
      result: hypothesisResultLabels[one.result],
      statement: printedText(one.statement),
      predicts: printedText(one.predicts),
      evidenceFor: printedText(one.evidenceFor),
      evidenceAgainst: printedText(one.evidenceAgainst),
      tests: testNames.map((name) => ({ label: testLabels[name], result: testResultLabels[one.tests[name].result], why: printedText(one.tests[name].why) })),
    })),
    finding: finding && {
      version: finding.version,
      by: `Version ${finding.version}, signed ${formatDayClock(new Date(finding.signedAt), zone)}.`,
      opinion: printedText(finding.opinion),
      certainty: certaintyLabels[finding.certainty],
      classification: classificationLabels[finding.classification],
      causes: [{ term: 'Causes', value: printedText(finding.causes) || 'not stated' }],
      limits: printedText(finding.limits),
      frozenHash: finding.frozenHash,
    },
    actions: released.actions.map((action) => ({ number: action.number, title: printedText(action.title), level: controlLevelLabels[action.controlLevel], due: formatIsoDay(action.dueOn), state: actionStateLabels[action.state] })),
    photos: released.photos.map((photo) => ({ label: photo.fileName, view: photo.view ? photoViewLabels[photo.view] : 'not stated', caption: printedText(photo.caption), taken: 'not stated', sha256: 'in the manifest' })),
  };
}

/** Releases made before the weather was part of them hold none. */
export function weatherOf({ weather }: Pick<ReleasedCase, 'weather'>): WeatherPart | null {
  return weather ? { ...weather, source: printedText(weather.source), bearingDeg: null } : null;
}

function sceneOf(released: ReleasedCase): ReportTerm[] {
  return [
    { term: 'Site', value: released.siteName ?? 'not named' },
    { term: 'Place', value: printedText(released.placeDetail) || 'not stated' },
    { term: 'Window', value: released.onsetBasis ? `basis: ${onsetBasisLabels[released.onsetBasis].toLowerCase()}` : 'basis not stated' },
    { term: 'Extent', value: released.extent ? extentLabels[released.extent] : 'Not stated' },
    { term: 'Sky, as seen', value: released.weatherSeen ? weatherSeenLabels[released.weatherSeen] : 'Not stated' },
    { term: 'Interim control', value: printedText(released.interimControl) || 'none recorded' },
  ];
}

function latestOf(released: ReleasedCase): string {
  return [released.reportedAt, ...released.chronology.map((row) => row.at), ...(released.finding ? [released.finding.signedAt] : [])].reduce((latest, at) => (at > latest ? at : latest));
}

function withheldWords(withheld: WithheldCounts): string {
  const counts = withheldClasses.filter((one) => withheld[one] > 0).map((one) => `${withheld[one]} ${withheldLabels[one]}`);
  return counts.length === 0 ? 'Nothing was withheld.' : `Withheld, by class: ${counts.join(', ')}.`;
}
