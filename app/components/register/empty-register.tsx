import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';

/** No rows: either nothing was ever reported, or the filter leaves nothing. */
export function EmptyRegister({ nothingAtAll }: { readonly nothingAtAll: boolean }) {
  if (!nothingAtAll) {
    return (
      <EmptyState title="No case fits this filter." action={<AppLink href="/cases" className="inline-flex min-h-11 items-center">Show all cases</AppLink>}>
        The filter is in the address of this page; take a word out of it, or show all.
      </EmptyState>
    );
  }
  return (
    <EmptyState title="Nothing has been reported yet." action={<ButtonLink href="/report" reload>Report a mark</ButtonLink>}>
      A report takes four answers: where, when, what you see, and whether anyone is hurt. It then stands here, with the hours in which the sun could have made the mark.
    </EmptyState>
  );
}
