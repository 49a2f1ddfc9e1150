import { canInOrganisation } from './permissions.ts';
import type { Actor } from './roles.ts';
import { holdsRoleAnywhere, roleLabels } from './roles.ts';

export interface NavigationEntry {
  readonly href: string;
  readonly label: string;
}

/** Words of the navigation for this person, in the order of the work. */
export function navigationFor(actor: Actor): readonly NavigationEntry[] {
  const entries: NavigationEntry[] = [];
  if (canInOrganisation(actor, 'register:read')) entries.push({ href: '/cases', label: 'Register' });
  if (canInOrganisation(actor, 'report:create')) entries.push({ href: '/report', label: 'Report' });
  if (canInOrganisation(actor, 'actions:read')) entries.push({ href: '/actions', label: 'Actions' });
  if (canInOrganisation(actor, 'site:read')) entries.push({ href: '/sites', label: 'Sites' });
  if (holdsRoleAnywhere(actor, ['insurer', 'investigator', 'manager', 'privacy-lead'])) entries.push({ href: '/case-files', label: 'Case files' });
  if (canInOrganisation(actor, 'people:manage')) entries.push({ href: '/people', label: 'People' });
  return entries;
}

/** Links in the person's own menu. */
export function personLinksFor(actor: Actor): readonly NavigationEntry[] {
  return [
    { href: '/account', label: 'Your account' },
    ...(canInOrganisation(actor, 'log:read-all') ? [{ href: '/log', label: 'Whole log' }] : []),
    { href: '/how-we-compute', label: 'How we compute' },
  ];
}

/** The page a person lands on after signing in. */
export function homeFor(actor: Actor): string {
  if (canInOrganisation(actor, 'register:read')) return '/cases';
  if (canInOrganisation(actor, 'release:read-own')) return '/case-files';
  if (canInOrganisation(actor, 'people:manage')) return '/people';
  return '/account';
}

export function initialsOf(displayName: string): string {
  const parts = displayName.trim().split(/\s+/u);
  return `${parts[0]?.[0] ?? ''}${parts.length > 1 ? (parts.at(-1)?.[0] ?? '') : ''}`.toUpperCase();
}

export const rolesInWords = (actor: Actor): string => [...new Set(actor.grants.map((grant) => roleLabels[grant.role]))].join(', ');
