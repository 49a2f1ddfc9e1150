import { createRequire } from 'node:module';
import type PDFDocument from 'pdfkit';

export type Doc = InstanceType<typeof PDFDocument>;
/** Faces of the printed report, by use. */
export const faces = { plain: 'plain', strong: 'strong', serif: 'serif', serifStrong: 'serif-strong' } as const;

const files: Record<string, string> = {
  [faces.plain]: '@expo-google-fonts/noto-sans/400Regular/NotoSans_400Regular.ttf',
  [faces.strong]: '@expo-google-fonts/noto-sans/600SemiBold/NotoSans_600SemiBold.ttf',
  [faces.serif]: '@expo-google-fonts/noto-serif/400Regular/NotoSerif_400Regular.ttf',
  [faces.serifStrong]: '@expo-google-fonts/noto-serif/600SemiBold/NotoSerif_600SemiBold.ttf',
};
const { resolve } = createRequire(import.meta.url);

/** Noto Sans and Noto Serif, whole files that ship with the application; only the signs in use go into the print. */
export function registerFaces(doc: Doc): void {
  for (const [face, file] of Object.entries(files)) doc.registerFont(face, resolve(file));
}

/** Signs that the faces lack, in words. */
const inWords: Readonly<Record<string, string>> = { '≥': 'at least ', '≤': 'at most ', '→': ' to ', '←': ' from ', '√': 'root of ', '≈': 'about ', '∞': 'without end', '⌀': 'diameter ' };

/** Whether the face that is set now has a sign for each character; `font` is the embedded font of the library. */
function hasGlyph(doc: Doc, codePoint: number): boolean {
  const inner: unknown = Reflect.get(doc, '_font');
  const font: unknown = typeof inner === 'object' && inner !== null ? Reflect.get(inner, 'font') : null;
  if (typeof font !== 'object' || font === null || !('hasGlyphForCodePoint' in font) || typeof font.hasGlyphForCodePoint !== 'function') return true;
  return font.hasGlyphForCodePoint(codePoint) === true;
}

/**
 * The text with every sign that the face cannot print in words, or as its number in Unicode, so that nothing is lost
 * without a trace. Tabs and control characters become blanks.
 */
export function printable(doc: Doc, text: string): string {
  return [...text.normalize('NFC')]
    .map((sign) => {
      const codePoint = sign.codePointAt(0) ?? 32;
      if (sign === '\n') return sign;
      if (codePoint < 32 || codePoint === 127) return ' ';
      if (hasGlyph(doc, codePoint)) return sign;
      return inWords[sign] ?? `[U+${codePoint.toString(16).toUpperCase().padStart(4, '0')}]`;
    })
    .join('');
}
