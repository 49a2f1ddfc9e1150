import { redirect } from 'react-router';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { noDetails, photoDetailsSchema } from '#app/domain/photo-details.ts';
import { photoRefusal, showableFileName } from '#app/domain/photo.ts';
import { readReceipt } from '#app/domain/report-receipt.ts';
import type { Actor } from '#app/domain/roles.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import type { UploadedFile } from '#app/http/multipart-form.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { addPhotoByReceipt } from '#app/services/photos/add-photo-by-receipt.server.ts';
import { db } from '#db/client.server.ts';
import { findCaseByReceipt } from '#db/queries/reports.server.ts';

/** Files wait in memory until the form has said what they show, so only a few are taken at once. */
const photosAtOnce = 6;

interface Posted {
  readonly request: Request;
  /** The receipt as it stands in the address, so that a wrong one is refused before any bytes are read. */
  readonly code: string;
  readonly actor: Actor | null;
  readonly address: string;
}

/** Takes the photos that whoever holds a receipt posts from the page of its progress. */
export async function receivePhotos({ request, code, actor, address }: Posted) {
  await limitReporting('photo', actor ? { kind: 'person', actor } : null, address);
  const receipt = readReceipt(code);
  // The page itself says what is wrong with the receipt.
  if (!receipt || !(await findCaseByReceipt(db, receipt))) return formProblem('photos', new FormData(), {}, 404);
  const files: UploadedFile[] = [];
  const refused: string[] = [];
  const form = await readForm(request, (file) => {
    if (file.fieldName === 'photos' && files.length < photosAtOnce) files.push(file);
    else if (file.fieldName === 'photos') refused.push(photoRefusal.tooManyAtOnce(showableFileName(file.name), photosAtOnce));
    return Promise.resolve();
  });
  const { view } = photoDetailsSchema.parse({ ...noDetails, view: form.get('view') });
  let stored = 0;
  try {
    for (const file of files) {
      const outcome = await addPhotoByReceipt({ receipt, actor, file, view });
      if (outcome.ok) stored += 1;
      else refused.push(outcome.sentence);
    }
  } catch (error) {
    return problemFromError('photos', form, error);
  }
  if (refused.length > 0) return formProblem('photos', form, { fieldErrors: { photos: [...refused, stored > 0 ? 'The others are stored.' : 'Nothing was stored.'] } });
  if (stored === 0) return formProblem('photos', form, { fieldErrors: { photos: ['Choose one photo or more first.'] } });
  return redirect(`/progress?code=${receipt}&photos=stored#photos`, 303);
}
