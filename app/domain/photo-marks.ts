import { z } from 'zod';
import { plainText } from './incident.ts';

/** Marks that a person drew over a photo, as a layer of their own. Places are parts of width and height, from the upper left corner. */
export type PhotoMark =
  | { readonly kind: 'arrow'; readonly fromX: number; readonly fromY: number; readonly toX: number; readonly toY: number; readonly words: string }
  | { readonly kind: 'circle'; readonly x: number; readonly y: number; readonly radius: number; readonly words: string }
  | { readonly kind: 'text'; readonly x: number; readonly y: number; readonly words: string };

export const photoMarkKinds = ['arrow', 'circle', 'text'] as const;
export type PhotoMarkKind = (typeof photoMarkKinds)[number];
export const photoMarkLabels: Record<PhotoMarkKind, string> = { arrow: 'Arrow', circle: 'Circle', text: 'Text' };

export const marksPerPhoto = 40;
const wordsLength = 80;

const share = z
  .string('Write a number from 0 to 100.')
  .trim()
  .min(1, 'Write a number from 0 to 100.')
  .transform((text) => Number(text.replace(',', '.')))
  .pipe(z.number('Write a number from 0 to 100.').min(0, 'From 0 to 100 per cent.').max(100, 'From 0 to 100 per cent.'))
  .transform((percent) => Math.round(percent * 100) / 10_000);
const words = plainText(wordsLength);

/** A mark as typed, in per cent of width and height. The radius of a circle is in per cent of the width. */
export const photoMarkSchema = z.discriminatedUnion('markKind', [
  z
    .object({ markKind: z.literal('arrow'), x: share, y: share, toX: share, toY: share, words: words.default('') })
    .refine((arrow) => Math.hypot(arrow.toX - arrow.x, arrow.toY - arrow.y) >= 0.01, { path: ['toX'], message: 'The arrow ends where it begins. Move its point.' })
    .transform((arrow): PhotoMark => ({ kind: 'arrow', fromX: arrow.x, fromY: arrow.y, toX: arrow.toX, toY: arrow.toY, words: arrow.words })),
  z
    .object({ markKind: z.literal('circle'), x: share, y: share, radius: share, words: words.default('') })
    .refine((circle) => circle.radius >= 0.005, { path: ['radius'], message: 'A circle needs a radius of half a per cent or more.' })
    .transform((circle): PhotoMark => ({ kind: 'circle', x: circle.x, y: circle.y, radius: circle.radius, words: circle.words })),
  z
    .object({ markKind: z.literal('text'), x: share, y: share, words: words.pipe(z.string().min(1, 'Write the words that are to stand on the photo.')) })
    .transform((text): PhotoMark => ({ kind: 'text', x: text.x, y: text.y, words: text.words })),
]);

const percent = (part: number) => String(Math.round(part * 1000) / 10);

/** The mark in words, for the list under the photo and for those who cannot see it. */
export function markWords(mark: PhotoMark): string {
  const said = mark.words ? `, “${mark.words}”` : '';
  if (mark.kind === 'arrow') return `Arrow from ${percent(mark.fromX)}, ${percent(mark.fromY)} to ${percent(mark.toX)}, ${percent(mark.toY)} %${said}`;
  if (mark.kind === 'circle') return `Circle round ${percent(mark.x)}, ${percent(mark.y)} %, radius ${percent(mark.radius)} % of the width${said}`;
  return `Text at ${percent(mark.x)}, ${percent(mark.y)} %${said}`;
}
