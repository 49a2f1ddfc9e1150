import { caseStateLabels } from './case-state.ts';
import type { CaseState } from './case-state.ts';
import { caseRules, whoCan } from './permissions.ts';
import type { CaseAction, CaseSubject } from './permissions.ts';
import { holdsRole } from './roles.ts';
import type { Actor } from './roles.ts';

const inWords = (states: readonly CaseState[]): string => {
  const names = states.map((state) => caseStateLabels[state].toLowerCase());
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} or ${names.at(-1)}`;
};

/** Why the actor may not do this to the case now: its state, where their role would do; otherwise who may. */
export function whyClosed(actor: Actor, action: CaseAction, subject: CaseSubject): string {
  const { roles, states }: { roles: readonly Parameters<typeof holdsRole>[1][number][]; states: readonly CaseState[] | 'any' } = caseRules[action];
  if (states === 'any' || states.includes(subject.state) || !holdsRole(actor, roles, subject.siteId)) return whoCan(action);
  return `Not while the case is in the state “${caseStateLabels[subject.state].toLowerCase()}”; in ${inWords(states)} it is open to you.`;
}
