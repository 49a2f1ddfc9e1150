import type { CardView } from './case-card.ts';
import { actionStateLabels, controlLevelLabels } from './corrective-action.ts';
import { evidenceKindLabels, examKindLabels, holderRoleLabels } from './evidence.ts';
import { certaintyLabels, classificationLabels } from './finding.ts';
import type { FourTests } from './hypothesis.ts';
import { hypothesisKindLabels, hypothesisResultLabels, testLabels, testNames } from './hypothesis.ts';
import { extentLabels, foundPrecisionLabels, onsetBasisLabels, photoViewLabels, weatherSeenLabels } from './incident.ts';
import { formatClock, formatDay, formatDayClock, formatIsoDay, formatOffset, formatWeekday, fromLocalInput } from './local-time.ts';
import { redactedWords } from './redact-text.ts';
import { trailWords } from './report-numbers.ts';
import type { RedactedText, ReleasedCase } from './released-case.ts';
import { releasedEventLabels } from './released-case.ts';
import type { ReleasedResult } from './released-result.ts';
import { assumptionLabel, becauseWords, gradeHeading, minuteReasonWords, totalsWords } from './run-words.ts';
import { weatherLead, weatherLimits, weatherTable } from './weather-part.ts';
import type { WeatherTable } from './weather-part.ts';

/** A released case in the words of its page. Made from the released case alone. */
export interface ReleaseDocument {
  readonly caseNumber: number;
  readonly title: RedactedText;
  readonly siteName: string | null;
  readonly zoneWords: string;
  readonly facts: readonly { readonly term: string; readonly value: string }[];
  readonly placeDetail: RedactedText;
  readonly account: RedactedText;
  readonly interimControl: RedactedText;
  readonly notes: readonly { readonly meta: string; readonly text: RedactedText }[];
  readonly chronology: readonly { readonly day: string; readonly clock: string; readonly atUtc: string; readonly what: string }[];
  readonly evidence: readonly ReleasedItemView[];
  readonly measurements: readonly { readonly group: string; readonly rows: ReleasedCase['measurements'] }[];
  readonly sun: SunPart | null;
  /** Null where the release says nothing of it. */
  readonly weather: ReleasedWeatherView | 'clear-sky' | null;
  readonly hypotheses: readonly HypothesisPart[];
  readonly finding: FindingPart | null;
  readonly actions: readonly { readonly number: number; readonly title: RedactedText; readonly meta: string; readonly effect: RedactedText }[];
  readonly photos: readonly { readonly fileName: string; readonly viewWords: string; readonly caption: RedactedText; readonly alternative: string; readonly maskWords: string }[];
}

/** An item as a reader outside is told of it: holders by part, never by name. */
export interface ReleasedItemView {
  readonly code: string;
  readonly kind: string;
  readonly custody: readonly { readonly holder: string; readonly from: string; readonly to: string }[];
  readonly exams: readonly { readonly kind: string; readonly when: string; readonly notice: string }[];
}

/** The weather that the run went by. */
export interface ReleasedWeatherView {
  readonly lead: RedactedText;
  readonly limits: readonly string[];
  readonly table: WeatherTable;
}

export interface SunPart {
  readonly card: CardView | null;
  readonly heading: string;
  readonly totals: string;
  readonly because: string;
  readonly reasons: readonly string[];
  readonly tests: readonly { readonly label: string; readonly result: 'supports' | 'contradicts' | 'inconclusive' | 'not tested'; readonly sentence: string }[];
  readonly minutes: readonly { readonly atUtc: string; readonly azimuthDeg: number; readonly apparentElevationDeg: number; readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell' }[];
  readonly numbers: readonly { readonly term: string; readonly value: string; readonly note: string }[];
  readonly returns: readonly { readonly days: string; readonly best: string; readonly minutes: number }[];
  readonly assumptions: readonly { readonly term: string; readonly value: string; readonly note: string }[];
  readonly warnings: readonly string[];
  readonly engineWords: string;
  readonly hashes: readonly { readonly label: string; readonly sha256: string }[];
}

export interface HypothesisPart {
  readonly heading: string;
  readonly result: string;
  readonly statement: RedactedText;
  readonly lines: readonly { readonly label: string; readonly text: RedactedText }[];
  readonly tests: readonly { readonly label: string; readonly result: 'supports' | 'contradicts' | 'inconclusive' | 'not tested'; readonly why: RedactedText }[];
}

export interface FindingPart {
  readonly heading: string;
  readonly certainty: string;
  readonly classification: string;
  readonly opinion: RedactedText;
  readonly causes: RedactedText;
  readonly limits: RedactedText;
  readonly hash: string;
}

const isEmpty = (text: RedactedText): boolean => text.length === 0;
const spaced = (zone: string): string => zone.replaceAll('_', ' ');
const markResult = (result: FourTests['geometry']['result']) => (result === 'not-tested' ? 'not tested' : result);

export function releaseDocument(released: ReleasedCase): ReleaseDocument {
  const { zone } = released;
  const at = (utc: string) => new Date(utc);
  return {
    caseNumber: released.caseNumber,
    title: released.title,
    siteName: released.siteName,
    zoneWords: `Times are clock times of the place, ${spaced(zone)}, ${formatOffset(at(released.reportedAt), zone)} on the day of the report.`,
    facts: factsOf(released),
    placeDetail: released.placeDetail,
    account: released.account,
    interimControl: released.interimControl,
    notes: released.notes.map((note) => ({ meta: `${note.by}, ${formatDayClock(at(note.at), zone)}`, text: note.text })),
    chronology: released.chronology.map((line) => ({ day: formatWeekday(at(line.at), zone), clock: line.what === 'Found on this day' ? '' : formatClock(at(line.at), zone), atUtc: line.at, what: line.what })),
    evidence: releasedItems(released),
    measurements: grouped(released.measurements),
    sun: sunPart(released),
    weather: weatherPart(released),
    hypotheses: released.hypotheses.map(hypothesisPart),
    finding: findingPart(released),
    actions: released.actions.map((action) => ({
      number: action.number,
      title: action.title,
      meta: [controlLevelLabels[action.controlLevel], action.interim ? 'interim' : 'lasting', `due ${formatIsoDay(action.dueOn)}`, actionStateLabels[action.state].toLowerCase()].join(', '),
      effect: action.effect,
    })),
    photos: released.photos.map((photo) => ({
      fileName: photo.fileName,
      viewWords: photo.view ? photoViewLabels[photo.view] : 'View not stated',
      caption: photo.caption,
      alternative: isEmpty(photo.altText) ? `Photo of the case, ${photo.view ? photoViewLabels[photo.view].toLowerCase() : 'view not stated'}` : redactedWords(photo.altText),
      maskWords: photo.maskCount === 0 ? '' : `${photo.maskCount} ${photo.maskCount === 1 ? 'part' : 'parts'} masked`,
    })),
  };
}

function factsOf(released: ReleasedCase): ReleaseDocument['facts'] {
  const { zone } = released;
  const moment = (utc: string | null) => (utc ? formatDayClock(new Date(utc), zone) : 'not known');
  const clock = released.foundClockErrorS === 0 ? '' : `, clock error of ${Math.round(Math.abs(released.foundClockErrorS) / 6) / 10} min taken off`;
  const found = released.foundAt && released.foundPrecision === 'date-only' ? formatDay(new Date(released.foundAt), zone) : moment(released.foundAt);
  const basis = released.onsetBasis ? `, ${onsetBasisLabels[released.onsetBasis].toLowerCase()}` : '';
  const window = released.onsetEarliestAt && released.onsetLatestAt ? `${stretchWords(released.onsetEarliestAt, released.onsetLatestAt, zone)}${basis}` : 'not stated';
  const use = released.siteUse.replaceAll('-', ' ');
  const all: { term: string; value: string | null }[] = [
    { term: 'What it is', value: releasedEventLabels[released.eventType] },
    { term: 'Found', value: `${found}${released.foundAt ? `, ${foundPrecisionLabels[released.foundPrecision].toLowerCase()}${clock}` : ''}` },
    { term: 'Onset window', value: window },
    { term: 'Reported', value: moment(released.reportedAt) },
    { term: 'Injury', value: released.injury },
    { term: 'Extent', value: released.extent ? extentLabels[released.extent] : null },
    { term: 'Sky as seen', value: released.weatherSeen ? weatherSeenLabels[released.weatherSeen] : null },
    { term: 'Use of the site', value: use.charAt(0).toUpperCase() + use.slice(1) },
    { term: 'Loss, estimated', value: released.loss ? `${released.loss.amount.toLocaleString('en-GB')} ${released.loss.currency}` : null },
  ];
  return all.flatMap(({ term, value }) => (value === null ? [] : [{ term, value }]));
}

function stretchWords(from: string, to: string, zone: string): string {
  const [start, end] = [new Date(from), new Date(to)];
  const sameDay = formatDay(start, zone) === formatDay(end, zone);
  return `${formatDayClock(start, zone)} to ${sameDay ? formatClock(end, zone) : formatDayClock(end, zone)}`;
}

function grouped(rows: ReleasedCase['measurements']): ReleaseDocument['measurements'] {
  const groups = [...new Set(rows.map((row) => row.group))];
  return groups.map((group) => ({ group, rows: rows.filter((row) => row.group === group) }));
}

const band = (low: number, high: number): string => `${round(low)} to ${round(high)}`;
const round = (value: number): string => (Number.isFinite(value) ? Number(value.toPrecision(3)).toLocaleString('en-GB', { maximumFractionDigits: 3 }) : 'not known');

/** More minutes than this are thinned for the picture; the data file holds all. */
const mostMinutes = 480;

function sunPart(released: ReleasedCase): SunPart | null {
  const run = released.reconstruction;
  if (!run) return null;
  const { result } = run;
  const step = Math.max(1, Math.ceil(result.minutes.length / mostMinutes));
  return {
    card: cardOf(released, result),
    heading: gradeHeading(result.grade),
    totals: totalsWords(result.totals),
    because: becauseWords(result.grade),
    reasons: result.grade.because,
    tests: result.tests.map((test) => ({ label: testLabels[test.test], result: test.result, sentence: test.sentence })),
    minutes: result.minutes.filter((_minute, index) => index % step === 0).map(({ atUtc, azimuthDeg, apparentElevationDeg, verdict }) => ({ atUtc, azimuthDeg, apparentElevationDeg, verdict })),
    numbers: numbersOf(result, released.zone),
    returns: result.recurrence.map((one) => ({
      days: one.firstOn === one.lastOn ? formatIsoDay(one.firstOn) : `${formatIsoDay(one.firstOn)} to ${formatIsoDay(one.lastOn)}`,
      best: formatDayClock(new Date(one.bestUtc), released.zone),
      minutes: one.minutes,
    })),
    assumptions: result.assumptions.map((one) => ({ term: assumptionLabel(one.field), value: one.value, note: `${one.source.text}${one.source.verified ? '' : ', unverified'}` })),
    warnings: result.warnings,
    engineWords: `Reconstruction ${run.number}, engine ${run.engineVersion}.`,
    hashes: [...(run.inputHash ? [{ label: 'Input', sha256: run.inputHash }] : []), { label: 'Result, as computed', sha256: run.resultHash }],
  };
}

/** Releases made before the weather was part of them hold none. */
function weatherPart({ weather, reconstruction, zone }: ReleasedCase): ReleaseDocument['weather'] {
  if (weather === undefined || !reconstruction) return null;
  if (weather === null) return 'clear-sky';
  const { before, after } = weatherLead({ ...weather, bearingDeg: null });
  return { lead: [{ text: before }, ...weather.source, { text: after }], limits: weatherLimits(weather), table: weatherTable(weather, reconstruction.result.window, zone) };
}

const dayMs = 86_400_000;

function cardOf(released: ReleasedCase, result: ReleasedResult): CardView | null {
  const daylight = result.daylight.flatMap((day) => {
    const begins = fromLocalInput(`${day.on}T00:00`, released.zone, 'first');
    if (day.polar === 'night' || begins.kind !== 'instant') return [];
    const midnight = begins.instant.getTime();
    return [{ riseUtc: day.sunriseUtc ?? new Date(midnight).toISOString(), setUtc: day.sunsetUtc ?? new Date(midnight + dayMs).toISOString() }];
  });
  const basis = released.onsetBasis ? onsetBasisLabels[released.onsetBasis].toLowerCase() : 'earliest';
  const foundShown = released.foundAt !== null && released.foundPrecision !== 'date-only';
  return {
    zone: released.zone,
    fromUtc: result.window.startUtc,
    toUtc: result.window.endUtc,
    daylight,
    polar: result.daylight[0]?.polar ?? null,
    window: result.window,
    runs: result.runs.map((run) => ({ fromUtc: run.fromUtc, toUtc: run.toUtc, verdict: run.verdict, reasonWords: minuteReasonWords[run.reason] })),
    foundAtUtc: foundShown ? released.foundAt : null,
    flux: result.minutes.flatMap((minute) => (minute.verdict === 'sunlit' && minute.fluxKwm2 !== null ? [{ atUtc: minute.atUtc, kwm2: minute.fluxKwm2 }] : [])),
    startWords: released.onsetEarliestAt ? [formatClock(new Date(released.onsetEarliestAt), released.zone), basis] : [],
    endWords: foundShown && released.foundAt ? [`${formatClock(new Date(released.foundAt), released.zone)} found`] : [],
  };
}

function numbersOf(result: ReleasedResult, zone: string): SunPart['numbers'] {
  const { best, focus } = result;
  const lines: { term: string; value: string; note: string }[] = [];
  if (best) {
    lines.push({ term: 'Best minute', value: formatDayClock(new Date(best.atUtc), zone), note: `sun ${best.sun.apparentElevationDeg.toFixed(1)}° up, bearing ${best.sun.azimuthDeg.toFixed(1)}° true` });
    if (best.dni.likelyWm2 !== null) lines.push({ term: 'Direct sunlight then', value: `${Math.round(best.dni.likelyWm2)} W/m²`, note: best.dni.basis });
    if (best.missLateralMm !== null) lines.push({ term: 'Focus beside the mark', value: `${round(best.missLateralMm)} mm`, note: best.toleranceLateralMm === null ? '' : `may be up to ${round(best.toleranceLateralMm)} mm` });
  }
  if (focus) {
    lines.push({ term: 'Focal length', value: focus.focalLengthM < 2 ? `${round(focus.focalLengthM * 1000)} mm` : `${round(focus.focalLengthM)} m`, note: focus.method === 'ray-trace' ? 'by tracing rays' : 'closed form' });
    for (const disc of focus.discs) lines.push({ term: `Flux on ${disc.disc === 'sun-image' ? `${round(disc.diameterMm)} mm, the image of the sun` : disc.disc}, centred on the ${disc.centre}`, value: `${band(disc.fluxKwm2.low, disc.fluxKwm2.high)} kW/m²`, note: `middle ${round(disc.fluxKwm2.mid)}` });
    if (focus.trailSpeedMmPerH !== null) lines.push({ term: 'Speed of the spot', value: `${round(focus.trailSpeedMmPerH)} mm/h`, note: trailWords(focus) });
  }
  return lines;
}

/** Releases made before custody was part of them hold none. */
export function releasedItems({ evidence, zone }: Pick<ReleasedCase, 'zone'> & { readonly evidence?: ReleasedCase['evidence'] }): ReleasedItemView[] {
  const at = (utc: string) => formatDayClock(new Date(utc), zone);
  return (evidence ?? []).map((item) => ({
    code: item.code,
    kind: evidenceKindLabels[item.kind],
    custody: item.custody.map((record) => ({ holder: holderRoleLabels[record.role], from: at(record.from), to: record.to ? at(record.to) : 'holds it now' })),
    exams: item.exams.map((exam) => ({ kind: examKindLabels[exam.kind], when: at(exam.at), notice: exam.noticeGiven ? 'others were told beforehand' : 'no notice recorded' })),
  }));
}

function hypothesisPart(one: ReleasedCase['hypotheses'][number]): HypothesisPart {
  const lines = [
    { label: 'What we should see', text: one.predicts },
    { label: 'For', text: one.evidenceFor },
    { label: 'Against', text: one.evidenceAgainst },
  ];
  return {
    heading: hypothesisKindLabels[one.kind],
    result: hypothesisResultLabels[one.result],
    statement: one.statement,
    lines: lines.filter((line) => !isEmpty(line.text)),
    tests: testNames.map((name) => ({ label: testLabels[name], result: markResult(one.tests[name].result), why: one.tests[name].why })),
  };
}

function findingPart(released: ReleasedCase): FindingPart | null {
  const { finding } = released;
  if (!finding) return null;
  return {
    heading: `Finding, signed ${formatDay(new Date(finding.signedAt), released.zone)}, version ${finding.version}`,
    certainty: certaintyLabels[finding.certainty],
    classification: classificationLabels[finding.classification],
    opinion: finding.opinion,
    causes: finding.causes,
    limits: finding.limits,
    hash: finding.frozenHash,
  };
}
