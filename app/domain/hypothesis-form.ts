import { z } from 'zod';
import { hypothesisKinds, hypothesisResults, testLabels, testNames, testResults, untestedWithoutWhy } from './hypothesis.ts';
import type { FourTests, HypothesisResult, TestName } from './hypothesis.ts';
import { plainText } from './incident.ts';

const required = (max: number, sentence: string) => plainText(max).pipe(z.string().min(1, sentence));
const outcome = z.enum(testResults, 'Choose one of the four answers; "not tested" is one of them.');
const why = plainText(1_000).default('');

/** The form of one hypothesis: four tests as eight flat fields, as a browser sends them. */
export const hypothesisFormSchema = z
  .object({
    kind: z.enum(hypothesisKinds, 'Choose what kind of cause this is.'),
    statement: required(2_000, 'Say in a sentence what would have happened.'),
    predicts: plainText(4_000).default(''),
    evidenceFor: plainText(4_000).default(''),
    evidenceAgainst: plainText(4_000).default(''),
    geometryResult: outcome,
    geometryWhy: why,
    weatherResult: outcome,
    weatherWhy: why,
    energyResult: outcome,
    energyWhy: why,
    markResult: outcome,
    markWhy: why,
    result: z.enum(hypothesisResults, 'Choose a result; "not tested" is one.'),
    testedById: z.union([z.literal(''), z.uuid('Choose a person from the list.')], 'Choose a person from the list.').default(''),
  })
  .transform((form) => ({
    kind: form.kind,
    statement: form.statement,
    predicts: form.predicts,
    evidenceFor: form.evidenceFor,
    evidenceAgainst: form.evidenceAgainst,
    tests: {
      geometry: { result: form.geometryResult, why: form.geometryWhy },
      weather: { result: form.weatherResult, why: form.weatherWhy },
      energy: { result: form.energyResult, why: form.energyWhy },
      mark: { result: form.markResult, why: form.markWhy },
    } satisfies FourTests,
    result: form.result,
    testedById: form.testedById === '' ? null : form.testedById,
  }));

export type HypothesisDraft = z.output<typeof hypothesisFormSchema>;

/**
 * Why a hypothesis may not carry this result yet; empty when it may.
 *
 * A result is the word of a person about one idea. "Probable" needs a test that speaks for it, "ruled out" something
 * that speaks against it: not having been ruled out shows nothing, and neither does a missing trace.
 */
export function resultObstacles(result: HypothesisResult, draft: { readonly tests: FourTests; readonly evidenceAgainst: string }): readonly string[] {
  const answers = testNames.map((name) => draft.tests[name].result);
  if (result === 'probable') {
    const open = untestedWithoutWhy(draft.tests).map((name) => testLabels[name].toLowerCase());
    return [
      ...(open.length > 0 ? [`"Probable" needs a result, or a reason why there is none, for: ${open.join(', ')}.`] : []),
      ...(answers.includes('supports') ? [] : ['"Probable" needs at least one test that supports it. Elimination alone shows nothing.']),
    ];
  }
  if (result === 'ruled-out' && !answers.includes('contradicts') && draft.evidenceAgainst.trim() === '') {
    return ['"Ruled out" needs a test that contradicts it, or a sentence under "Against".'];
  }
  return [];
}

/** What the engine concluded for one test, as it is offered to a person. */
export interface EngineTest {
  readonly test: TestName;
  readonly result: 'supports' | 'contradicts' | 'inconclusive' | 'not tested';
  readonly sentence: string;
}

/** The engine's answers in the shape of the form: a suggestion, which counts for nothing until a person saves it. */
export function suggestedTests(engine: readonly EngineTest[], otherwise: FourTests): FourTests {
  const suggestion = (name: TestName): FourTests[TestName] => {
    const answer = engine.find((candidate) => candidate.test === name);
    if (!answer) return otherwise[name];
    return { result: answer.result === 'not tested' ? 'not-tested' : answer.result, why: answer.sentence };
  };
  return { geometry: suggestion('geometry'), weather: suggestion('weather'), energy: suggestion('energy'), mark: suggestion('mark') };
}
