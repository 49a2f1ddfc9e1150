import { z } from 'zod';
import { actionViews, inView } from './action-list.ts';
import type { ActionView } from './action-list.ts';
import type { ActionLine } from './action-view.ts';
import { actionStates } from './corrective-action.ts';
import type { ActionState } from './corrective-action.ts';
import { risks } from './incident.ts';
import type { Risk } from './incident.ts';

/** What the address of the list narrows it to. Anything unreadable is taken as not said. */
const filterSchema = z.object({
  view: z.enum(actionViews).catch('open'),
  risk: z.enum(risks).nullable().catch(null),
  state: z.enum(actionStates).nullable().catch(null),
  site: z.string().max(200).nullable().catch(null),
});
export interface ActionFilter {
  readonly view: ActionView;
  readonly risk: Risk | null;
  readonly state: ActionState | null;
  readonly site: string | null;
}

export function readActionFilter(search: URLSearchParams): ActionFilter {
  const given = (name: string) => search.get(name) || null;
  return filterSchema.parse({ view: given('view'), risk: given('risk'), state: given('state'), site: given('site') });
}

/** The address of the same list with something changed; what is left at its default is not written. */
export function actionFilterHref(filter: ActionFilter, change: Partial<ActionFilter> = {}, extra: Readonly<Record<string, string>> = {}): string {
  const next = { ...filter, ...change };
  const search = new URLSearchParams();
  if (next.view !== 'open') search.set('view', next.view);
  if (next.risk) search.set('risk', next.risk);
  if (next.state) search.set('state', next.state);
  if (next.site) search.set('site', next.site);
  for (const [name, value] of Object.entries(extra)) search.set(name, value);
  const text = search.toString();
  return text === '' ? '/actions' : `/actions?${text}`;
}

/** A state that is named outweighs the view, which would hide finished ones. */
export function passesFilter(line: ActionLine, filter: ActionFilter, userId: string): boolean {
  const view = filter.state === null ? filter.view : filter.view === 'open' ? 'all' : filter.view;
  return inView(line, view, userId) && (filter.risk === null || line.risk === filter.risk) && (filter.state === null || line.state === filter.state) && (filter.site === null || line.siteName === filter.site);
}

/** `id:version` of the rows that were ticked; anything else is dropped. */
export function readChosen(values: readonly unknown[]): { actionId: string; version: number }[] {
  const one = z.string().regex(/^[0-9a-f-]{36}:\d{1,6}$/u);
  return values.flatMap((value) => {
    const parsed = one.safeParse(value);
    if (!parsed.success) return [];
    const [actionId = '', version = ''] = parsed.data.split(':');
    return [{ actionId, version: Number(version) }];
  });
}

export const chosenValue = (line: Pick<ActionLine, 'id' | 'version'>): string => `${line.id}:${line.version}`;
