import { MarksLayer } from './marks-layer.tsx';
import type { PhotoCard } from '#app/domain/photo-view.ts';
import type { PhotoMask } from '#app/domain/photo.ts';

/** View copy with its caption line, time and hash. The boxes to be hidden lie on top and never in the picture. */
export function PhotoFigure({ card, caseNumber }: { readonly card: PhotoCard; readonly caseNumber: number }) {
  return (
    <figure className="min-w-0">
      <div className="relative bg-wash">
        {card.state === 'ready' ? (
          <a href={`/photos/${card.id}/view`} className="block">
            <img src={`/photos/${card.id}/view`} alt={card.alternative} loading="lazy" className="block w-full" />
          </a>
        ) : (
          <p className="flex aspect-[3/2] items-center justify-center px-4 text-center text-small text-second">
            {card.state === 'failed' ? 'The original is kept, but no copy could be made of it.' : 'Being prepared. Reload in a few seconds.'}
          </p>
        )}
        {card.marks.length > 0 ? <MarksLayer marks={card.marks} widthPx={card.widthPx} heightPx={card.heightPx} /> : null}
        {card.masks.map((mask, index) => <MaskBox key={index} mask={mask} number={index + 1} />)}
      </div>
      <figcaption className="space-y-0.5 pt-1.5 text-small">
        <p className="text-body"><b className="font-semibold">{caseNumber}-{card.label}</b> {card.viewWords}</p>
        {card.caption ? <p className="font-serif text-group">{card.caption}</p> : null}
        <p className="text-second">{card.timeWords}</p>
        <p className="text-second"><span className="font-mono text-axis" title={card.sha256}>{card.hashShort}</span>, {card.sizeWords}</p>
        <HashCheck card={card} />
      </figcaption>
    </figure>
  );
}

function HashCheck({ card }: { readonly card: PhotoCard }) {
  const wrong = card.hashCheck === 'differs' || card.hashCheck === 'missing';
  return (
    <p className={`flex items-center gap-2 ${wrong ? 'font-semibold' : ''}`}>
      <svg width="13" height="13" viewBox="0 0 13 13" aria-hidden="true" className="flex-none">
        {card.hashCheck === 'same' ? (
          <>
            <rect width="13" height="13" fill="currentColor" />
            <path d="m3 6.8 2.4 2.4 4.4-5" fill="none" stroke="var(--color-paper)" strokeWidth="1.8" />
          </>
        ) : wrong ? (
          <path d="M6.5 1v7M6.5 10v2.4" stroke="currentColor" strokeWidth="2.4" />
        ) : (
          <rect x="1" y="1" width="11" height="11" fill="none" stroke="currentColor" strokeWidth="1.4" strokeDasharray="1.6 1.6" />
        )}
      </svg>
      {card.hashWords}
    </p>
  );
}

const percent = (share: number) => `${share * 100}%`;

function MaskBox({ mask, number }: { readonly mask: PhotoMask; readonly number: number }) {
  return (
    <div
      aria-hidden="true"
      className="pointer-events-none absolute border-2 border-ink outline-2 outline-pale"
      style={{ left: percent(mask.leftShare), top: percent(mask.topShare), width: percent(mask.widthShare), height: percent(mask.heightShare) }}
    >
      <span className="absolute top-0 left-0 bg-ink px-1.5 text-axis text-paper">{number} {mask.class === 'personal' ? 'personal' : 'exact place'}</span>
    </div>
  );
}
