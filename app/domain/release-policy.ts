import type { WithheldClass } from './released-case.ts';

/**
 * What leaves the house, by field and reader. Anything that has no line here does not leave: `redactCase` builds the
 * released case field by field, asks this table for each, and drops whatever the released shape does not name.
 */
export const audiences = ['insurer', 'other-party'] as const;
export type Audience = (typeof audiences)[number];
export const audienceLabels: Record<Audience, string> = { insurer: 'Insurer', 'other-party': 'Other party' };
export const audienceMeanings: Record<Audience, string> = {
  insurer: 'Site by name, roles not names, reasoning and signed finding in full, loss but no cost of actions.',
  'other-party': 'No site or organisation by name, no directions of the sun, no weather station by name, no hypotheses, the opinion without causes and limits, no loss.',
};

export type Treatment = 'shown' | 'reduced' | 'removed';
interface Policy {
  readonly class: WithheldClass | null;
  readonly insurer: Treatment;
  readonly 'other-party': Treatment;
}

/** Field × reader. `class` is what the count of withheld things says when the field is reduced or removed. */
export const fieldPolicies = {
  identity: { class: null, insurer: 'shown', 'other-party': 'shown' },
  siteName: { class: 'exact-place', insurer: 'shown', 'other-party': 'removed' },
  placeDetail: { class: 'free-text', insurer: 'reduced', 'other-party': 'removed' },
  position: { class: 'exact-place', insurer: 'removed', 'other-party': 'removed' },
  siteAddress: { class: 'exact-place', insurer: 'removed', 'other-party': 'removed' },
  dates: { class: null, insurer: 'shown', 'other-party': 'shown' },
  people: { class: 'personal', insurer: 'removed', 'other-party': 'removed' },
  contacts: { class: 'personal', insurer: 'removed', 'other-party': 'removed' },
  injury: { class: 'health', insurer: 'reduced', 'other-party': 'removed' },
  child: { class: 'child', insurer: 'removed', 'other-party': 'removed' },
  freeText: { class: 'free-text', insurer: 'reduced', 'other-party': 'reduced' },
  photos: { class: 'photo', insurer: 'reduced', 'other-party': 'reduced' },
  measurements: { class: null, insurer: 'shown', 'other-party': 'shown' },
  reconstruction: { class: 'exact-place', insurer: 'shown', 'other-party': 'reduced' },
  weather: { class: 'exact-place', insurer: 'shown', 'other-party': 'reduced' },
  hypotheses: { class: 'free-text', insurer: 'shown', 'other-party': 'removed' },
  draftFinding: { class: 'legal', insurer: 'removed', 'other-party': 'removed' },
  signedFinding: { class: 'free-text', insurer: 'shown', 'other-party': 'reduced' },
  privileged: { class: 'legal', insurer: 'removed', 'other-party': 'removed' },
  custody: { class: 'personal', insurer: 'shown', 'other-party': 'reduced' },
  loss: { class: 'commercial', insurer: 'shown', 'other-party': 'removed' },
  actions: { class: 'free-text', insurer: 'shown', 'other-party': 'reduced' },
  actionCost: { class: 'commercial', insurer: 'removed', 'other-party': 'removed' },
  reporterNotes: { class: 'free-text', insurer: 'reduced', 'other-party': 'removed' },
} as const satisfies Record<string, Policy>;
export type PolicyField = keyof typeof fieldPolicies;
