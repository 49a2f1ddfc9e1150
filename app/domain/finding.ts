export const certainties = ['probable', 'possible', 'undetermined'] as const;
export type Certainty = (typeof certainties)[number];
export const certaintyLabels: Record<Certainty, string> = { probable: 'Probable', possible: 'Possible', undetermined: 'Undetermined' };

export const classifications = ['accidental', 'natural', 'incendiary', 'undetermined', 'not-classified'] as const;
export type Classification = (typeof classifications)[number];
export const classificationLabels: Record<Classification, string> = {
  accidental: 'Accidental',
  natural: 'Natural',
  incendiary: 'Incendiary',
  undetermined: 'Undetermined',
  'not-classified': 'Not classified',
};

export const findingStates = ['draft', 'sent', 'sent-back', 'signed'] as const;
export type FindingState = (typeof findingStates)[number];
export const findingStateLabels: Record<FindingState, string> = {
  draft: 'Draft',
  sent: 'With the reviewer',
  'sent-back': 'Sent back',
  signed: 'Signed',
};

/** Fields of a finding that a review comment may name. */
export const reviewFields = ['opinion', 'certainty', 'classification', 'causes', 'limits', 'onset-window', 'optic', 'mark', 'reconstruction', 'hypotheses', 'photos', 'weather'] as const;
export type ReviewField = (typeof reviewFields)[number];
export const reviewFieldLabels: Record<ReviewField, string> = {
  opinion: 'Opinion',
  certainty: 'Certainty',
  classification: 'Classification',
  causes: 'Causes',
  limits: 'Limits',
  'onset-window': 'Onset window',
  optic: 'Optic',
  mark: 'Mark',
  reconstruction: 'Reconstruction',
  hypotheses: 'Hypotheses',
  photos: 'Photos',
  weather: 'Weather',
};

/** Fields that the author concludes; the others are inputs. */
const conclusionFields: readonly ReviewField[] = ['opinion', 'certainty', 'classification', 'causes', 'limits', 'hypotheses'];
export const isConclusionField = (field: ReviewField): boolean => conclusionFields.includes(field);

/**
 * Why this certainty may not be stated yet; empty when it may.
 *
 * "Probable" needs the focused-sunlight tests to be complete and two alternatives examined, since ruling other causes
 * out is not by itself evidence for this one.
 */
export function certaintyObstacles(certainty: Certainty, facts: { alternativesExamined: number; untestedWithoutWhy: number; supportingTests: number }): readonly string[] {
  if (certainty !== 'probable') return [];
  const obstacles: string[] = [];
  if (facts.alternativesExamined < 2) obstacles.push(`"Probable" needs two alternatives examined; ${facts.alternativesExamined} so far.`);
  if (facts.untestedWithoutWhy > 0) obstacles.push('"Probable" needs a result, or a reason, for each of the four tests.');
  if (facts.supportingTests === 0) obstacles.push('"Probable" needs at least one test that supports it. Elimination alone shows nothing.');
  return obstacles;
}
