import { AppLink } from '#app/components/ui/app-link.tsx';

export interface PagesLineProps {
  readonly page: number;
  readonly pages: number;
  readonly linkTo: (page: number) => string;
  /** What is paged, such as "cases". */
  readonly what: string;
}

/** "Page 2 of 5" with the way back and on; nothing for a single page. */
export function PagesLine({ page, pages, linkTo, what }: PagesLineProps) {
  if (pages <= 1) return null;
  return (
    <nav aria-label={`Pages of ${what}`} className="flex flex-wrap items-center gap-x-6 pt-4" data-print="no">
      <span className="text-second">Page {page} of {pages}</span>
      {page > 1 ? <AppLink href={linkTo(page - 1)} rel="prev" className="inline-flex min-h-11 items-center">Previous</AppLink> : null}
      {page < pages ? <AppLink href={linkTo(page + 1)} rel="next" className="inline-flex min-h-11 items-center">Next</AppLink> : null}
    </nav>
  );
}
