import { describe, expect, test } from 'vitest';
import { caseStates } from '#app/domain/case-state.ts';
import { canInOrganisation, canOnCase, caseRules } from '#app/domain/permissions.ts';
import type { CaseAction, OrganisationAction, Relation } from '#app/domain/permissions.ts';
import { isRole, roleTable } from '#app/domain/role-table.ts';
import type { Right } from '#app/domain/role-table.ts';
import { roles } from '#app/domain/roles.ts';
import type { Actor, Role } from '#app/domain/roles.ts';

const actor = (role: Role): Actor => ({ userId: 'u', organisationId: 'o', displayName: 'A Person', email: 'a@tallowmere.example', units: 'metric', grants: [{ role, siteId: null }] });
const may = (role: Role, action: CaseAction, relations: readonly Relation[] = []) => caseStates.some((state) => canOnCase(actor(role), action, { organisationId: 'o', siteId: 's', state, relations }));

const rightsOf = (words: string) => {
  const row = roleTable().flatMap((group) => group.rows).find((one) => one.words === words);
  if (!row) throw new Error(`The table has no row "${words}".`);
  return row.rights;
};
const kinds = (words: string) => Object.fromEntries(Object.entries(rightsOf(words)).map(([role, right]: [string, Right]) => [role, right.kind]));

const shownOfCases: readonly (readonly [string, CaseAction])[] = [
  ['See a case', 'case:read'], ['See personal fields', 'case:read-personal'], ['See health fields', 'case:read-health'], ['See the privileged part', 'case:read-privileged'],
  ['Add a note', 'case:add-note'], ['Read the log of a case', 'log:read'], ['First look, return, duplicate', 'case:triage'], ['Change facts and measurements', 'case:edit-facts'],
  ['Run a reconstruction', 'reconstruction:run'], ['Attach a reconstruction', 'reconstruction:attach'], ['Write hypotheses and findings', 'finding:write'],
  ['Sign or send back a finding', 'finding:review'], ['Make corrective actions', 'action:write'], ['Mark an action done', 'action:do'], ['Verify an action', 'action:verify'],
  ['Check the effect when the sun is back', 'action:check-effect'], ['Close a case', 'case:close'], ['Reopen a case', 'case:reopen'], ['Prepare a release', 'release:prepare'],
  ['Approve a release', 'release:approve'], ['Put a legal hold', 'case:hold'],
];

describe('each square of the table says what the server decides', () => {
  test.each(shownOfCases)('%s', (words, action) => {
    const rule = caseRules[action];
    const never: readonly Relation[] = 'never' in rule ? rule.never : [];
    for (const role of roles) {
      const plain = may(role, action);
      const expected = plain ? (never.length > 0 ? 'limit' : 'any') : null;
      if (expected) expect(rightsOf(words)[role].kind, role).toBe(expected);
      else expect(['part', 'no'], role).toContain(rightsOf(words)[role].kind);
    }
  });

  test.each<[string, OrganisationAction]>([
    ['Report a mark', 'report:create'], ['Read releases addressed to their house', 'release:read-own'], ['Add and change sites', 'site:manage'], ['Look after people and roles', 'people:manage'], ['Read the whole log', 'log:read-all'],
  ])('%s', (words, action) => {
    for (const role of roles) expect(rightsOf(words)[role].kind, role).toBe(canInOrganisation(actor(role), action) ? 'any' : 'no');
  });

  test('a half square needs the relation that it names, and the relation is enough', () => {
    expect(rightsOf('See personal fields').reporter).toEqual({ kind: 'part', words: 'own reports' });
    expect(may('reporter', 'case:read-personal')).toBe(false);
    expect(may('reporter', 'case:read-personal', ['reporter-of-case'])).toBe(true);
  });

  test('where role and relation are both needed, the square is half and names the relation', () => {
    expect(rightsOf('Sign for an item as its receiver').manager).toEqual({ kind: 'part', words: 'items offered to them' });
    expect(kinds('Sign for an item as its receiver')).toMatchObject({ reporter: 'no', administrator: 'no', insurer: 'no' });
  });

  test('an open square is closed by the relation that it names', () => {
    expect(rightsOf('Sign or send back a finding').reviewer).toEqual({ kind: 'limit', words: 'not own findings' });
    expect(may('reviewer', 'finding:review', ['author-of-finding'])).toBe(false);
    expect(rightsOf('Verify an action').manager).toEqual({ kind: 'limit', words: 'not own actions' });
    expect(may('manager', 'action:verify', ['owner-of-action'])).toBe(false);
  });
});

test('an insurer reader does nothing to a case', () => {
  for (const [words] of shownOfCases) expect(rightsOf(words).insurer.kind, words).toBe('no');
});

test('an administrator reads no case but what they reported or were given to do', () => {
  expect(kinds('See a case').administrator).toBe('part');
  expect(kinds('Read the log of a case').administrator).toBe('no');
});

test('a role in an address is one of ours', () => {
  expect([isRole('manager'), isRole('owner'), isRole(null)]).toEqual([true, false, false]);
});
