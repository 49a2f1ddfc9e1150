import { custodyFigure } from './figures/custody-figure.ts';
import { windowFigure, windowRows } from './figures/window-figure.ts';
import { formatDayClock } from './local-time.ts';
import { FigureCount, heading, plain, serif, small, sub, tableIf } from './report-blocks.ts';
import type { ReportBlock, ReportDocument } from './report-document.ts';
import type { ReportedHypothesis, ReportedItem, ReportedRun, ReportSource } from './report-source.ts';
import { sunPart } from './report-sun-part.ts';

const nothing = small;

/** Cautions that stand in every report. */
const cautions = [
  'Eyes: do not look at the sun, at its reflection, or along the beam, even with sunglasses. Do not look through a lens or telescope toward the sun. Do not put a hand, face or card into the beam.',
  'Do not re-enact: do not focus sunlight on anything that can burn to see if it would. Use geometry and, if a test is needed, a competent laboratory.',
  'Estimates from the values entered. Not a certificate, design approval, legal cause, or proof that a place is safe. A not sunlit result is only as good as the bearing, time and skyline.',
  'Follow your local law, fire service, codes and licensed practitioners.',
] as const;

/**
 * The report of a case in the customary order: scope, people, documents, scene, chronology, accounts, evidence,
 * measurements, sun and weather, hypotheses, opinion, classification, recommendations, appendices.
 */
export function buildReport(source: ReportSource): ReportDocument {
  const figures = new FigureCount();
  return {
    format: 1,
    title: source.title,
    subtitle: source.subtitle,
    running: source.running,
    foot: source.foot,
    language: 'en-GB',
    dateUtc: source.dateUtc,
    blocks: [
      ...(source.standing ? [{ kind: 'caution' as const, text: source.standing }] : []),
      ...windowPart(source, figures),
      ...scopePart(source),
      ...scenePart(source),
      ...evidencePart(source, figures),
      ...measurementPart(source),
      ...sunPart(source, figures),
      heading('Hypotheses and tests'),
      ...(source.hypotheses.length === 0 ? [nothing('None is on record for this reader.')] : source.hypotheses.flatMap(hypothesisPart)),
      ...findingPart(source),
      ...recommendationPart(source),
      heading('Cautions'),
      ...cautions.map((text): ReportBlock => ({ kind: 'caution', text })),
      ...appendixPart(source),
    ],
  };
}

function windowPart({ run, zone }: ReportSource, figures: FigureCount): ReportBlock[] {
  if (!run) return [];
  return [
    ...figures.place((size) => windowFigure(run.result, { ...size, zone })),
    { kind: 'table', caption: 'The window in words', head: ['From', 'To', 'Minutes', 'Sun on the mark', 'Reason'], widths: [1.3, 1.3, 0.8, 1.2, 3], rows: windowRows(run.result, zone) },
  ];
}

function scopePart({ scope, people, documents }: ReportSource): ReportBlock[] {
  return [
    heading('Instruction and scope'),
    { kind: 'facts', rows: scope },
    heading('Who'),
    { kind: 'facts', rows: people },
    heading('Documents relied on'),
    documents.length === 0 ? nothing('None is named.') : { kind: 'table', caption: 'Documents', head: ['No.', 'Title', 'Kind', 'SHA-256'], widths: [0.5, 2.4, 1.6, 3], rows: documents.map((document) => [document.code, document.title, document.kind, document.sha256]) },
  ];
}

function scenePart({ scene, account, notes, chronology, accounts }: ReportSource): ReportBlock[] {
  return [
    heading('Scene and layout'),
    { kind: 'facts', rows: scene },
    sub('As reported'),
    account.trim() === '' ? nothing('No account.') : serif(account),
    ...notes.flatMap((note) => [small(`Note by ${note.by}`), serif(note.text)]),
    heading('Chronology'),
    small('True time is the reading less the error of the clock that it was read from.'),
    chronology.length === 0 ? nothing('Nothing is on record.') : chronology.every((row) => row.reading === '') ? { kind: 'table', caption: 'Chronology', head: ['Day', 'True time', 'What'], widths: [1.2, 0.9, 4], rows: chronology.map((row) => [row.day, row.trueTime, row.what]) } : { kind: 'table', caption: 'Chronology', head: ['Day', 'True time', 'Clock read', 'Correction', 'What', 'Source'], widths: [1.2, 0.9, 1.1, 1, 2.6, 2], rows: chronology.map((row) => [row.day, row.trueTime, row.reading, row.correction, row.what, row.source]) },
    heading('Accounts of witnesses'),
    ...(accounts.length === 0 ? [nothing('None is in this report.')] : accounts.flatMap((one) => [sub(one.heading), small(one.meta), serif(one.words)])),
  ];
}

function evidencePart({ evidence, custodyLines, zone, dateUtc }: ReportSource, figures: FigureCount): ReportBlock[] {
  if (evidence.length === 0) return [heading('Evidence and custody'), nothing('No item is in this report.')];
  return [
    heading('Evidence and custody'),
    small('Holders are named by their part in the matter. Each record begins at the moment at which the one before it ends.'),
    ...(custodyLines.length > 0 ? figures.place((size) => custodyFigure(custodyLines, { ...size, zone, now: new Date(dateUtc), endWords: 'end of the record' })) : []),
    ...evidence.flatMap(itemPart),
  ];
}

function itemPart(item: ReportedItem): ReportBlock[] {
  const about = item.inBrief ? '' : [item.kind, item.seal, `from ${item.fromWhere}`].join('; ');
  const [custody, exams] = [`Custody of ${item.code}`, `Examinations of ${item.code}`];
  return [
    sub(`${item.code}: ${item.description}`),
    ...(about === '' ? [] : [small(about)]),
    ...(item.inBrief ? tableIf(custody, ['From', 'To', 'Holder'], [1.5, 1.5, 3], item.custody.map((record) => [record.from, record.to, record.holder])) : tableIf(custody, ['From', 'To', 'Holder', 'Purpose', 'Condition taken over'], [1.5, 1.5, 1.4, 2, 2], item.custody.map((record) => [record.from, record.to, record.holder, record.purpose, record.condition]))),
    ...(item.inBrief ? tableIf(exams, ['When', 'Kind', 'Notice'], [1.5, 1.5, 3], item.exams.map((exam) => [exam.when, exam.kind, exam.notice])) : tableIf(exams, ['When', 'Kind', 'Method', 'Result', 'Notice'], [1.3, 1.3, 2, 2.2, 1.8], item.exams.map((exam) => [exam.when, exam.kind, exam.method, exam.result, exam.notice]))),
    ...tableIf(`Planned examinations of ${item.code}`, ['Planned for', 'What is to be done', 'Still lacks'], [1.3, 2.4, 3], item.planned.map((plan) => [plan.when, plan.method, plan.lacks])),
    ...tableIf(`Notices about ${item.code}`, ['Told', 'Sent', 'How', 'About', 'Answer'], [1.4, 1.3, 1, 1.8, 1.6], item.notices.map((notice) => [notice.told, notice.sent, notice.way, notice.about, notice.answer])),
  ];
}

function measurementPart({ measurements }: ReportSource): ReportBlock[] {
  return [
    heading('Measurements'),
    measurements.length === 0 ? nothing('None is on record for this reader.') : { kind: 'table', caption: 'Measurements with uncertainty', head: ['Group', 'Measure', 'Value', '±', 'Unit', 'Method'], widths: [1, 2.2, 1.6, 0.7, 0.8, 1.6], rows: measurements.map((row) => [row.group, row.label, row.value, row.plusMinus, row.unit, row.method]) },
  ];
}

function hypothesisPart(one: ReportedHypothesis): ReportBlock[] {
  const lines = [['If so, we should see', one.predicts], ['For', one.evidenceFor], ['Against', one.evidenceAgainst]] as const;
  return [
    sub(one.result === null ? one.heading : `${one.heading}: ${one.result.toLowerCase()}`),
    serif(one.statement),
    { kind: 'facts', rows: lines.filter(([, text]) => text.trim() !== '').map(([term, value]) => ({ term, value })) },
    ...(one.result === null ? [small('Its result and its tests are not shown to this reader yet.')] : tableIf(`Tests of ${one.heading}`, ['Test', 'Result', 'Why'], [1, 1.2, 4], one.tests.map((test) => [test.label, test.result ?? '', test.why]))),
  ];
}

function findingPart({ finding }: ReportSource): ReportBlock[] {
  if (!finding) return [heading('Opinion'), nothing('No opinion is in this report.')];
  return [
    heading('Opinion'),
    small(finding.by),
    serif(finding.opinion),
    { kind: 'facts', rows: [{ term: 'Certainty', value: finding.certainty }, ...finding.causes] },
    sub('Limits'),
    serif(finding.limits.trim() === '' ? 'None stated.' : finding.limits),
    heading('Classification'),
    plain(finding.classification),
    ...(finding.frozenHash ? [small(`What was signed is kept whole. SHA-256 of it: ${finding.frozenHash}`)] : []),
  ];
}

function recommendationPart({ actions }: ReportSource): ReportBlock[] {
  return [
    heading('Recommendations'),
    ...(actions.length === 0 ? [nothing('No corrective action is on record.')] : tableIf('Corrective actions', ['No.', 'Action', 'Level of control', 'Due', 'State'], [0.4, 3, 1.6, 1, 1.2], actions.map((action) => [String(action.number), action.title, action.level, action.due, action.state]))),
  ];
}

function appendixPart({ photos, run, zone }: ReportSource): ReportBlock[] {
  return [
    heading('Appendix A: photos'),
    ...(photos.length === 0 ? [nothing('No photo is in this report.')] : tableIf('Photos', ['No.', 'View', 'Caption', 'Taken', 'SHA-256'], [0.7, 1.2, 2, 1.3, 2.6], photos.map((photo) => [photo.label, photo.view, photo.caption, photo.taken, photo.sha256]))),
    heading('Appendix B: the computation'),
    run ? { kind: 'facts', rows: runFacts(run, zone) } : nothing('No reconstruction is attached.'),
  ];
}

function runFacts(run: ReportedRun, zone: string) {
  return [
    { term: 'Reconstruction', value: `${run.number}` },
    { term: 'Engine', value: run.engineVersion, note: run.zoneRules ? `time zone rules ${run.zoneRules}` : '' },
    { term: 'Window', value: `${formatDayClock(new Date(run.result.window.startUtc), zone)} to ${formatDayClock(new Date(run.result.window.endUtc), zone)}`, note: `${run.result.window.minutes} min, each tested` },
    ...(run.inputHash ? [{ term: 'Input, SHA-256', value: run.inputHash }] : []),
    { term: 'Result, SHA-256', value: run.resultHash },
    { term: 'To do it again', value: 'The record of the run, fed to the same engine, gives the same result, byte for byte.' },
  ];
}
