import type { PhotoDetails } from '#app/domain/photo-details.ts';
import { exifAnswerOf } from '#app/domain/photo-details.ts';

/** What a person said of a photo of their report, as it stands in its row. */
export function detailColumns(details: PhotoDetails, at: Date) {
  const { position, view, caption, clockErrorS } = details;
  return { position, view, caption, clockErrorS, exifAnswer: exifAnswerOf(details, at.toISOString()) };
}
