import { readFile } from 'node:fs/promises';
import exifr from 'exifr';
import sharp from 'sharp';
import { expect, test } from 'vitest';
import { copyJpegExif } from '#app/components/report/jpeg-exif.ts';
import { exifOf, exifReading } from '#app/domain/photo-exif.ts';

const file = async (name: string) => new Uint8Array(await readFile(new URL(`../../../../fixtures/photos/${name}`, import.meta.url)));
/** As a canvas writes it: pixels and nothing else. */
const drawn = async () => new Uint8Array(await sharp({ create: { width: 40, height: 30, channels: 3, background: '#b8b4a8' } }).jpeg().toBuffer());

test('a smaller picture keeps what the camera wrote, and is still a picture', async () => {
  const original = await file('with-gps-exif.jpg');
  const smaller = copyJpegExif(original, await drawn());
  // Read by a library that shares nothing with the copying.
  expect(exifOf(await exifr.parse(smaller, exifReading))).toEqual(exifOf(await exifr.parse(original, exifReading)));
  expect(await sharp(smaller).metadata()).toMatchObject({ format: 'jpeg', width: 40, height: 30 });
});

test('the turn that the camera asked for is not asked for twice', async () => {
  const original = await file('rotated-exif6.jpg');
  expect((await sharp(original).metadata()).orientation).toBe(6);
  expect((await sharp(copyJpegExif(original, await drawn())).metadata()).orientation).toBe(1);
});

test.each(['no-exif.png', 'webp.webp', 'zero-byte.jpg', 'text-renamed.jpg'])('%s has nothing to give: the picture stays as it was drawn', async (name) => {
  const plain = await drawn();
  expect(copyJpegExif(await file(name), plain)).toBe(plain);
});

test('a picture that was cut off within its camera data gives none, and does no harm', async () => {
  const original = await file('with-gps-exif.jpg');
  const plain = await drawn();
  for (const length of [3, 10, 30, 60, 100]) expect(copyJpegExif(original.slice(0, length), plain)).toBe(plain);
});
