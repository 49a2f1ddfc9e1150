import { createCase, createFinding, createHouse, createHypothesis, createPhoto, createReconstruction, createScene } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import type { FindingDraft } from '#app/domain/finding-form.ts';
import type { FourTests } from '#app/domain/hypothesis.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { db } from '#db/client.server.ts';
import { cases } from '#db/schema/all.ts';
import { eq } from 'drizzle-orm';

export const supportingTests: FourTests = {
  geometry: { result: 'supports', why: 'The focus lies 1 mm from the mark.' },
  weather: { result: 'inconclusive', why: 'The station is 14 km away.' },
  energy: { result: 'supports', why: 'Above the scorch band for 20 minutes.' },
  mark: { result: 'not-tested', why: 'A line focus leaves no trail to test.' },
};

export const contradictingTests: FourTests = {
  geometry: { result: 'contradicts', why: 'No conductor within reach.' },
  weather: { result: 'not-tested', why: 'Not an idea about the sun.' },
  energy: { result: 'not-tested', why: 'No source was found.' },
  mark: { result: 'contradicts', why: 'No arc marks.' },
};

const input: ReconstructionInput = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, heightAboveGroundM: 10, zone: 'Europe/London' },
  window: { startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', clockSigmaS: 0 },
  sky: { climateClass: 'temperate-rural' },
  seed: 3,
};

export const emptyResult: ReconstructionResult = {
  engineVersion: 'test',
  seed: 3,
  window: { startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', minutes: 310 },
  daylight: [],
  minutes: [],
  runs: [],
  totals: { sunlit: 0, notSunlit: 0, cannotTell: 310 },
  best: null,
  focus: null,
  heating: null,
  recurrence: [],
  requiredSun: null,
  checks: [],
  tests: [
    { test: 'geometry', result: 'supports', sentence: 'The beam met the mark for 31 minutes.', margin: null },
    { test: 'weather', result: 'inconclusive', sentence: 'No record of the sky within 20 km.', margin: null },
    { test: 'energy', result: 'supports', sentence: 'The flux passed the scorch band.', margin: null },
    { test: 'mark', result: 'not tested', sentence: 'A line focus carries no time.', margin: null },
  ],
  grade: { word: 'not refuted', because: [] },
  sampling: null,
  assumptions: [],
  warnings: [],
};

export interface ReadyCase {
  readonly house: House;
  readonly caseId: string;
  readonly caseNumber: number;
  readonly version: number;
  readonly sunlightId: string;
}

/** A case to which nothing is missing but the finding: optic, attached run, photo, sunlight and two alternatives. */
export async function readyCase(state: CaseState = 'investigation'): Promise<ReadyCase> {
  const house = await createHouse();
  const row = await createCase(state, { site: house.site, assignedToId: house.investigator.userId });
  await createScene({ caseId: row.id, scene: { optic: { kind: 'metal-trim' } } });
  await createReconstruction({ caseId: row.id, number: 1, input, state: 'done', result: emptyResult, attachedAt: new Date('2026-05-12T11:00:00Z'), attachedById: house.investigator.userId });
  await createPhoto({ caseId: row.id, label: 1 });
  const sunlight = await createHypothesis({ caseId: row.id, tests: supportingTests, result: 'probable', evidenceFor: 'The focus lies at the mark.' });
  await createHypothesis({ caseId: row.id, kind: 'electrical', statement: 'A cable failed.', tests: contradictingTests, result: 'ruled-out', evidenceAgainst: 'No cable there.' });
  await createHypothesis({ caseId: row.id, kind: 'smoking-materials', statement: 'A cigarette end.', tests: contradictingTests, result: 'ruled-out', evidenceAgainst: 'The roof was locked.' });
  return { house, caseId: row.id, caseNumber: row.number, version: row.version, sunlightId: sunlight.id };
}

export const draft = (sunlightId: string | null, values: Partial<FindingDraft> = {}): FindingDraft => ({
  opinion: 'Focused sunlight from the parapet is the probable cause of the band.',
  selectedHypothesisId: sunlightId,
  certainty: 'probable',
  classification: 'accidental',
  immediateCauses: 'A curved, polished parapet.',
  underlyingCauses: 'Nobody was asked about focused light.',
  rootCauses: 'The design review has no such question.',
  limits: 'The skyline was measured two days later.',
  ...values,
});

/** The same with a finding that waits for its reviewer. */
export async function caseInReview(): Promise<ReadyCase & { readonly findingId: string }> {
  const ready = await readyCase('findings');
  const finding = await createFinding({ caseId: ready.caseId, authorId: ready.house.investigator.userId, state: 'sent', sentAt: new Date('2026-05-14T09:00:00Z'), ...draft(ready.sunlightId) });
  return { ...ready, findingId: finding.id };
}

/** Version of the case that a page opened now would post. */
export async function caseVersion(caseId: string): Promise<number> {
  const [row] = await db.select({ version: cases.version }).from(cases).where(eq(cases.id, caseId));
  return row?.version ?? 0;
}
