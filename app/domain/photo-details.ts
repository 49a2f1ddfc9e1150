import { z } from 'zod';
import { photoViews, plainText } from './incident.ts';
import { clockErrorSchema } from './photo.ts';
import type { PhotoExifAnswer } from './photo.ts';

const offerAnswer = z.enum(['accepted', 'declined']).nullable().catch(null);

/**
 * What the person says of a photo of a report under way. It is kept on the phone and sent with the photo, and again when
 * it changes.
 */
export const photoDetailsSchema = z.object({
  /** Place in the order of the photos, from 0. */
  position: z.int().min(0).max(1_000).nullable().catch(null),
  view: z.enum(photoViews).nullable().catch(null),
  caption: plainText(300).catch(({ input }) => String(input).slice(0, 300)),
  /** How far the camera's clock was ahead of true time; negative: behind. [s] */
  clockErrorS: clockErrorSchema.catch(0),
  /** What was answered to the time and the place that stand in the file. */
  timeAnswer: offerAnswer,
  placeAnswer: offerAnswer,
  /** The phone made the photo smaller, because the person asked for it: this file is not the camera's own. */
  madeSmaller: z.boolean().catch(false),
});
export type PhotoDetails = z.infer<typeof photoDetailsSchema>;

export const noDetails: PhotoDetails = { position: null, view: null, caption: '', clockErrorS: 0, timeAnswer: null, placeAnswer: null, madeSmaller: false };

/** Details as they travel ahead of their photo; whatever cannot be read counts as not said. */
export function readPhotoDetails(json: string): PhotoDetails {
  try {
    const read = photoDetailsSchema.safeParse({ ...noDetails, ...z.looseObject({}).parse(JSON.parse(json)) });
    return read.success ? read.data : noDetails;
  } catch {
    // Not JSON: nothing is said of the photo then, and the photo itself is kept all the same.
    return noDetails;
  }
}

/** Names of the fields that say something of one photo in a form without a script. */
export const photoFieldNames = (photoId: string) => ({ view: `photoView.${photoId}`, caption: `photoCaption.${photoId}` });

const photoField = /^photo(?:View|Caption)\.(.+)$/u;

/** What a form without a script says of the photos that are with the team. */
export function readPhotoFields(typed: Readonly<Record<string, string>>): { photoId: string; view: PhotoDetails['view']; caption: string }[] {
  const ids = new Set(Object.keys(typed).flatMap((name) => photoField.exec(name)?.[1] ?? []).filter((id) => z.uuid().safeParse(id).success));
  return [...ids].map((photoId) => {
    const names = photoFieldNames(photoId);
    const { view, caption } = photoDetailsSchema.parse({ ...noDetails, view: typed[names.view], caption: typed[names.caption] ?? '' });
    return { photoId, view, caption };
  });
}

/** @param at when the person answered, ISO; null when they did not. */
export const exifAnswerOf = (details: Pick<PhotoDetails, 'timeAnswer' | 'placeAnswer'>, at: string): PhotoExifAnswer => ({
  time: details.timeAnswer,
  place: details.placeAnswer,
  answeredAt: details.timeAnswer || details.placeAnswer ? at : null,
});
