import type { ReturnView } from './case-view.ts';
import { inDaysWords } from './case-view.ts';
import type { CaseState } from './case-state.ts';
import type { Certainty } from './finding.ts';
import type { EventType } from './incident.ts';
import { daysBetween, formatClock, formatDay, formatDayClock } from './local-time.ts';

const eventWords: Record<EventType, string> = {
  fire: 'fire',
  'heat-damage': 'heat damage',
  'burn-injury': 'injury',
  'eye-injury': 'injury',
  'near-miss': 'near miss',
  'undesired-circumstance': 'undesired circumstance',
};

/** Kind of event in lower case; injuries are named only to those who may know. */
export function eventNote(eventType: EventType | null, mayReadHealth: boolean): string {
  if (eventType === null) return '';
  const injury = eventType === 'burn-injury' || eventType === 'eye-injury';
  return injury && !mayReadHealth ? 'event' : eventWords[eventType];
}

export interface ResultFacts {
  readonly signedCertainty: Certainty | null;
  readonly sunlightRuledOut: boolean;
  readonly eventType: EventType | null;
  readonly reopenCount: number;
  readonly mayReadHealth: boolean;
}

/** Second line of a state: what was signed, or the kind of event, and whether the case was reopened. */
export function stateNote(facts: ResultFacts): string {
  const result = facts.signedCertainty === null ? eventNote(facts.eventType, facts.mayReadHealth) : facts.sunlightRuledOut ? 'sunlight ruled out' : facts.signedCertainty;
  const reopened = facts.reopenCount === 0 ? '' : facts.reopenCount === 1 ? 'reopened' : `reopened ${facts.reopenCount} times`;
  return [result, reopened].filter(Boolean).join(', ');
}

export function returnView(at: Date | null, zone: string, now: Date): ReturnView | null {
  if (!at) return null;
  return { atUtc: at.toISOString(), words: formatDayClock(at, zone), inWords: inDaysWords(daysBetween(now, at, zone)) };
}

/** In place of a return that is not known, or that no longer matters. */
export function noReturnWords(facts: { readonly state: CaseState; readonly duplicateOfNumber: number | null; readonly attachedRun: boolean; readonly returnsListed: boolean; readonly sunlightRuledOut: boolean }): string {
  if (facts.state === 'duplicate' && facts.duplicateOfNumber !== null) return `see ${facts.duplicateOfNumber}`;
  if (facts.sunlightRuledOut) return 'not applicable';
  if (facts.returnsListed) return 'after the listed year';
  return facts.attachedRun ? 'no fixed return' : 'not known yet';
}

/** "9 May 2026" and "05:30 to 15:10, 4 days". */
export function windowWords(earliest: Date | null, latest: Date | null, found: Date | null, zone: string): { readonly day: string; readonly hours: string } {
  if (!earliest || !latest) {
    return found ? { day: formatDay(found, zone), hours: `found ${formatClock(found, zone)}` } : { day: 'not known', hours: '' };
  }
  const days = daysBetween(earliest, latest, zone) + 1;
  const hours = `${formatClock(earliest, zone)} to ${formatClock(latest, zone)}`;
  return { day: formatDay(latest, zone), hours: days > 1 ? `${hours}, ${days} days` : hours };
}
