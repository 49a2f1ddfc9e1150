import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { photoViewLabels, photoViews } from '#app/domain/incident.ts';
import { photoFieldNames } from '#app/domain/photo-details.ts';
import { photoFileTypes } from '#app/domain/photo.ts';
import type { StoredPhoto } from './report-view.ts';

/** Without a script, or where the device keeps nothing: the platform's own field, sent with the form or by its own button. */
export function PlainPhotos({ stored, clientId }: { readonly stored: readonly StoredPhoto[]; readonly clientId: string }) {
  return (
    <>
      <ul className="space-y-4">{stored.map((photo) => <PlainPhoto key={photo.id} photo={photo} clientId={clientId} />)}</ul>
      <div className="space-y-2">
        <label htmlFor="photo-files" className="block font-semibold">Add photos</label>
        <input type="file" id="photo-files" name="photos" multiple accept={photoFileTypes} className="field-box" />
        <Button look="outlined" name="intent" value="add-photos" formNoValidate>Add these photos now</Button>
      </div>
    </>
  );
}

function PlainPhoto({ photo, clientId }: { readonly photo: StoredPhoto; readonly clientId: string }) {
  const names = photoFieldNames(photo.id);
  return (
    <li className="grid grid-cols-[7.5rem_1fr] gap-3">
      <div className="min-w-0">
        <div className="flex aspect-[3/2] items-center justify-center overflow-hidden bg-wash">
          {photo.state === 'ready'
            ? <img src={`/photos/${photo.id}/thumbnail?report=${clientId}`} alt={photo.caption || photo.fileName} className="h-full w-full object-cover" />
            : <span className="px-2 text-center text-axis text-second">{photo.state === 'failed' ? 'kept; cannot be shown' : 'being prepared'}</span>}
        </div>
        <p className="truncate pt-1 text-axis text-second">{photo.fileName}</p>
        <button type="submit" name="intent" value={`remove-photo:${photo.id}`} formNoValidate className="min-h-11 cursor-pointer text-small underline decoration-ember decoration-2 underline-offset-4">
          Take off<span className="sr-only"> {photo.fileName}</span>
        </button>
      </div>
      <div className="space-y-2">
        <Select field={{ name: names.view, id: names.view, errors: undefined, defaultValue: photo.view ?? '' }} label="What kind of view?" emptyLabel="Not said" options={photoViews.map((value) => ({ value, label: photoViewLabels[value] }))} />
        <TextInput field={{ name: names.caption, id: names.caption, errors: undefined, defaultValue: photo.caption }} label="What does it show?" help="No names." maxLength={300} autoComplete="off" />
      </div>
    </li>
  );
}
