import { useState } from 'react';
import { FieldError } from '#app/components/forms/field.tsx';
import { TwoPartBar } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { KeptPhoto } from './device-store.ts';
import { AddPhotoTile } from './add-photo-tile.tsx';
import { photoDifference } from './photo-difference.ts';
import { PhotoPanel } from './photo-panel.tsx';
import { PlainPhotos } from './plain-photos.tsx';
import { PhotoTile } from './photo-tile.tsx';
import type { ReportField } from './report-fields.ts';
import type { StoredPhoto } from './report-view.ts';
import type { StatedFinding } from './stated-finding.ts';
import type { ReportPhotos } from './use-report-photos.ts';

export interface PhotoStripProps {
  readonly field: ReportField;
  readonly clientId: string;
  /** What the team has, for a page without a script. */
  readonly stored: readonly StoredPhoto[];
  readonly photos: ReportPhotos;
  readonly progress: Readonly<Record<string, number>>;
  /** A script runs, and the device keeps what it is given. */
  readonly keeps: boolean;
  readonly finding: StatedFinding;
  /** Fills a field of the form with what a file says. */
  readonly onUse: (values: Readonly<Record<string, string>>) => void;
}

/** Photos first: each with what is said of it, and one tile to add more. */
export function PhotoStrip({ field, clientId, stored, photos, progress, keeps, finding, onUse }: PhotoStripProps) {
  const [openKey, setOpenKey] = useState<string | null>(null);
  const [smaller, setSmaller] = useState(false);
  const shown = photos.photos.filter((photo) => photo.removedAt === null && photo.state !== 'refused');
  const open = shown.find((photo) => photo.key === openKey);
  const number = (photo: KeptPhoto) => shown.indexOf(photo) + 1;
  return (
    <section id="photos" tabIndex={-1} aria-labelledby="photos-heading" className="space-y-3 pb-4">
      <h2 id="photos-heading" className="sr-only">Photos</h2>
      {keeps ? (
        <ul className="grid grid-cols-[repeat(auto-fill,minmax(6rem,1fr))] gap-3">
          {shown.map((photo) => (
            <PhotoTile key={photo.key} photo={photo} number={number(photo)} src={photos.previewOf(photo)} copy={photos.copyOf(photo)} differs={photoDifference(photo, finding) !== null} open={photo === open} onOpen={() => setOpenKey(photo === open ? null : photo.key)} onMove={(by) => photos.move(photo.key, by)} />
          ))}
          <li><AddPhotoTile onFiles={(files) => void photos.add(files, smaller)} /></li>
        </ul>
      ) : <PlainPhotos stored={stored} clientId={clientId} />}
      {open ? <PhotoPanel key={open.key} photo={open} number={number(open)} count={shown.length} photos={photos} finding={finding} onUse={onUse} onClose={() => setOpenKey(null)} /> : null}
      <p className="text-small text-second">Photograph the mark and the whole scene, with something that shows the size. Stay out of the beam. No faces, please.{keeps && shown.length > 0 ? ' Press a photo to say what it shows.' : ''}</p>
      {keeps ? <SmallerChoice chosen={smaller} onChange={setSmaller} /> : null}
      <FieldError field={field('photos')} />
      <Lines photos={photos} shown={shown} progress={progress} />
    </section>
  );
}

function SmallerChoice({ chosen, onChange }: { readonly chosen: boolean; readonly onChange: (chosen: boolean) => void }) {
  return (
    <label className="flex min-h-11 items-center gap-3">
      <input type="checkbox" className="tick-box" checked={chosen} onChange={(event) => onChange(event.currentTarget.checked)} />
      <span>Make the next photos smaller for sending<span className="block text-axis text-second">Left open, they go as the camera made them, which shows most.</span></span>
    </label>
  );
}

/** What is on this phone and what is with the team; what was taken off and can be taken back; a refused file says why. */
function Lines({ photos, shown, progress }: { readonly photos: ReportPhotos; readonly shown: readonly KeptPhoto[]; readonly progress: Readonly<Record<string, number>> }) {
  const waiting = shown.filter((photo) => photo.state === 'waiting');
  return (
    <div className="space-y-3 empty:hidden" role="status">
      {waiting.map((photo) => {
        const part = progress[photo.key] ?? 0;
        return <TwoPartBar key={photo.key} label={`Photo ${shown.indexOf(photo) + 1}`} detail={part > 0 && part < 1 ? `on its way, ${Math.round(part * 100)} %` : 'on this phone'} sentPart={part} />;
      })}
      {photos.roomless ? <p className="text-small font-semibold">This device has no room to keep a photo. Leave this page open until it is with the team.</p> : null}
      {photos.photos.filter((photo) => photo.state === 'refused').map((photo) => (
        <div key={photo.key} className="flex items-start justify-between gap-3 border-l-5 border-ink pl-3">
          <p className="text-small font-semibold">{photo.sentence}</p>
          <Button type="button" look="quiet" className="min-h-11" onClick={() => photos.dismiss(photo.key)}>Dismiss</Button>
        </div>
      ))}
      {photos.photos.filter((photo) => photo.removedAt !== null).map((photo) => (
        <div key={photo.key} className="flex items-center justify-between gap-3 border-t border-hair">
          <p className="min-w-0 truncate text-small">Taken off: {photo.details.caption || photo.fileName}</p>
          <Button type="button" look="quiet" className="min-h-11 flex-none" onClick={() => photos.takeBack(photo.key)}>Undo<span className="sr-only">: put {photo.fileName} back</span></Button>
        </div>
      ))}
    </div>
  );
}
