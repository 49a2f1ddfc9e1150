import { Form } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Tabs } from '#app/components/ui/tabs.tsx';
import { actionFilterHref } from '#app/domain/action-filter.ts';
import type { ActionFilter } from '#app/domain/action-filter.ts';
import { actionViewLabels, actionViews } from '#app/domain/action-list.ts';
import { actionStateLabels, actionStates } from '#app/domain/corrective-action.ts';
import { riskLabels, risks } from '#app/domain/incident.ts';

export interface ActionFilterLineProps {
  readonly filter: ActionFilter;
  readonly counts: Readonly<Record<string, number>>;
  readonly sites: readonly string[];
}

/** One line over the list; everything it narrows stands in the address. */
export function ActionFilterLine({ filter, counts, sites }: ActionFilterLineProps) {
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-2 pb-3" data-print="no">
      <Tabs label="Which actions" look="filter" items={actionViews.map((view) => ({ href: actionFilterHref(filter, { view }), label: actionViewLabels[view], count: counts[view] ?? 0, current: filter.view === view }))} />
      <Form method="get" className="flex flex-wrap items-center gap-x-4 gap-y-2 text-small">
        {filter.view === 'open' ? null : <input type="hidden" name="view" value={filter.view} />}
        <Narrow name="site" label="Site" all="all" value={filter.site} options={sites.map((site) => [site, site])} />
        <Narrow name="risk" label="Risk" all="any" value={filter.risk} options={risks.map((risk) => [risk, riskLabels[risk]])} />
        <Narrow name="state" label="State" all="any" value={filter.state} options={actionStates.map((state) => [state, actionStateLabels[state]])} />
        <Button look="quiet">Narrow</Button>
      </Form>
      <p className="text-small"><AppLink href={actionFilterHref(filter, {}, { format: 'csv' })} reload>CSV</AppLink></p>
    </div>
  );
}

interface NarrowProps {
  readonly name: string;
  readonly label: string;
  readonly all: string;
  readonly value: string | null;
  readonly options: readonly (readonly [value: string, label: string])[];
}

function Narrow({ name, label, all, value, options }: NarrowProps) {
  return (
    <label className="flex items-center gap-1.5">
      {label}
      <select key={value ?? ''} name={name} defaultValue={value ?? ''} className="field-box !min-h-9 !w-auto max-w-44 !py-1 !text-small">
        <option value="">{all}</option>
        {options.map(([option, words]) => <option key={option} value={option}>{words}</option>)}
      </select>
    </label>
  );
}
