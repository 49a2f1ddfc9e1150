import { caseRules, organisationRules } from './permissions.ts';
import type { CaseAction, OrganisationAction, Relation } from './permissions.ts';
import { roles } from './roles.ts';
import type { Role } from './roles.ts';

/**
 * The permission table in words, for the people page; made from the rules themselves so that it cannot go stale.
 *
 * `any`: every case of the role's sites. `part`: only where the person stands in the named relation. `limit`: every case,
 * except where the named relation holds. `no`: never.
 */
export type Right = { readonly kind: 'any' | 'no' } | { readonly kind: 'part' | 'limit'; readonly words: string };

export interface RoleTableRow {
  readonly words: string;
  readonly rights: Readonly<Record<Role, Right>>;
}
export interface RoleTableGroup {
  readonly heading: string;
  readonly rows: readonly RoleTableRow[];
}

interface TableRule {
  readonly roles: readonly Role[];
  readonly relations?: readonly Relation[];
  readonly never?: readonly Relation[];
  readonly only?: Relation;
}

const admitting: Record<Relation, string> = {
  'reporter-of-case': 'own reports',
  'owner-of-action': 'own actions',
  'verifier-of-action': 'to verify',
  'author-of-finding': 'own findings',
  'preparer-of-release': 'own releases',
  'holder-of-item': 'held items',
  'receiver-of-item': 'items offered to them',
  'maker-of-offer': 'own offers',
};
const excluding: Record<Relation, string> = {
  'reporter-of-case': 'not own reports',
  'owner-of-action': 'not own actions',
  'verifier-of-action': 'not own to verify',
  'author-of-finding': 'not own findings',
  'preparer-of-release': 'not own releases',
  'holder-of-item': 'not held items',
  'receiver-of-item': 'not items offered to them',
  'maker-of-offer': 'not own offers',
};

/** An insurer reader belongs to another house, so no relation to a case can admit them. */
function rightOf(role: Role, rule: TableRule): Right {
  if (rule.only) return rule.roles.includes(role) ? { kind: 'part', words: admitting[rule.only] } : { kind: 'no' };
  if (rule.roles.includes(role)) return rule.never ? { kind: 'limit', words: rule.never.map((relation) => excluding[relation]).join(', ') } : { kind: 'any' };
  if (!rule.relations || role === 'insurer') return { kind: 'no' };
  return { kind: 'part', words: rule.relations.map((relation) => admitting[relation]).join(', ') };
}

function rowOf(words: string, rule: TableRule): RoleTableRow {
  const right = (role: Role) => rightOf(role, rule);
  return {
    words,
    rights: {
      reporter: right('reporter'), investigator: right('investigator'), reviewer: right('reviewer'), manager: right('manager'),
      insurer: right('insurer'), 'privacy-lead': right('privacy-lead'), administrator: right('administrator'),
    },
  };
}

const ofCase = (action: CaseAction, words: string) => rowOf(words, caseRules[action]);
const ofHouse = (action: OrganisationAction, words: string) => rowOf(words, { roles: organisationRules[action] });

export function roleTable(): readonly RoleTableGroup[] {
  return [
    {
      heading: 'Reports and cases',
      rows: [
        ofHouse('report:create', 'Report a mark'),
        ofCase('case:read', 'See a case'),
        ofCase('case:read-personal', 'See personal fields'),
        ofCase('case:read-health', 'See health fields'),
        ofCase('case:read-privileged', 'See the privileged part'),
        ofCase('case:add-note', 'Add a note'),
        ofCase('log:read', 'Read the log of a case'),
      ],
    },
    {
      heading: 'Working a case',
      rows: [
        ofCase('case:triage', 'First look, return, duplicate'),
        ofCase('case:edit-facts', 'Change facts and measurements'),
        ofCase('evidence:write', 'Collect evidence, record hand-overs'),
        ofCase('evidence:take-over', 'Sign for an item as its receiver'),
        ofCase('attachment:add', 'Add documents'),
        ofCase('witness:write', 'Take accounts of witnesses'),
        ofCase('timeline:write', 'Enter events in the timeline'),
        ofCase('reconstruction:run', 'Run a reconstruction'),
        ofCase('reconstruction:attach', 'Attach a reconstruction'),
        ofCase('finding:write', 'Write hypotheses and findings'),
        ofCase('finding:review', 'Sign or send back a finding'),
        ofCase('action:write', 'Make corrective actions'),
        ofCase('action:do', 'Mark an action done'),
        ofCase('action:verify', 'Verify an action'),
        ofCase('action:check-effect', 'Check the effect when the sun is back'),
        ofCase('case:close', 'Close a case'),
        ofCase('case:reopen', 'Reopen a case'),
      ],
    },
    {
      heading: 'Releases, people and sites',
      rows: [
        ofCase('release:prepare', 'Prepare a release'),
        ofCase('release:approve', 'Approve a release'),
        ofHouse('release:read-own', 'Read releases addressed to their house'),
        ofCase('case:hold', 'Put a legal hold'),
        ofHouse('site:manage', 'Add and change sites'),
        ofHouse('people:manage', 'Look after people and roles'),
        ofHouse('log:read-all', 'Read the whole log'),
      ],
    },
  ];
}

export const isRole = (word: string | null): word is Role => roles.some((role) => role === word);
