export type TestName = 'geometry' | 'weather' | 'energy' | 'mark';

export type TestResult = 'supports' | 'contradicts' | 'inconclusive' | 'not tested';

/** One contradiction check. `passed` false refutes; null means that it could not be made. */
export interface Check {
  readonly id: string;
  readonly test: TestName;
  readonly passed: boolean | null;
  readonly margin: number | null;
  readonly unit: string;
  readonly sentence: string;
}

export interface TestSummary {
  readonly test: TestName;
  readonly result: TestResult;
  readonly sentence: string;
  readonly margin: { readonly value: number; readonly low: number; readonly high: number; readonly unit: string; readonly agreeFrom: number | null; readonly agreeTo: number | null } | null;
}

export interface Grade {
  readonly word: 'consistent' | 'not refuted' | 'inconsistent because' | 'cannot tell because';
  readonly because: readonly string[];
}
