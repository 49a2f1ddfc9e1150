import { Suspense, lazy } from 'react';
import type { ComponentType, ReactNode } from 'react';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import type { CaseMapProps } from './case-point.ts';
import type { PickerMapProps } from './picker-map.client.tsx';

const LazyCaseMap = lazy(async () => ({ default: await fetched(async () => (await import('./base-map.client.tsx')).CaseMap) }));
const LazyPickerMap = lazy(async () => ({ default: await fetched(async () => (await import('./base-map.client.tsx')).PickerMap) }));

/** Without a connection the map may not come; the page around it must not fall with it. */
async function fetched<Props>(part: () => Promise<ComponentType<Props>>): Promise<ComponentType<Props>> {
  try {
    return await part();
  } catch {
    // Whatever kept it away, everything on the map is also in words or boxes on the page.
    return NoMap;
  }
}

function NoMap() {
  return <p role="status" className="flex h-24 items-center justify-center border border-hair px-4 text-center text-small text-second">The map could not be fetched. Everything on it can also be typed or read on this page.</p>;
}

/** The register's cases on a world map; on the server, and until the script has come, a framed sentence. */
export function CaseMap(props: CaseMapProps) {
  return <WhenHydrated waiting={<Waiting tall />}><LazyCaseMap {...props} /></WhenHydrated>;
}

/** The map of the point picker; nothing at all without scripts, where the boxes below it do the work. */
export function PickerMap(props: PickerMapProps) {
  return <WhenHydrated waiting={<Waiting />}><LazyPickerMap {...props} /></WhenHydrated>;
}

function WhenHydrated({ waiting, children }: { readonly waiting: ReactNode; readonly children: ReactNode }) {
  const hydrated = useHydrated();
  if (!hydrated) return <noscript><p className="text-small text-second">The map needs scripts. Everything on it is also in words on this page.</p></noscript>;
  return <Suspense fallback={waiting}>{children}</Suspense>;
}

function Waiting({ tall = false }: { readonly tall?: boolean }) {
  return <p className={`flex items-center justify-center border border-hair text-small text-second ${tall ? 'h-60 tablet:h-[420px] desk:h-[612px]' : 'h-80 tablet:h-96'}`}>Drawing the map</p>;
}
