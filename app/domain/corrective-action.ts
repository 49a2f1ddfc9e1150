/** Hierarchy of controls, strongest first (ISO 45001:2018, 8.1.2). */
export const controlLevels = ['elimination', 'substitution', 'engineering', 'administrative', 'ppe'] as const;
export type ControlLevel = (typeof controlLevels)[number];
export const controlLevelLabels: Record<ControlLevel, string> = {
  elimination: 'Elimination',
  substitution: 'Substitution',
  engineering: 'Engineering control',
  administrative: 'Administrative control',
  ppe: 'Personal protective equipment',
};

export const actionStates = ['open', 'in-progress', 'done', 'verified', 'effective', 'not-effective', 'withdrawn'] as const;
export type ActionState = (typeof actionStates)[number];
export const actionStateLabels: Record<ActionState, string> = {
  open: 'Open',
  'in-progress': 'In progress',
  done: 'Done, not verified',
  verified: 'Verified, effect not shown',
  effective: 'Shown effective',
  'not-effective': 'Not effective',
  withdrawn: 'Withdrawn',
};

export const actionSteps = {
  start: { from: ['open'], to: 'in-progress', label: 'Start' },
  'mark-done': { from: ['open', 'in-progress'], to: 'done', label: 'Mark done, with proof' },
  verify: { from: ['done'], to: 'verified', label: 'Verify' },
  'send-back': { from: ['done'], to: 'in-progress', label: 'Send back to the owner' },
  'record-effective': { from: ['verified'], to: 'effective', label: 'Record as effective' },
  'record-not-effective': { from: ['verified', 'effective'], to: 'not-effective', label: 'Record as not effective' },
  withdraw: { from: ['open', 'in-progress', 'done', 'verified', 'not-effective'], to: 'withdrawn', label: 'Withdraw' },
} as const satisfies Record<string, { from: readonly ActionState[]; to: ActionState; label: string }>;
export type ActionStep = keyof typeof actionSteps;

export function stepAllowed(step: ActionStep, state: ActionState): boolean {
  const from: readonly ActionState[] = actionSteps[step].from;
  return from.includes(state);
}

/** Still to be finished by its owner or verifier. */
export const isOpenAction = (state: ActionState) => state === 'open' || state === 'in-progress' || state === 'done';
/** Verified, but nobody has yet seen it work with the sun back. */
export const isUnprovenAction = (state: ActionState) => state === 'verified';

/** The day on which to look whether the fix works: the first day of return on or after the day it was verified. */
export function effectivenessCheckOn(verifiedOn: string, returnDays: readonly string[]): string | null {
  return [...returnDays].sort().find((day) => day >= verifiedOn) ?? null;
}
