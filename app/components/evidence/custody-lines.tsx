import { ChartFrame } from '#app/components/charts/plot.tsx';
import { FigureSvg } from '#app/components/report-document/figure-svg.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { custodyFigure } from '#app/domain/figures/custody-figure.ts';
import type { CustodyLine } from '#app/domain/figures/custody-figure.ts';

export interface CustodyLinesProps {
  readonly lines: readonly CustodyLine[];
  readonly zone: string;
  readonly now: Date;
}

/** Custody drawn for the width it gets. The same facts stand in the table of each item. */
export function CustodyLines({ lines, zone, now }: CustodyLinesProps) {
  if (lines.length === 0) return null;
  return (
    <section aria-labelledby="custody-lines">
      <SectionHeading id="custody-lines" note="thick: in a person’s hands; thin: in store; dotted: days without change, folded">Custody, one line an item</SectionHeading>
      <ChartFrame widthsPx={[328, 640, 1080]} draw={(width) => <FigureSvg figure={custodyFigure(lines, { number: 1, width, textSize: 12, zone, now })} />} />
      <ul className="flex flex-wrap gap-x-6 gap-y-1 pt-2 text-small text-second">
        <Key words="hand-over"><path d="M0 8h22" strokeWidth="4" /><path d="M8 2v12M5 14h6" strokeWidth="1.4" /></Key>
        <Key words="looked at"><rect x="7" y="4" width="8" height="8" className="fill-ink" /></Key>
        <Key words="examined, nothing altered"><rect x="5" y="2" width="12" height="12" strokeWidth="1.4" /><rect x="9" y="6" width="4" height="4" className="fill-ink" /></Key>
        <Key words="examination that may have altered it"><rect x="5" y="2" width="12" height="12" strokeWidth="1.4" /><path d="M5 14 17 2" strokeWidth="1.4" /></Key>
        <Key words="planned, may alter it"><rect x="5" y="2" width="12" height="12" strokeWidth="1.4" strokeDasharray="3 2" /><path d="M5 14 17 2" strokeWidth="1.4" strokeDasharray="3 2" /></Key>
      </ul>
    </section>
  );
}

function Key({ words, children }: { readonly words: string; readonly children: React.ReactNode }) {
  return (
    <li className="flex items-center gap-2">
      <svg width="22" height="16" viewBox="0 0 22 16" aria-hidden="true" className="fill-none stroke-ink">{children}</svg>
      {words}
    </li>
  );
}
