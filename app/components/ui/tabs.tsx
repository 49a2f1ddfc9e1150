import type { ReactNode } from 'react';
import { AppLink } from './app-link.tsx';

export interface TabItem {
  readonly href: string;
  readonly label: ReactNode;
  readonly count?: number | string;
  readonly current?: boolean;
}
export interface TabsProps {
  /** Names the group for those who cannot see it. */
  readonly label: string;
  readonly items: readonly TabItem[];
  /** `page`: parts of a case. `filter`: narrow words above a list. */
  readonly look?: 'page' | 'filter';
}

/** Words in a line; the current one carries a 4 px bar. They are links, so they work without a script. */
export function Tabs({ label, items, look = 'page' }: TabsProps) {
  const page = look === 'page';
  return (
    <nav aria-label={label} className={`words-scroll ${page ? 'border-t-2 border-b border-t-ink border-b-hair' : ''}`}>
      <ul className={`flex ${page ? 'gap-5' : 'gap-4'}`}>
        {items.map((item) => (
          <li key={item.href} className="flex-none">
            <AppLink
              href={item.href}
              {...(item.current ? { 'aria-current': 'page' as const } : {})}
              className={`inline-flex min-h-11 min-w-6 items-center justify-center border-b-4 no-underline ${page ? 'desk:min-h-10' : 'text-small desk:min-h-8'} ${item.current ? 'border-here font-semibold' : 'border-transparent font-medium'}`}
            >
              {item.label}
              {item.count === undefined ? null : <> {item.count}</>}
            </AppLink>
          </li>
        ))}
      </ul>
    </nav>
  );
}
