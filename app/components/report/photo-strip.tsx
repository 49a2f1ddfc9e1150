import { useDropzone } from 'react-dropzone';
import { FieldError } from '#app/components/forms/field.tsx';
import { TwoPartBar } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { photoMimes } from '#app/domain/photo.ts';
import type { ReportField } from './report-fields.ts';
import { useHydrated } from './use-hydrated.ts';
import type { PhotoUpload, PhotoUploads } from './use-photo-uploads.ts';

/** A photo of this report that the team already has. */
export interface StoredPhoto {
  readonly id: string;
  readonly fileName: string;
  readonly state: 'stored' | 'ready' | 'failed';
}

export interface PhotoStripProps {
  readonly field: ReportField;
  readonly clientId: string;
  readonly stored: readonly StoredPhoto[];
  readonly uploads: PhotoUploads;
}

const accepted = photoMimes.join(',');

/** Photos first: the ones the team has, the ones on their way, and one tile to add more. */
export function PhotoStrip({ field, clientId, stored, uploads }: PhotoStripProps) {
  const hydrated = useHydrated();
  const shown = stored.filter((photo) => !uploads.uploads.some((upload) => upload.photoId === photo.id));
  const open = uploads.uploads.filter((upload) => upload.state !== 'stored');
  return (
    <section id="photos" tabIndex={-1} aria-labelledby="photos-heading" className="space-y-3 pb-4">
      <h2 id="photos-heading" className="sr-only">Photos</h2>
      <ul className="grid grid-cols-3 gap-3 tablet:grid-cols-4">
        {shown.map((photo) => <StoredTile key={photo.id} photo={photo} clientId={clientId} />)}
        {uploads.uploads.map((upload, index) => (upload.state === 'refused' ? null : <UploadTile key={upload.key} upload={upload} number={shown.length + index + 1} onTakeOff={() => uploads.takeOff(upload.key)} />))}
        {hydrated ? <li><AddTile onFiles={uploads.add} /></li> : null}
      </ul>
      {hydrated ? null : <PlainPhotoInput />}
      <p className="text-small text-second">Photograph the mark and the whole scene, with something that shows the size. Stay out of the beam. No faces, please.</p>
      <FieldError field={field('photos')} />
      {open.length > 0 ? <UploadLines uploads={open} actions={uploads} /> : null}
    </section>
  );
}

function StoredTile({ photo, clientId }: { readonly photo: StoredPhoto; readonly clientId: string }) {
  return (
    <li className="min-w-0">
      <div className="flex aspect-[3/2] items-center justify-center overflow-hidden bg-wash">
        {photo.state === 'ready'
          ? <img src={`/photos/${photo.id}/thumbnail?report=${clientId}`} alt={photo.fileName} className="h-full w-full object-cover" />
          : <span className="px-2 text-center text-axis text-second">{photo.state === 'failed' ? 'kept; cannot be shown' : 'being prepared'}</span>}
      </div>
      <p className="truncate pt-1 text-axis text-second">{photo.fileName}</p>
      <button type="submit" name="intent" value={`remove-photo:${photo.id}`} formNoValidate className="min-h-6 cursor-pointer text-axis underline decoration-ember decoration-2 underline-offset-4">
        Take off<span className="sr-only"> {photo.fileName}</span>
      </button>
    </li>
  );
}

function UploadTile({ upload, number, onTakeOff }: { readonly upload: PhotoUpload; readonly number: number; readonly onTakeOff: () => void }) {
  return (
    <li className="min-w-0">
      <img src={upload.previewUrl} alt={upload.file.name} className="aspect-[3/2] w-full bg-wash object-cover" />
      <p className="truncate pt-1 text-axis text-second">{upload.state === 'stored' ? 'with the team' : upload.state === 'interrupted' ? 'waits for signal' : 'on its way'}</p>
      {upload.state === 'sending' ? null : <button type="button" onClick={onTakeOff} className="min-h-6 cursor-pointer text-axis underline decoration-ember decoration-2 underline-offset-4">Take off<span className="sr-only"> photo {number}</span></button>}
    </li>
  );
}

function CameraSign() {
  return (
    <svg width="40" height="32" viewBox="0 0 40 32" aria-hidden="true" className="fill-none stroke-ember" strokeWidth="2.2">
      <path d="M2 8h9l4-5h10l4 5h9v21H2Z" />
      <circle cx="20" cy="18" r="7" />
    </svg>
  );
}

/** Press for camera or library, or drop files on it. */
function AddTile({ onFiles }: { readonly onFiles: (files: readonly File[]) => void }) {
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({ onDrop: (files) => onFiles(files), noClick: true, noKeyboard: true });
  return (
    <div {...getRootProps()} className="h-full">
      <input {...getInputProps({ accept: accepted, 'aria-label': 'Photo files' })} />
      <button type="button" onClick={open} className={`flex aspect-[3/2] w-full cursor-pointer flex-col items-center justify-center gap-1 border-2 border-ember font-semibold text-ember ${isDragActive ? 'bg-wash' : ''}`}>
        <CameraSign />
        {isDragActive ? 'Drop here' : 'Add photo'}
      </button>
    </div>
  );
}

/** Without a script: the platform's own field, sent with the form or by its own button. */
function PlainPhotoInput() {
  return (
    <div className="space-y-2">
      <label htmlFor="photo-files" className="block font-semibold">Add photos</label>
      <input type="file" id="photo-files" name="photos" multiple accept={accepted} className="field-box" />
      <Button look="outlined" name="intent" value="add-photos" formNoValidate>Add these photos now</Button>
    </div>
  );
}

const detailOf: Record<PhotoUpload['state'], string> = { waiting: 'waits its turn', sending: 'on its way', stored: 'with the team', refused: 'refused', interrupted: 'no signal; kept in this page' };

/** What is on this phone and what is with the team; a refused file says why. */
function UploadLines({ uploads, actions }: { readonly uploads: readonly PhotoUpload[]; readonly actions: PhotoUploads }) {
  const stuck = uploads.some(({ state }) => state === 'interrupted');
  return (
    <div className="space-y-3" role="status">
      {uploads.map((upload) =>
        upload.state === 'refused' ? (
          <div key={upload.key} className="flex items-start justify-between gap-3 border-l-5 border-ink pl-3">
            <p className="text-small font-semibold">{upload.sentence}</p>
            <Button type="button" look="quiet" onClick={() => actions.takeOff(upload.key)}>Dismiss</Button>
          </div>
        ) : (
          <TwoPartBar key={upload.key} label={upload.file.name} detail={detailOf[upload.state]} sentPart={upload.sentPart} />
        ),
      )}
      {stuck ? <Button type="button" look="outlined" onClick={actions.retry}>Try the photos again</Button> : null}
    </div>
  );
}
