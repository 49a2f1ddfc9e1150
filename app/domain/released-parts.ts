import type { CaseBeforeRedaction } from './case-before-redaction.ts';
import type { CaseState } from './case-state.ts';
import { actionStateLabels } from './corrective-action.ts';
import { itemCode } from './evidence.ts';
import { onsetBasisLabels } from './incident.ts';
import type { Searcher } from './redact-text.ts';
import { redactedWords, redactText } from './redact-text.ts';
import type { RedactedText, ReleasedCase, releasedEvents } from './released-case.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';

/** Parts of a released case that are made of our own words and of numbers. */

/** When the mark was found, true time; null for a bare day. */
export function correctedFound(source: Pick<CaseBeforeRedaction, 'foundAt' | 'foundPrecision' | 'foundClockErrorS'>): string | null {
  if (!source.foundAt || source.foundPrecision === 'unknown') return null;
  return new Date(Date.parse(source.foundAt) - source.foundClockErrorS * 1_000).toISOString();
}

export function releasedEvent(eventType: CaseBeforeRedaction['eventType']): (typeof releasedEvents)[number] {
  if (eventType === 'burn-injury' || eventType === 'eye-injury') return 'injury';
  return eventType ?? 'not-stated';
}

const stateWords: Record<CaseState, string> = {
  reported: 'Reported',
  triage: 'First look begun',
  returned: 'Question put to the reporter',
  investigation: 'Investigation begun',
  findings: 'Finding sent to technical review',
  'corrective-action': 'Corrective action begun',
  closed: 'Case closed',
  duplicate: 'Joined with another report',
};

/** Times of the case in order, in fixed words; the log itself stays in the house. */
export function chronologyOf(source: CaseBeforeRedaction): ReleasedCase['chronology'] {
  const found = correctedFound(source);
  const clock = source.foundClockErrorS === 0 ? '' : ', clock error taken off';
  const lines: { at: string | null; what: string }[] = [
    { at: source.onsetEarliestAt, what: source.onsetBasis ? `Earliest possible onset: ${onsetBasisLabels[source.onsetBasis].toLowerCase()}` : 'Earliest possible onset' },
    { at: source.onsetLatestAt, what: 'Latest possible onset' },
    { at: found, what: source.foundPrecision === 'date-only' ? 'Found on this day' : `Found or alarm${clock}` },
    { at: source.reportedAt, what: 'Reported' },
    { at: source.interimControlAt, what: 'Interim control in place' },
    ...source.moves.filter((move) => move.state !== 'reported').map((move) => ({ at: move.at, what: stateWords[move.state] })),
    { at: source.finding?.signedAt ?? null, what: `Finding signed, version ${source.finding?.version ?? ''}` },
    ...source.actions.flatMap((action) => [
      { at: action.doneAt, what: `Action ${action.number} done` },
      { at: action.verifiedAt, what: `Action ${action.number} verified by another person` },
      { at: action.effectAt, what: `Action ${action.number}: ${actionStateLabels[action.state].toLowerCase()}` },
    ]),
  ];
  return lines.flatMap(({ at, what }) => (at ? [{ at, what }] : [])).sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : 0));
}

/** Items with their chain in our own words: parts in the matter and times. A reader who gets less is told kinds and examinations. */
export function releasedEvidence(source: Pick<CaseBeforeRedaction, 'items' | 'caseNumber'>, how: 'shown' | 'reduced' | 'removed'): ReleasedCase['evidence'] {
  if (how === 'removed') return [];
  return source.items.map(({ label, kind, custody, exams }) => ({
    code: itemCode(source.caseNumber, label),
    kind,
    custody: how === 'shown' ? custody.map(({ role, from, to }) => ({ role, from, to })) : [],
    exams: exams.map(({ kind: exam, at, noticeGiven }) => ({ kind: exam, at, noticeGiven })),
  }));
}

const treatmentWords: Readonly<Record<string, string>> = {
  none: 'no treatment',
  'first-aid': 'first aid',
  'medical-treatment': 'medical treatment',
  'emergency-department': 'emergency department',
  'in-patient': 'in-patient',
};

/** That someone was hurt and the level of treatment, never the part of the body or the person; or nothing at all. */
export function injuryWords(source: Pick<CaseBeforeRedaction, 'injuries' | 'anyoneHurt'>, how: 'shown' | 'reduced' | 'removed'): string {
  if (how === 'removed') return 'withheld';
  if (source.injuries.length === 0) return { yes: 'yes', no: 'none', 'dont-know': 'not known' }[source.anyoneHurt];
  const words = [...new Set(source.injuries.map((injury) => treatmentWords[injury.treatment] ?? 'treatment not stated'))];
  return `yes, ${words.join(', ')}`;
}

/** The reporter is called so; others who wrote notes are told apart by letters, in the order in which they first wrote. */
export function authorNames(source: Pick<CaseBeforeRedaction, 'notes' | 'reporterId'>): readonly string[] {
  const letters = new Map<string, string>();
  return source.notes.map(({ authorId }) => {
    if (authorId !== null && authorId === source.reporterId) return 'Reporter';
    const key = authorId ?? 'guest';
    if (!letters.has(key)) letters.set(key, letterOf(letters.size));
    return `Person ${letters.get(key) ?? ''}`;
  });
}

function letterOf(index: number): string {
  const last = String.fromCharCode(65 + (index % 26));
  return index < 26 ? last : `${letterOf(Math.floor(index / 26) - 1)}${last}`;
}

/**
 * The name of a weather station is the one text of a result that somebody typed. It stands after a colon, and leaves as
 * far as the line of the weather does.
 */
function releasedBasis(basis: string, searcher: Searcher, station: RedactedText | null): string {
  const kept = station?.every((piece) => 'withheld' in piece) ? (basis.split(': ')[0] ?? '') : basis;
  return redactedWords(redactText(kept, searcher));
}

/**
 * The result for a reader. Where the exact place is to stay in the house, everything from which clock time and angles
 * give a position closer than some tens of kilometres is left out: directions of the sun, and the seconds of sunrise.
 *
 * @param station What leaves of the name of the weather's source; null where the run went by none.
 */
export function releasedResult(result: ReconstructionResult, searcher: Searcher, place: 'shown' | 'reduced', station: RedactedText | null): ReconstructionResult {
  const best = result.best ? { ...result.best, dni: { ...result.best.dni, basis: releasedBasis(result.best.dni.basis, searcher, station) } } : null;
  if (place === 'shown') return { ...result, best };
  const toMinute = (utc: string | null) => (utc ? new Date(Math.round(Date.parse(utc) / 60_000) * 60_000).toISOString() : null);
  return {
    ...result,
    best: null,
    requiredSun: null,
    minutes: [],
    daylight: result.daylight.map((day) => ({ ...day, sunriseUtc: toMinute(day.sunriseUtc), sunsetUtc: toMinute(day.sunsetUtc) })),
  };
}
