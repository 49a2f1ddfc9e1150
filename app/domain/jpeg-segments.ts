/**
 * Segments of a JPEG that carry anything besides the picture. Markers: ISO/IEC 10918-1, table B.1; APP0 with "JFIF" is
 * the plain header of ISO/IEC 10918-5. All other application segments and comments may hold camera, time, place or words.
 *
 * @returns Names of such segments, empty for a clean picture; `['not a JPEG']` when the bytes are something else.
 */
export function foreignJpegSegments(bytes: Uint8Array): readonly string[] {
  if (bytes[0] !== 0xff || bytes[1] !== 0xd8) return ['not a JPEG'];
  const found: string[] = [];
  let at = 2;
  while (at + 4 <= bytes.length) {
    if (bytes[at] !== 0xff) return [...found, 'bytes outside any segment'];
    const marker = bytes[at + 1] ?? 0;
    if (marker === 0xff) {
      at += 1;
      continue;
    }
    // Start of the picture itself; what follows it is checked below.
    if (marker === 0xda) break;
    const length = ((bytes[at + 2] ?? 0) << 8) | (bytes[at + 3] ?? 0);
    if (marker >= 0xe0 && marker <= 0xef && !isPlainHeader(bytes, at, marker)) found.push(`APP${marker - 0xe0}`);
    if (marker === 0xfe) found.push('comment');
    at += 2 + length;
  }
  return [...found, ...(endsWithPicture(bytes) ? [] : ['bytes after the picture'])];
}

function isPlainHeader(bytes: Uint8Array, at: number, marker: number): boolean {
  const length = ((bytes[at + 2] ?? 0) << 8) | (bytes[at + 3] ?? 0);
  // Longer than this and the header holds a thumbnail.
  return marker === 0xe0 && length === 16 && String.fromCharCode(...bytes.subarray(at + 4, at + 8)) === 'JFIF';
}

const endsWithPicture = (bytes: Uint8Array): boolean => bytes.at(-2) === 0xff && bytes.at(-1) === 0xd9;
