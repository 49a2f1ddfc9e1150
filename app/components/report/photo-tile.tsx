import { useRef, useState } from 'react';
import { photoViewLabels } from '#app/domain/incident.ts';
import type { KeptPhoto } from './device-store.ts';

export interface PhotoTileProps {
  readonly photo: KeptPhoto;
  readonly number: number;
  readonly src: string;
  /** The team's copy, for a file that this browser cannot draw. */
  readonly copy: string;
  /** Its time and the stated finding do not go together. */
  readonly differs: boolean;
  readonly open: boolean;
  readonly onOpen: () => void;
  readonly onMove: (by: -1 | 1) => void;
}

/** A photo of the strip. Press it for what is said of it; Alt and an arrow key move it. */
export function PhotoTile({ photo, number, src, copy, differs, open, onOpen, onMove }: PhotoTileProps) {
  const view = photo.details.view ? photoViewLabels[photo.details.view].toLowerCase() : null;
  const where = photo.state === 'stored' ? 'with the team' : 'on this phone';
  return (
    <li className="min-w-0">
      <button
        type="button"
        aria-expanded={open}
        aria-keyshortcuts="Alt+ArrowLeft Alt+ArrowRight"
        onClick={onOpen}
        onKeyDown={(event) => {
          if (!event.altKey || (event.key !== 'ArrowLeft' && event.key !== 'ArrowRight')) return;
          event.preventDefault();
          onMove(event.key === 'ArrowLeft' ? -1 : 1);
        }}
        className={`relative block w-full cursor-pointer text-left ${open ? 'outline-3 outline-ink' : ''}`}
      >
        <span className="sr-only">Photo {number}, </span>
        <PhotoPicture src={src} copy={copy} />
        {view ? <span className="absolute bottom-0 left-0 bg-ink px-1.5 text-axis text-paper">{view}</span> : null}
        <span className="sr-only">, {where}{differs ? ', its time and the finding differ' : ''}. Say what it shows</span>
      </button>
      <p className="pt-1 text-axis text-second" aria-hidden="true">{number}, {where}</p>
      {differs ? <p className="text-axis font-semibold" aria-hidden="true">! time differs</p> : null}
    </li>
  );
}

const copyWaitMs = 4_000;
const copyTries = 6;

/** The picture, else the team's copy of it, or words where neither can be drawn yet. */
export function PhotoPicture({ src, copy, whole = false }: { readonly src: string; readonly copy: string; readonly whole?: boolean }) {
  const [failed, setFailed] = useState<readonly string[]>([]);
  const tries = useRef(0);
  const shown = [src, copy].find((one) => one !== '' && !failed.includes(one));
  if (shown === undefined) return <span className={`flex items-center justify-center bg-wash px-2 text-center text-axis text-second ${whole ? 'min-h-32' : 'aspect-[3/2]'}`}>kept; not shown here</span>;
  const fail = () => {
    setFailed((all) => [...all, shown]);
    // The copy is made within seconds of the arrival.
    tries.current += 1;
    if (shown === copy && tries.current < copyTries) window.setTimeout(() => setFailed((all) => all.filter((one) => one !== copy)), copyWaitMs);
  };
  return <img src={shown} alt="" onError={fail} className={`block bg-wash ${whole ? 'max-h-72 w-full object-contain' : 'aspect-[3/2] w-full object-cover'}`} />;
}
