import { Caution } from '#app/components/ui/caution.tsx';
import { cautions } from './cautions.ts';
import type { CautionName } from './cautions.ts';

export interface CautionsFooterProps {
  /** Which cautions this page needs, in order. */
  readonly show?: readonly CautionName[];
}

/** Cautions at the foot of a page, at body size behind a bar. */
export function CautionsFooter({ show = ['estimates', 'defer'] }: CautionsFooterProps) {
  return (
    <footer className="mx-auto max-w-[1600px] px-(--page-margin) pt-4 pb-10">
      <Caution>
        <div className="max-w-[80ch] space-y-1.5">
          {show.map((name) => <p key={name}>{cautions[name]}</p>)}
        </div>
      </Caution>
    </footer>
  );
}
