import { z } from 'zod';
import { caseStates } from './case-state.ts';
import { certainties } from './finding.ts';
import { sceneOpticKinds } from './scene.ts';

export const registerViews = ['all', 'open', 'first-look', 'late', 'injury', 'mine'] as const;
export type RegisterView = (typeof registerViews)[number];
export const registerResults = [...certainties, 'ruled-out', 'none'] as const;
export type RegisterResult = (typeof registerResults)[number];
export const registerResultLabels: Record<RegisterResult, string> = {
  probable: 'Probable',
  possible: 'Possible',
  undetermined: 'Undetermined',
  'ruled-out': 'Sunlight ruled out',
  none: 'No signed finding',
};
/** Days ahead within which the sun is to be back. */
export const returnSpans = [30, 90, 180, 365] as const;
export const registerSorts = ['return', 'newest', 'oldest', 'risk'] as const;
export type RegisterSort = (typeof registerSorts)[number];
export const registerSortLabels: Record<RegisterSort, string> = {
  return: 'next return of the sun',
  newest: 'newest report',
  oldest: 'oldest report',
  risk: 'highest risk',
};

export const pageSize = 50;

/** What the address says; anything that it cannot mean is taken as not said. */
const schema = z.object({
  view: z.enum(registerViews).catch('all'),
  state: z.enum(caseStates).nullable().catch(null),
  optic: z.enum(sceneOpticKinds).nullable().catch(null),
  result: z.enum(registerResults).nullable().catch(null),
  within: z.coerce.number().int().min(1).max(3_660).nullable().catch(null),
  q: z.string().transform((text) => text.trim().slice(0, 120)).catch(''),
  sort: z.enum(registerSorts).catch('return'),
  page: z.coerce.number().int().min(1).max(10_000).catch(1),
});
export type RegisterFilter = z.infer<typeof schema>;

export function readRegisterFilter(search: URLSearchParams): RegisterFilter {
  const raw = (name: string) => search.get(name) || null;
  return schema.parse({
    view: raw('view'), state: raw('state'), optic: raw('optic'), result: raw('result'), within: raw('within'), q: search.get('q') ?? '', sort: raw('sort'), page: raw('page') ?? 1,
  });
}

const usual: Record<string, string> = { view: 'all', sort: 'return', page: '1' };

/** The query string of a filter, usual values left out; changing anything but the page goes back to page one. */
export function registerSearch(filter: RegisterFilter, change: Partial<RegisterFilter> = {}): string {
  const wanted = { ...filter, ...('page' in change ? {} : { page: 1 }), ...change };
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(wanted)) {
    if (value === null || value === '' || usual[name] === String(value)) continue;
    search.set(name, String(value));
  }
  const text = search.toString();
  return text ? `?${text}` : '';
}
