import { caseRules } from './permissions.ts';
import type { CaseAction } from './permissions.ts';
import type { Role } from './roles.ts';

/** The permission table in words, for the people page; made from the rules themselves so that it cannot go stale. */
const actionWords: Partial<Record<CaseAction, string>> = {
  'case:read': 'See a case',
  'case:read-personal': 'See personal fields',
  'case:read-health': 'See health fields',
  'case:read-privileged': 'See the privileged part',
  'case:triage': 'First look, return, duplicate',
  'case:edit-facts': 'Change facts and measurements',
  'reconstruction:run': 'Run a reconstruction',
  'reconstruction:attach': 'Attach a reconstruction',
  'finding:write': 'Write hypotheses and findings',
  'finding:review': 'Sign or send back a finding',
  'action:write': 'Make corrective actions',
  'action:do': 'Mark an action done',
  'action:verify': 'Verify an action',
  'case:close': 'Close a case',
  'case:reopen': 'Reopen a case',
  'case:hold': 'Put a legal hold',
  'release:prepare': 'Prepare a release',
  'release:approve': 'Approve a release',
  'log:read': 'Read the log of a case',
};

export interface RoleTableRow {
  readonly action: CaseAction;
  readonly words: string;
  /** Roles that may, in the states of the rule. */
  readonly roles: readonly Role[];
  /** "the person who reported it" and the like, where a relation admits or excludes. */
  readonly relations: string;
}

const relationWords = {
  'reporter-of-case': 'own reports',
  'owner-of-action': 'own actions',
  'verifier-of-action': 'actions to verify',
  'author-of-finding': 'not own findings',
  'preparer-of-release': 'not own releases',
} as const;

export function roleTable(): readonly RoleTableRow[] {
  return Object.entries(actionWords).flatMap(([name, words]) => {
    const entry = Object.entries(caseRules).find(([action]) => action === name);
    if (!entry) return [];
    const rule: { roles: readonly Role[]; relations?: readonly (keyof typeof relationWords)[]; never?: readonly (keyof typeof relationWords)[] } = entry[1];
    const relations = [...(rule.relations ?? []), ...(rule.never ?? [])].map((relation) => (rule.never?.includes(relation) && relation.startsWith('owner') ? 'not own actions' : relationWords[relation]));
    return [{ action: name as CaseAction, words, roles: rule.roles, relations: relations.join(', ') }];
  });
}
