import { useId } from 'react';
import { Button } from '#app/components/ui/button.tsx';
import { photoViewLabels, photoViews } from '#app/domain/incident.ts';
import type { KeptPhoto } from './device-store.ts';
import { noSendOnEnter } from './no-send-on-enter.ts';
import { PhotoClock } from './photo-clock.tsx';
import { PhotoFileSays } from './photo-file-says.tsx';
import { PhotoPicture } from './photo-tile.tsx';
import { sizeWords } from './size-words.ts';
import type { StatedFinding } from './stated-finding.ts';
import type { ReportPhotos } from './use-report-photos.ts';

export interface PhotoPanelProps {
  readonly photo: KeptPhoto;
  readonly number: number;
  readonly count: number;
  readonly photos: ReportPhotos;
  readonly finding: StatedFinding;
  readonly onUse: (values: Readonly<Record<string, string>>) => void;
  readonly onClose: () => void;
}

/** What one photo shows, when it was taken, and where it stands among the others. Fields have no names: the photo keeps them, not the form. */
export function PhotoPanel({ photo, number, count, photos, finding, onUse, onClose }: PhotoPanelProps) {
  const id = useId();
  return (
    <div role="group" aria-labelledby={`${id}-title`} className="space-y-3 border-y-[1.5px] border-ink bg-sheet px-4 py-3">
      <div className="flex items-center justify-between gap-3">
        <h3 id={`${id}-title`} className="font-semibold">Photo {number} of {count}</h3>
        <Button type="button" look="quiet" className="min-h-11" onClick={onClose}>Done</Button>
      </div>
      <PhotoPicture src={photos.previewOf(photo)} copy={photos.copyOf(photo)} whole />
      <p className="text-small break-words text-second">{photo.fileName}, {sizeWords(photo.bytes)}{photo.details.madeSmaller ? ', made smaller' : ''}</p>
      <div>
        <label htmlFor={`${id}-view`} className="block pb-1 font-semibold">What kind of view?</label>
        <select id={`${id}-view`} className="field-box" value={photo.details.view ?? ''} onChange={(event) => photos.say(photo.key, { view: photoViews.find((view) => view === event.currentTarget.value) ?? null })}>
          <option value="">Not said</option>
          {photoViews.map((view) => <option key={view} value={view}>{photoViewLabels[view]}</option>)}
        </select>
      </div>
      <div>
        <label htmlFor={`${id}-caption`} className="block pb-1 font-semibold">What does it show?</label>
        <input id={`${id}-caption`} className="field-box" maxLength={300} autoComplete="off" onKeyDown={noSendOnEnter} defaultValue={photo.details.caption} onChange={(event) => photos.say(photo.key, { caption: event.currentTarget.value })} aria-describedby={`${id}-caption-help`} />
        <p id={`${id}-caption-help`} className="mt-1 text-axis text-second">Such as: the band from hatch 2, ruler 300 mm. No names.</p>
      </div>
      <PhotoFileSays photo={photo} finding={finding} onUse={onUse} onSay={(details) => photos.say(photo.key, details)} />
      <PhotoClock photo={photo} count={count} onSay={(clockErrorS) => photos.say(photo.key, { clockErrorS })} onSayForAll={(clockErrorS) => photos.photos.forEach((other) => photos.say(other.key, { clockErrorS }))} />
      <div className="flex flex-wrap gap-2.5">
        <Button type="button" look={number === 1 ? 'waiting' : 'outlined'} className="min-h-11" disabled={number === 1} onClick={() => photos.move(photo.key, -1)}>Earlier</Button>
        <Button type="button" look={number === count ? 'waiting' : 'outlined'} className="min-h-11" disabled={number === count} onClick={() => photos.move(photo.key, 1)}>Later</Button>
        <Button type="button" look="outlined" className="ml-auto min-h-11" onClick={() => photos.takeOff(photo.key)}>Take off<span className="sr-only"> photo {number}</span></Button>
      </div>
    </div>
  );
}
