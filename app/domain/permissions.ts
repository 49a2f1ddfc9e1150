import type { CaseState } from './case-state.ts';
import type { Actor, Role } from './roles.ts';
import { holdsRole } from './roles.ts';

/**
 * Who may do what, to a case in which state. One table decides buttons and server alike.
 *
 * A rule passes when the actor holds one of `roles` for the case's site (or one of `relations` holds), the case is in
 * one of `states`, none of `never` holds, and `only` does.
 */
export type Relation =
  | 'reporter-of-case'
  | 'owner-of-action'
  | 'verifier-of-action'
  | 'author-of-finding'
  | 'preparer-of-release'
  | 'holder-of-item'
  | 'receiver-of-item'
  | 'maker-of-offer';

interface Rule {
  readonly roles: readonly Role[];
  readonly states: readonly CaseState[] | 'any';
  /** Relations that admit a person without the role. */
  readonly relations?: readonly Relation[];
  /** Relations that exclude a person in spite of the role. */
  readonly never?: readonly Relation[];
  /** The role is not enough: this relation must hold too. */
  readonly only?: Relation;
}

const beforeClose = ['reported', 'triage', 'returned', 'investigation', 'findings', 'corrective-action'] as const;
const atWork = ['triage', 'investigation', 'findings', 'corrective-action'] as const;

/** Items change hands and documents arrive after a case is closed too. */
const workAndAfter = [...atWork, 'closed'] as const;

export const caseRules = {
  'case:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any', relations: ['reporter-of-case', 'owner-of-action', 'verifier-of-action'] },
  'case:read-personal': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any', relations: ['reporter-of-case'] },
  'case:read-health': { roles: ['investigator', 'privacy-lead'], states: 'any', relations: ['reporter-of-case'] },
  'case:read-privileged': { roles: ['privacy-lead'], states: 'any' },
  'case:add-note': { roles: ['investigator'], states: beforeClose, relations: ['reporter-of-case'] },
  'case:add-photo': { roles: ['investigator'], states: beforeClose, relations: ['reporter-of-case'] },
  'photo:read-original': { roles: ['investigator', 'reviewer', 'privacy-lead'], states: 'any' },
  'case:triage': { roles: ['investigator', 'manager'], states: ['reported', 'triage', 'returned', 'duplicate'] },
  'case:close-at-triage': { roles: ['investigator', 'manager'], states: ['triage'] },
  'case:answer': { roles: ['investigator'], states: ['returned'], relations: ['reporter-of-case'] },
  'case:edit-facts': { roles: ['investigator'], states: ['triage', 'investigation', 'corrective-action'] },
  'case:assign': { roles: ['investigator', 'manager'], states: atWork },
  'case:close': { roles: ['manager'], states: ['corrective-action'] },
  'case:close-no-action': { roles: ['manager'], states: ['findings'], never: ['author-of-finding'] },
  'case:pass-to-action': { roles: ['manager', 'reviewer'], states: ['findings'], never: ['author-of-finding'] },
  'case:reinvestigate': { roles: ['investigator', 'reviewer'], states: ['corrective-action'] },
  'case:reopen': { roles: ['reviewer', 'manager'], states: ['closed'] },
  'case:hold': { roles: ['privacy-lead', 'administrator'], states: 'any' },
  'evidence:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'evidence:write': { roles: ['investigator'], states: workAndAfter },
  'evidence:offer': { roles: ['investigator'], states: workAndAfter, relations: ['holder-of-item'] },
  'evidence:take-over': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: workAndAfter, only: 'receiver-of-item' },
  'evidence:withdraw-offer': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: workAndAfter, only: 'maker-of-offer' },
  'attachment:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'attachment:add': { roles: ['investigator', 'privacy-lead'], states: workAndAfter },
  'witness:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'witness:write': { roles: ['investigator'], states: atWork },
  'timeline:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'timeline:write': { roles: ['investigator'], states: atWork },
  'reconstruction:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'reconstruction:run': { roles: ['investigator', 'reviewer'], states: atWork },
  'reconstruction:attach': { roles: ['investigator'], states: ['triage', 'investigation', 'corrective-action'] },
  'hypothesis:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'hypothesis:write': { roles: ['investigator'], states: ['investigation'] },
  'finding:read-draft': { roles: ['investigator', 'reviewer', 'privacy-lead'], states: 'any' },
  'finding:read-signed': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
  'finding:write': { roles: ['investigator'], states: ['investigation'] },
  'finding:review': { roles: ['reviewer'], states: ['findings'], never: ['author-of-finding'] },
  'action:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any', relations: ['owner-of-action', 'verifier-of-action'] },
  'action:write': { roles: ['investigator', 'manager'], states: ['triage', 'investigation', 'findings', 'corrective-action'] },
  'action:do': { roles: ['manager'], states: ['triage', 'investigation', 'findings', 'corrective-action'], relations: ['owner-of-action'] },
  'action:verify': { roles: ['investigator', 'reviewer', 'manager'], states: ['triage', 'investigation', 'findings', 'corrective-action'], relations: ['verifier-of-action'], never: ['owner-of-action'] },
  'action:check-effect': { roles: ['investigator', 'reviewer', 'manager'], states: ['corrective-action', 'closed'], never: ['owner-of-action'] },
  'release:prepare': { roles: ['investigator', 'manager', 'privacy-lead'], states: 'any' },
  'release:approve': { roles: ['manager', 'privacy-lead'], states: 'any', never: ['preparer-of-release'] },
  'log:read': { roles: ['investigator', 'reviewer', 'manager', 'privacy-lead'], states: 'any' },
} as const satisfies Record<string, Rule>;

export type CaseAction = keyof typeof caseRules;
export const caseActions = Object.keys(caseRules) as readonly CaseAction[];

/** What a decision needs to know of the case and, where it matters, of the part of it that is acted on. */
export interface CaseSubject {
  readonly organisationId: string;
  readonly siteId: string | null;
  readonly state: CaseState;
  readonly relations: readonly Relation[];
}

export function canOnCase(actor: Actor, action: CaseAction, subject: CaseSubject): boolean {
  const rule: Rule = caseRules[action];
  if (actor.organisationId !== subject.organisationId) return false;
  if (rule.states !== 'any' && !rule.states.includes(subject.state)) return false;
  if (rule.never?.some((relation) => subject.relations.includes(relation))) return false;
  if (rule.only && !subject.relations.includes(rule.only)) return false;
  if (rule.relations?.some((relation) => subject.relations.includes(relation))) return true;
  return holdsRole(actor, rule.roles, subject.siteId);
}

/** The subject with one relation more, where a decision is about a part of the case that the actor stands in it to. */
export const withRelation = (subject: CaseSubject, relation: Relation, holds: boolean): CaseSubject => (holds ? { ...subject, relations: [...subject.relations, relation] } : subject);

/** The sentence shown beside a move that the actor may not make. */
export function whoCan(action: CaseAction): string {
  const rule: Rule = caseRules[action];
  const names: Record<Role, string> = {
    reporter: 'a reporter',
    investigator: 'an investigator',
    reviewer: 'a technical reviewer',
    manager: 'the site manager',
    insurer: 'the insurer',
    'privacy-lead': 'the privacy lead',
    administrator: 'an administrator',
  };
  const relationNames: Record<Relation, string> = {
    'reporter-of-case': 'the person who reported it',
    'owner-of-action': 'the owner of the action',
    'verifier-of-action': 'its verifier',
    'author-of-finding': 'the author',
    'preparer-of-release': 'the person who prepared it',
    'holder-of-item': 'the person who holds the item',
    'receiver-of-item': 'the person to whom it is offered',
    'maker-of-offer': 'the person who offered it',
  };
  const allowed = [...rule.roles.map((role) => names[role]), ...(rule.relations ?? []).map((relation) => relationNames[relation])];
  const list = allowed.length > 1 ? `${allowed.slice(0, -1).join(', ')} or ${allowed.at(-1)}` : (allowed[0] ?? 'nobody');
  const except = rule.never?.length ? `, but not ${rule.never.map((relation) => relationNames[relation]).join(' or ')}` : '';
  const needed = rule.only ? `, and there only to ${relationNames[rule.only]}` : '';
  return `Open to ${list}${except}${needed}.`;
}

/** Things done to an organisation rather than to a case. */
export const organisationRules = {
  'report:create': ['reporter', 'investigator', 'reviewer', 'manager', 'privacy-lead', 'administrator'],
  'register:read': ['reporter', 'investigator', 'reviewer', 'manager', 'privacy-lead'],
  'actions:read': ['reporter', 'investigator', 'reviewer', 'manager', 'privacy-lead'],
  'release:read-own': ['insurer'],
  'people:manage': ['administrator'],
  'site:read': ['reporter', 'investigator', 'reviewer', 'manager', 'privacy-lead', 'administrator'],
  'site:manage': ['administrator', 'manager'],
  'log:read-all': ['reviewer', 'privacy-lead', 'administrator'],
} as const satisfies Record<string, readonly Role[]>;
export type OrganisationAction = keyof typeof organisationRules;

/** These reach every site, so a role that holds for one site only does not open them. */
const acrossSites: readonly OrganisationAction[] = ['people:manage', 'log:read-all'];

export function canInOrganisation(actor: Actor, action: OrganisationAction): boolean {
  const allowed: readonly Role[] = organisationRules[action];
  return actor.grants.some((grant) => allowed.includes(grant.role) && (grant.siteId === null || !acrossSites.includes(action)));
}
