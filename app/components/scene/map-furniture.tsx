import { lengthText } from './graticule.ts';
import type { EdgeTick } from './world-layers.client.ts';

/** The fixed cross at the middle; its centre is filled once a place is set. */
export function Cross({ set }: { readonly set: boolean }) {
  return (
    <svg className="pointer-events-none absolute top-1/2 left-1/2 -translate-x-1/2 -translate-y-1/2" style={{ zIndex: 550 }} width="92" height="92" viewBox="-46 -46 92 92" aria-hidden="true">
      <g stroke="var(--color-sheet)" strokeWidth="5"><path d="M0-45V-12M0 12V45M-45 0H-12M12 0H45" /></g>
      <g stroke="var(--color-ink)" strokeWidth="1.9" fill="none"><path d="M0-45V-12M0 12V45M-45 0H-12M12 0H45" /></g>
      <circle r="4.5" fill={set ? 'var(--color-ink)' : 'var(--color-sheet)'} stroke="var(--color-ink)" strokeWidth="1.5" strokeDasharray={set ? undefined : '2 2'} />
    </svg>
  );
}

/** Degrees along the top and left edges, clear of the buttons and of the scale bar. */
export function Ticks({ ticks }: { readonly ticks: readonly EdgeTick[] }) {
  return (
    <div aria-hidden="true">
      {ticks.filter(hasRoom).map(({ axis, text, atPx }) => (axis === 'longitude' ? (
        <span key={`x${text}`} className="map-tick top-0 -translate-x-1/2" style={{ left: atPx }}>{text}</span>
      ) : (
        <span key={`y${text}`} className="map-tick left-0 -translate-y-1/2" style={{ top: atPx }}>{text}</span>
      )))}
    </div>
  );
}

/** Top right belongs to the zoom buttons, bottom left to the scale bar, top left to neither edge. */
function hasRoom({ axis, atPx, ofPx }: EdgeTick): boolean {
  return axis === 'longitude' ? atPx > 120 && atPx < ofPx - 100 : atPx > 28 && atPx < ofPx - 40;
}

export function Scale({ metres, widthPx }: { readonly metres: number; readonly widthPx: number }) {
  if (metres === 0) return null;
  return (
    <div className="pointer-events-none absolute bottom-2 left-3 flex items-center gap-2 bg-sheet px-1 text-axis" style={{ zIndex: 550 }}>
      <svg width={widthPx + 2} height="12" aria-hidden="true"><path d={`M1 1V11M${widthPx + 1} 1V11M1 6H${widthPx + 1}`} stroke="var(--color-ink)" strokeWidth="1.5" /></svg>
      {lengthText(metres)}
    </div>
  );
}

export function Sign({ plus = false }: { readonly plus?: boolean }) {
  return <svg width="20" height="20" viewBox="0 0 20 20" aria-hidden="true"><path d={plus ? 'M3 10H17M10 3V17' : 'M3 10H17'} stroke="currentColor" strokeWidth="1.9" /></svg>;
}
