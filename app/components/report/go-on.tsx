import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import type { ReportView } from './report-view.ts';

export interface GoOnProps {
  readonly view: ReportView;
  readonly hydrated: boolean;
  readonly onGo: (stillThere: boolean) => void;
}

/** One button on; what is kept, for those who came by the link of a site. */
export function GoOn({ view, hydrated, onGo }: GoOnProps) {
  const site = view.guest ? view.sites[0] : undefined;
  return (
    <div className="space-y-3">
      {site ? <p><span className="block text-small text-second">This link is for</span><span className="font-serif text-title">{site.name}</span></p> : null}
      {hydrated
        ? <Button type="button" size="large" block onClick={() => onGo(false)}>It is covered, or gone. Go on</Button>
        : <ButtonLink href="#report" size="large" block>It is covered, or gone. Go on</ButtonLink>}
      <p>
        {hydrated
          ? <Button type="button" look="quiet" className="min-h-11" onClick={() => onGo(true)}>I could not reach it</Button>
          : <a href="#hazardStillPresent" className="inline-flex min-h-11 items-center">I could not reach it</a>}
      </p>
      {site ? <WhatIsKept /> : null}
    </div>
  );
}

function WhatIsKept() {
  return (
    <div className="space-y-2 border-t-[1.5px] border-ink pt-3">
      <h2 className="font-semibold">About two minutes. No account, no name needed.</h2>
      <p><b className="font-semibold">Your words, photos, time and place</b> are kept. The site team reads them.</p>
      <p><b className="font-semibold">A way to reach you</b> only if you give one. It goes 90 days after the case closes.</p>
      <p><b className="font-semibold">No faces, please.</b></p>
      <p><AppLink href="/progress">Look up a report by its receipt</AppLink></p>
    </div>
  );
}
