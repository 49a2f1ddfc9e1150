import { describe, expect, test } from 'vitest';
import { homeFor, initialsOf, navigationFor, personLinksFor, rolesInWords } from '#app/domain/navigation.ts';
import type { Actor, Role } from '#app/domain/roles.ts';

function actor(...roles: readonly Role[]): Actor {
  return { userId: 'u', organisationId: 'o', displayName: 'Dara Whitlock', email: 'dara@tallowmere.example', units: 'metric', grants: roles.map((role) => ({ role, siteId: null })) };
}
const words = (...roles: readonly Role[]) => navigationFor(actor(...roles)).map((entry) => entry.label);

describe('the words of the navigation', () => {
  test.each<[Role, readonly string[]]>([
    ['reporter', ['Register', 'Report', 'Actions', 'Sites']],
    ['investigator', ['Register', 'Report', 'Actions', 'Sites', 'Case files']],
    ['reviewer', ['Register', 'Report', 'Actions', 'Sites']],
    ['manager', ['Register', 'Report', 'Actions', 'Sites', 'Case files']],
    ['privacy-lead', ['Register', 'Report', 'Actions', 'Sites', 'Case files']],
    ['insurer', ['Case files']],
    ['administrator', ['Report', 'Sites', 'People']],
  ])('of the role %s are those pages it opens', (role, labels) => {
    expect(words(role)).toEqual(labels);
  });

  test('of two roles are joined, each once, in the order of the work', () => {
    expect(words('administrator', 'reporter')).toEqual(['Register', 'Report', 'Actions', 'Sites', 'People']);
    expect(words('reporter', 'reporter')).toEqual(words('reporter'));
  });

  test('without a role there are none', () => {
    expect(words()).toEqual([]);
  });
});

test('the whole log is found in the menu of those who may read it', () => {
  const finds = (role: Role) => personLinksFor(actor(role)).some((link) => link.href === '/log');
  expect((['reviewer', 'privacy-lead', 'administrator'] as const).every(finds)).toBe(true);
  expect((['reporter', 'investigator', 'manager', 'insurer'] as const).some(finds)).toBe(false);
});

describe('the page after signing in', () => {
  test.each<[string, readonly Role[], string]>([
    ['staff', ['investigator'], '/cases'],
    ['a reporter', ['reporter'], '/cases'],
    ['an insurer reader', ['insurer'], '/case-files'],
    ['an administrator', ['administrator'], '/people'],
    ['an administrator who also reports', ['administrator', 'reporter'], '/cases'],
    ['a person without a role', [], '/account'],
  ])('%s comes to the first page they can open', (_who, roles, home) => {
    expect(homeFor(actor(...roles))).toBe(home);
  });

  test('a role for one site does not open what reaches every site', () => {
    const oneSite: Actor = { ...actor(), grants: [{ role: 'administrator', siteId: 's' }] };
    expect(navigationFor(oneSite).map((entry) => entry.label)).not.toContain('People');
  });
});

test('initials are those of the first and the last name', () => {
  expect(['Dara Whitlock', ' Ana María de la Cruz ', 'Plato', ''].map(initialsOf)).toEqual(['DW', 'AC', 'P', '']);
});

test('roles are named once each', () => {
  const both: Actor = { ...actor(), grants: [{ role: 'manager', siteId: 'a' }, { role: 'manager', siteId: 'b' }, { role: 'reporter', siteId: null }] };
  expect(rolesInWords(both)).toBe('Site manager, Reporter');
});
