import type { CaseBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import { noTests } from '#app/domain/hypothesis.ts';
import { linesToDecide, photoKey } from '#app/domain/lines-to-decide.ts';
import type { Decisions } from '#app/domain/redaction.ts';
import type { Audience } from '#app/domain/release-policy.ts';

/** An invented case as the redactor gets it; a test gives the fields that it is about. */
export function sourceOf(values: Partial<CaseBeforeRedaction> = {}): CaseBeforeRedaction {
  return {
    caseNumber: 7,
    zone: 'Europe/London',
    site: { name: 'Tarrow Quay House', code: 'TARROW', address: '12 Tarrow Quay, BS1 4DJ', use: 'dwelling', latitudeDeg: 51.40213, longitudeDeg: -2.90417 },
    organisationName: 'Pellerin Housing',
    position: { latitudeDeg: 51.40219, longitudeDeg: -2.90422 },
    title: 'Curtain burned by a mirror',
    placeDetail: 'flat 12',
    account: 'The curtain had a brown line.',
    interimControl: '',
    interimControlAt: null,
    eventType: 'fire',
    anyoneHurt: 'no',
    foundAt: '2025-12-14T12:31:00.000Z',
    foundPrecision: 'exact',
    foundClockErrorS: 0,
    onsetEarliestAt: '2025-12-14T10:50:00.000Z',
    onsetLatestAt: '2025-12-14T12:31:00.000Z',
    onsetBasis: 'last-seen-sound',
    reportedAt: '2025-12-14T12:52:00.000Z',
    extent: 'surface-mark',
    weatherSeen: 'clear',
    loss: { amount: 1850, currency: 'GBP' },
    privilegedNote: null,
    legalHoldReason: null,
    hasDraftFinding: false,
    reporterId: null,
    notes: [],
    photos: [],
    scene: null,
    reconstruction: null,
    weather: null,
    hypotheses: [],
    finding: null,
    actions: [],
    returnDays: [],
    items: [],
    moves: [],
    people: [],
    staff: [],
    injuries: [],
    ...values,
  };
}

export const hypothesis = (values: Partial<CaseBeforeRedaction['hypotheses'][number]> = {}): CaseBeforeRedaction['hypotheses'][number] => ({
  id: 'h1',
  kind: 'focused-sunlight',
  statement: 'The mirror focused the sun.',
  predicts: '',
  evidenceFor: '',
  evidenceAgainst: '',
  tests: noTests,
  result: 'probable',
  ...values,
});

/** Decisions that share everything that can be shared. */
export function allShared(source: CaseBeforeRedaction, audience: Audience): Decisions {
  const keys = [...linesToDecide(source, audience).map((line) => line.key), ...source.photos.map((photo) => photoKey(photo))];
  return Object.fromEntries(keys.map((key) => [key, 'share' as const]));
}
