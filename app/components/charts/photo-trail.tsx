import { useState } from 'react';
import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { verdictWords } from '#app/components/burn-card/words.ts';
import { Numbers } from '#app/components/ui/numbers.tsx';
import type { PhotoTrail, ScaledPhoto } from '#app/domain/photo-trail.ts';
import { photoTrail } from '#app/domain/photo-trail.ts';
import type { BeamFigureProps } from './beam-figures.tsx';
import { NumberTable } from './number-table.tsx';

export interface PhotoTrailProps extends BeamFigureProps {
  readonly figure: string;
  readonly photo: ScaledPhoto;
}

/** The predicted way of the spot over the photo on which the mark was measured. A layer over the view copy. */
export function PhotoTrailFigure({ figure, photo, ...props }: PhotoTrailProps) {
  const { beam, minutes, cursorUtc, zone } = props;
  const trail = photoTrail(beam, photo.clicks);
  if (!trail) return null;
  const verdicts = new Map(minutes.map((minute) => [minute.atUtc, minute.verdict]));
  const title = `Way of the spot over photo ${photo.label}`;
  return (
    <Numbers
      figure={figure}
      title={title}
      picture={<Overlay photo={photo} trail={trail} verdicts={verdicts} cursorUtc={cursorUtc} />}
      numbers={<NumberTable caption={title} columns={[{ head: 'Clock' }, { head: 'Right, px', numeric: true }, { head: 'Down, px', numeric: true }, { head: 'Result' }]} rows={trail.spots.filter((_one, index) => index % 10 === 0 || index === trail.spots.length - 1).map(({ atUtc, at }) => [clockWords(atUtc, zone), at.x.toFixed(0), at.y.toFixed(0), verdictWords[verdicts.get(atUtc) ?? 'cannot-tell']])} />}
      note={`The middle of the mark as measured on the photo is the mark of the run; ${trail.basis}. Solid: sunlit. Dots: can't tell. Dashed: not sunlit. White: the mark, from A to B. The photo itself is not changed.`}
    />
  );
}

interface OverlayProps {
  readonly photo: ScaledPhoto;
  readonly trail: PhotoTrail;
  readonly verdicts: ReadonlyMap<string, 'sunlit' | 'not-sunlit' | 'cannot-tell'>;
  readonly cursorUtc: string | null;
}

function Overlay({ photo, trail, verdicts, cursorUtc }: OverlayProps) {
  const [size, setSize] = useState<{ width: number; height: number } | null>(null);
  const measure = (image: HTMLImageElement) => setSize({ width: image.naturalWidth, height: image.naturalHeight });
  const at = trail.spots.find((spot) => spot.atUtc === cursorUtc)?.at;
  const [a, b] = trail.mark;
  return (
    <div className="relative overflow-hidden border border-edge">
      <img
        src={`/photos/${photo.photoId}/view`}
        alt={photo.altText || `Photo ${photo.label}, on which the mark was measured`}
        className="block w-full"
        onLoad={(event) => measure(event.currentTarget)}
        ref={(image) => { if (image?.complete && image.naturalWidth > 0 && !size) measure(image); }}
      />
      {size ? (
        <svg viewBox={`0 0 ${size.width} ${size.height}`} className="absolute inset-0 h-full w-full" aria-hidden="true" strokeLinecap="round">
          <line x1={a.x} y1={a.y} x2={b.x} y2={b.y} stroke="#fcf9f3" strokeWidth="6" strokeOpacity="0.8" vectorEffect="non-scaling-stroke" />
          {stretches(trail, verdicts).map(({ verdict, d }, index) => (
            <g key={index} className="fill-none" strokeDasharray={verdict === 'sunlit' ? undefined : verdict === 'cannot-tell' ? '0 7' : '5 4'}>
              <path d={d} stroke="#fcf9f3" strokeWidth={verdict === 'not-sunlit' ? 3 : 7} vectorEffect="non-scaling-stroke" />
              <path d={d} stroke="#2f6b8f" strokeWidth={verdict === 'not-sunlit' ? 1.4 : 4} vectorEffect="non-scaling-stroke" />
            </g>
          ))}
          {at ? <path d={`M${at.x} ${at.y}h0`} stroke="#fcf9f3" strokeWidth="17" vectorEffect="non-scaling-stroke" /> : null}
          {at ? <path d={`M${at.x} ${at.y}h0`} stroke="#2f6b8f" strokeWidth="11" vectorEffect="non-scaling-stroke" /> : null}
        </svg>
      ) : null}
    </div>
  );
}

type Verdict = 'sunlit' | 'not-sunlit' | 'cannot-tell';

/** Consecutive minutes of one result as one path each. */
function stretches(trail: PhotoTrail, verdicts: OverlayProps['verdicts']): { verdict: Verdict; d: string }[] {
  const found: { verdict: Verdict; d: string; lastMs: number }[] = [];
  for (const { atUtc, at } of trail.spots) {
    const verdict = verdicts.get(atUtc) ?? 'cannot-tell';
    const ms = Date.parse(atUtc);
    const point = `${at.x.toFixed(1)} ${at.y.toFixed(1)}`;
    const last = found.at(-1);
    const joined = last !== undefined && ms - last.lastMs <= 90_000;
    if (last && joined) Object.assign(last, { d: `${last.d}L${point}`, lastMs: ms });
    if (!last || !joined || last.verdict !== verdict) found.push({ verdict, d: `M${point}`, lastMs: ms });
  }
  return found;
}
