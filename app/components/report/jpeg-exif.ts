/** Markers and segments: ISO/IEC 10918-1 Annex B; the Exif segment: CIPA DC-008 (Exif 2.32), 4.5.4 and 4.6.2. */
const startOfImage = 0xffd8;
const appOne = 0xffe1;
const startOfScan = 0xffda;
const orientationTag = 0x0112;
const exifName = [0x45, 0x78, 0x69, 0x66, 0, 0];

const viewOf = (bytes: Uint8Array) => new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);

/** The Exif segment of a JPEG with its marker, or null. */
function exifSegment(jpeg: Uint8Array): Uint8Array | null {
  const view = viewOf(jpeg);
  if (jpeg.byteLength < 4 || view.getUint16(0) !== startOfImage) return null;
  for (let at = 2; at + 4 <= jpeg.byteLength; ) {
    const marker = view.getUint16(at);
    if (marker < 0xff00 || marker === startOfScan) return null;
    const end = at + 2 + view.getUint16(at + 2);
    if (end > jpeg.byteLength) return null;
    if (marker === appOne && exifName.every((byte, index) => jpeg[at + 4 + index] === byte)) return jpeg.slice(at, end);
    at = end;
  }
  return null;
}

/** The drawn picture stands upright already: the turn that the camera asked for must not be made twice. */
function setUpright(segment: Uint8Array): void {
  const tiff = new DataView(segment.buffer, segment.byteOffset + 10, segment.byteLength - 10);
  const little = tiff.getUint16(0) === 0x4949;
  const directory = tiff.getUint32(4, little);
  if (directory + 2 > tiff.byteLength) return;
  const entries = tiff.getUint16(directory, little);
  for (let index = 0; index < entries; index += 1) {
    const at = directory + 2 + index * 12;
    if (at + 12 > tiff.byteLength) return;
    if (tiff.getUint16(at, little) === orientationTag) tiff.setUint16(at + 8, 1, little);
  }
}

/** The second JPEG with the camera data of the first, its turn taken out; the second as it is when the first has none. */
export function copyJpegExif(from: Uint8Array, to: Uint8Array<ArrayBuffer>): Uint8Array<ArrayBuffer> {
  const segment = exifSegment(from);
  if (!segment) return to;
  setUpright(segment);
  const joined = new Uint8Array(to.byteLength + segment.byteLength);
  joined.set(to.subarray(0, 2));
  joined.set(segment, 2);
  joined.set(to.subarray(2), 2 + segment.byteLength);
  return joined;
}
