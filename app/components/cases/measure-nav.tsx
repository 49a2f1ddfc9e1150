import { href } from 'react-router';
import { Tabs } from '#app/components/ui/tabs.tsx';

export const measurePages = ['measurements', 'scene', 'skyline', 'weather'] as const;
export type MeasurePage = (typeof measurePages)[number];
const labels: Record<MeasurePage, string> = { measurements: 'Values', scene: 'Plan and section', skyline: 'Skyline', weather: 'Weather' };

/** The pages of what was measured, in a line under the tabs of the case; the sheet for paper stands last. */
export function MeasureNav({ caseNumber, current }: { readonly caseNumber: number; readonly current: MeasurePage }) {
  const base = href('/cases/:caseNumber', { caseNumber: String(caseNumber) });
  return (
    <div className="pb-4" data-print="no">
      <Tabs
        label="What was measured"
        look="filter"
        items={[...measurePages.map((page) => ({ href: `${base}/${page}`, label: labels[page], current: page === current })), { href: `${base}/measurements/sheet`, label: 'Sheet for paper' }]}
      />
    </div>
  );
}
