import type { FourTests, HypothesisKind, HypothesisResult, TestName, TestResult } from './hypothesis.ts';
import { hypothesisKindLabels, hypothesisResultLabels, testLabels, testNames } from './hypothesis.ts';
import { formatDay } from './local-time.ts';

export interface TestView {
  readonly name: TestName;
  readonly label: string;
  readonly result: 'supports' | 'contradicts' | 'inconclusive' | 'not tested';
  readonly why: string;
}

/** A hypothesis as the page shows it. Outcome is null while a reviewer has not asked to see it. */
export interface HypothesisCard {
  readonly id: string;
  readonly kind: HypothesisKind;
  readonly label: string;
  readonly statement: string;
  readonly predicts: readonly string[];
  readonly evidenceFor: string;
  readonly evidenceAgainst: string;
  readonly outcome: { readonly tests: readonly TestView[]; readonly result: string; readonly by: string } | null;
}

interface HypothesisSource {
  readonly id: string;
  readonly kind: HypothesisKind;
  readonly statement: string;
  readonly predicts: string;
  readonly evidenceFor: string;
  readonly evidenceAgainst: string;
  readonly tests: FourTests;
  readonly result: HypothesisResult;
  readonly testedBy: string | null;
  readonly updatedAt: Date;
}

export const testWord = (result: TestResult): TestView['result'] => (result === 'not-tested' ? 'not tested' : result);

export function hypothesisCard(source: HypothesisSource, context: { readonly zone: string; readonly outcomeShown: boolean }): HypothesisCard {
  const by = [source.testedBy, formatDay(source.updatedAt, context.zone)].filter(Boolean).join(', ');
  return {
    id: source.id,
    kind: source.kind,
    label: hypothesisKindLabels[source.kind],
    statement: source.statement,
    predicts: source.predicts.split(/\n+/u).filter((line) => line.trim() !== ''),
    // For and against are inputs to the review; the tests and the result are the author's conclusions.
    evidenceFor: source.evidenceFor,
    evidenceAgainst: source.evidenceAgainst,
    outcome: context.outcomeShown
      ? { tests: testNames.map((name) => ({ name, label: testLabels[name], result: testWord(source.tests[name].result), why: source.tests[name].why })), result: hypothesisResultLabels[source.result].toLowerCase(), by }
      : null,
  };
}

/** What the list of hypotheses amounts to, as one sentence; people's results only, no total. */
export function hypothesesHeading(list: readonly { readonly kind: HypothesisKind; readonly result: HypothesisResult }[]): string {
  if (list.length === 0) return 'No hypothesis is recorded yet';
  const sunlight = list.find((hypothesis) => hypothesis.kind === 'focused-sunlight');
  const alternatives = list.filter((hypothesis) => hypothesis.kind !== 'focused-sunlight');
  const fallen = alternatives.filter((hypothesis) => hypothesis.result === 'ruled-out').length;
  const first = sunlight ? `Focused sunlight: ${hypothesisResultLabels[sunlight.result].toLowerCase()}` : 'Focused sunlight is not on the list yet';
  if (alternatives.length === 0) return `${first}; no alternative examined`;
  return `${first}; ${fallen} of ${alternatives.length} ${alternatives.length === 1 ? 'alternative' : 'alternatives'} ruled out`;
}

/** Stored values as the form's flat fields. */
export function hypothesisFields(source: Pick<HypothesisSource, 'kind' | 'statement' | 'predicts' | 'evidenceFor' | 'evidenceAgainst' | 'tests' | 'result'> & { readonly testedById: string | null }): Record<string, string> {
  const tests = testNames.flatMap((name) => [
    [`${name}Result`, source.tests[name].result],
    [`${name}Why`, source.tests[name].why],
  ]);
  const { kind, statement, predicts, evidenceFor, evidenceAgainst, result, testedById } = source;
  return { kind, statement, predicts, evidenceFor, evidenceAgainst, result, testedById: testedById ?? '', ...Object.fromEntries(tests) };
}
