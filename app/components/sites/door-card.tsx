import { MakeSafeLines } from '#app/components/layout/make-safe-card.tsx';
import { QrCode } from '#app/components/ui/qr-code.tsx';
import type { QrPath } from '#app/components/ui/qr-code.tsx';

export interface DoorCardProps {
  readonly card: {
    readonly name: string;
    readonly guestCode: string;
    readonly link: string;
    readonly host: string;
    readonly emergencyNumber: string;
    readonly qr: QrPath;
  };
}

/** One page for the door of a site: what to do, and the code that opens the report there. Black on white, as it is printed. */
export function DoorCard({ card }: DoorCardProps) {
  return (
    <article data-print="alone" style={{ colorScheme: 'light' }} className="max-w-[180mm] border-2 border-ink bg-white p-6 text-ink tablet:p-8 print:[zoom:1.1]">
      <p className="border-2 border-ink bg-ink px-4 py-3 text-[1.125rem]/6 font-semibold text-white print:bg-transparent print:text-ink">Smoking or burning? Raise the alarm, get out, call {card.emergencyNumber}. Report later.</p>
      <h1 className="pt-5 font-serif text-title">Have you seen a burn mark, or a very bright patch of sunlight?</h1>
      <p className="pt-1 text-account">Tell the site team. It takes about two minutes. You need no account and no name.</p>
      <div className="flex flex-wrap items-center gap-6 py-5">
        <QrCode code={card.qr} label={`Code that opens the report page of ${card.name}`} className="h-[52mm] w-[52mm] flex-none" />
        <div className="min-w-0 flex-1 basis-56 space-y-2">
          <p>Point the camera of your phone at the square.</p>
          <p>Or type <span className="font-semibold">{card.host}</span> and give this code:</p>
          <p className="font-mono text-account break-all">{card.guestCode}</p>
          <p className="text-small">This card is for <b className="font-semibold">{card.name}</b>.</p>
        </div>
      </div>
      <MakeSafeLines />
      <p className="border-t border-hair pt-3 text-small">No faces and no names in photos, please. Tell the person in charge of the site if a child or a visitor is involved. You get a receipt, with which you can read what came of your report.</p>
    </article>
  );
}
