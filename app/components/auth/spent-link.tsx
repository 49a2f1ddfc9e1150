import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';

/** A mailed link that no longer works. */
export function SpentLink() {
  return (
    <Page width="task">
      <PageTitle>This link no longer works</PageTitle>
      <p>It has been used, or its time is over.</p>
      <p className="pt-4">
        <AppLink href="/forgotten-password">Get a new link by mail</AppLink>
      </p>
    </Page>
  );
}
