import { z } from 'zod';
import { certainties, classifications, reviewFields } from './finding.ts';
import type { Certainty } from './finding.ts';
import { isExaminedAlternative, testNames, untestedWithoutWhy } from './hypothesis.ts';
import type { FourTests, HypothesisKind, HypothesisResult } from './hypothesis.ts';
import { plainText } from './incident.ts';

const words = (max: number) => plainText(max).default('');

/** A draft may be incomplete: what is still missing is said before it is sent, not before it is kept. */
export const findingFormSchema = z.object({
  opinion: words(20_000),
  selectedHypothesisId: z
    .union([z.literal(''), z.uuid('Choose one of the hypotheses, or none.')], 'Choose one of the hypotheses, or none.')
    .default('')
    .transform((id) => (id === '' ? null : id)),
  certainty: z.enum(certainties, 'Choose how certain the opinion is.'),
  classification: z.enum(classifications, 'Choose a class, or "not classified".'),
  immediateCauses: words(4_000),
  underlyingCauses: words(4_000),
  rootCauses: words(4_000),
  limits: words(8_000),
});
export type FindingDraft = z.output<typeof findingFormSchema>;

export const reviewCommentSchema = z.object({
  field: z.enum(reviewFields, 'Choose the field that the comment is about.'),
  body: plainText(4_000).pipe(z.string().min(1, 'Write what is unclear or missing.')),
});

export interface HypothesisFacts {
  readonly id: string;
  readonly kind: HypothesisKind;
  readonly result: HypothesisResult;
  readonly evidenceFor: string;
  readonly evidenceAgainst: string;
  readonly tests: FourTests;
}

/**
 * What `certaintyObstacles` wants to know. Supporting tests are those of the selected hypothesis, or of the
 * focused-sunlight one while none is selected; tests left open are counted over all hypotheses.
 */
export function certaintyFacts(hypotheses: readonly HypothesisFacts[], selectedId: string | null) {
  const weighed = hypotheses.find((hypothesis) => hypothesis.id === selectedId) ?? (selectedId === null ? hypotheses.find((hypothesis) => hypothesis.kind === 'focused-sunlight') : undefined);
  return {
    alternativesExamined: hypotheses.filter(isExaminedAlternative).length,
    untestedWithoutWhy: hypotheses.reduce((open, hypothesis) => open + untestedWithoutWhy(hypothesis.tests).length, 0),
    supportingTests: weighed ? testNames.filter((name) => weighed.tests[name].result === 'supports').length : 0,
  };
}

/** Why the certainty and the chosen hypothesis do not go together; empty when they do. */
export function selectionObstacles(certainty: Certainty, selected: HypothesisFacts | null): readonly string[] {
  if (certainty === 'undetermined') return selected ? ['An undetermined finding selects no hypothesis: choose "none", or say how certain it is.'] : [];
  if (!selected) return [`Say which hypothesis is ${certainty}.`];
  if (selected.result === 'ruled-out') return ['The selected hypothesis is recorded as ruled out.'];
  if (certainty === 'probable' && selected.result !== 'probable') return ['The selected hypothesis is not recorded as probable on the hypotheses page.'];
  return [];
}
