import { useDropzone } from 'react-dropzone';
import { photoFileTypes } from '#app/domain/photo.ts';

function CameraSign() {
  return (
    <svg width="40" height="32" viewBox="0 0 40 32" aria-hidden="true" className="fill-none stroke-ember" strokeWidth="2.2">
      <path d="M2 8h9l4-5h10l4 5h9v21H2Z" />
      <circle cx="20" cy="18" r="7" />
    </svg>
  );
}

/** Press for camera or gallery, or drop files on it. Several at once are welcome. */
export function AddPhotoTile({ onFiles }: { readonly onFiles: (files: readonly File[]) => void }) {
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({ onDrop: (files) => onFiles(files), noClick: true, noKeyboard: true });
  return (
    <div {...getRootProps()} className="h-full">
      <input {...getInputProps({ accept: photoFileTypes, 'aria-label': 'Photo files' })} />
      <button type="button" onClick={open} className={`flex aspect-[3/2] w-full cursor-pointer flex-col items-center justify-center gap-1 border-2 border-ember font-semibold text-ember ${isDragActive ? 'bg-wash' : ''}`}>
        <CameraSign />
        {isDragActive ? 'Drop here' : 'Add photo'}
      </button>
    </div>
  );
}
