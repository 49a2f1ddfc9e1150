import { differenceWords } from '#app/domain/photo-view.ts';
import { exifInstant } from '#app/domain/photo.ts';
import type { KeptPhoto } from './device-store.ts';
import type { StatedFinding } from './stated-finding.ts';

/** Said when the time in the file, corrected for the camera's clock, and the stated finding lie more than 30 minutes apart. */
export function photoDifference({ exif, details }: Pick<KeptPhoto, 'exif' | 'details'>, { zone, foundAt }: StatedFinding): string | null {
  // A time that the person called wrong is not held against the finding.
  if (!zone || details.timeAnswer === 'declined') return null;
  return differenceWords({ takenAt: exifInstant(exif, zone), clockErrorS: details.clockErrorS }, { zone, foundAt, foundClockErrorS: 0 });
}
