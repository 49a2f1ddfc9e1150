import { Form, useSubmit } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Tabs } from '#app/components/ui/tabs.tsx';
import { caseStateLabels, caseStates } from '#app/domain/case-state.ts';
import type { RegisterView as RegisterData } from '#app/domain/case-view.ts';
import type { RegisterFilter, RegisterView } from '#app/domain/register-filter.ts';
import { registerResultLabels, registerResults, registerSearch, registerSortLabels, registerSorts, registerViews, returnSpans } from '#app/domain/register-filter.ts';
import { sceneOpticKinds, sceneOpticLabels } from '#app/domain/scene.ts';

export interface RegisterFiltersProps {
  readonly filter: RegisterFilter;
  readonly counts: RegisterData['counts'];
  readonly showAs: 'list' | 'map';
}

const viewWords: Record<RegisterView, string> = { all: 'All', open: 'Open', 'first-look': 'First look', late: 'Late', injury: 'Injury', mine: 'Mine' };
const listPath = '/cases';
const mapPath = '/cases/map';

/** The filter line: words with counts, then lists to choose from. All of it is in the address. */
export function RegisterFilters({ filter, counts, showAs }: RegisterFiltersProps) {
  const submit = useSubmit();
  const path = showAs === 'map' ? mapPath : listPath;
  const views = registerViews.flatMap((view) => {
    const count = counts[view];
    return count === null ? [] : [{ href: `${path}${registerSearch(filter, { view })}`, label: viewWords[view], count, current: filter.view === view }];
  });
  return (
    <div className="space-y-1 pb-2 desk:flex desk:flex-wrap desk:items-center desk:gap-x-6 desk:space-y-0" data-print="no">
      <Tabs label="Which cases" look="filter" items={views} />
      <Form method="get" action={path} role="search" aria-label="Filter the register" className="words-scroll flex items-center gap-x-4 gap-y-1 desk:flex-wrap" onChange={(event) => void submit(event.currentTarget)}>
        {filter.view === 'all' ? null : <input type="hidden" name="view" value={filter.view} />}
        <FilterList name="state" label="State" value={filter.state} options={caseStates.map((state) => [state, caseStateLabels[state]])} />
        <FilterList name="optic" label="Optic" value={filter.optic} options={sceneOpticKinds.map((kind) => [kind, sceneOpticLabels[kind]])} />
        <FilterList name="result" label="Result" value={filter.result} options={registerResults.map((result) => [result, registerResultLabels[result]])} />
        <FilterList name="within" label="Sun returns" value={filter.within} options={returnSpans.map((days) => [String(days), `within ${days} days`])} />
        <FilterList name="sort" label="Order" value={filter.sort} options={registerSorts.map((sort) => [sort, registerSortLabels[sort]])} any={null} />
        <label className="flex flex-none items-center gap-1.5 text-small">
          <span className="text-second">Words</span>
          <input type="search" name="q" defaultValue={filter.q} data-find className="min-h-11 w-36 border-b-[1.5px] border-edge bg-transparent px-1 desk:min-h-8" onChange={(event) => event.stopPropagation()} />
        </label>
        <button type="submit" className="min-h-11 flex-none cursor-pointer text-small underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Show</button>
      </Form>
      <p className="flex min-h-11 items-center gap-3 text-small desk:min-h-8">
        <span className="text-second">Show as</span>
        <ShowAs href={`${listPath}${registerSearch(filter)}`} current={showAs === 'list'}>list</ShowAs>
        <ShowAs href={`${mapPath}${registerSearch(filter)}`} current={showAs === 'map'}>map</ShowAs>
      </p>
    </div>
  );
}

function ShowAs({ href, current, children }: { readonly href: string; readonly current: boolean; readonly children: string }) {
  return (
    <AppLink href={href} {...(current ? { 'aria-current': 'page' as const } : {})} className={`inline-flex min-h-8 items-center border-b-4 no-underline ${current ? 'border-here font-semibold' : 'border-transparent'}`}>
      {children}
    </AppLink>
  );
}

interface FilterListProps {
  readonly name: string;
  readonly label: string;
  readonly value: string | number | null;
  readonly options: readonly (readonly [string, string])[];
  /** Word for no choice; null where one always holds. */
  readonly any?: string | null;
}

function FilterList({ name, label, value, options, any = 'any' }: FilterListProps) {
  return (
    <label className="flex flex-none items-center gap-1.5 text-small">
      <span className="text-second">{label}</span>
      <select key={String(value)} name={name} defaultValue={value === null ? '' : String(value)} className="min-h-11 max-w-52 cursor-pointer border-b-[1.5px] border-edge bg-transparent pr-1 [field-sizing:content] desk:min-h-8">
        {any === null ? null : <option value="">{any}</option>}
        {options.map(([option, words]) => <option key={option} value={option} className="bg-sheet text-ink">{words}</option>)}
      </select>
    </label>
  );
}
