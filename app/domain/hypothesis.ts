import { z } from 'zod';
import { plainText } from './incident.ts';

export const hypothesisKinds = [
  'focused-sunlight',
  'electrical',
  'smoking-materials',
  'self-heating',
  'open-flame',
  'hot-work',
  'lightning',
  'other-radiant-heat',
  'deliberate',
  'material-fault',
  'other',
] as const;
export type HypothesisKind = (typeof hypothesisKinds)[number];
export const hypothesisKindLabels: Record<HypothesisKind, string> = {
  'focused-sunlight': 'Focused sunlight',
  electrical: 'Electrical',
  'smoking-materials': 'Smoking materials',
  'self-heating': 'Self-heating',
  'open-flame': 'Open flame',
  'hot-work': 'Hot work',
  lightning: 'Lightning',
  'other-radiant-heat': 'Other radiant heat',
  deliberate: 'Deliberate',
  'material-fault': 'Material fault',
  other: 'Other',
};

export const hypothesisResults = ['ruled-out', 'possible', 'probable', 'not-tested'] as const;
export type HypothesisResult = (typeof hypothesisResults)[number];
export const hypothesisResultLabels: Record<HypothesisResult, string> = {
  'ruled-out': 'Ruled out',
  possible: 'Possible',
  probable: 'Probable',
  'not-tested': 'Not tested',
};

export const testNames = ['geometry', 'weather', 'energy', 'mark'] as const;
export type TestName = (typeof testNames)[number];
export const testLabels: Record<TestName, string> = { geometry: 'Geometry', weather: 'Weather', energy: 'Energy', mark: 'Mark' };

export const testResults = ['supports', 'contradicts', 'inconclusive', 'not-tested'] as const;
export type TestResult = (typeof testResults)[number];
export const testResultLabels: Record<TestResult, string> = {
  supports: 'Supports',
  contradicts: 'Contradicts',
  inconclusive: 'Inconclusive',
  'not-tested': 'Not tested',
};

const test = z.object({ result: z.enum(testResults), why: plainText(1_000).default('') });
export const fourTestsSchema = z.object({ geometry: test, weather: test, energy: test, mark: test });
export type FourTests = z.infer<typeof fourTestsSchema>;

export const noTests: FourTests = {
  geometry: { result: 'not-tested', why: '' },
  weather: { result: 'not-tested', why: '' },
  energy: { result: 'not-tested', why: '' },
  mark: { result: 'not-tested', why: '' },
};

/** Tests left open with no reason: they keep a finding from being sent. */
export function untestedWithoutWhy(tests: FourTests): readonly TestName[] {
  return testNames.filter((name) => tests[name].result === 'not-tested' && tests[name].why.trim() === '');
}

/** An alternative counts as examined once it has a result and a sentence for or against. */
export function isExaminedAlternative(hypothesis: { kind: HypothesisKind; result: HypothesisResult; evidenceFor: string; evidenceAgainst: string }): boolean {
  return (
    hypothesis.kind !== 'focused-sunlight' &&
    hypothesis.result !== 'not-tested' &&
    (hypothesis.evidenceFor.trim() !== '' || hypothesis.evidenceAgainst.trim() !== '')
  );
}
