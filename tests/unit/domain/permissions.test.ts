import { describe, expect, test } from 'vitest';
import { caseStates } from '#app/domain/case-state.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { canOnCase, caseActions, whoCan } from '#app/domain/permissions.ts';
import type { CaseAction, Relation } from '#app/domain/permissions.ts';
import { roles } from '#app/domain/roles.ts';
import type { Actor, Role } from '#app/domain/roles.ts';

/**
 * Who may do what in which state, typed from the permission and state tables of the requirements and kept apart from the
 * product's own table. Letters: I investigator, R technical reviewer, M site manager, P privacy lead, A administrator.
 */
const letters: Record<string, Role> = { I: 'investigator', R: 'reviewer', M: 'manager', P: 'privacy-lead', A: 'administrator' };
const all = caseStates;
const open: readonly CaseState[] = ['reported', 'triage', 'returned', 'investigation', 'findings', 'corrective-action'];
const working: readonly CaseState[] = ['triage', 'investigation', 'findings', 'corrective-action'];

const expected: Readonly<Record<CaseAction, readonly [string, readonly CaseState[]]>> = {
  'case:read': ['IRMP', all],
  'case:read-personal': ['IRMP', all],
  'case:read-health': ['IP', all],
  'case:read-privileged': ['P', all],
  'case:add-note': ['I', open],
  'case:add-photo': ['I', open],
  'case:triage': ['IM', ['reported', 'triage', 'returned', 'duplicate']],
  'case:close-at-triage': ['IM', ['triage']],
  'case:answer': ['I', ['returned']],
  'case:edit-facts': ['I', ['triage', 'investigation', 'corrective-action']],
  'case:assign': ['IM', working],
  'case:close': ['M', ['corrective-action']],
  'case:close-no-action': ['M', ['findings']],
  'case:pass-to-action': ['RM', ['findings']],
  'case:reinvestigate': ['IR', ['corrective-action']],
  'case:reopen': ['RM', ['closed']],
  'case:hold': ['PA', all],
  'photo:read-original': ['IRP', all],
  'evidence:read': ['IRMP', all],
  'evidence:write': ['I', [...working, 'closed']],
  'evidence:offer': ['I', [...working, 'closed']],
  'evidence:take-over': ['', []],
  'evidence:withdraw-offer': ['', []],
  'attachment:read': ['IRMP', all],
  'attachment:add': ['IP', [...working, 'closed']],
  'witness:read': ['IRMP', all],
  'witness:write': ['I', working],
  'timeline:read': ['IRMP', all],
  'timeline:write': ['I', working],
  'reconstruction:read': ['IRMP', all],
  'reconstruction:run': ['IR', working],
  'reconstruction:attach': ['I', ['triage', 'investigation', 'corrective-action']],
  'hypothesis:read': ['IRMP', all],
  'hypothesis:write': ['I', ['investigation']],
  'finding:read-draft': ['IRP', all],
  'finding:read-signed': ['IRMP', all],
  'finding:write': ['I', ['investigation']],
  'finding:review': ['R', ['findings']],
  'action:read': ['IRMP', all],
  'action:write': ['IM', working],
  'action:do': ['M', working],
  'action:verify': ['IRM', working],
  'action:check-effect': ['IRM', ['corrective-action', 'closed']],
  'release:prepare': ['IMP', all],
  'release:approve': ['MP', all],
  'log:read': ['IRMP', all],
};

const organisationId = 'organisation';
const siteId = 'site';
const actor = (role: Role, grantSiteId: string | null = null): Actor => ({ userId: 'user', organisationId, displayName: 'A person', email: 'person@example.test', units: 'metric', grants: [{ role, siteId: grantSiteId }] });
const subject = (state: CaseState, relations: readonly Relation[] = []) => ({ organisationId, siteId, state, relations });
const allowed = (action: CaseAction, role: Role, state: CaseState) => {
  const [who, states] = expected[action];
  return [...who].some((letter) => letters[letter] === role) && states.includes(state);
};

test('the expectation names every action of the product and no other', () => {
  expect(Object.keys(expected).sort()).toEqual([...caseActions].sort());
});

describe.each(caseActions)('%s', (action) => {
  test.each(roles)('for %s is open exactly in the agreed states', (role) => {
    const opened = caseStates.filter((state) => canOnCase(actor(role), action, subject(state)));
    expect(opened).toEqual(caseStates.filter((state) => allowed(action, role, state)));
  });

  test('is closed to every role of another organisation', () => {
    for (const role of roles) for (const state of caseStates) expect(canOnCase({ ...actor(role), organisationId: 'another' }, action, subject(state))).toBe(false);
  });

  test('is closed to a role granted for another site, and open to the same role granted for this one', () => {
    for (const role of roles) {
      for (const state of caseStates) {
        expect(canOnCase(actor(role, 'another site'), action, subject(state))).toBe(false);
        expect(canOnCase(actor(role, siteId), action, subject(state))).toBe(allowed(action, role, state));
      }
    }
  });
});

describe('without any role', () => {
  const nobody: Actor = { ...actor('reporter'), grants: [] };
  const byRelation: readonly (readonly [Relation, readonly CaseAction[]])[] = [
    ['reporter-of-case', ['case:read', 'case:read-personal', 'case:read-health', 'case:add-note', 'case:add-photo', 'case:answer']],
    ['owner-of-action', ['case:read', 'action:read', 'action:do']],
    ['verifier-of-action', ['case:read', 'action:read', 'action:verify']],
    ['author-of-finding', []],
    ['preparer-of-release', []],
    ['holder-of-item', ['evidence:offer']],
    ['receiver-of-item', []],
    ['maker-of-offer', []],
  ];

  test.each(byRelation)('the %s may do exactly what follows from that', (relation, actions) => {
    const opened = caseActions.filter((action) => caseStates.some((state) => canOnCase(nobody, action, subject(state, [relation]))));
    expect([...opened].sort()).toEqual([...actions].sort());
  });

  test('nothing is open', () => {
    for (const action of caseActions) for (const state of caseStates) expect(canOnCase(nobody, action, subject(state))).toBe(false);
  });
});

describe('with the role only', () => {
  test.each([
    ['evidence:take-over', 'receiver-of-item'],
    ['evidence:withdraw-offer', 'maker-of-offer'],
  ] as const)('%s is open to the %s who may read the evidence, while items change hands', (action, relation) => {
    for (const role of roles) for (const state of caseStates) expect(canOnCase(actor(role), action, subject(state, [relation]))).toBe(['investigator', 'reviewer', 'manager', 'privacy-lead'].includes(role) && [...working, 'closed'].includes(state));
  });
});

describe('in spite of the role', () => {
  test.each([
    ['finding:review', 'reviewer', 'findings', 'author-of-finding'],
    ['action:verify', 'manager', 'corrective-action', 'owner-of-action'],
    ['action:check-effect', 'investigator', 'corrective-action', 'owner-of-action'],
    ['release:approve', 'privacy-lead', 'closed', 'preparer-of-release'],
  ] as const)('%s is closed to a %s who is the %s-state case’s %s', (action, role, state, relation) => {
    expect(canOnCase(actor(role), action, subject(state))).toBe(true);
    expect(canOnCase(actor(role), action, subject(state, [relation]))).toBe(false);
  });
});

test('the sentence about who can names every role of the rule and who is shut out', () => {
  expect(whoCan('finding:review')).toBe('Open to a technical reviewer, but not the author.');
  expect(whoCan('evidence:take-over')).toBe('Open to an investigator, a technical reviewer, the site manager or the privacy lead, and there only to the person to whom it is offered.');
  expect(whoCan('case:reopen')).toBe('Open to a technical reviewer or the site manager.');
});
